package main

import "sync"

// ordered has several workers make outputs of inputs, and hands the outputs on in the
// order of the inputs. Only a few inputs per worker are in hand at a time. It ends when
// next has no more inputs or emit returns false; what is in hand then is still worked
// on, and dropped in the second case. next and emit each run on one goroutine.
func ordered[In, Out any](workers int, next func() (In, bool), work func(In) Out, emit func(Out) bool) {
	type slot struct {
		in  In
		out chan Out
	}
	const ahead = 4 // inputs per worker, so that none waits for a slow neighbour
	queue := make(chan *slot, ahead*workers)
	tasks := make(chan *slot)
	stop := make(chan struct{})
	var group sync.WaitGroup
	group.Go(func() {
		defer close(tasks)
		defer close(queue)
		for {
			in, ok := next()
			if !ok {
				return
			}
			s := &slot{in: in, out: make(chan Out, 1)}
			select {
			case queue <- s:
				tasks <- s
			case <-stop:
				return
			}
		}
	})
	for range workers {
		group.Go(func() {
			for s := range tasks {
				s.out <- work(s.in)
			}
		})
	}
	going := true
	for s := range queue {
		if out := <-s.out; going && !emit(out) {
			going = false
			close(stop)
		}
	}
	group.Wait()
}
