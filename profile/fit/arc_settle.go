package fit

import "math"

// manyArcs is the number of arcs from which the swing of a chain can be read off:
// it takes four sums about a joint that is two arcs from either end.
const manyArcs = 6

// settle finds the shares of the end arcs, or the free heading, that suit the other
// shares. With few arcs it compares chains; with many it takes the swing out.
func (f *arcFit) settle(tolerance float64) {
	if f.n >= manyArcs {
		f.steady()
		return
	}
	narrow := func(value *float64, low, high float64) {
		*value = minimize(func(v float64) float64 {
			*value = v
			f.lay()
			return f.estimate()
		}, low, high, tolerance)
		f.lay()
	}
	switch {
	case !f.ends.start:
		narrow(&f.turn, 0, 1)
	case f.n > 1:
		narrow(&f.first, leastShare, 1)
	}
	if f.ends.start && f.ends.end && f.n > 2 {
		narrow(&f.last, leastShare, 1)
		narrow(&f.first, leastShare, 1)
	}
}

// leastShare bounds the part of its share that an arc beside a prescribed tangent
// takes from below. The theory's is 0.69 where the curvature's rate is constant, and
// down to 0.4 where the curve starts on the base circle.
const leastShare = 0.2

// steady takes the swing out of a chain of many arcs. Sums that change smoothly from
// arc to arc allow one run of differences that is smooth too; to fourth order, from
// the sums s about joint j,
//
//	d_j = (s_(j-1) + s_j)/4 - (s_(j-2) - s_(j-1) - s_j + s_(j+1))/16
//
// What the chain has above that at j is its swing, which alternates in sign and keeps
// its size. Both ends are judged at the middle, each from its own side, and secant
// steps on their freedoms bring it to nothing.
func (f *arcFit) steady() {
	const steps = 5
	j := f.n / 2
	var start, end secant
	for range steps {
		f.deal()
		s := f.sums
		smooth := (s[j-1]+s[j])/4 - (s[j-2]-s[j-1]-s[j]+s[j+1])/16
		d := 0.0
		if !f.ends.start {
			d = f.turn * s[0]
		}
		for i := range j {
			d = s[i] - d
		}
		if swing := (d - smooth) * sign(j); f.ends.start {
			f.first = start.next(f.first, swing)
		} else {
			f.turn -= swing / s[0]
		}
		if f.ends.end {
			d = 0
			for i := f.n - 1; i >= j; i-- {
				d = s[i] - d
			}
			f.last = end.next(f.last, (d-smooth)*sign(f.n-j))
		}
	}
	f.lay()
}

// secant finds the share of an end arc at which the swing vanishes.
type secant struct {
	share, swing float64
	begun        bool
}

// next is the share to try after one that gave a swing.
func (x *secant) next(share, swing float64) float64 {
	const firstStep = 0.03 // of a share: what few-percent changes of curvature ask for
	next := share + firstStep
	if x.begun && swing != x.swing {
		next = share - swing*(share-x.share)/(swing-x.swing)
	}
	x.share, x.swing, x.begun = share, swing, true
	return math.Min(1.1, math.Max(leastShare, next))
}

// sign is (-1)^i.
func sign(i int) float64 { return float64(1 - 2*(i&1)) }

// minimize narrows a range around the least value of a function with one valley, by
// golden sections, until it is small enough to serve.
func minimize(value func(float64) float64, a, b, target float64) float64 {
	const golden = 0.6180339887
	const steps = 8     // leave a hundredth of the range: shares need no more
	const enough = 0.95 // of the target: an estimate is good to some percent
	c, d := b-golden*(b-a), a+golden*(b-a)
	fc, fd := value(c), value(d)
	for range steps {
		if math.Min(fc, fd) < enough*target {
			break
		}
		if fc < fd {
			b, d, fd = d, c, fc
			c = b - golden*(b-a)
			fc = value(c)
		} else {
			a, c, fc = c, d, fd
			d = a + golden*(b-a)
			fd = value(d)
		}
	}
	if fc < fd {
		return c
	}
	return d
}
