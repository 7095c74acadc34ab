package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"runtime/debug"

	"flankwright/export"
	"flankwright/export/files"
	"flankwright/export/sidecar"
)

// rowResult is what became of a row.
type rowResult struct {
	row     tableRow
	set     []files.File // nil if the row could not be made, or was there already
	memory  *pages       // of the set
	listed  sidecar.FamilyRow
	found   problems // why the row could not be made
	skipped bool     // it was there already
}

// tally counts what became of the rows.
type tally struct{ written, skipped, failed int }

// garbagePercent lets the heap grow to several times what lives: rows leave large
// buffers behind and little else, so that collecting them often would cost a tenth of
// the time.
const garbagePercent = 800

// run makes the rows and lists them. The lists are written last.
func (f *family) run(ctx context.Context, io streams) error {
	defer debug.SetGCPercent(debug.SetGCPercent(garbagePercent))
	folder, err := files.OpenFolder(f.dir, f.shard.tag())
	if err != nil {
		return setFailed(err)
	}
	defer folder.Close()
	// A killed run leaves temporary files, and an old list does not belong to what is
	// written now.
	err = folder.Sweep()
	for _, ending := range []string{".json", ".csv"} {
		err = errors.Join(err, folder.Remove(f.shard.tag()+ending))
	}
	if err != nil {
		return setFailed(err)
	}
	lists, err := f.beginLists(folder)
	if err != nil {
		return setFailed(err)
	}
	defer lists.abandon()
	progress := newProgress(io.err, f.rows, f.quiet)
	t, bad, err := f.makeRows(ctx, io, folder, lists, progress)
	progress.clear()
	if err == nil {
		err = ctx.Err()
	}
	if err == nil && (bad == nil || !f.stopOnError) {
		err = lists.finish(t)
	}
	if err != nil && ctx.Err() == nil {
		bad = append(bad, asProblems(err)...)
	}
	if !f.quiet {
		fmt.Fprintf(io.out, "%s: %s\n", f.dir, progress.summary(t))
	}
	switch {
	case ctx.Err() != nil:
		complain(io.err, bad...)
		return ctx.Err()
	case bad != nil:
		return bad
	}
	return nil
}

// asProblems is an error of the output as problems.
func asProblems(err error) problems {
	var found problems
	if errors.As(err, &found) {
		return found
	}
	_ = errors.As(setFailed(err), &found)
	return found
}

// makeRows makes every row of the shard, and tells of each in the table's order.
func (f *family) makeRows(ctx context.Context, out streams, folder *files.Folder, lists *familyLists, progress *progress) (t tally, bad problems, err error) {
	reader, err := f.source.start()
	if err != nil {
		return t, nil, err
	}
	var tableErr error
	next := func() (tableRow, bool) {
		for ctx.Err() == nil {
			row, err := reader.Next()
			switch {
			case err == io.EOF:
				return tableRow{}, false
			case err != nil:
				tableErr = err
				return tableRow{}, false
			case f.shard.takes(row.Number):
				return f.read(row), true
			}
		}
		return tableRow{}, false
	}
	w := &rowMaker{family: f, folder: folder}
	ordered(f.workers, next, w.make, func(r rowResult) bool {
		if ctx.Err() != nil {
			return false
		}
		switch {
		case r.found != nil:
			t.failed++
			bad = append(bad, r.found...)
			r.listed = f.listFailed(r)
		case r.skipped:
			t.skipped++
		default:
			// Nothing of a row stands under its name if its files could not all be written.
			if err = w.write(ctx, &r); err != nil {
				return false
			}
			t.written++
		}
		if !f.quiet && r.listed.Warnings != nil {
			progress.clear()
			for _, warning := range r.listed.Warnings {
				fmt.Fprintf(out.err, "flankwright: warning: %s: %s\n", f.source.at(r.row.Line, 0), oneLine(warning.Message))
			}
		}
		progress.show(t)
		err = lists.add(r.listed)
		return err == nil && (r.found == nil || !f.stopOnError)
	})
	if err == nil && tableErr != nil {
		err = f.source.failed(tableErr)
	}
	if err == nil && ctx.Err() == nil && (bad == nil || !f.stopOnError) && [32]byte(f.source.sum.Sum(nil)) != f.digest {
		err = problems{{message: "the table " + f.source.name + " changed while it was read", hint: "run again when nothing else writes to it", exit: exitFailed}}
	}
	return t, bad, err
}

// listFailed is what the list tells of a row that could not be made.
func (f *family) listFailed(r rowResult) sidecar.FamilyRow {
	listed := sidecar.FamilyRow{Line: r.row.Line, Name: r.row.name, Form: r.row.form.name}
	for _, p := range r.found {
		listed.Errors = append(listed.Errors, p.message)
	}
	return listed
}

// placed says where in the table a row's problems are, and makes them one of a family.
func (f *family) placed(row tableRow, found problems) problems {
	placed := make(problems, len(found))
	for i, p := range found {
		at, cell := f.source.at(row.Line, 0), ""
		for c, column := range f.columns {
			if column == p.flag && row.Cells[c] != "" {
				at = f.source.at(row.Line, row.Column(c))
				cell = fmt.Sprintf(" column %s, cell %q:", column, row.Cells[c])
			}
		}
		message := p.Error()
		if cell != "" {
			message = p.message
		}
		placed[i] = problem{message: at + ":" + cell + " " + message, hint: p.hint, exit: exitRows}
	}
	return placed
}

// familyLists are the two lists of a family while they are written.
type familyLists struct {
	json, csv *files.Pending
	list      *sidecar.FamilyList
}

// beginLists begins both lists.
func (f *family) beginLists(folder *files.Folder) (*familyLists, error) {
	l := &familyLists{}
	var err error
	if l.json, err = folder.Create(f.shard.tag() + ".json"); err != nil {
		return nil, err
	}
	if l.csv, err = folder.Create(f.shard.tag() + ".csv"); err != nil {
		l.abandon()
		return nil, err
	}
	head := sidecar.FamilyHead{Program: program(), Table: f.source.name, Shard: f.shard.String()}
	if l.list, err = sidecar.NewFamilyList(l.json, l.csv, head); err != nil {
		l.abandon()
	}
	return l, err
}

func (l *familyLists) add(row sidecar.FamilyRow) error { return l.list.Add(row) }

// finish completes both, the JSON last.
func (l *familyLists) finish(t tally) error {
	if err := l.list.Finish(sidecar.FamilyTail{Made: t.written + t.skipped, Failed: t.failed, Cautions: export.Cautions()}); err != nil {
		return err
	}
	if err := l.csv.Commit(); err != nil {
		return err
	}
	return l.json.Commit()
}

// abandon leaves nothing of lists that are not finished.
func (l *familyLists) abandon() {
	for _, p := range []*files.Pending{l.json, l.csv} {
		if p != nil {
			p.Abandon()
		}
	}
}
