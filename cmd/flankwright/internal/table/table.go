// Package table reads tables of comma, semicolon or tab separated values as a
// stream, row by row, and knows where each cell stands in the file.
package table

import (
	"bufio"
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"unicode/utf8"
)

// longestRow is the most bytes read for one row, so that a quote that is never
// closed does not pull a whole file into memory.
const longestRow = 1 << 20

// Fault is something wrong with the table itself.
type Fault struct {
	Line, Column int // from 1; Column counts bytes, 0 where the whole line is meant
	Text, Hint   string
	// Final says that nothing after it can be read.
	Final bool
}

// Error is the fault with its place.
func (f *Fault) Error() string { return fmt.Sprintf("%d:%d: %s", f.Line, f.Column, f.Text) }

// Row is one row of the table.
type Row struct {
	Number int      // of the row, from 1; the header does not count
	Line   int      // where it starts in the file, from 1
	Cells  []string // without blanks around them, one for each column
	places []int
}

// Column is where a cell starts on its line, in bytes from 1.
func (r Row) Column(cell int) int { return r.places[cell] }

// Reader reads a table.
type Reader struct {
	Columns []string // the header's cells
	Header  Row

	csv    *csv.Reader
	budget *budget
	rows   int
	line   int // where the record read last starts
}

// NewReader reads the header. The separator is the one that occurs in it: names of
// columns hold none of the three. The error is a *Fault, or that of in.
func NewReader(in io.Reader) (*Reader, error) {
	limited := &budget{in: in, left: longestRow}
	buffered := bufio.NewReader(limited)
	separator, err := prepare(buffered)
	if err != nil {
		return nil, err
	}
	r := &Reader{csv: csv.NewReader(buffered), budget: limited}
	r.csv.Comma = separator
	r.csv.FieldsPerRecord = -1 // judged here, where the line can be told
	r.Header, err = r.read()
	if err == io.EOF {
		return nil, &Fault{Line: 1, Text: "the table is empty", Hint: "begin with a line of column names", Final: true}
	}
	r.Columns = r.Header.Cells
	return r, err
}

// prepare skips a byte order mark, refuses what is no UTF-8 text, and finds the
// separator.
func prepare(in *bufio.Reader) (rune, error) {
	head, err := in.Peek(in.Size())
	if err != nil && err != io.EOF {
		return 0, err
	}
	if bytes.HasPrefix(head, []byte("\xff\xfe")) || bytes.HasPrefix(head, []byte("\xfe\xff")) || bytes.IndexByte(head, 0) >= 0 {
		return 0, &Fault{Line: 1, Column: 1, Text: "the table is not UTF-8 text", Hint: "save it as CSV in UTF-8", Final: true}
	}
	if mark := []byte("\xef\xbb\xbf"); bytes.HasPrefix(head, mark) {
		in.Discard(len(mark))
		head = head[len(mark):]
	}
	line, _, _ := bytes.Cut(bytes.TrimLeft(head, "\r\n"), []byte("\n"))
	if i := bytes.IndexByte(bytes.TrimRight(line, "\r"), '\r'); i >= 0 {
		return 0, &Fault{Line: 1, Column: i + 1, Text: "lines end in CR alone", Hint: "save the table with LF or CRLF line ends", Final: true}
	}
	for _, separator := range "\t;" {
		if bytes.ContainsRune(line, separator) {
			return separator, nil
		}
	}
	return ',', nil
}

// Next is the next row that holds anything, io.EOF after the last. A *Fault that is
// not Final concerns one row only.
func (r *Reader) Next() (Row, error) {
	for {
		row, err := r.read()
		if err != nil {
			return row, err
		}
		if !slices.ContainsFunc(row.Cells, func(c string) bool { return c != "" }) {
			continue // spreadsheets leave such rows behind
		}
		r.rows++
		row.Number = r.rows
		if len(row.Cells) != len(r.Columns) {
			return row, &Fault{Line: row.Line, Text: fmt.Sprintf("the row has %d cells, and the header %d", len(row.Cells), len(r.Columns)),
				Hint: "give every row a cell for each column; an empty one takes the default"}
		}
		for i, c := range row.Cells {
			if !utf8.ValidString(c) {
				return row, &Fault{Line: row.Line, Column: row.places[i], Text: "the cell is not UTF-8 text", Hint: "save the table as CSV in UTF-8"}
			}
		}
		return row, nil
	}
}

// read is the next record with its places.
func (r *Reader) read() (Row, error) {
	r.budget.left = longestRow
	record, err := r.csv.Read()
	var wrong *csv.ParseError
	var long *tooLong
	switch {
	case errors.As(err, &long):
		return Row{}, &Fault{Line: r.line + 1, Text: fmt.Sprintf("here or below is a row of more than %d bytes", longestRow),
			Hint: "look for a quote that is not closed", Final: true}
	case errors.As(err, &wrong):
		f := &Fault{Line: wrong.StartLine, Text: "wrong quoting: " + wrong.Err.Error(),
			Hint: `put a cell that holds a quote in quotes and double those inside: "5 "" x"`, Final: true}
		if wrong.Line == wrong.StartLine {
			f.Column = wrong.Column
		}
		return Row{}, f
	case err != nil:
		return Row{}, err
	}
	row := Row{Cells: make([]string, len(record)), places: make([]int, len(record))}
	for i, cell := range record {
		line, column := r.csv.FieldPos(i)
		if i == 0 {
			row.Line = line
		}
		row.places[i] = column
		row.Cells[i] = strings.TrimSpace(cell)
	}
	r.line = row.Line
	return row, nil
}

// tooLong is the error of a row beyond longestRow.
type tooLong struct{}

func (*tooLong) Error() string { return "the row is too long" }

// budget lets only so many bytes through.
type budget struct {
	in   io.Reader
	left int
}

func (b *budget) Read(p []byte) (int, error) {
	if b.left <= 0 {
		return 0, &tooLong{}
	}
	n, err := b.in.Read(p[:min(len(p), b.left)])
	b.left -= n
	return n, err
}
