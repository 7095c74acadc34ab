// Package svgtest reads SVG files for tests, strictly: what it accepts is what
// this module promises to write. It shares no code with the writer.
package svgtest

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"math"
	"regexp"
	"strconv"
	"strings"
)

// Shape is a path or a circle. Coordinates are those of the file: y down.
type Shape struct {
	Element   string // path or circle
	ID        string // its own, or that of its group
	Attr      map[string]string
	Subpaths  []Subpath
	CX, CY, R float64 // of a circle
}

// File is what stands in an SVG file.
type File struct {
	Width, Height float64 // as written
	Unit          string  // mm or in
	Shapes        []Shape
}

// Part returns the shape of the part whose id is "part", nil if there is none.
func (f *File) Part() *Shape {
	for i := range f.Shapes {
		if f.Shapes[i].ID == "part" {
			return &f.Shapes[i]
		}
	}
	return nil
}

// Area is the sum of the signed areas of the closed subpaths, positive
// counter-clockwise as one sees it; what is filled, if holes are wound against
// outer loops.
func (s *Shape) Area() float64 {
	if s.Element == "circle" {
		return math.Pi * s.R * s.R
	}
	sum := 0.0
	for _, p := range s.Subpaths {
		if p.Closed {
			sum += p.Area
		}
	}
	return sum
}

// attributes lists what each element may carry.
func attributes(element string) []string {
	switch element {
	case "svg":
		return []string{"width", "height", "viewBox", "version"}
	case "g":
		return []string{"id", "fill", "stroke", "stroke-width"}
	case "path":
		return []string{"id", "d", "fill", "fill-rule", "stroke", "stroke-width"}
	case "circle":
		return []string{"cx", "cy", "r"}
	}
	return nil
}

var (
	size   = regexp.MustCompile(`^([0-9]+\.[0-9]{1,9})(mm|in)$`)
	number = regexp.MustCompile(`^-?(0|[1-9][0-9]*)\.[0-9]{1,9}$`)
	color  = regexp.MustCompile(`^(none|#[0-9a-f]{6})$`)
)

// Read parses a file and returns every rule it breaks, joined.
func Read(data []byte) (*File, error) {
	f := &File{}
	var errs []error
	fail := func(format string, args ...any) { errs = append(errs, fmt.Errorf(format, args...)) }
	for _, c := range data {
		if c > '~' || c < ' ' && c != '\n' {
			fail("byte %#x is not printable ASCII", c)
			break
		}
	}
	dec := xml.NewDecoder(bytes.NewReader(data))
	dec.Strict = true
	var group []xml.StartElement
	for {
		tok, err := dec.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return nil, err
		}
		switch tok := tok.(type) {
		case xml.EndElement:
			group = group[:len(group)-1]
		case xml.CharData:
			if strings.TrimSpace(string(tok)) != "" {
				fail("text %q", tok)
			}
		case xml.StartElement:
			group = append(group, tok)
			attr := map[string]string{}
			known := attributes(tok.Name.Local)
			if known == nil {
				fail("element %s", tok.Name.Local)
			}
			for _, a := range tok.Attr {
				if a.Name.Space == "xmlns" || a.Name.Local == "xmlns" {
					continue
				}
				if !strings.Contains(" "+strings.Join(known, " ")+" ", " "+a.Name.Local+" ") {
					fail("attribute %s of %s", a.Name.Local, tok.Name.Local)
				}
				attr[a.Name.Local] = a.Value
			}
			for _, name := range []string{"fill", "stroke"} {
				if v, ok := attr[name]; ok && !color.MatchString(v) {
					fail("%s=%q", name, v)
				}
			}
			switch tok.Name.Local {
			case "svg":
				if err := f.root(attr); err != nil {
					errs = append(errs, err)
				}
			case "path", "circle":
				s := Shape{Element: tok.Name.Local, ID: attr["id"], Attr: attr}
				if s.ID == "" && len(group) > 1 {
					for _, a := range group[len(group)-2].Attr {
						if a.Name.Local == "id" {
							s.ID = a.Value
						}
					}
				}
				if err := s.fill(); err != nil {
					errs = append(errs, fmt.Errorf("%s %s: %w", s.Element, s.ID, err))
				}
				f.Shapes = append(f.Shapes, s)
			}
		}
	}
	errs = append(errs, f.check()...)
	return f, errors.Join(errs...)
}

func (f *File) root(attr map[string]string) error {
	w, h := size.FindStringSubmatch(attr["width"]), size.FindStringSubmatch(attr["height"])
	if w == nil || h == nil || w[2] != h[2] {
		return fmt.Errorf("width %q, height %q", attr["width"], attr["height"])
	}
	f.Width, _ = strconv.ParseFloat(w[1], 64)
	f.Height, _ = strconv.ParseFloat(h[1], 64)
	f.Unit = w[2]
	if want := "0 0 " + w[1] + " " + h[1]; attr["viewBox"] != want {
		return fmt.Errorf("viewBox %q, want %q", attr["viewBox"], want)
	}
	return nil
}

func (s *Shape) fill() error {
	if s.Element == "circle" {
		for name, p := range map[string]*float64{"cx": &s.CX, "cy": &s.CY, "r": &s.R} {
			if !number.MatchString(s.Attr[name]) {
				return fmt.Errorf("%s=%q", name, s.Attr[name])
			}
			*p, _ = strconv.ParseFloat(s.Attr[name], 64)
		}
		if s.R <= 0 {
			return fmt.Errorf("radius %v", s.R)
		}
		return nil
	}
	var err error
	s.Subpaths, err = Parse(s.Attr["d"])
	return err
}

// check looks at the file as a whole: shapes inside the page, holes wound
// against the outer loop, both fill rules the same.
func (f *File) check() []error {
	var errs []error
	for _, s := range f.Shapes {
		boxes := [][4]float64{{s.CX - s.R, s.CY - s.R, s.CX + s.R, s.CY + s.R}}
		if s.Element == "path" {
			boxes = nil
			for _, p := range s.Subpaths {
				boxes = append(boxes, p.Span)
			}
		}
		for _, b := range boxes {
			const slack = 1e-6 // arcs are measured through rounded radii
			if b[0] < -slack || b[1] < -slack || b[2] > f.Width+slack || b[3] > f.Height+slack {
				errs = append(errs, fmt.Errorf("%s reaches %v on a page of %v by %v", s.ID, b, f.Width, f.Height))
			}
		}
		if strings.HasPrefix(s.ID, "part") {
			if s.Attr["fill-rule"] != "evenodd" {
				errs = append(errs, fmt.Errorf("%s without fill-rule evenodd", s.ID))
			}
			for _, p := range s.Subpaths {
				if !p.Closed {
					errs = append(errs, fmt.Errorf("%s holds an open subpath", s.ID))
				}
			}
		}
	}
	return errs
}
