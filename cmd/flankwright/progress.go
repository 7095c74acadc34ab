package main

import (
	"fmt"
	"io"
	"os"
	"time"
)

// progress tells on a terminal how far a run is; elsewhere it is silent.
type progress struct {
	out     io.Writer // nil where nothing is to be shown
	total   int
	started time.Time
	shown   time.Time
	onLine  bool
}

// progressPause is the least time between two lines of progress.
const progressPause = 100 * time.Millisecond

// newProgress starts the clock.
func newProgress(out io.Writer, total int, quiet bool) *progress {
	p := &progress{total: total, started: time.Now()}
	if file, ok := out.(*os.File); ok && !quiet {
		if info, err := file.Stat(); err == nil && info.Mode()&os.ModeCharDevice != 0 {
			p.out = out
		}
	}
	return p
}

// show replaces the line of progress, not too often.
func (p *progress) show(t tally) {
	now := time.Now()
	if p.out == nil || now.Sub(p.shown) < progressPause {
		return
	}
	p.shown, p.onLine = now, true
	fmt.Fprintf(p.out, "\r\x1b[K%s", p.line(t, now.Sub(p.started)))
}

// line is the state in one line: how many, how fast, and how long still.
func (p *progress) line(t tally, elapsed time.Duration) string {
	done := t.written + t.skipped + t.failed
	s := fmt.Sprintf("%d of %d", done, p.total)
	if done == 0 || elapsed <= 0 {
		return s
	}
	rate := float64(done) / elapsed.Seconds()
	left := time.Duration(float64(p.total-done) / rate * float64(time.Second))
	return fmt.Sprintf("%s, %.0f a second, %s left", s, rate, left.Round(time.Second))
}

// clear removes the line of progress, before another is printed.
func (p *progress) clear() {
	if p.onLine {
		fmt.Fprint(p.out, "\r\x1b[K")
		p.onLine = false
	}
}

// summary is the final line.
func (p *progress) summary(t tally) string {
	return fmt.Sprintf("%d written, %d skipped, %d failed in %.1f s", t.written, t.skipped, t.failed, time.Since(p.started).Seconds())
}
