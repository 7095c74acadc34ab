package main

import (
	"context"
	"crypto/sha256"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"flankwright/cmd/flankwright/internal/table"
)

// family is a table that has been judged and can be made.
type family struct {
	familyOptions
	source  *tableSource
	columns []string
	forms   map[string]tableForm
	rows    int // of the shard
	digest  [sha256.Size]byte
}

// tableForm is a form with what rows of it may hold.
type tableForm struct {
	form
	allowed  map[string]bool // its flags
	defaults request         // of the command line's flags those that it has
}

// The columns that are no flags.
const (
	columnForm = "form"
	columnName = "name"
)

// mostFaults is how many mistakes of a table are told one by one.
const mostFaults = 50

// planFamily reads the whole table and tells what is wrong with it, before anything is
// written: columns, the shape of rows, names that occur twice.
func planFamily(ctx context.Context, source *tableSource, o familyOptions, defaults request) (*family, error) {
	f := &family{familyOptions: o, source: source, forms: map[string]tableForm{}}
	for _, form := range forms() {
		known := tableForm{form, form.flags(), request{values: map[string][]string{}}}
		for flag, v := range defaults.values {
			if known.allowed[flag] {
				known.defaults.values[flag] = v
			}
		}
		f.forms[form.name] = known
	}
	reader, err := source.start()
	if err != nil {
		return nil, err
	}
	f.columns = reader.Columns
	if found := f.judgeColumns(reader.Header); found != nil {
		return nil, found
	}
	var found problems
	count := 0
	names := map[string]int{} // in lower case, to the line they stand on
	for {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		row, err := reader.Next()
		if err == io.EOF {
			break
		}
		var fault *table.Fault
		if errors.As(err, &fault) {
			count++
			if count <= mostFaults {
				found = append(found, source.fault(fault))
			}
			if fault.Final {
				break
			}
			continue
		}
		if err != nil {
			return nil, source.failed(err)
		}
		if o.shard.takes(row.Number) {
			f.rows++
		}
		r := f.read(row)
		if r.name == "" || r.form.checkRowName(r.name) != nil {
			continue // a matter of the row
		}
		for _, name := range r.form.baseNames(r.name) {
			key := strings.ToLower(name) // one file where case does not count
			if before, twice := names[key]; twice {
				count++
				if count <= mostFaults {
					found = append(found, problem{message: fmt.Sprintf("%s: the name %q is that of line %d", source.at(row.Line, 0), name, before),
						hint: "give a column name, or a --name-pattern that tells the rows apart, such as {form}-{size}-z{teeth}-x{profile-shift}", exit: exitMalformed})
				}
				break
			}
			names[key] = row.Line
		}
	}
	if count > mostFaults {
		found = append(found, problem{message: fmt.Sprintf("%s: and %d more mistakes", source.name, count-mostFaults), exit: exitMalformed})
	}
	if found == nil && len(names) == 0 && f.rows == 0 {
		found = problems{{message: source.name + ": the table has no rows", hint: "put a row for each gear below the column names", exit: exitMalformed}}
	}
	if found != nil {
		return nil, found
	}
	source.sum.Sum(f.digest[:0])
	return f, nil
}

// judgeColumns lists unknown and repeated columns.
func (f *family) judgeColumns(header table.Row) error {
	known := []string{columnForm, columnName}
	for _, p := range rowParameters() {
		known = append(known, p.name)
	}
	var found problems
	for i, c := range f.columns {
		at := f.source.at(header.Line, header.Column(i))
		switch {
		case c == "":
			found = append(found, problem{message: fmt.Sprintf("%s: column %d has no name", at, i+1), hint: "name it as a flag, without dashes", exit: exitMalformed})
		case !slices.Contains(known, c):
			p := problem{message: fmt.Sprintf("%s: unknown column %q", at, c), hint: "columns are named as flags, without dashes; see flankwright family --help", exit: exitMalformed}
			if near, ok := nearest(strings.ToLower(strings.TrimLeft(c, "-")), known); ok {
				p.hint = fmt.Sprintf("did you mean %s?", near)
			}
			found = append(found, p)
		case slices.Contains(f.columns[:i], c):
			found = append(found, problem{message: fmt.Sprintf("%s: column %s stands there twice", at, c), hint: "keep one of the two", exit: exitMalformed})
		}
	}
	if found == nil {
		return nil
	}
	return found
}

// tableRow is a row of the table as a request.
type tableRow struct {
	table.Row
	form    form
	name    string // of its files, without an ending
	request request
	found   problems // what is wrong before its values are read
}

// read makes a request of a row: its cells, and the command line's flags where they
// are empty.
func (f *family) read(row table.Row) tableRow {
	r := tableRow{Row: row, request: request{values: map[string][]string{}}}
	formName, name := "gear", ""
	for i, cell := range row.Cells {
		switch column := f.columns[i]; {
		case cell == "":
		case column == columnForm:
			formName = cell
		case column == columnName:
			name = cell
		case column == "hole-circle":
			r.request.values[column] = strings.Fields(cell)
		default:
			r.request.values[column] = []string{cell}
		}
	}
	known, ok := f.forms[formName]
	if r.form = known.form; !ok {
		p := problem{flag: columnForm, value: formName, message: "unknown form", hint: "it is one of " + strings.Join(formNames(), ", "), exit: exitMalformed}
		if near, ok := nearest(formName, formNames()); ok {
			p.hint = fmt.Sprintf("did you mean %s? %s", near, p.hint)
		}
		r.found = append(r.found, p)
		r.form.name = formName
		return r
	}
	for column := range r.request.values {
		if !known.allowed[column] {
			r.found = append(r.found, problem{flag: column, message: "is no flag of " + formName, hint: "leave the cell empty", exit: exitMalformed})
		}
	}
	slices.SortFunc(r.found, func(a, b problem) int { return strings.Compare(a.flag, b.flag) })
	r.request.command = formName
	r.request = r.request.withDefaults(known.defaults)
	if r.name = name; name == "" {
		r.name = f.pattern.name(formName, row.Number, r.request)
	}
	if err := r.form.checkRowName(r.name); err != nil {
		r.found = append(r.found, err.(problems)...)
	}
	return r
}
