package main

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"flankwright/export/files"
)

// namePattern is the parsed --name-pattern: literal text and placeholders in turn.
type namePattern struct {
	literals     []string // one more than placeholders
	placeholders []string
}

// defaultPattern names a gear by its form, its size as given, and its teeth.
const defaultPattern = "{form}-{size}-z{teeth}"

// The placeholders that are no flags.
const (
	placeForm = "form"
	placeSize = "size" // m2, p10 or c5: the size by the flag it is given with
	placeRow  = "row"
)

// parsePattern takes a pattern apart; known are the flags it may name.
func parsePattern(s string, known []string) (namePattern, error) {
	known = append([]string{placeForm, placeSize, placeRow}, known...)
	fail := func(message, hint string) (namePattern, error) {
		return namePattern{}, problems{{flag: "name-pattern", value: s, message: message, hint: hint, exit: exitMalformed}}
	}
	var p namePattern
	for rest := s; ; {
		before, after, open := strings.Cut(rest, "{")
		if strings.Contains(before, "}") {
			return fail("a brace is closed that was not opened", "write placeholders as {teeth}")
		}
		p.literals = append(p.literals, before)
		if !open {
			return p, nil
		}
		name, tail, closed := strings.Cut(after, "}")
		if !closed {
			return fail("a brace is not closed", "write placeholders as {teeth}")
		}
		if !slices.Contains(known, name) {
			hint := "use {form}, {size}, {row} or the name of a flag, such as {teeth}"
			if near, ok := nearest(name, known); ok {
				hint = fmt.Sprintf("did you mean {%s}?", near)
			}
			return fail(fmt.Sprintf("{%s} is unknown", name), hint)
		}
		p.placeholders = append(p.placeholders, name)
		rest = tail
	}
}

// name fills the pattern for a row. A beam's width is appended, since the files then
// hold its path and not the part.
func (p namePattern) name(form string, row int, r request) string {
	var b strings.Builder
	for i, literal := range p.literals {
		b.WriteString(literal)
		if i < len(p.placeholders) {
			b.WriteString(placeholderValue(p.placeholders[i], form, row, r))
		}
	}
	if r.given("kerf") && !slices.Contains(p.placeholders, "kerf") {
		b.WriteString("-kerf" + nameText(r, "kerf"))
	}
	return b.String()
}

// placeholderValue is what stands for a placeholder.
func placeholderValue(name, form string, row int, r request) string {
	switch name {
	case placeForm:
		return form
	case placeRow:
		return strconv.Itoa(row)
	case placeSize:
		for _, size := range []struct{ flag, letter string }{{"module", "m"}, {"diametral-pitch", "p"}, {"circular-pitch", "c"}} {
			if r.given(size.flag) {
				return size.letter + nameText(r, size.flag)
			}
		}
		return ""
	case "module":
		if !r.given(name) {
			// A table may hold both systems; the module is defined in each.
			j := partJob{}
			if newReader(r).size(&j); j.spec.Module > 0 {
				const digits = 6
				return strconv.FormatFloat(j.spec.Module, 'g', digits, 64)
			}
		}
	}
	return nameText(r, name)
}

// nameText is a value as it stands in a name: a length in the row's own unit without
// its suffix; "0" for a number that is not given, nothing for a word.
func nameText(r request, name string) string {
	reader := newReader(r)
	var j partJob
	reader.size(&j)
	values := r.values[name]
	if len(values) == 0 {
		if name == "profile-shift" || name == "thinning" || name == "turn" {
			return "0"
		}
		return ""
	}
	texts := make([]string, len(values))
	for i, v := range values {
		texts[i] = v
		if l, err := parseLength(v); err == nil {
			texts[i] = plain(l.number)
			if l.unit != nil && l.unit.suffix != reader.bare.suffix {
				texts[i] += l.unit.suffix
			}
		}
	}
	// A pair's two values are no part of a list in a name.
	return strings.ReplaceAll(strings.Join(texts, "+"), ",", "-")
}

// baseNames are the names of a row's files without their endings: those of the drawings,
// and that of the sidecar where it is none of them.
func (f form) baseNames(name string) []string {
	names := []string{name}
	for _, suffix := range f.suffixes {
		if suffix != "" {
			names = append(names, name+suffix)
		}
	}
	return names
}

// checkRowName refuses what is no name for the row's files.
func (f form) checkRowName(name string) error {
	const longestEnding = ".json"
	for _, base := range f.baseNames(name) {
		err := files.CheckName(base + longestEnding)
		if folded := strings.ToLower(base); err == nil && (folded == listName || strings.HasPrefix(folded, listName+"-")) {
			err = fmt.Errorf("%q is the name of the family's own list", base)
		}
		if err != nil {
			return problems{{flag: "name", message: err.Error(), hint: "give a plain name without folder and ending", exit: exitMalformed}}
		}
	}
	return nil
}

// listName is the name of the family's list, without its ending.
const listName = "family"
