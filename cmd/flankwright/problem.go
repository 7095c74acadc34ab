package main

import (
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"flankwright/profile"
	"flankwright/profile/gauge"
	"flankwright/profile/label"
	"flankwright/profile/mesh"
)

// problem is one thing wrong with a run, as it is told on stderr.
type problem struct {
	flag    string // name without dashes, "" where none is to blame
	value   string // as given or computed
	message string
	hint    string
	exit    int
}

// Error is the problem in one line.
func (p problem) Error() string {
	switch {
	case p.flag != "" && p.value != "":
		return fmt.Sprintf("--%s %s: %s", p.flag, p.value, p.message)
	case p.flag != "":
		return fmt.Sprintf("--%s: %s", p.flag, p.message)
	}
	return p.message
}

// problems are all that was found wrong in one run.
type problems []problem

// Error joins the lines.
func (ps problems) Error() string {
	lines := make([]string, len(ps))
	for i, p := range ps {
		lines[i] = p.Error()
	}
	return strings.Join(lines, "; ")
}

// exit is the code of the gravest kind: output that failed before rows of a family
// that did, a malformed request before geometry, since the geometry was judged on a
// guess then.
func (ps problems) exit() int {
	code := exitFailed
	for _, p := range ps {
		if p.exit == exitFailed {
			return exitFailed
		}
		if p.exit == exitMalformed {
			return exitMalformed
		}
		code = max(code, p.exit)
	}
	return code
}

// complain prints problems, each with its hint.
func complain(w io.Writer, found ...problem) {
	for _, p := range found {
		fmt.Fprintf(w, "flankwright: error: %s\n", oneLine(p.Error()))
		if p.hint != "" {
			fmt.Fprintf(w, "flankwright: hint: %s\n", oneLine(p.hint))
		}
	}
}

// warn prints warnings.
func warn(w io.Writer, found []profile.Finding, show func(profile.Quantity) string) {
	for _, f := range found {
		message, _ := f.Describe(show)
		fmt.Fprintf(w, "flankwright: warning: %s\n", message)
	}
}

// oneLine keeps hostile values from breaking the line or the terminal.
func oneLine(s string) string {
	const longest = 500 // characters; a refusal is a sentence, not an echo of its input
	clean := strings.Map(func(r rune) rune {
		if r < ' ' || r == 0x7f || (r >= 0x80 && r < 0xa0) {
			return '?'
		}
		return r
	}, s)
	if len(clean) > longest {
		clean = strings.ToValidUTF8(clean[:longest], "") + "..."
	}
	return clean
}

// fromFindings turns what the geometry refuses into problems.
func fromFindings(err error, show func(profile.Quantity) string) error {
	var violations profile.Violations
	if !errors.As(err, &violations) {
		return err
	}
	found := make(problems, len(violations))
	for i, f := range violations {
		message, hint := f.Describe(show)
		found[i] = problem{flag: string(f.Param), value: show(f.Value), message: message, hint: hint, exit: exitGeometry}
		switch f.Rule {
		case label.RuleCharacters, label.RuleTooLong, label.RuleBlank:
			found[i].value, found[i].exit = "", exitMalformed
		case label.RuleNoRoom, mesh.RuleShortContact, gauge.RuleNoSpan, ruleDrawnMesh:
			found[i].value = "" // it is not that of the flag
		default:
			if f.Rule.Malformed() {
				found[i].exit = exitMalformed
			}
		}
	}
	return found
}

// malformed wraps an error of the command line parser.
func malformed(err error) problem {
	return problem{message: err.Error(), hint: "see flankwright --help", exit: exitMalformed}
}

// flagError puts the parser's typed errors into the project's words.
func flagError(cmd *cobra.Command, err error) error {
	p := problem{hint: fmt.Sprintf("see %s --help", cmd.CommandPath()), exit: exitMalformed}
	var missing *pflag.NotExistError
	var noValue *pflag.ValueRequiredError
	var bad *pflag.InvalidValueError
	switch {
	case errors.As(err, &missing):
		name := missing.GetSpecifiedName()
		p.message = fmt.Sprintf("unknown flag --%s", name)
		if len(name) == 1 {
			p.message = fmt.Sprintf("unknown flag -%s", name)
		} else if near := nearestFlag(cmd, name); near != "" {
			p.hint = fmt.Sprintf("did you mean --%s?", near)
		}
	case errors.As(err, &noValue):
		p.flag, p.message = noValue.GetSpecifiedName(), "a value is missing"
	case errors.As(err, &bad):
		p.flag, p.value = bad.GetFlag().Name, bad.GetValue()
		p.message = bad.Unwrap().Error()
	default:
		p.message = err.Error()
	}
	return problems{p}
}

// nearestFlag is the flag of cmd most like name, "" if none is like it.
func nearestFlag(cmd *cobra.Command, name string) string {
	var names []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) { names = append(names, f.Name) })
	near, _ := nearest(name, names)
	return near
}

// knownCommand refuses a first word that is no command, before its flags are taken
// for those of the program itself.
func knownCommand(root *cobra.Command, args []string) error {
	if len(args) == 0 || strings.HasPrefix(args[0], "-") {
		return nil
	}
	root.InitDefaultHelpCmd()
	root.InitDefaultCompletionCmd(args...)
	names := []string{cobra.ShellCompRequestCmd, cobra.ShellCompNoDescRequestCmd}
	for _, c := range root.Commands() {
		names = append(names, c.Name())
	}
	if slices.Contains(names, args[0]) {
		return nil
	}
	p := problem{message: fmt.Sprintf("unknown command %q", args[0]), hint: "see flankwright --help", exit: exitMalformed}
	if near, ok := nearest(args[0], names); ok {
		p.hint = fmt.Sprintf("did you mean %s?", near)
	}
	return problems{p}
}

// noArguments refuses stray words after a command, as a switch given a separate
// value leaves them.
func noArguments(_ *cobra.Command, args []string) error {
	if len(args) == 0 {
		return nil
	}
	return problems{{message: fmt.Sprintf("unexpected argument %q", args[0]),
		hint: "every value follows its flag; a switch takes one only as --switch=false", exit: exitMalformed}}
}
