package fit

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// arcFit searches for a good chain of n arcs along a curve whose start may have a
// prescribed tangent, or both its ends.
//
// The chain's joints lie on the curve. Given the heading at its start, each arc
// follows from its chord, so that a chain has its break points and one heading as
// freedoms. Writing d_i for the amount by which the chain's heading at joint i
// differs from the curve's, an arc's two differences add up to what its chord says,
//
//	d_i + d_(i+1) = 2 chord_i - heading_i - heading_(i+1)
//
// so whatever is too much at one joint is too little at the next: a chain that
// starts badly swings all along. The arcs between take equal shares of the spread;
// the share of the first arc, or the free heading, is what has to be found. Two
// prescribed ends are reconciled by making the last two arcs a biarc, whose joint
// may leave the curve.
type arcFit struct {
	curve  profile.Curve
	spread spread
	ends   ends
	n      int

	shares      []float64 // of the spread, one per arc
	first, last float64   // parts of their shares that arcs at prescribed tangents take
	turn        float64   // what a free start takes of the first arc's two differences

	breaks   []float64 // parameters of the joints
	points   []r2.Vec
	headings []float64 // the curve's, at the joints
	sums     []float64 // of an arc's two differences in heading
	chain    []Segment
	worst    []float64 // deviation of each arc, mm
}

// newArcFit starts with the shares of a curve whose curvature changes at a constant
// rate.
func newArcFit(c profile.Curve, s spread, e ends, n int) *arcFit {
	joints := make([]float64, 2*(n+1)+3*n)
	cut := func(k int) []float64 {
		part := joints[:k:k]
		joints = joints[k:]
		return part
	}
	f := &arcFit{curve: c, spread: s, ends: e, n: n, first: fixedShare, last: fixedShare, turn: 0.5,
		breaks: cut(n + 1), headings: cut(n + 1), shares: cut(n), sums: cut(n), worst: cut(n),
		points: make([]r2.Vec, n+1), chain: make([]Segment, n)}
	if !e.start {
		f.first = 1
	}
	if !e.end {
		f.last = 1
	}
	for i := range f.shares {
		f.shares[i] = 1
	}
	return f
}

// best looks for a chain within the tolerance in mm and measures what it finds. It
// stops at the first that serves, and where more effort gains too little.
func (f *arcFit) best(tolerance float64) float64 {
	f.lay()
	worst := f.measure()
	if worst <= tolerance {
		return worst
	}
	f.settle(tolerance)
	worst = f.measure()
	for range f.evenRounds() {
		if worst <= tolerance || worst > evenReach*tolerance {
			break
		}
		before := worst
		f.even()
		f.settle(tolerance)
		if worst = f.measure(); worst > evenGain*before {
			break
		}
	}
	return worst
}

// Evening shares out gains some tens of percent of deviation for few arcs, most of it
// in the first rounds: it is tried where the tolerance is within evenReach, and for
// as long as a round leaves less than evenGain of the deviation.
const (
	evenReach = 1.3
	evenGain  = 0.985
	evenPower = 0.33 // a third would make up for a deviation that goes with the cube
)

// evenRounds is how often shares may be evened out; never where the end arcs' shares,
// which are searched for, are all the freedom the joints have.
func (f *arcFit) evenRounds() int {
	const rounds = 5
	searched := 0
	if f.ends.start {
		searched++
	}
	if f.ends.end {
		searched++
	}
	if f.n-1 <= searched {
		return 0
	}
	return rounds
}

// even moves shares from arcs that deviate much to arcs that deviate little. Judging
// each arc with its neighbours keeps these from exchanging places; an arc beside a
// prescribed tangent that deviates less than its neighbour stands back, for its share
// is found by other means.
func (f *arcFit) even() {
	last := f.n - 1
	if f.ends.start {
		f.worst[0] = math.Max(f.worst[0], f.worst[1])
	}
	if f.ends.end {
		f.worst[last] = math.Max(f.worst[last], f.worst[last-1])
	}
	mean := 0.0
	for _, w := range f.worst {
		mean += w / float64(f.n)
	}
	for i, w := range f.worst {
		around := (f.worst[max(i-1, 0)] + 2*w + f.worst[min(i+1, last)]) / 4
		f.shares[i] *= math.Pow(mean/around, evenPower)
	}
}

// lay deals the joints out and lays the arcs between them.
func (f *arcFit) lay() {
	f.deal()
	heading := f.headings[0]
	if !f.ends.start {
		heading += f.turn * f.sums[0]
	}
	straight := f.n
	if f.ends.end {
		straight -= 2
	}
	at := f.points[0]
	for i := range straight {
		f.chain[i], heading = arcFrom(at, heading, f.points[i+1])
		at = f.points[i+1]
	}
	if f.ends.end {
		f.chain[f.n-2], f.chain[f.n-1] = biarc(at, heading, f.points[f.n], f.headings[f.n], f.points[f.n-1])
	}
}

// deal places the joints by the shares, of which the first and the last arc take a
// part only.
func (f *arcFit) deal() {
	part := func(i int) float64 {
		share := f.shares[i]
		if i == 0 {
			share *= f.first
		}
		if i == f.n-1 && i > 0 {
			share *= f.last
		}
		return share
	}
	total := 0.0
	for i := range f.n {
		total += part(i)
	}
	sum := 0.0
	for i := range f.breaks {
		q := sum / total
		if i == f.n {
			q = 1
		} else {
			sum += part(i)
		}
		f.breaks[i] = f.spread.at(q)
		f.points[i] = f.curve.At(f.breaks[i])
		f.headings[i] = f.curve.Heading(f.breaks[i])
	}
	for i := range f.sums {
		chord := r2.Sub(f.points[i+1], f.points[i])
		f.sums[i] = wrapped(2*math.Atan2(chord.Y, chord.X) - f.headings[i] - f.headings[i+1])
	}
}

// measure finds the deviation of each arc and returns the largest.
func (f *arcFit) measure() float64 {
	worst := 0.0
	for i, s := range f.chain {
		f.worst[i] = deviation(f.curve, f.breaks[i], f.breaks[i+1], s)
		worst = math.Max(worst, f.worst[i])
	}
	return worst
}

// estimate is the largest deviation at four places of each arc, enough to compare
// chains by.
func (f *arcFit) estimate() float64 {
	worst := 0.0
	for i := range f.chain {
		u0, u1 := f.breaks[i], f.breaks[i+1]
		ruler := f.chain[i].ruler()
		for _, q := range [4]float64{0.2, 0.4, 0.6, 0.8} {
			worst = math.Max(worst, math.Abs(ruler.offset(f.curve.At(u0+q*(u1-u0)))))
		}
	}
	return worst
}
