package main

import (
	"context"
	"encoding/json"
	"io"
	"math"
	"strings"
	"testing"
)

// TestParseLength: what counts as a length, and in which unit.
func TestParseLength(t *testing.T) {
	mm, inch := units()[0], units()[2]
	for s, want := range map[string]struct {
		mm   float64 // read with bare lengths in mm
		inch float64 // read with bare lengths in inch
		text string  // normalized, bare in inch
	}{
		"2":       {2, 50.8, "2in"},
		"2mm":     {2, 2, "2mm"},
		"1um":     {0.001, 0.001, "1um"},
		"0.5in":   {12.7, 12.7, "0.5in"},
		"2thou":   {0.0508, 0.0508, "2thou"},
		".5":      {0.5, 12.7, "0.5in"},
		"5.":      {5, 127, "5in"},
		"-0.25":   {-0.25, -6.35, "-0.25in"},
		"1e-3mm":  {0.001, 0.001, "0.001mm"},
		"+3":      {3, 76.2, "3in"},
		"010":     {10, 254, "10in"},
		"0.1um":   {0.0001, 0.0001, "0.1um"},
		"1000um":  {1, 1, "1000um"},
		"250thou": {6.35, 6.35, "250thou"},
	} {
		l, err := parseLength(s)
		if err != nil {
			t.Errorf("%q: %v", s, err)
			continue
		}
		const ulps = 1e-15 // relative
		if got := l.in(mm); math.Abs(got-want.mm) > ulps*math.Abs(want.mm) {
			t.Errorf("%q is %v mm, want %v", s, got, want.mm)
		}
		if got := l.in(inch); math.Abs(got-want.inch) > ulps*math.Abs(want.inch) {
			t.Errorf("%q bare in inch is %v mm, want %v", s, got, want.inch)
		}
		if got := l.text(inch); got != want.text {
			t.Errorf("%q is normalized to %q, want %q", s, got, want.text)
		}
	}
	for _, s := range []string{"", "x", "1,25", "NaN", "inf", "0x10", "1_000", "1e999", "2 mm", "mm", "--2", "1.2.3", "2MM", "٣"} {
		if l, err := parseLength(s); err == nil {
			t.Errorf("%q is taken for %v", s, l)
		}
	}
}

// FuzzParseLength: a length that is taken is finite, and its normalized text reads
// back as the same length.
func FuzzParseLength(f *testing.F) {
	for _, s := range []string{"2", "0.5in", "1um", "1,25", "NaN", "1e308thou", "-0"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		l, err := parseLength(s)
		if err != nil {
			return
		}
		for _, bare := range units() {
			v := l.in(bare)
			if math.IsNaN(v) {
				t.Fatalf("%q is NaN", s)
			}
			again, err := parseLength(l.text(bare))
			if err != nil || again.in(units()[0]) != v {
				t.Fatalf("%q is %v, its text %q reads as %v, %v", s, v, l.text(bare), again, err)
			}
		}
	})
}

// FuzzParseSidecar: whatever a file holds, reading it ends in a request of known
// flags or in an error.
func FuzzParseSidecar(f *testing.F) {
	f.Add([]byte(`{"schema":"flankwright/sidecar/v1","input":{"command":"gear","module":"2mm","teeth":"24","reference":true}}`))
	f.Add([]byte(`{"schema":"flankwright/sidecar/v1","input":{"command":"gear","module":["1","2"]}}`))
	f.Add([]byte(`{"schema":"x"}`))
	f.Add([]byte(`[]`))
	params := partParameters("gear")
	f.Fuzz(func(t *testing.T, data []byte) {
		r, err := parseSidecar(data, params, "gear")
		if err != nil {
			return
		}
		for name, values := range r.values {
			if len(values) == 0 {
				t.Fatalf("flag %s without a value", name)
			}
		}
		_, _ = resolvePart(r)
	})
}

// FuzzGear: any command line ends within the known exit codes, says why it failed in
// whole lines, and never prints a number that is none.
func FuzzGear(f *testing.F) {
	f.Add("2", "24", "0.2", "iso53-a", "1um", "0.1")
	f.Add("0.05", "3", "-2", "stub-20", "100um", "0")
	f.Add("100", "2000", "2", "full-depth-14.5", "1mm", "1e9")
	f.Fuzz(func(t *testing.T, module, teeth, shift, rack, tolerance, thinning string) {
		var out, errOut strings.Builder
		code := run(context.Background(), []string{"gear", "--module=" + module, "--teeth=" + teeth, "--profile-shift=" + shift,
			"--basic-rack=" + rack, "--tolerance=" + tolerance, "--thinning=" + thinning, "--json"}, strings.NewReader(""), &out, &errOut)
		switch code {
		case exitDone:
			if !json.Valid([]byte(out.String())) {
				t.Fatal("stdout is not JSON")
			}
		case exitMalformed, exitGeometry:
			if out.Len() > 0 {
				t.Fatalf("refused, but printed %q", out.String())
			}
			for line := range strings.Lines(errOut.String()) {
				if !strings.HasPrefix(line, "flankwright: ") || !strings.HasSuffix(line, "\n") {
					t.Fatalf("stderr line %q", line)
				}
			}
		default:
			t.Fatalf("exit %d: %s", code, errOut.String())
		}
		if strings.Contains(errOut.String(), "NaN") && !strings.Contains(module+teeth+shift+rack+tolerance+thinning, "NaN") {
			t.Fatalf("a number that is none: %s", errOut.String())
		}
	})
}

// TestFromTakesItsOwnInput: the input of a sidecar resolves to the same job.
func TestFromTakesItsOwnInput(t *testing.T) {
	args := []string{"gear", "--diametral-pitch", "12", "--teeth", "31", "--pressure-angle", "22.5", "--addendum", "0.9", "--dedendum", "0.1in",
		"--root-radius", "full", "--profile-shift", "-0.1", "--thinning", "2thou", "--thinning-by", "infeed", "--tip-chamfer", "0.2mm",
		"--bore", "0.75", "--curves", "lines", "--tolerance", "3um", "--reference", "--unit", "mm", "--turn", "7.5", "--json"}
	code, first, stderr := call(t, args...)
	if code != exitDone {
		t.Fatal(stderr)
	}
	r, err := parseSidecar([]byte(first), partParameters("gear"), "gear")
	if err != nil {
		t.Fatal(err)
	}
	job, err := resolvePart(r)
	if err != nil {
		t.Fatal(err)
	}
	made, err := makePart(job)
	if err != nil {
		t.Fatal(err)
	}
	again, err := made.doc.Marshal()
	if err != nil {
		t.Fatal(err)
	}
	if string(again) != first {
		t.Errorf("the sidecar's input gives another sidecar:\n%s\n%s", first, again)
	}
}

// TestInterruptedRunWritesNothing: a cancelled run exits 130 and leaves no file.
func TestInterruptedRunWritesNothing(t *testing.T) {
	dir := t.TempDir()
	t.Chdir(dir)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	var errOut strings.Builder
	if code := run(ctx, []string{"gear", "--module", "2", "--teeth", "24", "-o", "x.dxf"}, nil, io.Discard, &errOut); code != exitInterrupted {
		t.Errorf("exit %d: %s", code, errOut.String())
	}
	assertEmpty(t, dir)
}
