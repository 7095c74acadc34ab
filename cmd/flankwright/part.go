package main

import (
	"context"
	"fmt"

	"github.com/spf13/cobra"

	"flankwright/export"
	"flankwright/profile"
)

// partWords are what the help of a form says.
type partWords struct{ short, long, example string }

func wordsOf(form string) partWords {
	switch form {
	case "ring":
		return partWords{"An internal gear",
			`Computes an internal gear: flanks exact, roots rounded by arcs or as a pinion-type
cutter leaves them. Without -o the dimension table is printed; with -o the drawing
and its sidecar are written.

A positive profile shift thickens the ring's own teeth, which then reach further
towards the axis (ISO 21771). Some handbooks count a ring's shift the other way:
change the sign of what they print.
`, `  flankwright ring --module 1.5 --teeth 60 --rim-diameter 110 -o ring.dxf -o ring.svg
  flankwright ring --module 2 --teeth 48 --cutter-teeth 28 --rim-diameter 120 -o cut.dxf`}
	case "rack":
		return partWords{"A straight rack",
			`Computes a straight rack of so many pitches. The datum line is on y = 0, the teeth
point to +Y, and tooth 1 is on x = 0 with the others towards +X. Without -o the
dimension table is printed; with -o the drawing and its sidecar are written.
`, `  flankwright rack --diametral-pitch 8 --teeth 12 --height 0.75in -o rack.dxf
  flankwright rack --module 2 --teeth 20 --rack-ends tooth -o rack.svg`}
	}
	return partWords{"An external gear",
		`Computes an external involute gear as the generating rack would leave it. Without
-o the dimension table is printed; with -o the drawing and its sidecar are
written.
`, `  flankwright gear --module 2 --teeth 24
  flankwright gear --module 2 --teeth 24 --bore 10 -o gear.dxf -o gear.svg
  flankwright gear --diametral-pitch 16 --teeth 30 --profile-shift 0.2 --thinning 0.003 -o g.dxf`}
}

// newPart is the command of one form of part.
func newPart(io streams, form string) *cobra.Command {
	params, words := partParameters(form), wordsOf(form)
	cmd := &cobra.Command{
		Use:     form,
		Short:   words.short,
		Long:    words.long + "\n" + reading + "\n" + cautions(),
		Example: words.example,
		Args:    noArguments,
	}
	flags := define(cmd, params)
	cmd.RunE = func(cmd *cobra.Command, _ []string) error {
		return runPart(cmd.Context(), io, newRequest(form, flags), params)
	}
	return cmd
}

// runPart is the way of a request: defaults, numbers, exact tooth, drawn tooth,
// sheet, files or table.
func runPart(ctx context.Context, io streams, req request, params []parameter) error {
	out, err := readOutput(req)
	if err != nil {
		return err
	}
	if out.from != "" {
		defaults, err := readSidecar(out.from, params, req.command)
		if err != nil {
			return err
		}
		req = req.withDefaults(defaults)
	}
	job, err := resolvePart(req)
	if err != nil {
		return err
	}
	made, err := makePart(job)
	if err != nil {
		return err
	}
	return out.deliver(ctx, io, made)
}

// title names the part in one line.
func (m *partMade) title() string {
	d := m.part.Tooth.Dimensions
	size := "module " + profile.NumberOf(d.Module).String() + " mm"
	if m.part.Unit == export.Inch {
		size = "diametral pitch " + profile.NumberOf(d.DiametralPitch()).String()
	}
	switch m.part.Tooth.Form {
	case profile.FormRing:
		return fmt.Sprintf("internal gear, %d teeth, %s", d.Teeth, size)
	case profile.FormRack:
		return fmt.Sprintf("rack, %d pitches, %s", d.Teeth, size)
	}
	return fmt.Sprintf("external gear, %d teeth, %s", d.Teeth, size)
}
