package main

import (
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"slices"

	"flankwright/export/sidecar"
)

// request is what is asked for: each flag's value as text.
type request struct {
	command string
	values  map[string][]string
}

// given says whether a flag has a value.
func (r request) given(name string) bool { return len(r.values[name]) > 0 }

// newRequest collects the flags that were set.
func newRequest(command string, flags map[string]*text) request {
	r := request{command: command, values: map[string][]string{}}
	for name, t := range flags {
		if len(t.values) > 0 {
			r.values[name] = t.values
		}
	}
	return r
}

// alternatives are flags that exclude each other: where the command line names
// one of a set, a sidecar's value for another of it gives way.
func alternatives() [][]string {
	return [][]string{
		{"module", "diametral-pitch", "circular-pitch"},
		{"tip-diameter", "tip-shortening"},
		{"tip-radius", "tip-chamfer"},
	}
}

// withDefaults fills what r leaves open from another request.
func (r request) withDefaults(from request) request {
	merged := request{command: r.command, values: map[string][]string{}}
	for name, v := range from.values {
		merged.values[name] = v
	}
	for name, v := range r.values {
		for _, set := range alternatives() {
			if slices.Contains(set, name) {
				for _, other := range set {
					delete(merged.values, other)
				}
			}
		}
		merged.values[name] = v
	}
	// Deleting above may have met a name already merged from r.
	for name, v := range r.values {
		merged.values[name] = v
	}
	return merged
}

// largestSidecar is the most that is read of a file given to --from: far above
// what this program writes, far below what would strain a machine.
const largestSidecar = 16 << 20 // bytes

// readSidecar takes the request out of a sidecar of one of the commands.
func readSidecar(path string, params []parameter, commands ...string) (request, error) {
	file, err := os.Open(path)
	if err != nil {
		return request{}, problems{{flag: "from", value: path, message: "cannot be read: " + reason(err), exit: exitFailed,
			hint: "give the path of a sidecar that flankwright wrote"}}
	}
	defer file.Close()
	data, err := io.ReadAll(io.LimitReader(file, largestSidecar+1))
	if err != nil {
		return request{}, problems{{flag: "from", value: path, message: "cannot be read: " + reason(err), exit: exitFailed}}
	}
	r, err := parseSidecar(data, params, commands...)
	if err != nil {
		return request{}, problems{{flag: "from", value: path, message: err.Error(), exit: exitMalformed,
			hint: "give a sidecar that flankwright " + commands[0] + " wrote"}}
	}
	return r, nil
}

// parseSidecar checks the document's schema and takes its input apart.
func parseSidecar(data []byte, params []parameter, commands ...string) (request, error) {
	if len(data) > largestSidecar {
		return request{}, errors.New("the file is too large for a sidecar")
	}
	var doc struct {
		Schema string                     `json:"schema"`
		Input  map[string]json.RawMessage `json:"input"`
	}
	if err := json.Unmarshal(data, &doc); err != nil {
		return request{}, fmt.Errorf("not a sidecar: %v", err)
	}
	if doc.Schema != sidecar.SchemaID {
		return request{}, fmt.Errorf("not a sidecar: its schema is %q, not %q", doc.Schema, sidecar.SchemaID)
	}
	r := request{command: commands[0], values: map[string][]string{}}
	for name, raw := range doc.Input {
		values, err := inputValues(raw)
		if err != nil {
			return request{}, fmt.Errorf("input %q: %v", name, err)
		}
		if name == "command" {
			if !slices.Contains(commands, values[0]) {
				return request{}, fmt.Errorf("the sidecar is of command %q", values[0])
			}
			r.command = values[0]
			continue
		}
		known := slices.ContainsFunc(params, func(p parameter) bool { return p.name == name && !p.transient })
		if !known {
			return request{}, fmt.Errorf("input %q is no flag of %s", name, commands[0])
		}
		r.values[name] = values
	}
	return r, nil
}

// inputValues reads a string, true, or a list of strings.
func inputValues(raw json.RawMessage) ([]string, error) {
	var one string
	if json.Unmarshal(raw, &one) == nil && string(raw) != "null" {
		return []string{one}, nil
	}
	var on bool
	if json.Unmarshal(raw, &on) == nil && on {
		return []string{"true"}, nil
	}
	var many []string
	if json.Unmarshal(raw, &many) == nil && len(many) > 0 {
		return many, nil
	}
	return nil, errors.New("must be text, true or a list of texts")
}

// reason is the bare cause of a file error, without operation and path.
func reason(err error) string {
	var pathErr *fs.PathError
	if errors.As(err, &pathErr) {
		return pathErr.Err.Error()
	}
	var linkErr *os.LinkError
	if errors.As(err, &linkErr) {
		return linkErr.Err.Error()
	}
	return err.Error()
}

// writeFailed is the problem of output that could not be written; nil for nil.
func writeFailed(what string, err error) error {
	if err == nil {
		return nil
	}
	return problems{{message: fmt.Sprintf("%s cannot be written: %s", what, reason(err)), exit: exitFailed}}
}
