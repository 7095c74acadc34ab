package dxftest

import (
	"fmt"
)

// entities turns the records of the section into entities; VERTEX and SEQEND
// are folded into their POLYLINE.
func (f *File) entities(records []Record) error {
	var open *Entity // POLYLINE whose SEQEND has not come
	for _, r := range records {
		if (r.Kind == "VERTEX" || r.Kind == "SEQEND") != (open != nil) {
			return fmt.Errorf("line %d: %s out of place", r.Line, r.Kind)
		}
		switch r.Kind {
		case "VERTEX":
			v := Entity{Kind: r.Kind, Line: r.Line, groups: r.Groups}
			if err := v.fill(); err != nil {
				return err
			}
			if v.Layer != open.Layer || len(v.Vertices) != 1 {
				return fmt.Errorf("line %d: VERTEX on layer %q with %d points", r.Line, v.Layer, len(v.Vertices))
			}
			open.Vertices = append(open.Vertices, v.Vertices[0])
			open.groups = append(open.groups, r.Groups...)
			continue
		case "SEQEND":
			open = nil
			continue
		}
		e := Entity{Kind: r.Kind, Line: r.Line, groups: r.Groups}
		if err := e.fill(); err != nil {
			return err
		}
		f.Entities = append(f.Entities, e)
		if r.Kind == "POLYLINE" {
			open = &f.Entities[len(f.Entities)-1]
			open.Vertices = nil // its own point is the elevation
		}
	}
	if open != nil {
		return fmt.Errorf("the last POLYLINE has no SEQEND")
	}
	return nil
}

// fill sets the fields from the groups. Every code must be one that the kind
// has, and codes that can occur once must not come twice.
func (e *Entity) fill() error {
	allowed, ok := codes(e.Kind)
	if !ok {
		return fmt.Errorf("line %d: unexpected entity %s", e.Line, e.Kind)
	}
	e.counts = map[int]int{}
	seen := map[int]int{}
	for _, p := range e.groups {
		repeat, ok := allowed[p.Code]
		if !ok {
			return fmt.Errorf("line %d: group %d in %s", p.Line, p.Code, e.Kind)
		}
		if seen[p.Code]++; seen[p.Code] > 1 && !repeat {
			return fmt.Errorf("line %d: group %d twice in %s", p.Line, p.Code, e.Kind)
		}
		if err := e.group(p); err != nil {
			return fmt.Errorf("line %d: %w", p.Line, err)
		}
	}
	for _, code := range required(e.Kind) {
		if seen[code] == 0 {
			return fmt.Errorf("line %d: %s without group %d", e.Line, e.Kind, code)
		}
	}
	if seen[10] != seen[20] {
		return fmt.Errorf("line %d: %s with %d x and %d y", e.Line, e.Kind, seen[10], seen[20])
	}
	return nil
}

// required lists the groups an entity cannot do without.
func required(kind string) []int {
	switch kind {
	case "LINE":
		return []int{8, 10, 20, 11, 21}
	case "CIRCLE":
		return []int{8, 10, 20, 40}
	case "ARC":
		return []int{8, 10, 20, 40, 50, 51}
	case "LWPOLYLINE":
		return []int{8, 90, 70, 10, 20}
	case "SPLINE":
		return []int{8, 70, 71, 72, 73, 40, 10, 20}
	case "POLYLINE":
		return []int{8, 66, 70, 10, 20}
	}
	return []int{8, 10, 20} // VERTEX
}

// codes says which groups an entity may hold; true ones may repeat.
func codes(kind string) (map[int]bool, bool) {
	m := map[int]bool{5: false, 330: false, 100: true, 8: false}
	add := func(repeat bool, codes ...int) map[int]bool {
		for _, c := range codes {
			m[c] = repeat
		}
		return m
	}
	switch kind {
	case "LINE":
		return add(false, 10, 20, 30, 11, 21, 31), true
	case "CIRCLE":
		return add(false, 10, 20, 30, 40, 210, 220, 230), true
	case "ARC":
		return add(false, 10, 20, 30, 40, 210, 220, 230, 50, 51), true
	case "LWPOLYLINE":
		add(false, 90, 70)
		return add(true, 10, 20, 42), true
	case "SPLINE":
		add(false, 70, 71, 72, 73, 74, 42, 43, 44, 210, 220, 230)
		return add(true, 40, 10, 20, 30), true
	case "POLYLINE":
		return add(false, 66, 10, 20, 30, 70), true
	case "VERTEX":
		return add(false, 10, 20, 30, 42), true
	}
	return nil, false
}

func (e *Entity) group(p Pair) error {
	round := e.Kind == "CIRCLE" || e.Kind == "ARC"
	switch p.Code {
	case 5:
		e.Handle = p.Handle()
	case 330:
		e.Owner = p.Handle()
	case 8:
		e.Layer = p.Value
	case 10:
		if round {
			e.Center.X = p.Float()
		} else {
			e.Vertices = append(e.Vertices, Vertex{X: p.Float()})
		}
	case 20, 42:
		if round {
			e.Center.Y = p.Float()
			break
		}
		if e.Kind == "SPLINE" && p.Code == 42 {
			break // knot tolerance
		}
		if len(e.Vertices) == 0 {
			return fmt.Errorf("group %d before the first vertex", p.Code)
		}
		v := &e.Vertices[len(e.Vertices)-1]
		if p.Code == 20 {
			v.Y = p.Float()
		} else {
			v.Bulge = p.Float()
		}
	case 11:
		e.Vertices = append(e.Vertices, Vertex{X: p.Float()})
	case 21:
		if len(e.Vertices) != 2 {
			return fmt.Errorf("group 21 out of place")
		}
		e.Vertices[1].Y = p.Float()
	case 30, 31:
		if p.Float() != 0 {
			return fmt.Errorf("z is %s", p.Value)
		}
	case 40:
		if round {
			e.Radius = p.Float()
		} else {
			e.Knots = append(e.Knots, p.Float())
		}
	case 50:
		e.From = p.Float()
	case 51:
		e.To = p.Float()
	case 70:
		e.Flag = p.Int()
		e.Closed = e.Kind != "SPLINE" && e.Flag == 1
	case 71:
		e.Degree = p.Int()
	case 66, 72, 73, 74, 90:
		e.counts[p.Code] = p.Int()
	}
	return nil
}
