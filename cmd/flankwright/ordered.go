package main

import "sync"

// ordered has several workers make outputs of inputs, and hands the outputs on in the
// order of the inputs. At most so many are being made or handed on at a time, and only a
// few more are waiting. It ends when next has no more inputs or emit returns false; what
// is in hand then is still worked on, and dropped. next and emit each run on one
// goroutine.
//
// Handing on counts as work since it writes files: doing that one after the other costs
// less than having workers contend for the folder.
func ordered[In, Out any](workers int, next func() (In, bool), work func(In) Out, emit func(Out) bool) {
	type slot struct {
		in  In
		out chan Out
	}
	const ahead = 4 // inputs per worker, so that none waits for a slow neighbour
	queue := make(chan *slot, ahead*workers)
	tasks := make(chan *slot)
	stop := make(chan struct{})
	busy := make(chan struct{}, workers)
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
				busy <- struct{}{}
				s.out <- work(s.in)
				<-busy
			}
		})
	}
	going := true
	for s := range queue {
		out := <-s.out
		if !going {
			continue
		}
		busy <- struct{}{}
		if !emit(out) {
			going = false
			close(stop)
		}
		<-busy
	}
	group.Wait()
}
