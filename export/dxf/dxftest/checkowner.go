package dxftest

import (
	"slices"
	"strings"
)

// handles checks that all handles are there, unique and below $HANDSEED, and
// that every pointer leads to one of them.
func (c *checker) handles() {
	lines := map[uint64]int{}
	top := uint64(0)
	add := func(kind string, line int, groups []Pair, code int) {
		n := 0
		for _, p := range groups {
			if p.Code != code {
				continue
			}
			n++
			h := p.Handle()
			if h == 0 {
				c.fail("line %d: %s has handle 0", line, kind)
			}
			if before, ok := lines[h]; ok {
				c.fail("line %d: %s has the handle of line %d", line, kind, before)
			}
			lines[h] = line
			top = max(top, h)
		}
		if n != 1 {
			c.fail("line %d: %s has %d handles", line, kind, n)
		}
	}
	for _, t := range c.Tables {
		add("TABLE", t.Line, t.Groups, 5)
		code := 5
		if t.Name == "DIMSTYLE" {
			code = 105
		}
		for _, r := range t.Records {
			add(r.Kind, r.Line, r.Groups, code)
		}
	}
	for _, r := range slices.Concat(c.Blocks, c.Objects) {
		add(r.Kind, r.Line, r.Groups, 5)
	}
	for _, e := range c.Entities {
		add(e.Kind, e.Line, e.groups, 5)
	}
	if seed := c.Header["$HANDSEED"]; len(seed) != 1 || seed[0].Handle() <= top {
		c.fail("$HANDSEED is %v, the highest handle %X", seed, top)
	}
	for _, p := range c.Pairs {
		if k, _ := kindOf(p.Code); k == handle && p.Code != 5 && p.Code != 105 {
			if _, ok := lines[p.Handle()]; !ok && p.Handle() != 0 {
				c.fail("line %d: group %d points to %s, which is nothing", p.Line, p.Code, p.Value)
			}
		}
	}
}

// owner checks the owner (330) of a record.
func (c *checker) owner(r Record, want uint64) {
	if got, ok := r.First(330); !ok || got.Handle() != want {
		c.fail("line %d: %s has owner %q, want %X", r.Line, r.Kind, got.Value, want)
	}
}

// markers checks the subclass markers (100) of a record.
func (c *checker) markers(kind string, line int, groups []Pair, want ...string) {
	var got []string
	for _, p := range groups {
		if p.Code == 100 {
			got = append(got, p.Value)
		}
	}
	if !slices.Equal(got, want) {
		c.fail("line %d: %s has markers %v, want %v", line, kind, got, want)
	}
}

// container checks tables, blocks and objects of an AC1015 file.
func (c *checker) container() {
	c.require("VPORT", "*Active")
	c.require("LTYPE", "ByBlock", "ByLayer", "Continuous")
	c.require("STYLE", "Standard")
	c.require("APPID", "ACAD")
	c.require("DIMSTYLE", "Standard")
	c.require("BLOCK_RECORD", "*Model_Space", "*Paper_Space")
	for _, t := range c.Tables {
		c.owner(t.Record, 0)
		h, _ := t.First(5)
		for _, r := range t.Records {
			c.owner(r, h.Handle())
			if m, ok := r.First(100); !ok || m.Value != "AcDbSymbolTableRecord" {
				c.fail("line %d: %s without AcDbSymbolTableRecord", r.Line, r.Kind)
			}
		}
	}
	spaces := c.records("BLOCK_RECORD")
	space := func(name string) uint64 {
		r := spaces[strings.ToUpper(name)]
		h, _ := r.First(5)
		return h.Handle()
	}
	if len(c.Blocks) != 4 {
		c.fail("%d records in BLOCKS, want 4", len(c.Blocks))
		return
	}
	for i, name := range []string{"*Model_Space", "*Paper_Space"} {
		begin, end := c.Blocks[2*i], c.Blocks[2*i+1]
		if n, _ := begin.First(2); begin.Kind != "BLOCK" || end.Kind != "ENDBLK" || n.Value != name {
			c.fail("line %d: %s %s and %s, want the block %s", begin.Line, begin.Kind, n.Value, end.Kind, name)
		}
		c.owner(begin, space(name))
		c.owner(end, space(name))
		c.markers("BLOCK", begin.Line, begin.Groups, "AcDbEntity", "AcDbBlockBegin")
		c.markers("ENDBLK", end.Line, end.Groups, "AcDbEntity", "AcDbBlockEnd")
	}
	for _, e := range c.Entities {
		c.owner(Record{Kind: e.Kind, Line: e.Line, Groups: e.groups}, space("*Model_Space"))
	}
	c.objects()
}

// objects checks that the first object is the root dictionary and that each
// other object is owned by an object that names it.
func (c *checker) objects() {
	if len(c.Objects) == 0 || c.Objects[0].Kind != "DICTIONARY" {
		c.fail("OBJECTS does not start with the root dictionary")
		return
	}
	c.owner(c.Objects[0], 0)
	names := map[uint64][]uint64{} // object to the handles it names
	for _, o := range c.Objects {
		h, _ := o.First(5)
		for _, p := range o.Groups {
			if p.Code == 350 {
				names[h.Handle()] = append(names[h.Handle()], p.Handle())
			}
		}
	}
	for _, o := range c.Objects[1:] {
		h, _ := o.First(5)
		owner, _ := o.First(330)
		if !slices.Contains(names[owner.Handle()], h.Handle()) {
			c.fail("line %d: %s is not named by its owner %s", o.Line, o.Kind, owner.Value)
		}
	}
}

// r12 checks that an AC1009 file holds nothing newer.
func (c *checker) r12() {
	for _, p := range c.Pairs {
		switch p.Code {
		case 5, 100, 102, 105, 330, 340, 350, 360, 370, 390, 90, 280, 281:
			c.fail("line %d: group %d in an AC1009 file", p.Line, p.Code)
		}
	}
	known := []string{
		"$ACADVER", "$INSBASE", "$EXTMIN", "$EXTMAX", "$LIMMIN", "$LIMMAX", "$LTSCALE",
		"$CLAYER", "$CELTYPE", "$CECOLOR", "$LUNITS", "$LUPREC", "$AUNITS",
	}
	for name := range c.Header {
		if !slices.Contains(known, name) {
			c.fail("header variable %s in an AC1009 file", name)
		}
	}
	if len(c.Blocks) != 0 {
		c.fail("blocks in an AC1009 file")
	}
	c.require("LTYPE", "Continuous")
	for _, e := range c.Entities {
		if !slices.Contains([]string{"POLYLINE", "LINE", "ARC", "CIRCLE"}, e.Kind) {
			c.fail("line %d: %s in an AC1009 file", e.Line, e.Kind)
		}
	}
}
