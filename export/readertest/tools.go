package readertest

import (
	"bytes"
	"crypto/sha256"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"testing"
)

// missing ends the test: skipped, or failed where all readers must be there.
func missing(t testing.TB, what string) {
	t.Helper()
	if os.Getenv("CI") == "true" {
		t.Fatalf("reader missing: %s", what)
	}
	t.Skipf("reader missing: %s", what)
}

// program finds a command on the path.
func program(t testing.TB, name, debian string) string {
	t.Helper()
	path, err := exec.LookPath(name)
	if err != nil {
		missing(t, fmt.Sprintf("%s (apt-get install %s)", name, debian))
	}
	return path
}

// python finds an interpreter that has the module: the first one on the path
// need not be the one that the distribution's packages belong to.
func python(t testing.TB, module, debian string) string {
	t.Helper()
	for _, name := range []string{"python3", "/usr/bin/python3", "/usr/local/bin/python3"} {
		if path, err := exec.LookPath(name); err == nil && exec.Command(path, "-c", "import "+module).Run() == nil {
			return path
		}
	}
	missing(t, fmt.Sprintf("Python module %s (apt-get install %s)", module, debian))
	return ""
}

// nodeModules returns the folder of node modules if it holds the module.
func nodeModules(t testing.TB, module string) string {
	t.Helper()
	dir := os.Getenv("FLANKWRIGHT_NODE_MODULES")
	if cache, err := os.UserCacheDir(); dir == "" && err == nil {
		dir = filepath.Join(cache, "flankwright", "node_modules") // where .ci/install puts them
	}
	if _, err := os.Stat(filepath.Join(dir, module)); dir == "" || err != nil {
		missing(t, fmt.Sprintf("node module %s (bash .ci/install)", module))
	}
	return dir
}

// script returns the path of a helper in .ci/readers.
func script(t testing.TB, name string) string {
	t.Helper()
	dir, err := os.Getwd()
	if err != nil {
		t.Fatal(err)
	}
	for {
		if _, err := os.Stat(filepath.Join(dir, "go.mod")); err == nil {
			return filepath.Join(dir, ".ci", "readers", name)
		}
		up := filepath.Dir(dir)
		if up == dir {
			t.Fatal("not inside the module")
		}
		dir = up
	}
}

// run runs a command and returns its standard output; anything but success
// ends the test.
func run(t testing.TB, env []string, name string, args ...string) []byte {
	t.Helper()
	cmd := exec.CommandContext(t.Context(), name, args...)
	cmd.Env = append(os.Environ(), env...)
	var stdout, stderr bytes.Buffer
	cmd.Stdout, cmd.Stderr = &stdout, &stderr
	if err := cmd.Run(); err != nil {
		t.Fatalf("%s %q: %v\n%s%s", filepath.Base(name), args, err, stdout.Bytes(), stderr.Bytes())
	}
	return stdout.Bytes()
}

// compiled returns the program made of a C++ source in .ci/readers, kept in the
// temporary folder under a name that changes with the source.
func compiled(t testing.TB, source, lib, debian string) string {
	t.Helper()
	src := script(t, source)
	text, err := os.ReadFile(src)
	if err != nil {
		t.Fatal(err)
	}
	exe := filepath.Join(os.TempDir(), fmt.Sprintf("flankwright-%s-%x", lib, sha256.Sum256(text)))
	if _, err := os.Stat(exe); err == nil {
		return exe
	}
	gxx := program(t, "g++", "g++")
	tmp := filepath.Join(t.TempDir(), "reader")
	if out, err := exec.Command(gxx, "-O1", "-o", tmp, src, "-l"+lib).CombinedOutput(); err != nil {
		missing(t, fmt.Sprintf("lib%s (apt-get install %s): %s", lib, debian, out))
	}
	if err := os.Rename(tmp, exe); err != nil {
		return tmp // another file system; compile again next time
	}
	return exe
}
