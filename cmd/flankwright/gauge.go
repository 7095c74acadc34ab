package main

import (
	"context"
	"slices"

	"github.com/spf13/cobra"

	"flankwright/export/sidecar"
)

// groupGauge heads the flags of measuring.
const groupGauge group = "Measuring"

// gaugeParameters are the flags of the gauge command besides those of the parts.
func gaugeParameters() []parameter {
	return []parameter{
		{name: "form", group: groupForm, value: "FORM", usage: "gear, ring or rack (default gear)", choices: partForms()},
		{name: "pin-diameter", group: groupGauge, value: "L", usage: "of pins or balls (default the nearest kept in stock)"},
		{name: "thickness-allowance", group: groupGauge, value: "A", usage: "UPPER,LOWER deviation of the tooth thickness, or a series of DIN 3967 such as cd25; gives limits"},
		{name: "flank-class", group: groupGauge, value: "N", usage: "flank tolerance class of ISO 1328-1, 1 to 11"},
		{name: "measured-span", group: groupGauge, value: "K:L", usage: "span L measured over K teeth; repeatable", repeatable: true},
		{name: "measured-over-pins", group: groupGauge, value: "L", usage: "dimension measured over (in a ring between) pins; repeatable", repeatable: true},
		{name: "measured-chord", group: groupGauge, value: "L", usage: "chordal thickness measured at the nominal height; repeatable", repeatable: true},
		{name: "mate-teeth", group: groupGauge, value: "N", usage: "of a nominal mate without shift and thinning; gives the backlash of measured teeth"},
		{name: "center-distance", group: groupGauge, value: "L", usage: "to the mate (default half the sum of the reference diameters)"},
		{name: "unknown", group: groupGauge, usage: "finds the size of a gear from --teeth and what was measured", transient: true},
		{name: "measured-tip-diameter", group: groupGauge, value: "L", usage: "with --unknown", transient: true},
		{name: "uncertainty", group: groupGauge, value: "L", usage: "with --unknown: the most by which a reading is off (default 0.02mm)", transient: true},
		{name: "unit", group: groupOutput, value: "UNIT", usage: "mm or in, of what is printed (default that of the size)", choices: []string{"mm", "in"}},
		{name: "json", group: groupOutput, usage: "prints the sidecar to stdout", transient: true},
		{name: "quiet", group: groupOutput, usage: "prints errors only", transient: true},
		{name: "from", group: groupOutput, value: "SIDECAR", usage: "takes its input as defaults, that of a drawing too", transient: true},
	}
}

// measuredParameters are the flags of the gauge command for a form: those of its size
// and teeth, and what measuring a rack's back or a ring needs.
func measuredParameters(form string) []parameter {
	params := slices.DeleteFunc(partParameters(form), func(p parameter) bool {
		return p.group != groupSize && p.group != groupForm && p.name != "height" && p.name != "rim-diameter"
	})
	return append(params, gaugeParameters()...)
}

func newGauge(io streams) *cobra.Command {
	cmd := &cobra.Command{
		Use:   "gauge",
		Short: "Inspection dimensions, and what a measured value means",
		Long: `Prints the dimensions a gear, ring or rack is inspected by: span over teeth,
dimension over pins, chordal thickness, each with the circle where it touches, and
limits where a thickness allowance is given. Measured values are turned into the
tooth thickness they mean. With --unknown, the size of an unmarked gear is found
from its teeth, tip diameter, and spans over two numbers of teeth.

` + reading + "\n" + cautions(),
		Example: `  flankwright gauge --diametral-pitch 8 --teeth 22
  flankwright gauge --module 2.5 --teeth 31 --measured-span 4:27.15 --mate-teeth 62
  flankwright gauge --unknown --teeth 28 --measured-tip-diameter 59.9 --measured-span 4:21.32 --measured-span 5:27.22`,
		Args: noArguments,
	}
	var params []parameter
	seen := map[string]bool{}
	for _, form := range partForms() {
		for _, p := range measuredParameters(form) {
			if !seen[p.name] {
				seen[p.name] = true
				params = append(params, p)
			}
		}
	}
	slices.SortStableFunc(params, func(a, b parameter) int { return groupRank(a.group) - groupRank(b.group) })
	flags := define(cmd, params)
	cmd.RunE = func(cmd *cobra.Command, _ []string) error {
		return runGauge(cmd.Context(), io, newRequest("gauge", flags))
	}
	return cmd
}

// groupRank puts groups in the order of the help.
func groupRank(g group) int {
	return slices.Index([]group{groupSize, groupForm, groupPair, groupBody, groupGauge, groupDrawing, groupCut, groupFamily, groupOutput}, g)
}

// runGauge prints what the part is inspected by.
func runGauge(_ context.Context, io streams, req request) error {
	r := newReader(req)
	show := output{json: r.on("json"), quiet: r.on("quiet")}
	if r.on("unknown") {
		return runUnknown(io, req, show)
	}
	if from, ok := r.value("from"); ok {
		var err error
		if req, err = withDrawing(req, from); err != nil {
			return err
		}
		r = newReader(req)
	}
	form := r.choice("form", partForms(), "gear")
	if r.found != nil {
		return r.found
	}
	if err := onlyWith(req, "unknown", "measured-tip-diameter", "uncertainty"); err != nil {
		return err
	}
	known := measuredParameters(form)
	for name := range req.values {
		if !slices.ContainsFunc(known, func(p parameter) bool { return p.name == name }) && !req.given("from") {
			return problems{{flag: name, message: "is no flag for a " + form, hint: "leave it out", exit: exitMalformed}}
		}
	}
	req.command = form
	job, err := resolvePart(req)
	if err != nil {
		return err
	}
	job.input["command"], job.input["form"] = "gauge", form
	job.measuring.only = true
	made, err := makePart(job)
	if err != nil {
		return err
	}
	if !show.quiet {
		warn(io.err, made.warnings, sidecar.Show(made.part.Unit))
	}
	if show.json {
		document, err := made.doc.Marshal()
		if err != nil {
			return problems{{message: "the sidecar cannot be written: " + err.Error(), exit: exitFailed}}
		}
		_, err = io.out.Write(document)
		return writeFailed("stdout", err)
	}
	if show.quiet {
		return nil
	}
	return printGauge(io.out, made)
}

// withDrawing takes the sidecar of a drawing, or of this command, as defaults.
func withDrawing(req request, path string) (request, error) {
	defaults, err := readSidecar(path, append(allParameters(), gaugeParameters()...), append([]string{"gauge"}, partForms()...)...)
	if err != nil {
		return req, err
	}
	if defaults.command != "gauge" {
		defaults.values["form"] = []string{defaults.command}
	}
	return req.withDefaults(defaults), nil
}

// onlyWith refuses flags that say nothing without another.
func onlyWith(req request, other string, names ...string) error {
	var found problems
	for _, name := range names {
		if req.given(name) {
			found = append(found, problem{flag: name, message: "says nothing here", hint: "give it with --" + other, exit: exitMalformed})
		}
	}
	if found == nil {
		return nil
	}
	return found
}
