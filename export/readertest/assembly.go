package readertest

import (
	"encoding/json"
	"strconv"
	"testing"
)

// Touching is how two members stand to each other.
type Touching struct {
	Gap     float64 // in the unit of the drawing
	Overlap float64 // its square
}

// Assembly has a general geometry library judge an assembly drawing: as placed, and with
// member 2 turned about a center in degrees, or moved, by a half of so much, by all of it
// and by twice as much.
func Assembly(t testing.TB, path string, center [2]float64, degrees float64, move [2]float64) [4]Touching {
	t.Helper()
	python := python(t, "ezdxf, shapely", "python3-ezdxf python3-shapely")
	args := []string{script(t, "assembly_check.py"), path}
	for _, v := range []float64{center[0], center[1], degrees, move[0], move[1]} {
		args = append(args, strconv.FormatFloat(v, 'g', -1, 64))
	}
	out := run(t, nil, python, args...)
	var got [4]Touching
	if err := json.Unmarshal(out, &got); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	return got
}
