package main

import "testing"

// FuzzPair: whatever is given for two members ends in a pair's numbers or in problems with
// a line each.
func FuzzPair(f *testing.F) {
	f.Add("17,43", "0.3,-0.1", "61", "0.1", ",4x6@50", false)
	f.Add("18,60", "", "", "0.05", "", true)
	f.Add("20,rack", "0.1", "21mm", "", "", false)
	f.Add(",", ",,", "-", "1e9", "x@,", true)
	f.Fuzz(func(t *testing.T, teeth, shift, distance, backlash, holes string, internal bool) {
		req := request{command: "pair", values: map[string][]string{"module": {"2"}}}
		for name, v := range map[string]string{"teeth": teeth, "profile-shift": shift, "center-distance": distance, "backlash": backlash, "hole-circle": holes} {
			if v != "" {
				req.values[name] = []string{v}
			}
		}
		if internal {
			req.values["internal"] = []string{"true"}
		}
		job, err := resolvePair(req)
		if err != nil {
			found, ok := err.(problems)
			if !ok || len(found) == 0 || found.exit() != exitMalformed {
				t.Fatalf("%T: %v", err, err)
			}
			return
		}
		if job.input["command"] != "pair" || job.forms[0] != "gear" {
			t.Fatalf("%+v", job)
		}
	})
}
