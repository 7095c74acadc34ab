package main

import (
	"fmt"
	"maps"
	"slices"
	"strconv"
	"strings"
)

// splitMembers parts a pair's flags between its members, and settles their forms.
func splitMembers(req request, forms *[2]string, internal bool) (members [2]request, found problems) {
	fail := func(flag, value, message, hint string) {
		found = append(found, problem{flag: flag, value: value, message: message, hint: hint, exit: exitMalformed})
	}
	if internal {
		forms[1] = "ring"
	}
	if teeth := req.values["teeth"]; len(teeth) > 0 {
		first, second, two := strings.Cut(teeth[0], ",")
		switch {
		case !two:
			fail("teeth", teeth[0], "a pair has two numbers of teeth", "give them with a comma between, such as 17,43 or 17,rack")
		case strings.TrimSpace(second) == "rack" && internal:
			fail("internal", "", "member 2 is a rack", "leave --internal out")
		case strings.TrimSpace(second) == "rack":
			forms[1] = "rack"
			// As many pitches as the gear has teeth: a full turn.
			req = request{command: req.command, values: maps.Clone(req.values)}
			req.values["teeth"] = []string{first + "," + first}
		}
	}
	var allowed [2]map[string]bool
	for i, form := range forms {
		members[i] = request{command: form, values: map[string][]string{}}
		allowed[i] = flagsOf(form)
	}
	for _, p := range memberParameters() {
		values := req.values[p.name]
		if len(values) == 0 {
			continue
		}
		if !allowed[0][p.name] && !allowed[1][p.name] {
			fail(p.name, "", fmt.Sprintf("is no flag of a %s or a %s", forms[0], forms[1]), "leave it out")
			continue
		}
		for _, v := range values {
			parts := strings.Split(v, ",")
			switch {
			case len(parts) > 2:
				fail(p.name, v, "a pair has two members", "give one value, or two with a comma between")
				continue
			case len(parts) == 1:
				parts = []string{v, v}
			case slices.Contains(sharedFlags(), p.name):
				fail(p.name, v, "is the same for both members", "give one value")
				continue
			}
			for i, part := range parts {
				part = strings.TrimSpace(part)
				switch {
				case part == "":
				case allowed[i][p.name]:
					members[i].values[p.name] = append(members[i].values[p.name], part)
				case strings.Contains(v, ","):
					fail(p.name, v, fmt.Sprintf("member %d, a %s, has no such flag", i+1, forms[i]), "leave its value empty")
				}
			}
		}
	}
	return members, found
}

// flagsOf are the flags of a form by its name.
func flagsOf(name string) map[string]bool {
	flags := map[string]bool{}
	for _, p := range partParameters(name) {
		if !p.transient {
			flags[p.name] = true
		}
	}
	return flags
}

// ofMember says whose problems these are.
func ofMember(err error, i int) problems {
	found, ok := err.(problems)
	if !ok {
		return problems{malformed(err)}
	}
	out := make(problems, len(found))
	for k, p := range found {
		p.message = fmt.Sprintf("member %d: %s", i+1, p.message)
		out[k] = p
	}
	return out
}

// joinInputs is the pair's normalized request: what both members share once, the rest
// with a comma between.
func joinInputs(first, second, own map[string]any) map[string]any {
	joined := map[string]any{}
	names := maps.Clone(first)
	maps.Copy(names, second)
	for name := range names {
		if name == "command" {
			continue
		}
		a, b := first[name], second[name]
		switch {
		case fmt.Sprint(a) == fmt.Sprint(b):
			joined[name] = a
		case name == "hole-circle":
			joined[name] = joinLists(a, b)
		default:
			joined[name] = textOf(a) + "," + textOf(b)
		}
	}
	for name, v := range own {
		joined[name] = v
	}
	return joined
}

// joinLists pairs two lists up, the shorter one with empty values.
func joinLists(a, b any) []string {
	first, _ := a.([]string)
	second, _ := b.([]string)
	var out []string
	for i := range max(len(first), len(second)) {
		var one, two string
		if i < len(first) {
			one = first[i]
		}
		if i < len(second) {
			two = second[i]
		}
		out = append(out, one+","+two)
	}
	return out
}

// textOf is a normalized value as it stands in a list; "" for none.
func textOf(v any) string {
	switch v := v.(type) {
	case nil:
		return ""
	case bool:
		return strconv.FormatBool(v)
	}
	return fmt.Sprint(v)
}
