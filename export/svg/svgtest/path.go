package svgtest

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Subpath is a run of segments after an M. Areas and angles are as one sees
// them, so counter-clockwise is positive although y runs down in the file.
type Subpath struct {
	Closed   bool
	Commands string // letters, such as MALZ
	Area     float64
	Length   float64
	Span     [4]float64 // least x, least y, greatest x, greatest y
}

// Parse reads path data: absolute M, L, A, C and Z, everything separated by
// single blanks. A closed subpath must repeat its first point before Z.
func Parse(d string) ([]Subpath, error) {
	p := parser{words: strings.Split(d, " ")}
	for len(p.words) > 0 && p.err == nil {
		p.command()
	}
	p.finish()
	return p.out, p.err
}

type parser struct {
	words  []string
	out    []Subpath
	cur    *Subpath
	x, y   float64 // current point
	x0, y0 float64 // first point of the subpath
	err    error
}

func (p *parser) fail(format string, args ...any) {
	if p.err == nil {
		p.err = fmt.Errorf(format, args...)
	}
}

func (p *parser) word() string {
	if len(p.words) == 0 {
		p.fail("the path data end too early")
		return ""
	}
	w := p.words[0]
	p.words = p.words[1:]
	return w
}

func (p *parser) number() float64 {
	w := p.word()
	if !number.MatchString(w) || w == "-0.0" {
		p.fail("number %q", w)
	}
	x, _ := strconv.ParseFloat(w, 64)
	return x
}

func (p *parser) flag() bool {
	w := p.word()
	if w != "0" && w != "1" {
		p.fail("flag %q", w)
	}
	return w == "1"
}

// finish ends the current subpath.
func (p *parser) finish() {
	if p.cur == nil {
		return
	}
	if len(p.cur.Commands) < 2 {
		p.fail("a subpath of %s only", p.cur.Commands)
	}
	p.out = append(p.out, *p.cur)
	p.cur = nil
}

func (p *parser) command() {
	c := p.word()
	if c != "M" && p.cur == nil {
		p.fail("%q outside a subpath", c)
		return
	}
	switch c {
	case "M":
		p.finish()
		p.x, p.y = p.number(), p.number()
		p.x0, p.y0 = p.x, p.y
		p.cur = &Subpath{Span: [4]float64{p.x, p.y, p.x, p.y}}
	case "L":
		p.move(p.number(), p.number())
	case "A":
		p.arc()
	case "C":
		p.cubic()
	case "Z":
		if p.x != p.x0 || p.y != p.y0 {
			p.fail("closed at (%v, %v), begun at (%v, %v)", p.x, p.y, p.x0, p.y0)
		}
		p.cur.Closed = true
		p.cur.Commands += "Z"
		p.finish()
		return
	default:
		p.fail("command %q", c)
		return
	}
	p.cur.Commands += c
}

// move goes straight to a point.
func (p *parser) move(x, y float64) {
	if x == p.x && y == p.y {
		p.fail("a segment of no length at (%v, %v)", x, y)
	}
	p.cur.Length += math.Hypot(x-p.x, y-p.y)
	p.cur.Area -= (p.x*y - x*p.y) / 2 // y runs down
	p.x, p.y = x, y
	p.reach(x, y)
}

func (p *parser) reach(x, y float64) {
	s := &p.cur.Span
	s[0], s[1], s[2], s[3] = min(s[0], x), min(s[1], y), max(s[2], x), max(s[3], y)
}

// arc follows the conversion of the SVG specification (appendix on elliptical
// arcs) for a circle.
func (p *parser) arc() {
	rx, ry, rotation := p.number(), p.number(), p.word()
	large, sweep := p.flag(), p.flag()
	x, y := p.number(), p.number()
	if rx != ry || rx <= 0 || rotation != "0" {
		p.fail("arc with radii %v, %v and rotation %s", rx, ry, rotation)
	}
	if large {
		p.fail("large arc")
	}
	sx, sy := p.x, p.y
	p.move(x, y)
	chord := math.Hypot(x-sx, y-sy)
	half := math.Asin(min(1, chord/(2*rx)))
	turn := 2 * half
	segment := rx * rx / 2 * (turn - math.Sin(turn))
	if turn < 1e-3 { // the difference cancels; its series does not
		segment = rx * rx / 12 * turn * turn * turn
	}
	p.cur.Length += rx*turn - chord
	if sweep { // clockwise as one sees it
		p.cur.Area -= segment
	} else {
		p.cur.Area += segment
	}
	// Extremes, from points along the arc.
	h := math.Sqrt(max(0, rx*rx-chord*chord/4))
	side := 1.0
	if sweep {
		side = -1
	}
	cx := (sx+x)/2 + side*h*(y-sy)/chord
	cy := (sy+y)/2 - side*h*(x-sx)/chord
	a := math.Atan2(sy-cy, sx-cx)
	lo, hi := a-turn, a // without sweep the angle falls, y running down
	if sweep {
		lo, hi = a, a+turn
	}
	for k := math.Ceil(lo / (math.Pi / 2)); k*math.Pi/2 <= hi; k++ {
		p.reach(cx+rx*math.Cos(k*math.Pi/2), cy+rx*math.Sin(k*math.Pi/2))
	}
}

// cubic samples the curve finely.
func (p *parser) cubic() {
	const steps = 2000
	x0, y0 := p.x, p.y
	x1, y1, x2, y2, x3, y3 := p.number(), p.number(), p.number(), p.number(), p.number(), p.number()
	for i := 1; i <= steps; i++ {
		u := float64(i) / steps
		v := 1 - u
		a, b, c, d := v*v*v, 3*v*v*u, 3*v*u*u, u*u*u
		x, y := a*x0+b*x1+c*x2+d*x3, a*y0+b*y1+c*y2+d*y3
		if i == steps {
			x, y = x3, y3
		}
		if x != p.x || y != p.y {
			p.move(x, y)
		}
	}
}
