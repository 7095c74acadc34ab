package main

import (
	"context"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"flankwright/export/dxf"
	"flankwright/export/files"
	"flankwright/export/sheet"
	"flankwright/export/sidecar"
	"flankwright/export/svg"
)

// output is where results go.
type output struct {
	paths []string // drawings, in the order given
	json  bool
	quiet bool
	from  string
}

// readOutput reads the flags that do not change what is made.
func readOutput(req request) (output, error) {
	r := newReader(req)
	o := output{paths: req.values["output"], json: r.on("json"), quiet: r.on("quiet")}
	o.from, _ = r.value("from")
	for _, path := range o.paths {
		switch formatOf(path) {
		case "dxf", "svg":
		case "json":
			r.fail("output", path, "the sidecar is written by itself", "name a .dxf or .svg file; its sidecar takes the same base name")
		default:
			r.fail("output", path, "the ending says the format, and this one is unknown", "end the name in .dxf or .svg")
		}
	}
	if r.found == nil && o.from != "" {
		for _, path := range append([]string{o.sidecar()}, o.paths...) {
			if sameFile(path, o.from) {
				r.fail("output", path, "would overwrite the input "+o.from, "choose another name")
			}
		}
	}
	if r.found != nil {
		return output{}, r.found
	}
	return o, nil
}

// sameFile says whether two paths lead to one file, or would.
func sameFile(a, b string) bool {
	infoA, errA := os.Stat(a)
	infoB, errB := os.Stat(b)
	if errA == nil && errB == nil {
		return os.SameFile(infoA, infoB)
	}
	absA, errA := filepath.Abs(a)
	absB, errB := filepath.Abs(b)
	return errA == nil && errB == nil && absA == absB
}

// setFailed says why files were not written. Two names for one file are a mistake
// of the request, all else one of the place it names.
func setFailed(err error) error {
	p := problem{flag: "output", message: err.Error(), exit: exitFailed,
		hint: "check that the folder exists and can be written; nothing was left half written"}
	var failure *files.Error
	if errors.As(err, &failure) && failure.Rule == files.RuleDuplicate {
		p.exit, p.hint = exitMalformed, "give each drawing a name of its own"
	}
	return problems{p}
}

// formatOf is the format a path's ending names.
func formatOf(path string) string {
	return strings.ToLower(strings.TrimPrefix(filepath.Ext(path), "."))
}

// sidecar is the path of the sidecar: the first drawing's with another ending; ""
// without drawings.
func (o output) sidecar() string {
	if len(o.paths) == 0 {
		return ""
	}
	first := o.paths[0]
	return strings.TrimSuffix(first, filepath.Ext(first)) + ".json"
}

// deliver writes the files, if any, and prints what was asked for.
func (o output) deliver(ctx context.Context, io streams, m *partMade) error {
	set, err := o.render(m, new(pages))
	if err != nil {
		return err
	}
	document, err := m.doc.Marshal()
	if err != nil {
		return problems{{message: "the sidecar cannot be written: " + err.Error(), exit: exitFailed}}
	}
	if len(set) > 0 {
		set = append(set, files.File{Name: o.sidecar(), Data: document})
		if err := files.WriteSet(ctx, files.Options{}, set...); err != nil {
			return setFailed(err)
		}
	}
	if !o.quiet {
		warn(io.err, m.warnings, sidecar.Show(m.part.Unit))
	}
	switch {
	case o.json:
		_, err := io.out.Write(document)
		return writeFailed("stdout", err)
	case o.quiet:
		return nil
	case len(set) == 0:
		return printTable(io.out, m)
	}
	return o.printFiles(io, m, set)
}

// render makes the bytes of the drawings, in the memory of p, and enters them in the
// sidecar.
func (o output) render(m *partMade, p *pages) ([]files.File, error) {
	var formats []string
	for _, path := range o.paths {
		formats = append(formats, formatOf(path))
	}
	next := 0
	return renderAll(m, p, formats, func(int, string) string { next++; return o.paths[next-1] })
}

// renderSheets makes the bytes of a product's drawings in each format, named by their
// base names.
func renderSheets(m product, p *pages, formats []string, base func(sheet int) string) ([]files.File, error) {
	return renderAll(m, p, formats, func(i int, format string) string { return base(i) + "." + format })
}

func renderAll(m product, p *pages, formats []string, name func(sheet int, format string) string) ([]files.File, error) {
	var set []files.File
	if len(formats) == 0 {
		return nil, nil
	}
	doc := m.document()
	for i, s := range m.sheets() {
		if err := p.sheet.Set(s.drawing); err != nil {
			return nil, drawingFailed(name(i, formats[0]), err)
		}
		for _, format := range formats {
			path := name(i, format)
			memory := p.drawing(len(set))
			data, err := s.write((*memory)[:0], &p.sheet, format)
			if err != nil {
				return nil, drawingFailed(path, err)
			}
			*memory = data
			set = append(set, files.File{Name: path, Data: data})
			doc.Files = append(doc.Files, described(files.File{Name: path, Data: data}))
		}
	}
	return set, nil
}

// drawingFailed says why a drawing cannot be written.
func drawingFailed(path string, err error) error {
	p := problem{flag: "output", value: path, message: err.Error(), exit: exitGeometry}
	var failure *sheet.Error
	if errors.As(err, &failure) && failure.Rule == sheet.RulePrecision {
		p.hint = "draw so large a part with --curves arcs and without --loose"
	}
	return problems{p}
}

// write appends the sheet in the format.
func (o sheetOf) write(dst []byte, s *sheet.Sheet, format string) ([]byte, error) {
	if format == "svg" {
		return svg.AppendSheet(dst, s, svg.Options{})
	}
	return dxf.AppendSheet(dst, s, o.dxf)
}

// printFiles reports what was written, with the size to check after import.
func (o output) printFiles(io streams, m *partMade, set []files.File) error {
	var b strings.Builder
	fmt.Fprintln(&b, m.title())
	for _, f := range set {
		fmt.Fprintf(&b, "wrote %s, %d bytes\n", f.Name, len(f.Data))
	}
	for _, line := range m.reportLines() {
		fmt.Fprintln(&b, line)
	}
	_, err := io.out.Write([]byte(b.String()))
	return writeFailed("stdout", err)
}
