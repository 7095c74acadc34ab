package dxftest

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"slices"
	"strings"
)

// checker collects what is wrong with a file.
type checker struct {
	*File
	errs []error
}

func (c *checker) fail(format string, args ...any) {
	c.errs = append(c.errs, fmt.Errorf(format, args...))
}

// Check returns every rule that the file breaks, joined, or nil. It covers the
// container, the header, the tables, ownership and the entities one by one.
func Check(data []byte) error {
	f, err := Read(data)
	if err != nil {
		return err
	}
	c := &checker{File: f}
	switch f.Version() {
	case "AC1015":
		c.sections("HEADER", "CLASSES", "TABLES", "BLOCKS", "ENTITIES", "OBJECTS")
		c.tableNames("VPORT", "LTYPE", "LAYER", "STYLE", "VIEW", "UCS", "APPID", "DIMSTYLE", "BLOCK_RECORD")
		c.unit()
		c.handles()
		c.container()
	case "AC1009":
		c.sections("HEADER", "TABLES", "BLOCKS", "ENTITIES")
		c.tableNames("LTYPE", "LAYER", "STYLE")
		c.r12()
	default:
		c.fail("$ACADVER is %q", f.Version())
	}
	c.layers()
	c.extents()
	for i := range f.Entities {
		c.entity(&f.Entities[i])
	}
	if len(f.Entities) == 0 {
		c.fail("no entities")
	}
	return errors.Join(c.errs...)
}

func (c *checker) sections(want ...string) {
	if !slices.Equal(c.Sections, want) {
		c.fail("sections %v, want %v", c.Sections, want)
	}
}

func (c *checker) tableNames(want ...string) {
	var got []string
	for _, t := range c.Tables {
		got = append(got, t.Name)
		if n, ok := t.First(70); !ok || n.Int() != len(t.Records) {
			c.fail("table %s declares %s records and has %d", t.Name, n.Value, len(t.Records))
		}
	}
	if !slices.Equal(got, want) {
		c.fail("tables %v, want %v", got, want)
	}
}

func (c *checker) unit() {
	if v := c.value("$DWGCODEPAGE"); v != "ANSI_1252" {
		c.fail("$DWGCODEPAGE is %q", v)
	}
	switch units, metric := c.Int("$INSUNITS"), c.Int("$MEASUREMENT"); {
	case units == 4 && metric == 1, units == 1 && metric == 0:
	default:
		c.fail("$INSUNITS %d with $MEASUREMENT %d", units, metric)
	}
}

// records returns the records of a table by name, case folded as DXF does.
func (c *checker) records(table string) map[string]Record {
	m := map[string]Record{}
	for _, t := range c.Tables {
		if t.Name != table {
			continue
		}
		for _, r := range t.Records {
			name, ok := r.First(2)
			key := strings.ToUpper(name.Value)
			if _, twice := m[key]; twice || !ok {
				c.fail("line %d: %s %q without or with a repeated name", r.Line, table, name.Value)
			}
			m[key] = r
		}
	}
	return m
}

func (c *checker) require(table string, names ...string) {
	have := c.records(table)
	for _, n := range names {
		if _, ok := have[strings.ToUpper(n)]; !ok {
			c.fail("table %s has no %s", table, n)
		}
	}
}

var layerName = regexp.MustCompile(`^[A-Z0-9_-]{1,31}$`)

// layers checks that the layers in the table are "0" and those in use.
func (c *checker) layers() {
	defined := c.records("LAYER")
	types := c.records("LTYPE")
	used := c.Layers()
	if _, ok := defined["0"]; !ok {
		c.fail("no layer 0")
	}
	for name, r := range defined {
		n, _ := r.First(2)
		if !layerName.MatchString(n.Value) {
			c.fail("layer name %q", n.Value)
		}
		if _, ok := used[n.Value]; !ok && name != "0" {
			c.fail("layer %s is not used", n.Value)
		}
		if col, ok := r.First(62); !ok || col.Int() < 1 || col.Int() > 255 {
			c.fail("layer %s has colour %q", n.Value, col.Value)
		}
		lt, _ := r.First(6)
		if _, ok := types[strings.ToUpper(lt.Value)]; !ok || !strings.EqualFold(lt.Value, "Continuous") {
			c.fail("layer %s has line type %q", n.Value, lt.Value)
		}
	}
	for name := range used {
		if _, ok := defined[name]; !ok {
			c.fail("layer %q is not in the table", name)
		}
	}
}

// extents compares $EXTMIN and $EXTMAX with the entities.
func (c *checker) extents() {
	span, err := Span(c.Entities)
	if err != nil {
		c.fail("%w", err)
		return
	}
	// A step of the last digit for the ends and one for the extent; bulges have
	// nine decimals too, so an arc may bulge half a step of its chord further.
	size := math.Hypot(span[2]-span[0], span[3]-span[1])
	tol := 2e-9 + 2e-9*size
	for _, e := range c.Entities {
		if e.Kind == "SPLINE" {
			tol = 1e-6 * size // sampled
		}
	}
	x0, y0 := c.Point("$EXTMIN")
	x1, y1 := c.Point("$EXTMAX")
	for i, got := range [4]float64{x0, y0, x1, y1} {
		if !(math.Abs(got-span[i]) <= tol) {
			c.fail("$EXTMIN, $EXTMAX are (%v, %v), (%v, %v) but the entities reach %v", x0, y0, x1, y1, span)
			return
		}
	}
}
