package main

import (
	"context"
	"runtime"
	"strconv"
	"strings"

	"github.com/spf13/cobra"
)

// familyParameters are the flags of a family itself; those of its rows come from the
// forms.
func familyParameters() []parameter {
	return []parameter{
		{name: "output", short: "o", group: groupFamily, value: "DIR", usage: "folder of the drawings; made where it does not exist", transient: true},
		{name: "format", group: groupFamily, value: "LIST", usage: "dxf, svg or dxf,svg (default dxf)", transient: true, choices: []string{"dxf", "svg", "dxf,svg"}},
		{name: "name-pattern", group: groupFamily, value: "TEXT", usage: "names of the files: {form}, {size}, {row} and {FLAG} are filled in (default " + defaultPattern + ")", transient: true},
		{name: "workers", group: groupFamily, value: "N", usage: "gears made at a time (default the number of cores)", transient: true},
		{name: "resume", group: groupFamily, usage: "skips rows whose files are there, whole and of the same request", transient: true},
		{name: "shard", group: groupFamily, value: "I/N", usage: "only every N-th row from the I-th on, for one of N machines", transient: true},
		{name: "stop-on-error", group: groupFamily, usage: "makes nothing of the rows after the first bad one", transient: true},
		{name: "quiet", group: groupFamily, usage: "prints errors only", transient: true},
	}
}

// groupFamily heads the flags of the family.
const groupFamily group = "Family"

// rowParameters are the flags that may stand in a table: all that say what is made,
// of all forms.
func rowParameters() []parameter {
	var params []parameter
	seen := map[string]bool{}
	for _, f := range forms() {
		for _, p := range f.parameters() {
			if !p.transient && !seen[p.name] {
				seen[p.name] = true
				params = append(params, p)
			}
		}
	}
	return params
}

func newFamily(io streams) *cobra.Command {
	cmd := &cobra.Command{
		Use:   "family TABLE",
		Short: "One drawing for each row of a table",
		Long: `Makes one drawing, and its sidecar, for each row of a table of comma, semicolon or
tab separated values; - reads standard input. Columns are named as the flags
below, without dashes, and form (` + strings.Join(formNames(), ", ") + `; gear if absent) and name (of the
files; by --name-pattern if absent). An empty cell takes the flag's value from
the command line, or its default; a cell of hole-circle may hold several with
blanks between.

A bad row is left out and told at the end; mistakes of the table itself are told
before anything is written. DIR/family.json and DIR/family.csv list every row with
key figures, deviation, warnings, files and checksums; they are written last.

` + reading + `4 some rows failed, and the others are written.

` + cautions(),
		Example: `  flankwright family sizes.csv -o out/ --format dxf,svg
  flankwright family sizes.csv -o out/ --resume
  flankwright family sizes.csv -o out/ --shard 2/8`,
		Args: oneTable,
	}
	own := define(cmd, familyParameters())
	defaults := define(cmd, rowParameters())
	cmd.RunE = func(cmd *cobra.Command, args []string) error {
		options, err := readFamilyOptions(args[0], newRequest("family", own))
		if err != nil {
			return err
		}
		return runFamily(cmd.Context(), io, options, newRequest("", defaults))
	}
	return cmd
}

// oneTable asks for the one argument.
func oneTable(_ *cobra.Command, args []string) error {
	switch len(args) {
	case 0:
		return problems{{message: "the table is missing", hint: "give its path, or - for standard input", exit: exitMalformed}}
	case 1:
		return nil
	}
	return noArguments(nil, args[1:])
}

// familyOptions say how a family is made.
type familyOptions struct {
	table       string // path, or - for standard input
	dir         string
	formats     []string
	pattern     namePattern
	workers     int
	resume      bool
	shard       shard
	stopOnError bool
	quiet       bool
}

// shard is the part of a table that one machine makes.
type shard struct{ i, n int }

// takes says whether a row belongs to the shard.
func (s shard) takes(row int) bool { return (row-s.i)%s.n == 0 }

// String is I/N; "" for the whole table.
func (s shard) String() string {
	if s.n == 1 {
		return ""
	}
	return strconv.Itoa(s.i) + "/" + strconv.Itoa(s.n)
}

// tag tells the shard's files apart from those of others.
func (s shard) tag() string {
	if s.n == 1 {
		return listName
	}
	return listName + "-" + strconv.Itoa(s.i) + "-of-" + strconv.Itoa(s.n)
}

// mostWorkers is more than any machine has cores to keep busy.
const mostWorkers = 1024

// readFamilyOptions reads the family's own flags.
func readFamilyOptions(tablePath string, req request) (familyOptions, error) {
	r := newReader(req)
	o := familyOptions{table: tablePath, formats: []string{"dxf"}, workers: runtime.GOMAXPROCS(0), shard: shard{1, 1},
		resume: r.on("resume"), stopOnError: r.on("stop-on-error"), quiet: r.on("quiet")}
	if dir, ok := r.value("output"); ok && dir != "" {
		o.dir = dir
	} else {
		r.found = append(r.found, problem{message: "the folder for the drawings is missing", hint: "give -o DIR", exit: exitMalformed})
	}
	if s, ok := r.value("format"); ok {
		o.formats = r.formats(s)
	}
	if n, ok := r.count("workers"); ok {
		if n < 1 || n > mostWorkers {
			r.fail("workers", strconv.Itoa(n), "is no number of workers", "give 1 to "+strconv.Itoa(mostWorkers))
		}
		o.workers = n
	}
	if s, ok := r.value("shard"); ok {
		o.shard = r.shard(s)
	}
	pattern := defaultPattern
	if s, ok := r.value("name-pattern"); ok {
		pattern = s
	}
	var known []string
	for _, p := range rowParameters() {
		known = append(known, p.name)
	}
	var err error
	if o.pattern, err = parsePattern(pattern, known); err != nil {
		r.found = append(r.found, err.(problems)...)
	}
	if r.found != nil {
		return familyOptions{}, r.found
	}
	return o, nil
}

// formats reads a list of formats.
func (r *reader) formats(s string) []string {
	var list []string
	for _, f := range strings.Split(s, ",") {
		switch {
		case f != "dxf" && f != "svg":
			r.fail("format", s, strconv.Quote(f)+" is no format", "give dxf, svg or dxf,svg")
			return nil
		case len(list) > 0 && list[0] == f:
			r.fail("format", s, "a format is given twice", "give dxf, svg or dxf,svg")
			return nil
		}
		list = append(list, f)
	}
	return list
}

// shard reads I/N.
func (r *reader) shard(s string) shard {
	const hint = "give I/N, such as 2/8 for the second of eight"
	first, of, ok := strings.Cut(s, "/")
	if !ok {
		r.fail("shard", s, "is not of the form I/N", hint)
		return shard{}
	}
	i, okI := r.wholePart("shard", s, first, hint)
	n, okN := r.wholePart("shard", s, of, hint)
	if okI && okN && i > n {
		r.fail("shard", s, "there is no such part", hint)
	}
	return shard{i, n}
}

// runFamily plans the whole table, then makes its rows.
func runFamily(ctx context.Context, io streams, o familyOptions, defaults request) error {
	source, err := openTable(io.in, o)
	if err != nil {
		return err
	}
	defer source.Close()
	plan, err := planFamily(ctx, source, o, defaults)
	if err != nil {
		return err
	}
	return plan.run(ctx, io)
}
