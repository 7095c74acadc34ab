package main

import (
	"errors"
	"testing"
)

func TestNamePattern(t *testing.T) {
	known := []string{"module", "teeth", "kerf", "profile-shift", "label"}
	values := func(pairs ...string) request {
		r := request{values: map[string][]string{}}
		for i := 0; i < len(pairs); i += 2 {
			r.values[pairs[i]] = append(r.values[pairs[i]], pairs[i+1])
		}
		return r
	}
	for _, c := range []struct {
		pattern string
		row     request
		want    string
	}{
		{defaultPattern, values("module", "2.0", "teeth", "24"), "gear-m2-z24"},
		{defaultPattern, values("module", "0.1in", "teeth", "24"), "gear-m0.1in-z24"},
		{defaultPattern, values("diametral-pitch", "16", "teeth", "24"), "gear-p16-z24"},
		{defaultPattern, values("circular-pitch", "5mm", "teeth", "24"), "gear-c5-z24"},
		{"{form}-m{module}-z{teeth}", values("diametral-pitch", "10", "teeth", "24"), "gear-m2.54-z24"},
		{defaultPattern, values("module", "2", "teeth", "24", "kerf", "0.2"), "gear-m2-z24-kerf0.2"},
		{"k{kerf}", values("module", "2", "kerf", "0.2mm"), "k0.2"},
		{"{row}x{profile-shift}{label}", values("module", "2"), "7x0"},
		{"{label}", values("module", "2", "label", "A 1"), "A 1"},
		{"plain", values(), "plain"},
	} {
		p, err := parsePattern(c.pattern, known)
		if err != nil {
			t.Errorf("%s: %v", c.pattern, err)
			continue
		}
		if got := p.name("gear", 7, c.row); got != c.want {
			t.Errorf("%s of %v is %q, not %q", c.pattern, c.row.values, got, c.want)
		}
	}
	for _, bad := range []string{"{", "}", "{teeth", "teeth}", "{}", "{{teeth}}", "{output}"} {
		var found problems
		if _, err := parsePattern(bad, known); !errors.As(err, &found) || found.exit() != exitMalformed || found[0].hint == "" {
			t.Errorf("%s: %v", bad, err)
		}
	}
}

// FuzzNamePattern: whatever pattern and cell, what passes for a name is one.
func FuzzNamePattern(f *testing.F) {
	f.Add(defaultPattern, "24")
	f.Add("{teeth}/..", "../../x")
	f.Fuzz(func(t *testing.T, pattern, cell string) {
		p, err := parsePattern(pattern, []string{"teeth"})
		if err != nil {
			return
		}
		name := p.name("gear", 1, request{values: map[string][]string{"module": {"2"}, "teeth": {cell}}})
		if (form{suffixes: []string{""}}).checkRowName(name) != nil {
			return
		}
		for _, r := range name {
			if r == '/' || r == '\\' || r < ' ' {
				t.Fatalf("%q passes for a name", name)
			}
		}
	})
}
