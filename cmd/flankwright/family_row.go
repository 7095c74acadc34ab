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

// rowMaker makes rows. It is used by all workers at once.
type rowMaker struct {
	*family
	folder *files.Folder
	memory sync.Pool // of *pages
}

// make makes one row, up to its bytes.
func (w *rowMaker) make(row tableRow) rowResult {
	r := rowResult{row: row}
	memory, ok := w.memory.Get().(*pages)
	if !ok {
		memory = new(pages)
	}
	set, err := w.prepare(&r, memory)
	if err == nil && set != nil {
		r.set, r.memory = set, memory
		return r
	}
	w.memory.Put(memory)
	if err != nil {
		var found problems
		if !errors.As(err, &found) {
			found = problems{malformed(err)}
		}
		r.found = w.placed(row, found)
	}
	return r
}

// prepare makes the files of a row and what is listed of it; no files if they are there
// already.
func (w *rowMaker) prepare(r *rowResult, memory *pages) ([]files.File, error) {
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
	set, err := renderSheets(made, memory, w.formats, func(i int) string { return r.row.name + r.row.form.suffixes[i] })
	if err != nil {
		return nil, err
	}
	text, err := made.document().Append(memory.sidecar[:0])
	if err != nil {
		return nil, err
	}
	memory.sidecar = text
	own := files.File{Name: r.row.name + ".json", Data: text}
	r.listed = made.document().FamilyRow(r.row.Line, r.row.name, r.row.form.name, described(own))
	return append(set, own), nil
}

// write writes the files of a row, and gives its memory back.
func (w *rowMaker) write(ctx context.Context, r *rowResult) error {
	defer w.memory.Put(r.memory)
	return w.folder.WriteSet(ctx, r.set...)
}

// described is a file as sidecars and lists describe it.
func described(f files.File) sidecar.File {
	sum := sha256.Sum256(f.Data)
	return sidecar.File{Name: filepath.Base(f.Name), Format: formatOf(f.Name), Bytes: len(f.Data), SHA256: hex.EncodeToString(sum[:])}
}

// standing says whether the files of a row are there: a sidecar of the same request and
// program, and every file it tells of with the sum it tells.
func (w *rowMaker) standing(row tableRow, j job) (listed sidecar.FamilyRow, ok bool) {
	text, err := w.read(row.name+".json", largestSidecar)
	if err != nil {
		return listed, false
	}
	doc, err := sidecar.Read(text)
	if err != nil || doc.Program != program() || !sameInput(doc.Input, j.normalized()) {
		return listed, false
	}
	var names []string
	for _, suffix := range row.form.suffixes {
		for _, format := range w.formats {
			names = append(names, row.name+suffix+"."+format)
		}
	}
	if len(doc.Files) != len(names) {
		return listed, false
	}
	for i, f := range doc.Files {
		if f.Name != names[i] || f.Format != formatOf(f.Name) {
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
func (w *rowMaker) read(name string, most int) ([]byte, error) {
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
