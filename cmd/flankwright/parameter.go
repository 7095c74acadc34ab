package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// group is a heading of the help text.
type group string

const (
	groupSize    group = "Size, exactly one"
	groupForm    group = "Form"
	groupBody    group = "Body"
	groupDrawing group = "Drawing"
	groupCut     group = "Cutting"
	groupOutput  group = "Output"
)

// parameter is one flag. Every value is kept as the text given, so that the
// command line and a sidecar are read by the same code.
type parameter struct {
	name       string
	short      string
	group      group
	value      string // placeholder in the help; "" makes it a switch
	usage      string
	repeatable bool
	forms      string // that have it, "" for all
	transient  bool   // says where results go, not what is made: not in a sidecar
	choices    []string
}

// partParameters are the flags of one form of part.
func partParameters(form string) []parameter {
	return slices.DeleteFunc(allParameters(), func(p parameter) bool {
		return p.forms != "" && !slices.Contains(strings.Fields(p.forms), form)
	})
}

// allParameters are the flags of all forms.
func allParameters() []parameter {
	return []parameter{
		{name: "module", group: groupSize, value: "L", usage: "module m; makes bare lengths mm"},
		{name: "diametral-pitch", group: groupSize, value: "P", usage: "teeth per inch of reference diameter; makes bare lengths inch"},
		{name: "circular-pitch", group: groupSize, value: "L", usage: "pitch along the reference circle; bare lengths take its unit, mm if it has none"},

		{name: "teeth", group: groupForm, value: "N", usage: "number of teeth; of a rack its length in pitches"},
		{name: "basic-rack", group: groupForm, value: "NAME", usage: "see flankwright basic-racks (default iso53-a in mm, full-depth-20 in inch)", choices: rackNames()},
		{name: "pressure-angle", group: groupForm, value: "DEG", usage: "in place of the rack's"},
		{name: "addendum", group: groupForm, value: "C", usage: "of the rack, in place of its own"},
		{name: "dedendum", group: groupForm, value: "C", usage: "of the rack, in place of its own"},
		{name: "root-radius", group: groupForm, value: "C|full", usage: "of the rack; full takes the largest that fits"},
		{name: "profile-shift", group: groupForm, value: "X", usage: "coefficient x, positive thickens the tooth, of a ring too (ISO 21771; some handbooks count a ring's shift the other way) (default 0)"},
		{name: "thinning", group: groupForm, value: "L", usage: "takes so much off the tooth thickness on the reference circle (default 0)"},
		{name: "thinning-by", group: groupForm, value: "WAY", usage: "flank keeps the root circle, infeed deepens it (default flank)", choices: []string{"flank", "infeed"}},
		{name: "tip-diameter", forms: "gear ring", group: groupForm, value: "L", usage: "in place of the one that follows from rack and shift"},
		{name: "tip-shortening", group: groupForm, value: "C", usage: "takes so much off the tip radius (default 0)"},
		{name: "tip-radius", group: groupForm, value: "L", usage: "rounds the tip corners"},
		{name: "tip-chamfer", group: groupForm, value: "L", usage: "breaks the tip corners, so far along flank and tip circle"},
		{name: "min-tip-thickness", group: groupForm, value: "C", usage: "lowers the tip where needed to keep so much thickness"},
		{name: "cutter-teeth", forms: "ring", group: groupForm, value: "N", usage: "has the root cut by a pinion-type cutter with the rack's tip (default rounded by arcs)"},
		{name: "cutter-shift", forms: "ring", group: groupForm, value: "X", usage: "profile shift coefficient of the cutter (default 0)"},
		{name: "rack-ends", forms: "rack", group: groupForm, value: "WHERE", usage: "space or tooth: the rack ends in the middle of (default space)", choices: []string{"space", "tooth"}},

		{name: "bore", forms: "gear", group: groupBody, value: "L", usage: "diameter of a round bore"},
		{name: "keyway", forms: "gear", group: groupBody, value: "KEY", usage: "iso, ansi (the size for the bore) or WxD, width x depth from the bore's crown; on +Y", choices: []string{"iso", "ansi"}},
		{name: "bore-flat", forms: "gear", group: groupBody, value: "L", usage: "gives the bore a flat on +Y; L is the depth from the flat across the bore"},
		{name: "bore-hex", forms: "gear", group: groupBody, value: "L", usage: "hexagon bore, across flats"},
		{name: "hole-circle", forms: "gear ring", group: groupBody, value: "NxD@BCD", usage: "N holes of diameter D on bolt circle BCD, the first on +Y; repeatable", repeatable: true},
		{name: "windows", forms: "gear", group: groupBody, value: "N", usage: "N lightening windows between arms, an arm on +Y"},
		{name: "rim-width", forms: "gear", group: groupBody, value: "L", usage: "between windows and root circle (default 1.2 whole depths)"},
		{name: "hub-diameter", forms: "gear", group: groupBody, value: "L", usage: "of the hub inside the windows (default from the bore)"},
		{name: "arm-width", forms: "gear", group: groupBody, value: "L", usage: "of the arms between windows (default from the rim)"},
		{name: "window-radius", forms: "gear", group: groupBody, value: "L", usage: "of the windows' corners (default from their size)"},
		{name: "rim-diameter", forms: "ring", group: groupBody, value: "L", usage: "outer diameter; without it the drawing holds the toothed bore only"},
		{name: "height", forms: "rack", group: groupBody, value: "L", usage: "from the datum line to the back (default the dedendum and 1.2 whole depths)"},
		{name: "min-feature", group: groupBody, value: "L", usage: "warns where a radius, web, gap or land is finer"},

		{name: "curves", group: groupDrawing, value: "KIND", usage: "arcs, cubics or lines (default arcs)", choices: []string{"arcs", "cubics", "lines"}},
		{name: "tolerance", group: groupDrawing, value: "L", usage: "largest distance between drawn and exact curve (default 1um)"},
		{name: "extent", group: groupDrawing, value: "PART", usage: "all, tooth, space or a number of teeth, as an open chain with its radial limits (default all)", choices: []string{"all", "tooth", "space"}},
		{name: "reference", group: groupDrawing, usage: "adds reference, base and form circles and the center lines, or the datum line, on their own layer"},
		{name: "unit", group: groupDrawing, value: "UNIT", usage: "mm or in, of the drawing (default that of the size)", choices: []string{"mm", "in"}},
		{name: "dxf", group: groupDrawing, value: "VERSION", usage: "r2000 or r12 (default r2000)", choices: []string{"r2000", "r12"}},
		{name: "loose", group: groupDrawing, usage: "writes DXF outlines as single lines and arcs, not as polylines"},
		{name: "turn", group: groupDrawing, value: "DEG", usage: "turns the part counter-clockwise; tooth 1 is on +Y (default 0)"},

		{name: "kerf", group: groupCut, value: "W", usage: "draws the path of a beam W wide: outer loops W/2 out, inner loops W/2 in"},
		{name: "lead-in", group: groupCut, value: "L", usage: "adds quarter turns of radius L from pierce points on the scrap side onto each cut"},
		{name: "tabs", forms: "gear", group: groupCut, value: "NxW", usage: "leaves N gaps of width W on tip lands"},
		{name: "label", group: groupCut, value: "TEXT", usage: "single-stroke characters on the web: letters, digits, . - + / and space"},
		{name: "label-height", group: groupCut, value: "L", usage: "of its capitals (default the largest that fits)"},

		{name: "output", short: "o", group: groupOutput, value: "PATH", usage: "a .dxf or .svg file, repeatable; the sidecar takes the first one's base name with .json", repeatable: true, transient: true},
		{name: "json", group: groupOutput, usage: "prints the sidecar to stdout", transient: true},
		{name: "quiet", group: groupOutput, usage: "prints errors only", transient: true},
		{name: "from", group: groupOutput, value: "SIDECAR", usage: "takes its input as defaults", transient: true},
	}
}

