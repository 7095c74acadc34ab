package table

import (
	"errors"
	"io"
	"slices"
	"strings"
	"testing"
)

// all reads a whole table; faults of single rows are kept in order.
func all(text string) (r *Reader, rows []Row, faults []*Fault, err error) {
	r, err = NewReader(strings.NewReader(text))
	if err != nil {
		return nil, nil, nil, err
	}
	for {
		row, err := r.Next()
		var f *Fault
		switch {
		case err == io.EOF:
			return r, rows, faults, nil
		case errors.As(err, &f):
			faults = append(faults, f)
			if f.Final {
				return r, rows, faults, nil
			}
		case err != nil:
			return r, rows, faults, err
		default:
			rows = append(rows, row)
		}
	}
}

func TestSeparators(t *testing.T) {
	for _, text := range []string{
		"module,teeth\n2,24\n3,17\n", "module;teeth\n2;24\n3;17", "module\tteeth\r\n2\t24\r\n3\t17\r\n",
		"\xef\xbb\xbfmodule, teeth\n\n2 ,\" 24\"\n,\n3,17\n",
	} {
		r, rows, faults, err := all(text)
		if err != nil || faults != nil {
			t.Fatalf("%q: %v %v", text, err, faults)
		}
		if !slices.Equal(r.Columns, []string{"module", "teeth"}) || len(rows) != 2 ||
			!slices.Equal(rows[0].Cells, []string{"2", "24"}) || !slices.Equal(rows[1].Cells, []string{"3", "17"}) {
			t.Errorf("%q: columns %q, rows %v", text, r.Columns, rows)
		}
		if rows[0].Number != 1 || rows[1].Number != 2 {
			t.Errorf("%q: numbers %d, %d", text, rows[0].Number, rows[1].Number)
		}
	}
}

func TestPlaces(t *testing.T) {
	_, rows, _, err := all("a,b,c\n1,\"two\nlines\",3\n\n4,5,6\n")
	if err != nil {
		t.Fatal(err)
	}
	if rows[0].Line != 2 || rows[1].Line != 5 || rows[1].Column(2) != 5 || rows[0].Column(1) != 3 {
		t.Errorf("rows %+v", rows)
	}
}

func TestFaults(t *testing.T) {
	for _, c := range []struct {
		text         string
		line, column int
		says         string
		final        bool
	}{
		{"", 1, 0, "empty", true},
		{"\n\n", 1, 0, "empty", true},
		{"a,b\n1\n2,3\n", 2, 0, "1 cells, and the header 2", false},
		{"a,b\n1,2,3\n", 2, 0, "3 cells, and the header 2", false},
		{"a,b\n1,x\"y\n", 2, 4, "quoting", true},
		{"a,b\n1,\"y\n2,3\n", 2, 0, "quoting", true},
		{strings.Repeat("x", 2*longestRow), 1, 0, "more than", true},
		{"a,b\n1,\xff\n", 2, 3, "UTF-8", false},
		{"a\rb\r", 1, 2, "CR alone", true},
		{"\xff\xfea\x00", 1, 1, "UTF-8", true},
		{"a,b\n1,\"" + strings.Repeat("x", 2*longestRow), 2, 0, "more than", true},
	} {
		_, _, faults, err := all(c.text)
		var f *Fault
		if !errors.As(err, &f) && len(faults) > 0 {
			f = faults[0]
		}
		if f == nil || f.Line != c.line || f.Column != c.column || !strings.Contains(f.Text, c.says) || f.Final != c.final {
			t.Errorf("%.20q: %+v, %v", c.text, f, err)
		}
	}
}

// FuzzTable asks that reading ends, and that what is read is whole.
func FuzzTable(f *testing.F) {
	for _, seed := range []string{"a,b\n1,2\n", "a;b\n\"1\";2", "a\tb\r\n1\t2", "\xef\xbb\xbfa\n1", "a,b\n\"", "a,b\n1\n,,\n"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		r, rows, _, err := all(text)
		if err != nil {
			return
		}
		for i, row := range rows {
			if row.Number <= i || row.Line < 1 || len(row.Cells) != len(r.Columns) {
				t.Fatalf("row %d is %+v of columns %q", i, row, r.Columns)
			}
		}
	})
}
