package main

import (
	"context"
	"errors"
	"io"

	"github.com/spf13/cobra"
)

// The exit codes; --help lists them.
const (
	exitDone        = 0
	exitFailed      = 1   // input or output failed
	exitMalformed   = 2   // the request is malformed
	exitGeometry    = 3   // the geometry cannot be made
	exitRows        = 4   // some rows of a family failed, the others are written
	exitInterrupted = 130 // as shells report SIGINT
)

// streams are where a command reads and writes.
type streams struct {
	in       io.Reader
	out, err io.Writer
}

// run is the whole program but for the process around it.
//
// Rules of speech: stdout carries results only. stderr carries
// "flankwright: error: ...", "flankwright: hint: ..." and
// "flankwright: warning: ...", a line each, lower case, without a full stop.
func run(ctx context.Context, args []string, in io.Reader, out, errOut io.Writer) int {
	io := streams{in, out, errOut}
	root := newRoot(io)
	root.SetArgs(args)
	err := knownCommand(root, args)
	if err == nil {
		err = root.ExecuteContext(ctx)
	}
	if err == nil {
		return exitDone
	}
	if ctx.Err() != nil {
		complain(errOut, problem{message: "interrupted; nothing is left half written", exit: exitInterrupted})
		return exitInterrupted
	}
	var found problems
	if !errors.As(err, &found) {
		found = problems{malformed(err)}
	}
	complain(errOut, found...)
	return found.exit()
}

// newRoot assembles the command tree.
func newRoot(io streams) *cobra.Command {
	root := &cobra.Command{
		Use:   "flankwright",
		Short: "Draw involute gears: exact generated outlines as DXF and SVG, with the numbers to inspect them by",
		Long: `flankwright computes the outline a generating rack would leave of a gear tooth,
draws it within a stated tolerance, and hands it over as DXF or SVG with a
sidecar of dimensions. What cannot be made is refused, with what would work.`,
		SilenceErrors: true,
		SilenceUsage:  true,
		RunE:          func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	root.SetIn(io.in)
	root.SetOut(io.out)
	root.SetErr(io.err)
	root.SetFlagErrorFunc(flagError)
	root.SetUsageFunc(usage)
	root.AddCommand(newPart(io, "gear"), newPart(io, "ring"), newPart(io, "rack"), newPair(io), newFamily(io), newGauge(io), newBasicRacks(io), newVersion(io), newSidecarTopic(), newFamilyTopic())
	return root
}