// text is a flag value kept as given. It implements pflag.Value.
type text struct {
	values []string
	param  parameter
}

// String is the value for the help; flags have no other default than "not given".
func (t *text) String() string { return "" }

// Type is the placeholder in the help.
func (t *text) Type() string { return t.param.value }

// Set keeps a value; what it means is judged later, all flags together.
func (t *text) Set(v string) error {
	if len(t.values) > 0 && !t.param.repeatable {
		return fmt.Errorf("given twice")
	}
	t.values = append(t.values, v)
	return nil
}

// define adds the parameters to a command as flags, and returns where their values
// will be.
func define(cmd *cobra.Command, params []parameter) map[string]*text {
	flags := cmd.Flags()
	flags.SortFlags = false
	values := make(map[string]*text, len(params))
	for _, p := range params {
		t := &text{param: p}
		values[p.name] = t
		f := flags.VarPF(t, p.name, p.short, p.usage)
		if p.value == "" {
			f.NoOptDefVal = "true"
		}
		f.Annotations = map[string][]string{groupKey: {string(p.group)}}
		complete := cobra.NoFileCompletions
		if p.choices != nil {
			complete = cobra.FixedCompletions(p.choices, cobra.ShellCompDirectiveNoFileComp)
		}
		if p.name == "output" || p.name == "from" {
			continue // files are what the shell completes by itself
		}
		// The only error is a flag that was not defined, and it has just been.
		_ = cmd.RegisterFlagCompletionFunc(p.name, complete)
	}
	return values
}

// groupKey marks a flag's group in its annotations.
const groupKey = "flankwright_group"

// flagGroup is the group of a flag; "" for those cobra adds.
func flagGroup(f *pflag.Flag) group {
	if g := f.Annotations[groupKey]; len(g) > 0 {
		return group(g[0])
	}
	return ""
}
