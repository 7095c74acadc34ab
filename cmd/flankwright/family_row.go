package main

import (
	"bytes"
	"context"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"errors"
	"io"
	"path/filepath"
	"sync"

	"flankwright/export/files"
	"flankwright/export/sidecar"
)

// rowWriter makes rows and writes their files. It is used by all workers at once.
type rowWriter struct {
	*family
	folder *files.Folder
	gate   *gate     // nil unless the first bad row ends the run
	memory sync.Pool // of *pages
}

// make makes one row.
func (w *rowWriter) make(ctx context.Context, row tableRow) rowResult {
	r := rowResult{row: row}
	memory, ok := w.memory.Get().(*pages)
	if !ok {
		memory = new(pages)
	}
	defer w.memory.Put(memory)
	made, err := w.prepare(&r, memory)
	if err != nil {
		var found problems
		if !errors.As(err, &found) {
			found = problems{malformed(err)}
		}
		r.found = w.placed(row, found)
	}
	if w.gate != nil && !w.gate.pass(ctx, row.Number, r.found == nil) {
		r.stopped = r.found == nil || ctx.Err() != nil
		return r
	}
	if ctx.Err() != nil {
		r.stopped = true
	}
	if r.stopped || r.found != nil || r.skipped {
		return r
	}
	r.listed, err = w.write(ctx, row, made, memory)
	switch {
	case err != nil && ctx.Err() != nil:
		r.stopped = true
	case err != nil:
		r.err = setFailed(err)
	}
	return r
}

// prepare makes the drawing of a row, unless it is there already.
func (w *rowWriter) prepare(r *rowResult, memory *pages) (*rendered, error) {
	if r.row.found != nil {
		return nil, r.row.found
	}
	job, err := r.row.form.resolve(r.row.request)
	if err != nil {
		return nil, err
	}
	if w.resume {
		if r.listed, r.skipped = w.standing(r.row, job); r.skipped {
			return nil, nil
		}
	}
	made, err := job.make()
	if err != nil {
		return nil, err
	}
	o := output{}
	for _, format := range w.formats {
		o.paths = append(o.paths, r.row.name+"."+format)
	}
	set, err := o.render(made, memory)
	if err != nil {
		return nil, err
	}
	return &rendered{made.document, set}, nil
}

// rendered is a row as bytes, but for its sidecar.
type rendered struct {
	document *sidecar.Document
	set      []files.File
}

// write writes the files of a row.
func (w *rowWriter) write(ctx context.Context, row tableRow, made *rendered, memory *pages) (sidecar.FamilyRow, error) {
	text, err := made.document.Append(memory.sidecar[:0])
	if err != nil {
		return sidecar.FamilyRow{}, err
	}
	memory.sidecar = text
	own := files.File{Name: row.name + ".json", Data: text}
	if err := w.folder.WriteSet(ctx, append(made.set, own)...); err != nil {
		return sidecar.FamilyRow{}, err
	}
	return made.document.FamilyRow(row.Line, row.name, row.form.name, described(own)), nil
}

// described is a file as sidecars and lists describe it.
func described(f files.File) sidecar.File {
	sum := sha256.Sum256(f.Data)
	return sidecar.File{Name: filepath.Base(f.Name), Format: formatOf(f.Name), Bytes: len(f.Data), SHA256: hex.EncodeToString(sum[:])}
}

// standing says whether the files of a row are there: a sidecar of the same request and
// program, and every file it tells of with the sum it tells.
func (w *rowWriter) standing(row tableRow, j job) (listed sidecar.FamilyRow, ok bool) {
	text, err := w.read(row.name+".json", largestSidecar)
	if err != nil {
		return listed, false
	}
	doc, err := sidecar.Read(text)
	if err != nil || doc.Program != program() || len(doc.Files) != len(w.formats) || !sameInput(doc.Input, j.normalized()) {
		return listed, false
	}
	for i, f := range doc.Files {
		if f.Name != row.name+"."+w.formats[i] || f.Format != w.formats[i] {
			return listed, false
		}
		data, err := w.read(f.Name, f.Bytes)
		if err != nil || described(files.File{Name: f.Name, Data: data}) != f {
			return listed, false
		}
	}
	return doc.FamilyRow(row.Line, row.name, row.form.name, described(files.File{Name: row.name + ".json", Data: text})), true
}

// read is a file of the folder, of at most so many bytes and one more.
func (w *rowWriter) read(name string, most int) ([]byte, error) {
	file, err := w.folder.Open(name)
	if err != nil {
		return nil, err
	}
	defer file.Close()
	return io.ReadAll(io.LimitReader(file, int64(most)+1))
}

// sameInput compares normalized requests, one of which was read from JSON.
func sameInput(a, b map[string]any) bool {
	textA, errA := json.Marshal(a)
	textB, errB := json.Marshal(b)
	return errA == nil && errB == nil && bytes.Equal(textA, textB)
}
