package main

import (
	"fmt"
	"io"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"flankwright/export"
	"flankwright/export/sidecar"
)

// usage prints the usage of a command. It is a function and not a template because
// functions for templates are shared by all commands of a process.
func usage(cmd *cobra.Command) error {
	var b strings.Builder
	b.WriteString("Usage:\n")
	if cmd.Runnable() {
		fmt.Fprintf(&b, "  %s\n", cmd.UseLine())
	}
	list := func(heading string, wanted func(*cobra.Command) bool) {
		for _, c := range cmd.Commands() {
			if wanted(c) {
				if heading != "" {
					fmt.Fprintf(&b, "\n%s:\n", heading)
					heading = ""
				}
				fmt.Fprintf(&b, "  %-*s %s\n", cmd.NamePadding(), c.Name(), c.Short)
			}
		}
	}
	if cmd.HasAvailableSubCommands() {
		fmt.Fprintf(&b, "  %s COMMAND [flags]\n", cmd.CommandPath())
		list("Commands", (*cobra.Command).IsAvailableCommand)
		list("Further help", (*cobra.Command).IsAdditionalHelpTopicCommand)
	}
	if cmd.HasAvailableLocalFlags() {
		fmt.Fprintf(&b, "\n%s\n", groupedFlags(cmd.LocalFlags()))
	}
	if cmd.HasExample() {
		fmt.Fprintf(&b, "\nExamples:\n%s\n", cmd.Example)
	}
	_, err := io.WriteString(cmd.OutOrStdout(), b.String())
	return err
}

// reading explains placeholders and exit codes where flags are many.
const reading = `L is a length: 12mm, 0.5in, 1um, 2thou, or bare in the unit of the size.
C is a coefficient times the module (1.25 means 1.25 m), or a length with its unit.
Numbers are decimal with a point.

Exit codes: 0 done; 1 input or output failed; 2 the request is malformed;
3 the geometry cannot be made; 130 interrupted.
`

// cautions is the safety section of the help.
func cautions() string {
	return "Cautions:\n  " + strings.Join(export.Cautions(), "\n  ")
}

// groupedFlags lays flags out under the headings of their groups, in the order
// they were defined.
func groupedFlags(flags *pflag.FlagSet) string {
	var order []group
	lines := map[group][]string{}
	flags.VisitAll(func(f *pflag.Flag) {
		if f.Hidden {
			return
		}
		g := flagGroup(f)
		if g == "" {
			g = "Other"
		}
		if lines[g] == nil {
			order = append(order, g)
		}
		lines[g] = append(lines[g], flagLine(f))
	})
	var b strings.Builder
	for i, g := range order {
		if i > 0 {
			b.WriteString("\n\n")
		}
		fmt.Fprintf(&b, "%s:\n%s", g, strings.Join(lines[g], "\n"))
	}
	return b.String()
}

// flagLine is one flag of the help.
func flagLine(f *pflag.Flag) string {
	head := "      --" + f.Name
	if f.Shorthand != "" {
		head = "  -" + f.Shorthand + ", --" + f.Name
	}
	if kind := f.Value.Type(); kind != "" && kind != "bool" {
		head += " " + kind
	}
	const column = 32
	return fmt.Sprintf("%-*s %s", column, head, f.Usage)
}

// newSidecarTopic is a help topic: the sidecar's schema.
func newSidecarTopic() *cobra.Command {
	return &cobra.Command{
		Use:   "sidecar",
		Short: "The JSON Schema of the sidecar",
		Long:  strings.TrimRight(sidecar.Schema, "\n"),
	}
}

// newFamilyTopic is a help topic: the schema of a family's list.
func newFamilyTopic() *cobra.Command {
	return &cobra.Command{
		Use:   "family-list",
		Short: "The JSON Schema of family.json",
		Long:  strings.TrimRight(sidecar.FamilySchema, "\n"),
	}
}
