package label_test

import (
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
	"pgregory.net/rapid"

	"flankwright/profile/fit"
	"flankwright/profile/label"
)

// The properties of the characters, each with its test:
//
//	1  Every allowed character but the space has strokes, in the box from 0 to its
//	   width and from -0.25 to 1, and reaches both sides but for thin characters.
//	2  Strokes are open chains of lines and arcs, points shared to the last bit.
//	3  No segment is shorter than 1/100 of the height, no stroke than 1/12.
//	4  Nothing is drawn twice, and no two strokes could be drawn as one by joining ends.
//	5  Two characters differ by 6/100 of the height or more somewhere.
//	6  A text is its characters side by side.

// letters are the allowed characters without the space.
func letters() string { return strings.TrimSuffix(label.Characters(), " ") }

// accuracy of coordinates of a few units, in cap heights: 1e4 roundings of a double.
const accuracy = 1e-12

func TestProperty1Box(t *testing.T) {
	for _, c := range letters() {
		paths, width := drawn(t, string(c))
		if len(paths) == 0 || width <= 0 || width > 1 {
			t.Fatalf("%q: %d strokes, %g wide", c, len(paths), width)
		}
		box := paths[0].Bounds()
		for _, p := range paths {
			b := p.Bounds()
			box.Min = r2.Vec{X: math.Min(box.Min.X, b.Min.X), Y: math.Min(box.Min.Y, b.Min.Y)}
			box.Max = r2.Vec{X: math.Max(box.Max.X, b.Max.X), Y: math.Max(box.Max.Y, b.Max.Y)}
		}
		if box.Min.X < -accuracy || box.Max.X > width+accuracy || box.Min.Y < -0.25-accuracy || box.Max.Y > 1+accuracy {
			t.Errorf("%q: %v leaves the box %g wide", c, box, width)
		}
		const side = 0.051 // left free beside a single upright
		if box.Min.X > side || box.Max.X < width-side {
			t.Errorf("%q: %v does not fill the box %g wide", c, box, width)
		}
		if strings.ContainsRune("ABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789", c) && (math.Abs(box.Max.Y-1) > accuracy || math.Abs(box.Min.Y) > 0.021) {
			t.Errorf("%q: from %g to %g, want the cap height", c, box.Min.Y, box.Max.Y)
		}
	}
}

func TestProperty2Chains(t *testing.T) {
	for _, c := range letters() {
		paths, _ := drawn(t, "1"+string(c))
		for _, p := range paths {
			if p.Closed || len(p.Segments) == 0 {
				t.Errorf("%q: a stroke of %d segments, closed %v", c, len(p.Segments), p.Closed)
			}
			for i, s := range p.Segments {
				if s.Kind == fit.Cubic || (s.Kind == fit.Arc) != (s.Bulge != 0) || math.Abs(s.Bulge) >= 1 {
					t.Errorf("%q: %+v", c, s)
				}
				if i == 0 {
					continue
				}
				before := p.Segments[i-1]
				if before.End != s.Start {
					t.Errorf("%q: a gap before %+v", c, s)
				}
				// At an arc the stroke runs on smoothly, or turns right back as in a 3.
				turn := r2.Cross(before.EndTangent(), s.StartTangent())
				const smooth = 1e-8 // rad; rounding of an end over the shortest arc leaves less
				if (before.Kind == fit.Arc || s.Kind == fit.Arc) && math.Abs(turn) > smooth {
					t.Errorf("%q: a corner of %g before %+v", c, turn, s)
				}
			}
			first, last := p.Segments[0].Start, p.Segments[len(p.Segments)-1].End
			if d := r2.Norm(r2.Sub(first, last)); d != 0 && d < 0.05 {
				t.Errorf("%q: the ends of a stroke are %g apart", c, d)
			}
		}
	}
}

func TestProperty3Lengths(t *testing.T) {
	for _, c := range letters() {
		paths, _ := drawn(t, string(c))
		for _, p := range paths {
			if p.Shortest() < 0.01 || p.Length() < 1.0/12 {
				t.Errorf("%q: a stroke %g long with a segment of %g", c, p.Length(), p.Shortest())
			}
		}
	}
}

