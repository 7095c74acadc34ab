package main

import (
	"context"
	"fmt"

	"github.com/spf13/cobra"

	"flankwright/export"
	"flankwright/profile"
)

func newGear(io streams) *cobra.Command {
	params := partParameters("gear")
	cmd := &cobra.Command{
		Use:   "gear",
		Short: "An external gear",
		Long: `Computes an external involute gear as the generating rack would leave it. Without
-o the dimension table is printed; with -o the drawing and its sidecar are
written.

` + reading + "\n" + cautions(),
		Example: `  flankwright gear --module 2 --teeth 24
  flankwright gear --module 2 --teeth 24 --bore 10 -o gear.dxf -o gear.svg
  flankwright gear --diametral-pitch 16 --teeth 30 --profile-shift 0.2 --thinning 0.003 -o g.dxf`,
		Args: noArguments,
	}
	flags := define(cmd, params)
	cmd.RunE = func(cmd *cobra.Command, _ []string) error {
		return runPart(cmd.Context(), io, newRequest("gear", flags), params)
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

// title names the gear in one line.
func (m *partMade) title() string {
	d := m.part.Tooth.Dimensions
	size := "module " + profile.NumberOf(d.Module).String() + " mm"
	if m.part.Unit == export.Inch {
		size = "diametral pitch " + profile.NumberOf(d.DiametralPitch()).String()
	}
	return fmt.Sprintf("external gear, %d teeth, %s", d.Teeth, size)
}
