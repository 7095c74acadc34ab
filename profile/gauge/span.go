package gauge

import (
	"math"

	"flankwright/profile"
)

// Span is a measurement over teeth between two parallel jaws.
type Span struct {
	TeethSpanned    int
	Value           float64 // mm, W_k
	ContactDiameter float64 // mm, with the jaws placed evenly
}

// span is the base tangent length over k teeth,
//
//	W_k = cos(alpha) (p (k - 1) + s) + db inv alpha
//	    = m cos(alpha) (pi (k - 1/2) + z inv alpha + 2 x tan alpha) - E cos(alpha)
//
// (ISO 21771:2007, 8.2; DIN 3960:1987, 4.2, less the thinning). k is real here.
func (g Gear) span(k float64) float64 {
	return g.cos*(g.pitch()*(k-1)+g.thickness) + 2*g.rb*g.inv
}

// spanned is the inverse of span: the real number of teeth a length spans.
func (g Gear) spanned(length float64) float64 {
	return 1 + ((length-2*g.rb*g.inv)/g.cos-g.thickness)/g.pitch()
}

// spannedRange are the fewest and the most teeth over which both contacts lie on the
// usable flank: the contacts' distances from the points where the measured line
// touches the base circle add up to W, so W lies between twice the roll lengths of
// the flank's ends, however the jaws are turned.
func (g Gear) spannedRange() (fewest, most int) {
	low, high := g.flank()
	fewest = max(1, int(math.Ceil(g.spanned(2*g.rb*low))))
	most = int(math.Floor(g.spanned(2 * g.rb * high)))
	return fewest, min(most, g.spec.Teeth-1)
}

// idealSpanned is the real number of teeth over which the contacts lie on the circle
// d + 2 x m (DIN 3960:1987, 4.2.2, from memory).
func (g Gear) idealSpanned() float64 {
	working := math.Max(g.rb, g.r+g.spec.ProfileShift*g.spec.Module)
	return g.spanned(2 * g.rb * g.roll(working))
}

// Span is the measurement over k teeth of an external gear. Rings and racks have no
// parallel flanks a jaw could take and are refused, and so is a contact off the
// usable flank, with the numbers of teeth that do.
func (g Gear) Span(k int) (Span, error) {
	fewest, most, found := g.checkSpan()
	if found != nil {
		return Span{}, found
	}
	if k >= fewest && k <= most {
		return g.spanOver(k), nil
	}
	contact := g.spanOver(k).ContactDiameter
	bound := g.size(g.spec.Form)
	if k > most {
		bound = g.size(g.spec.TipForm)
	}
	return Span{}, profile.Violations{{Rule: RuleOffFlank, Param: ParamMeasuredSpan, Value: profile.NumberOf(float64(k)), Bound: bound,
		Also: []profile.Quantity{profile.LengthOf(contact), profile.NumberOf(float64(fewest)), profile.NumberOf(float64(most))},
		Text: "a span over {value} teeth would touch at diameter {0}, past the end of the usable flank at {bound}",
		Hint: "span {1} to {2} teeth"}}
}

// Spans are the measurements an external gear is best spanned by: first over the
// number of teeth whose contacts lie nearest to the circle d + 2 x m, then over one
// less and one more where their contacts lie on the usable flank.
func (g Gear) Spans() ([]Span, error) {
	fewest, most, found := g.checkSpan()
	if found != nil {
		return nil, found
	}
	best := min(max(int(math.Round(g.idealSpanned())), fewest), most)
	spans := []Span{g.spanOver(best)}
	for _, k := range []int{best - 1, best + 1} {
		if k >= fewest && k <= most {
			spans = append(spans, g.spanOver(k))
		}
	}
	return spans, nil
}

// spanOver is the span over k teeth, wherever it touches.
func (g Gear) spanOver(k int) Span {
	w := g.span(float64(k))
	return Span{TeethSpanned: k, Value: w, ContactDiameter: 2 * math.Hypot(g.rb, w/2)}
}

// checkSpan says whether there is anything to span.
func (g Gear) checkSpan() (fewest, most int, found profile.Violations) {
	if g.spec.Kind != External {
		return 0, 0, profile.Violations{{Rule: RuleNoSpan, Param: ParamMeasuredSpan, Value: profile.NumberOf(g.z()),
			Text: "only an external gear has flanks that parallel jaws can span",
			Hint: "measure a ring between pins, a rack over a pin"}}
	}
	fewest, most = g.spannedRange()
	if fewest > most {
		return 0, 0, profile.Violations{{Rule: RuleNoSpan, Param: ParamMeasuredSpan, Value: g.size(g.spec.Form), Bound: g.size(g.spec.TipForm),
			Text: "no number of teeth can be spanned with both contacts on the usable flank from {value} to {bound}",
			Hint: "measure over pins"}}
	}
	return fewest, most, nil
}
