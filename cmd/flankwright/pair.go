package main

import (
	"context"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"flankwright/export/files"
	"flankwright/export/sidecar"
)

// groupPair heads the flags of two members in mesh.
const groupPair group = "Pair"

// meshParameters are the flags of a pair besides those of its members.
func meshParameters() []parameter {
	return []parameter{
		{name: "internal", group: groupPair, usage: "member 2 is a ring"},
		{name: "center-distance", group: groupPair, value: "L", usage: "with no shifts given they follow from it; of a rack from the gear's axis to the datum line (default from the shifts)"},
		{name: "center-distance-tolerance", group: groupPair, value: "L", usage: "either way; gives the least and largest backlash"},
		{name: "shift-balance", group: groupPair, value: "WAY", usage: "how the sum of shifts is parted: sliding (equal largest specific sliding), equal, first (default sliding)", choices: []string{"sliding", "equal", "first"}},
		{name: "backlash", group: groupPair, value: "L", usage: "circumferential, on the operating pitch circle; made by thinning"},
		{name: "backlash-rule", group: groupPair, value: "RULE", usage: "agma or iso: the recommended least backlash", choices: []string{"agma", "iso"}},
		{name: "backlash-split", group: groupPair, value: "X", usage: "share of the thinning that member 1 takes (default 0.5)"},
		{name: "drive", group: groupPair, value: "WAY", usage: "cw or ccw: how member 1 turns and drives in the assembly drawing (default ccw)", choices: []string{"cw", "ccw"}},
		{name: "allow-short-contact", group: groupPair, usage: "takes a contact ratio below 1"},
	}
}

// memberParameters are the flags of the parts that members of a pair have: all but the
// turn, which the assembly settles.
func memberParameters() []parameter {
	return slices.DeleteFunc(allParameters(), func(p parameter) bool { return p.name == "turn" || p.transient })
}

// pairParameters are all flags of a pair that say what is made.
func pairParameters() []parameter { return append(memberParameters(), meshParameters()...) }

func newPair(io streams) *cobra.Command {
	cmd := &cobra.Command{
		Use:   "pair",
		Short: "Two members at a center distance",
		Long: `Finds shifts, tips and thinning of two members at a center distance, or the center
distance of two members with their shifts, tells whether they work together, proves
it on the drawn curves by rolling them through a pitch of contact, and with -o
writes both and an assembly into a folder: 1-..., 2-..., assembly and pair.json.

Where the members differ a flag takes two values with a comma between, and an empty
one is the default: --teeth 17,43 --bore 8, gives member 1 a bore. Member 2 is a
ring with --internal and a rack with --teeth 17,rack.

` + reading + "\n" + cautions(),
		Example: `  flankwright pair --module 2 --teeth 17,43 --center-distance 61 --backlash-rule iso -o out/
  flankwright pair --diametral-pitch 10 --teeth 14,56 --profile-shift 0.4,-0.1 --backlash 0.004
  flankwright pair --module 1 --teeth 18,60 --internal --backlash 0.05 -o internal/
  flankwright pair --module 2 --teeth 20,rack -o rack/`,
		Args: noArguments,
	}
	params := append(pairParameters(),
		parameter{name: "output", short: "o", group: groupOutput, value: "DIR", usage: "folder of the drawings; made where it does not exist", transient: true},
		parameter{name: "format", group: groupOutput, value: "LIST", usage: "dxf, svg or dxf,svg (default dxf)", transient: true, choices: []string{"dxf", "svg", "dxf,svg"}},
		parameter{name: "json", group: groupOutput, usage: "prints the sidecar to stdout", transient: true},
		parameter{name: "quiet", group: groupOutput, usage: "prints errors only", transient: true},
		parameter{name: "from", group: groupOutput, value: "SIDECAR", usage: "takes its input as defaults", transient: true})
	slices.SortStableFunc(params, func(a, b parameter) int { return groupRank(a.group) - groupRank(b.group) })
	flags := define(cmd, params)
	cmd.RunE = func(cmd *cobra.Command, _ []string) error {
		return runPair(cmd.Context(), io, newRequest("pair", flags))
	}
	return cmd
}

// runPair makes a pair, and writes or prints it.
func runPair(ctx context.Context, io streams, req request) error {
	r := newReader(req)
	out := output{json: r.on("json"), quiet: r.on("quiet")}
	dir, _ := r.value("output")
	formats := []string{"dxf"}
	if s, ok := r.value("format"); ok {
		formats = r.formats(s)
	}
	if r.found != nil {
		return r.found
	}
	if from, ok := r.value("from"); ok {
		defaults, err := readSidecar(from, pairParameters(), "pair")
		if err != nil {
			return err
		}
		req = req.withDefaults(defaults)
	}
	job, err := resolvePair(req)
	if err != nil {
		return err
	}
	made, err := job.makePair()
	if err != nil {
		return err
	}
	var set []files.File
	if dir != "" {
		if set, err = writePair(ctx, made, dir, formats); err != nil {
			return err
		}
	}
	if !out.quiet {
		warn(io.err, made.pair.Warnings, sidecar.Show(made.unit()))
	}
	switch {
	case out.json:
		document, err := made.doc.Marshal()
		if err == nil {
			_, err = io.out.Write(document)
		}
		return writeFailed("stdout", err)
	case out.quiet:
		return nil
	}
	return made.print(io.out, set)
}

// writePair writes the files of a pair into a folder, the sidecar last.
func writePair(ctx context.Context, made *pairMade, dir string, formats []string) ([]files.File, error) {
	if err := os.MkdirAll(dir, 0o777); err != nil {
		return nil, setFailed(err)
	}
	names := made.names()
	set, err := renderSheets(made, new(pages), formats, func(i int) string { return filepath.Join(dir, names[i]) })
	if err != nil {
		return nil, err
	}
	text, err := made.doc.Marshal()
	if err != nil {
		return nil, setFailed(err)
	}
	set = append(set, files.File{Name: filepath.Join(dir, "pair.json"), Data: text})
	if err := files.WriteSet(ctx, files.Options{}, set...); err != nil {
		return nil, setFailed(err)
	}
	return set, nil
}

// names are the base names of a pair's drawings.
func (m *pairMade) names() []string {
	var names []string
	for i, member := range m.members {
		name := []string{"1", "2"}[i] + "-" + m.job.forms[i] + "-z" + plain(float64(member.part.Tooth.Dimensions.Teeth))
		if k := m.job.members[i].kerf; k > 0 {
			name += "-kerf" + strings.TrimSuffix(m.job.members[i].input["kerf"].(string), newReaderOf(m.job).bare.suffix)
		}
		names = append(names, name)
	}
	return append(names, "assembly")
}
