package main

import (
	"context"
	"sync"
	"sync/atomic"
	"testing"
)

// TestGate: whatever order rows come in, those before the first bad one pass and none
// after it.
func TestGate(t *testing.T) {
	const rows, firstBad, step = 40, 17, 3
	g := newGate(2, step)
	var passed atomic.Int64
	var group sync.WaitGroup
	for i := range rows {
		row := 2 + step*(rows-1-i) // the last first
		group.Go(func() {
			index := (row - 2) / step
			if g.pass(context.Background(), row, index != firstBad && index != 30) {
				if index >= firstBad {
					t.Errorf("row %d passed", index)
				}
				passed.Add(1)
			}
		})
	}
	group.Wait()
	if passed.Load() != firstBad {
		t.Errorf("%d passed", passed.Load())
	}
}

// TestGateEnds: an end of the context frees those who wait.
func TestGateEnds(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	g := newGate(1, 1)
	var group sync.WaitGroup
	group.Go(func() {
		if g.pass(ctx, 2, true) {
			t.Error("row 2 passed before row 1")
		}
	})
	cancel()
	group.Wait()
}
