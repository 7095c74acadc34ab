package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// TestREADMECommands runs every flankwright command of the README, in order, in one
// empty folder; a line that ends in "# exits N" must exit with N, others with 0.
func TestREADMECommands(t *testing.T) {
	readme, err := os.ReadFile(filepath.Join("..", "..", "README.md"))
	if err != nil {
		t.Fatal(err)
	}
	examples, err := filepath.Abs(filepath.Join("..", "..", "examples"))
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	if err := os.CopyFS(filepath.Join(dir, "examples"), os.DirFS(examples)); err != nil {
		t.Fatal(err)
	}
	t.Chdir(dir)
	ran := 0
	for _, line := range shellLines(string(readme)) {
		command, ok := strings.CutPrefix(strings.TrimPrefix(line, "go run ./cmd/"), "flankwright ")
		if !ok {
			continue
		}
		want := exitDone
		if before, code, found := strings.Cut(command, "# exits "); found {
			command, want = before, int(strings.TrimSpace(code)[0]-'0')
		}
		code, _, stderr := call(t, words(command)...)
		if code != want {
			t.Errorf("%s\nexits %d, not %d: %s", line, code, want, stderr)
		}
		ran++
	}
	const atLeast = 8 // so that a change of layout cannot skip them all
	if ran < atLeast {
		t.Errorf("only %d commands found in README.md", ran)
	}
}

// shellLines are the lines of all sh blocks.
func shellLines(markdown string) []string {
	var lines []string
	in := false
	for line := range strings.Lines(markdown) {
		line = strings.TrimRight(line, "\n")
		switch {
		case strings.HasPrefix(line, "```"):
			in = line == "```sh"
		case in && line != "":
			lines = append(lines, line)
		}
	}
	return lines
}

// words splits a command at blanks outside double quotes.
func words(command string) []string {
	var out []string
	for i, part := range strings.Split(command, `"`) {
		if i%2 == 1 {
			out = append(out, part)
			continue
		}
		out = append(out, strings.Fields(part)...)
	}
	return out
}
