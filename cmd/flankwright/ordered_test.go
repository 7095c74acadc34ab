package main

import (
	"sync/atomic"
	"testing"
	"time"
)

// count hands out 0, 1, 2 ... below n.
func count(n int) func() (int, bool) {
	i := -1
	return func() (int, bool) { i++; return i, i < n }
}

func TestOrderedKeepsOrder(t *testing.T) {
	const n = 500
	for _, workers := range []int{1, 2, 8} {
		want := 0
		var inHand, most atomic.Int64
		ordered(workers, count(n), func(i int) int {
			now := inHand.Add(1)
			for m := most.Load(); now > m && !most.CompareAndSwap(m, now); m = most.Load() {
			}
			if i%7 == 0 {
				time.Sleep(50 * time.Microsecond)
			}
			inHand.Add(-1)
			return i * i
		}, func(square int) bool {
			if square != want*want {
				t.Fatalf("%d workers: got %d in place of %d", workers, square, want*want)
			}
			want++
			return true
		})
		if want != n {
			t.Errorf("%d workers: %d outputs", workers, want)
		}
		if most.Load() > int64(workers) {
			t.Errorf("%d at work at a time, with %d workers", most.Load(), workers)
		}
	}
}

func TestOrderedStops(t *testing.T) {
	var begun atomic.Int64
	got := 0
	ordered(4, count(1_000_000), func(i int) int { begun.Add(1); return i }, func(int) bool { got++; return got < 10 })
	const inHand = 4*4 + 4 + 4 // queued, at work, and being handed over
	if got != 10 || begun.Load() > 10+inHand {
		t.Errorf("%d handed on, %d begun", got, begun.Load())
	}
}
