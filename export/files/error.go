package files

import "fmt"

// Rule names why a file is not written.
type Rule string

// The rules.
const (
	RuleName      Rule = "a file needs a name"
	RuleDuplicate Rule = "two files of a set go to one name"
	RuleDirectory Rule = "is a folder"
	RuleFolder    Rule = "its folder does not exist"
	RuleIrregular Rule = "is not a regular file"
	RuleReadOnly  Rule = "is read-only"
	RulePortable  Rule = "is no name for a file"
	RuleIO        Rule = "input or output failed"
)

// Error says which file could not be written, and why.
type Error struct {
	Rule  Rule
	Path  string // as it was given, or resolved for RuleIO
	Other string // the other name, for RuleDuplicate; why, for RulePortable
	Op    string // what failed, for RuleIO: create, write, close, rename, ...
	Err   error  // the cause, if the system gave one
}

// Error is one line.
func (e *Error) Error() string {
	switch e.Rule {
	case RuleIO:
		return fmt.Sprintf("cannot %s %q: %v", e.Op, e.Path, e.Err)
	case RuleDuplicate:
		return fmt.Sprintf("%q and %q are one file", e.Other, e.Path)
	case RulePortable:
		return fmt.Sprintf("%q %s: %s", e.Path, string(e.Rule), e.Other)
	case RuleName:
		return string(e.Rule)
	}
	return fmt.Sprintf("%q %s", e.Path, string(e.Rule))
}

// Unwrap returns the cause.
func (e *Error) Unwrap() error { return e.Err }

func ioError(op, path string, err error) error {
	return &Error{Rule: RuleIO, Path: path, Op: op, Err: err}
}
