package dxftest

import (
	"fmt"
)

// Record is a group 0 with the groups that follow it.
type Record struct {
	Kind   string
	Line   int
	Groups []Pair
}

// First returns the first group with the code.
func (r *Record) First(code int) (Pair, bool) {
	for _, p := range r.Groups {
		if p.Code == code {
			return p, true
		}
	}
	return Pair{}, false
}

// Table is a TABLE with its records.
type Table struct {
	Record
	Name    string
	Records []Record
}

// File is what stands in a DXF file.
type File struct {
	Pairs    []Pair
	Sections []string          // in file order
	Header   map[string][]Pair // variable name to its groups
	Classes  []Record
	Tables   []Table
	Blocks   []Record
	Entities []Entity
	Objects  []Record
}

// Version is the value of $ACADVER.
func (f *File) Version() string { return f.value("$ACADVER") }

// Int is the value of an integer header variable, -1 if it is missing.
func (f *File) Int(name string) int {
	if g := f.Header[name]; len(g) == 1 {
		return g[0].Int()
	}
	return -1
}

// Point is the value of a header variable that is a point, z left out.
func (f *File) Point(name string) (x, y float64) {
	for _, p := range f.Header[name] {
		switch p.Code {
		case 10:
			x = p.Float()
		case 20:
			y = p.Float()
		}
	}
	return x, y
}

func (f *File) value(name string) string {
	if g := f.Header[name]; len(g) == 1 {
		return g[0].Value
	}
	return ""
}

// Layers counts the entities of each kind on each layer.
func (f *File) Layers() map[string]map[string]int {
	n := map[string]map[string]int{}
	for _, e := range f.Entities {
		if n[e.Layer] == nil {
			n[e.Layer] = map[string]int{}
		}
		n[e.Layer][e.Kind]++
	}
	return n
}

// Read parses a file as far as its structure goes; Check finds what is wrong
// with a file that can be parsed.
func Read(data []byte) (*File, error) {
	pairs, err := Pairs(data)
	if err != nil {
		return nil, err
	}
	f := &File{Pairs: pairs, Header: map[string][]Pair{}}
	for i := 0; ; {
		p := pairs[i]
		if p.Code != 0 {
			return nil, fmt.Errorf("line %d: group %d between sections", p.Line, p.Code)
		}
		if p.Value == "EOF" {
			return f, nil
		}
		if p.Value != "SECTION" || pairs[i+1].Code != 2 {
			return nil, fmt.Errorf("line %d: %q where a section should start", p.Line, p.Value)
		}
		name := pairs[i+1].Value
		start := i + 2
		i = start
		for pairs[i].Code != 0 || pairs[i].Value != "ENDSEC" {
			if i++; i == len(pairs) {
				return nil, fmt.Errorf("section %s does not end", name)
			}
		}
		if err := f.section(name, pairs[start:i]); err != nil {
			return nil, err
		}
		f.Sections = append(f.Sections, name)
		i++
	}
}

func (f *File) section(name string, pairs []Pair) error {
	if name == "HEADER" {
		return f.header(pairs)
	}
	records, err := split(pairs)
	if err != nil {
		return err
	}
	switch name {
	case "CLASSES":
		f.Classes = records
	case "TABLES":
		return f.tables(records)
	case "BLOCKS":
		f.Blocks = records
	case "ENTITIES":
		return f.entities(records)
	case "OBJECTS":
		f.Objects = records
	default:
		return fmt.Errorf("unexpected section %s", name)
	}
	return nil
}

func (f *File) header(pairs []Pair) error {
	name := ""
	for _, p := range pairs {
		if p.Code == 9 {
			name = p.Value
			if _, twice := f.Header[name]; twice {
				return fmt.Errorf("line %d: %s occurs twice", p.Line, name)
			}
			f.Header[name] = nil
			continue
		}
		if name == "" {
			return fmt.Errorf("line %d: header value without a name", p.Line)
		}
		f.Header[name] = append(f.Header[name], p)
	}
	return nil
}

// split parts groups into records, one for each group 0.
func split(pairs []Pair) ([]Record, error) {
	var rs []Record
	for _, p := range pairs {
		switch {
		case p.Code == 0:
			rs = append(rs, Record{Kind: p.Value, Line: p.Line})
		case len(rs) == 0:
			return nil, fmt.Errorf("line %d: group %d before the first record", p.Line, p.Code)
		default:
			last := &rs[len(rs)-1]
			last.Groups = append(last.Groups, p)
		}
	}
	return rs, nil
}

func (f *File) tables(records []Record) error {
	open := false
	for _, r := range records {
		switch r.Kind {
		case "TABLE":
			if open {
				return fmt.Errorf("line %d: TABLE within a TABLE", r.Line)
			}
			open = true
			name, _ := r.First(2)
			f.Tables = append(f.Tables, Table{Record: r, Name: name.Value})
		case "ENDTAB":
			if !open {
				return fmt.Errorf("line %d: ENDTAB without TABLE", r.Line)
			}
			open = false
		default:
			if !open {
				return fmt.Errorf("line %d: %s outside a TABLE", r.Line, r.Kind)
			}
			t := &f.Tables[len(f.Tables)-1]
			if r.Kind != t.Name {
				return fmt.Errorf("line %d: %s in table %s", r.Line, r.Kind, t.Name)
			}
			t.Records = append(t.Records, r)
		}
	}
	if open {
		return fmt.Errorf("the last TABLE does not end")
	}
	return nil
}
