package readertest

import (
	"encoding/json"
	"strconv"
	"testing"
)

// OffsetBack moves the loops of a beam's path, in the DXF file path, back by half the
// beam's width with a general geometry library (shapely) and returns for each, outline
// last, how far it is from the part's in the DXF file part, in drawing units.
func OffsetBack(t testing.TB, part, path string, width float64) []float64 {
	t.Helper()
	python := python(t, "ezdxf, shapely", "python3-ezdxf python3-shapely")
	out := run(t, nil, python, script(t, "offset_back.py"), part, path, strconv.FormatFloat(width, 'g', -1, 64))
	var got struct {
		Worst []float64
		Valid []bool
	}
	if err := json.Unmarshal(out, &got); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	for i, ok := range got.Valid {
		if !ok {
			t.Errorf("loop %d crosses itself, says shapely", i)
		}
	}
	return got.Worst
}
