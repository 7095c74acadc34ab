package main

import (
	"context"
	"sync"
)

// gate lets rows on in the order of the table, until one is bad.
type gate struct {
	mu     sync.Mutex
	moved  *sync.Cond
	turn   int // number of the row whose turn it is
	step   int
	closed bool
}

// newGate begins with the first row of a shard; the next one is step further on.
func newGate(first, step int) *gate {
	g := &gate{turn: first, step: step}
	g.moved = sync.NewCond(&g.mu)
	return g
}

// pass waits until all rows before this one have passed, and says whether all of them,
// and this one, are good. After the context's end it does not wait for others.
func (g *gate) pass(ctx context.Context, row int, good bool) bool {
	stop := context.AfterFunc(ctx, func() {
		g.mu.Lock()
		defer g.mu.Unlock()
		g.closed = true
		g.moved.Broadcast()
	})
	defer stop()
	g.mu.Lock()
	defer g.mu.Unlock()
	for g.turn != row && !g.closed {
		g.moved.Wait()
	}
	if g.closed {
		return false
	}
	if !good {
		g.closed = true
	}
	g.turn += g.step
	g.moved.Broadcast()
	return good
}
