package main

import (
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"text/tabwriter"

	"github.com/spf13/cobra"

	"flankwright/profile"
)

// rackNames are the names of the basic racks, each once.
func rackNames() []string {
	var names []string
	for _, r := range profile.StandardRacks() {
		if !slices.Contains(names, r.Name) {
			names = append(names, r.Name)
		}
	}
	return names
}

func newBasicRacks(io streams) *cobra.Command {
	return &cobra.Command{
		Use:   "basic-racks",
		Short: "List the basic racks known by name",
		Long: `The basic racks known by name: pressure angle in degrees, the rest in modules.
Any of them can be changed with --pressure-angle, --addendum, --dedendum and
--root-radius. A default rounding that does not fit is lowered to the full
radius, with a warning.`,
		Args: noArguments,
		RunE: func(*cobra.Command, []string) error { return listRacks(io.out) },
	}
}

// listRacks prints the table.
func listRacks(out io.Writer) error {
	w := tabwriter.NewWriter(out, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "name\tsizes\tangle\taddendum\tdedendum\troot radius\tsource")
	ours := ""
	for _, r := range profile.StandardRacks() {
		radius := strconv.FormatFloat(r.RootRadius, 'f', -1, 64)
		if math.IsNaN(r.RootRadius) {
			radius, ours = "ours", r.Note
		}
		sizes := r.Pitch
		if sizes == "" {
			sizes = "all"
		}
		fmt.Fprintf(w, "%s\t%s\t%s\t%s\t%s\t%s\t%s\n", r.Name, sizes, profile.NumberOf(r.PressureAngle*180/math.Pi),
			profile.NumberOf(r.Addendum), r.DedendumText(), radius, r.Source)
	}
	if err := w.Flush(); err != nil {
		return writeFailed("stdout", err)
	}
	_, err := fmt.Fprintf(out, "\nours: %s\n", ours)
	return writeFailed("stdout", err)
}
