package label_test

import (
	"errors"
	"strings"
	"testing"

	"flankwright/profile"
	"flankwright/profile/label"
)

func TestRefusedTexts(t *testing.T) {
	for text, want := range map[string]struct {
		rules []profile.Rule
		words []string
	}{
		"":                              {[]profile.Rule{label.RuleBlank}, []string{"blank"}},
		"   ":                           {[]profile.Rule{label.RuleBlank}, []string{"blank"}},
		"M2\n":                          {[]profile.Rule{label.RuleCharacters}, []string{`"\n"`, "A to Z", ". - + /"}},
		"M2\x00\x1b[1m":                 {[]profile.Rule{label.RuleCharacters}, []string{`"\x00", "\x1b", "["`}},
		"5×6":                           {[]profile.Rule{label.RuleCharacters}, []string{`"×"`, "write x for ×"}},
		"2,5":                           {[]profile.Rule{label.RuleCharacters}, []string{`","`, "decimal point"}},
		"{value}":                       {[]profile.Rule{label.RuleCharacters}, []string{`"{", "}"`}},
		"\xff{0}":                       {[]profile.Rule{label.RuleCharacters}, []string{`"\xff", "{", "}"`}},
		"!#$%&()=?;:":                   {[]profile.Rule{label.RuleCharacters}, []string{`"!"`, "and 3 more"}},
		strings.Repeat("8", 41):         {[]profile.Rule{label.RuleTooLong}, []string{"41 characters", "at most 40"}},
		strings.Repeat("Ø", 41):         {[]profile.Rule{label.RuleTooLong, label.RuleCharacters}, []string{"41 characters", `"Ø"`, "D for Ø"}},
		strings.Repeat("\u202e", 1<<20): {[]profile.Rule{label.RuleTooLong, label.RuleCharacters}, []string{`"\u202e"`}},
	} {
		paths, width, err := label.Strokes(text)
		var found profile.Violations
		if paths != nil || width != 0 || !errors.As(err, &found) || len(found) != len(want.rules) {
			t.Errorf("%.40q: %v", text, err)
			continue
		}
		said := ""
		for i, f := range found {
			if f.Rule != want.rules[i] || f.Param != label.ParamLabel {
				t.Errorf("%.40q: %+v", text, f)
			}
			message, hint := f.Describe(profile.Quantity.String)
			said += message + "; " + hint + "; "
		}
		for _, w := range want.words {
			if !strings.Contains(said, w) {
				t.Errorf("%.40q: %s lacks %s", text, said, w)
			}
		}
	}
	if _, width, err := label.Strokes(strings.Repeat("8", label.MaxLength)); err != nil || width <= 0 {
		t.Error(err)
	}
}

// FuzzStrokes: any text is drawn or refused with words, whatever bytes it has.
func FuzzStrokes(f *testing.F) {
	for _, s := range []string{"", " ", "Z40 M2", "6x5", "S/N 08-B", "+0.25", "ÄÖ", "\x00", "\xff\xfe", "{value}{bound}{0}", label.Characters()[:40]} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		paths, width, err := label.Strokes(text)
		if err != nil {
			var found profile.Violations
			if !errors.As(err, &found) || len(found) == 0 || paths != nil {
				t.Fatalf("%q: %v", text, err)
			}
			for _, f := range found {
				message, hint := f.Describe(profile.Quantity.String)
				if f.Rule == "" || message == "" || hint == "" || len(message)+len(hint) > 600 {
					t.Fatalf("%q: %q %q", text, message, hint)
				}
				if strings.ContainsFunc(message, func(r rune) bool { return r < ' ' || r == 0x7f }) {
					t.Fatalf("%q: control characters in %q", text, message)
				}
			}
			return
		}
		if len(paths) == 0 || !(width > 0) || len(paths) > 3*label.MaxLength {
			t.Fatalf("%q: %d strokes, %g wide", text, len(paths), width)
		}
		for _, p := range paths {
			b := p.Bounds()
			if !(b.Min.X >= -accuracy && b.Max.X <= width+accuracy && b.Min.Y >= -0.25-accuracy && b.Max.Y <= 1+accuracy) || p.Shortest() < 0.01-accuracy {
				t.Fatalf("%q: %v", text, b)
			}
		}
	})
}
