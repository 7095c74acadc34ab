package main

import (
	"bytes"
	"testing"
	"time"
)

func TestProgressLine(t *testing.T) {
	p := newProgress(&bytes.Buffer{}, 2000, false)
	if p.out != nil {
		t.Error("progress is shown where there is no terminal")
	}
	for _, c := range []struct {
		tally   tally
		elapsed time.Duration
		want    string
	}{
		{tally{}, time.Second, "0 of 2000"},
		{tally{written: 400, skipped: 50, failed: 50}, 2 * time.Second, "500 of 2000, 250 a second, 6s left"},
		{tally{written: 2000}, 4 * time.Second, "2000 of 2000, 500 a second, 0s left"},
	} {
		if got := p.line(c.tally, c.elapsed); got != c.want {
			t.Errorf("%q, not %q", got, c.want)
		}
	}
}
