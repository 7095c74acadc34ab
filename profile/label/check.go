package label

import (
	"fmt"
	"strconv"
	"strings"
	"unicode/utf8"

	"flankwright/profile"
)

// The parameters findings of this package speak of.
const (
	ParamLabel  profile.Param = "label"
	ParamHeight profile.Param = "label-height"
)

// The rules of this package. The first three say that the request itself is malformed,
// RuleNoRoom that the part has no place for the label.
const (
	RuleCharacters profile.Rule = "label-characters"
	RuleTooLong    profile.Rule = "label-too-long"
	RuleBlank      profile.Rule = "label-blank"
	RuleNoRoom     profile.Rule = "label-no-room"
)

// MaxLength is the most characters a label may have: a part number and a size, not a
// text.
const MaxLength = 40

// check lists what is wrong with a text.
func check(text string) profile.Violations {
	var found profile.Violations
	length := utf8.RuneCountInString(text)
	if length == 0 {
		found = append(found, profile.Finding{Rule: RuleBlank, Param: ParamLabel,
			Text: "the label is blank", Hint: "give it characters to draw, or leave --label out"})
	}
	if length > MaxLength {
		found = append(found, profile.Finding{Rule: RuleTooLong, Param: ParamLabel,
			Value: profile.NumberOf(float64(length)), Bound: profile.NumberOf(MaxLength).AtMost(),
			Text: "the label has {value} characters", Hint: "it can have at most {bound}"})
	}
	if unknown := unknownIn(text); len(unknown) > 0 {
		found = append(found, profile.Finding{Rule: RuleCharacters, Param: ParamLabel,
			Value: profile.NumberOf(float64(len(unknown))),
			Text:  "the label has characters that cannot be drawn: " + named(unknown),
			Hint:  "a label is made of A to Z, a to z, 0 to 9, space and . - + /" + instead(unknown)})
	}
	return found
}

// unknownIn lists the characters of text that have no drawing, each once, in the order
// they occur. A byte that is not UTF-8 is listed as itself, a string of one byte.
func unknownIn(text string) []string {
	var unknown []string
	seen := map[string]bool{}
	for len(text) > 0 {
		c, size := utf8.DecodeRuneInString(text)
		if one := text[:size]; !seen[one] {
			if _, ok := glyphOf(c); !ok {
				seen[one] = true
				unknown = append(unknown, one)
			}
		}
		text = text[size:]
	}
	return unknown
}

// named quotes the first of the unknown characters, control characters as escapes.
func named(unknown []string) string {
	const most = 8 // enough to see what kind of characters they are
	var quoted []string
	for _, s := range unknown[:min(most, len(unknown))] {
		if s == `"` {
			s = `'"'`
		} else {
			s = strconv.Quote(s)
		}
		quoted = append(quoted, s)
	}
	list := strings.Join(quoted, ", ")
	if more := len(unknown) - most; more > 0 {
		list += fmt.Sprintf(" and %d more", more)
	}
	return list
}

// instead says what to write for characters that are common in sizes.
func instead(unknown []string) string {
	hint := ""
	for _, s := range unknown {
		switch s {
		case "×", "*":
			hint += `; write x for ` + s
		case ",":
			hint += "; write a decimal point for the comma"
		case "–", "−", "_":
			hint += "; write - for " + s
		case "Ø", "ø", "⌀":
			hint += "; write D for " + s
		}
	}
	return hint
}