func TestProperty4Once(t *testing.T) {
	for _, c := range letters() {
		paths, _ := drawn(t, string(c))
		var all []fit.Segment
		ends := map[r2.Vec]int{}
		for i, p := range paths {
			all = append(all, p.Segments...)
			for _, e := range []r2.Vec{p.Segments[0].Start, p.Segments[len(p.Segments)-1].End} {
				if before, ok := ends[e]; ok && before != i {
					t.Errorf("%q: strokes %d and %d could be one", c, before, i)
				}
				ends[e] = i
			}
		}
		for i, s := range all {
			for k, other := range all {
				if i != k && shared(s, other) {
					t.Errorf("%q: %+v is drawn again by %+v", c, s, other)
				}
			}
		}
	}
}

// shared says whether two neighbouring points out of many on s lie on the other. Segments
// that only touch are farther apart at one of them: with radii below 1/2 and steps of at
// least 1e-4 by more than 1e-8.
func shared(s, other fit.Segment) bool {
	const steps, on = 100, 1e-9
	before := false
	for _, p := range points(s, steps) {
		here := distance(p, other) < on
		if here && before {
			return true
		}
		before = here
	}
	return false
}

// distance is how far p is from a segment.
func distance(p r2.Vec, s fit.Segment) float64 {
	ends := math.Min(r2.Norm(r2.Sub(p, s.Start)), r2.Norm(r2.Sub(p, s.End)))
	chord := r2.Sub(s.End, s.Start)
	if s.Kind == fit.Arc {
		c := s.Center()
		turned := r2.Cross(chord, r2.Sub(p, s.Start)) * s.Bulge // below 0 on the arc's side
		if turned < 0 {
			return math.Min(ends, math.Abs(r2.Norm(r2.Sub(p, c))-s.Radius()))
		}
		return ends
	}
	share := r2.Dot(r2.Sub(p, s.Start), chord) / r2.Norm2(chord)
	if share < 0 || share > 1 {
		return ends
	}
	return math.Abs(r2.Cross(chord, r2.Sub(p, s.Start))) / r2.Norm(chord)
}

func TestProperty5Distinct(t *testing.T) {
	all := []rune(letters())
	clouds := make([][]r2.Vec, len(all))
	for i, c := range all {
		paths, _ := drawn(t, string(c))
		clouds[i] = cloud(paths, 0.05)
	}
	// away is how far a is from b at most, to half the distance of the points.
	away := func(a, b []r2.Vec) float64 {
		most := 0.0
		for _, p := range a {
			least := math.Inf(1)
			for _, q := range b {
				least = math.Min(least, r2.Norm(r2.Sub(p, q)))
			}
			most = math.Max(most, least)
		}
		return most
	}
	for i := range all {
		for k := range i {
			if d := math.Max(away(clouds[i], clouds[k]), away(clouds[k], clouds[i])); d < 0.06 {
				t.Errorf("%q and %q differ by %g only", all[i], all[k], d)
			}
		}
	}
}

func TestProperty6SideBySide(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		text := rapid.StringOfN(rapid.SampledFrom([]rune(label.Characters())), 1, label.MaxLength, -1).Draw(t, "text")
		paths, width, err := label.Strokes(text)
		text = strings.Trim(text, " ")
		if text == "" {
			if err == nil {
				t.Fatal("a blank label was drawn")
			}
			return
		}
		if err != nil {
			t.Fatal(err)
		}
		strokes, sum := 0, 0.0
		for i, c := range text {
			if i > 0 {
				sum += 0.25
			}
			if c == ' ' {
				sum += 0.15
				continue
			}
			one, w, err := label.Strokes(string(c))
			if err != nil {
				t.Fatal(err)
			}
			for _, p := range one {
				for k, s := range p.Segments {
					got := paths[strokes].Segments[k]
					if r2.Norm(r2.Sub(got.End, r2.Add(s.End, r2.Vec{X: sum}))) > 40*accuracy || math.Abs(got.Bulge-s.Bulge) > 40*accuracy {
						t.Fatalf("%q: %+v, want %+v moved by %g", text, got, s, sum)
					}
				}
				strokes++
			}
			sum += w
		}
		if len(paths) != strokes || math.Abs(width-sum) > 40*accuracy {
			t.Fatalf("%q: %d strokes %g wide, want %d, %g", text, len(paths), width, strokes, sum)
		}
	})
}

func TestSpacesAtTheEndsAreDropped(t *testing.T) {
	_, plain := drawn(t, "Z 40")
	if paths, padded := drawn(t, "  Z 40 "); plain != padded || paths[0].Segments[0].Start.X != 0 {
		t.Errorf("%g wide, want %g", padded, plain)
	}
}

func BenchmarkStrokes(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		if _, _, err := label.Strokes("Z40 M2 x+0.25"); err != nil {
			b.Fatal(err)
		}
	}
}
