//go:build unix

package main

import (
	"bytes"
	"fmt"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"syscall"
	"testing"
	"time"
)

// TestFamilyKilled kills runs at random moments and resumes them: the tree is then that
// of a run that was let alone.
func TestFamilyKilled(t *testing.T) {
	kills := 50
	if testing.Short() {
		kills = 5
	}
	table := writeTable(t, mixedTable(100))
	whole := t.TempDir()
	started := time.Now()
	family := func(dir string, more ...string) *exec.Cmd {
		return programProcess(append([]string{"family", table, "-o", dir, "--format", "dxf,svg", "--quiet"}, more...)...)
	}
	if out, err := family(whole).CombinedOutput(); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	took := time.Since(started)
	want := tree(t, whole)
	early, late := 0, 0
	for i := range kills {
		dir := filepath.Join(t.TempDir(), "out")
		run := family(dir)
		if err := run.Start(); err != nil {
			t.Fatal(err)
		}
		time.Sleep(time.Duration(rand.Int64N(int64(took))))
		run.Process.Kill()
		if err := run.Wait(); err == nil {
			late++
		}
		got := map[string][]byte{}
		if _, err := os.Stat(dir); err == nil {
			got = tree(t, dir)
		}
		if len(got) == 0 {
			early++
		}
		for name, data := range got {
			if !strings.HasPrefix(name, ".") && !bytes.Equal(data, want[name]) {
				t.Errorf("kill %d: %s is not whole", i, name)
			}
		}
		if out, err := family(dir, "--resume").CombinedOutput(); err != nil {
			t.Fatalf("%v: %s", err, out)
		}
		compareTrees(t, fmt.Sprintf("kill %d, resumed", i), tree(t, dir), want)
	}
	if early+late > kills*9/10 {
		t.Errorf("of %d kills %d came before anything was written and %d after all of it", kills, early, late)
	}
}

// TestFamilyInterrupted: after SIGINT nothing is partial, there is no list, and the exit
// code is 130.
func TestFamilyInterrupted(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "out")
	run := programProcess("family", writeTable(t, mixedTable(5000)), "-o", dir)
	var errOut bytes.Buffer
	run.Stderr = &errOut
	if err := run.Start(); err != nil {
		t.Fatal(err)
	}
	for deadline := time.Now().Add(20 * time.Second); time.Now().Before(deadline); time.Sleep(time.Millisecond) {
		if entries, _ := os.ReadDir(dir); len(entries) > 20 {
			break
		}
	}
	run.Process.Signal(syscall.SIGINT)
	run.Wait()
	if code := run.ProcessState.ExitCode(); code != exitInterrupted {
		t.Errorf("exits %d: %.500s", code, errOut.String())
	}
	got := tree(t, dir)
	drawings := 0
	for name := range got {
		base, isDrawing := strings.CutSuffix(name, ".dxf")
		switch {
		case strings.HasPrefix(name, ".") || strings.HasPrefix(name, "family"):
			t.Errorf("left behind: %s", name)
		case isDrawing && got[base+".json"] == nil:
			t.Errorf("%s has no sidecar", name)
		case isDrawing:
			drawings++
		}
	}
	if drawings < 5 || !strings.Contains(errOut.String(), "interrupted") {
		t.Errorf("%d drawings; %.500s", drawings, errOut.String())
	}
}

// TestFamilyMemoryIsFlat: a table of 100,000 rows takes no more memory than its workers.
func TestFamilyMemoryIsFlat(t *testing.T) {
	if raceDetector {
		t.Skip("asked without the race detector")
	}
	rows := 100_000
	if testing.Short() {
		rows = 5_000
	}
	dir := memoryFolder(t)
	table := filepath.Join(dir, "table.csv")
	if err := os.WriteFile(table, []byte(mixedTable(rows)), 0o666); err != nil {
		t.Fatal(err)
	}
	run := programProcess("family", table, "-o", filepath.Join(dir, "out"), "--format", "svg", "--extent", "tooth", "--tolerance", "20um", "--quiet")
	if out, err := run.CombinedOutput(); err != nil {
		t.Fatalf("%v: %.2000s", err, out)
	}
	peak := int64(run.ProcessState.SysUsage().(*syscall.Rusage).Maxrss)
	if runtime.GOOS == "linux" {
		peak *= 1024 // there in kilobytes
	}
	t.Logf("%d rows: %d MB", rows, peak>>20)
	const most = 150 << 20 // bytes
	if peak > most {
		t.Errorf("%d rows took %d MB", rows, peak>>20)
	}
}

// TestFamilyFullDisk fills a small file system: an error, exit 1, no partial file.
func TestFamilyFullDisk(t *testing.T) {
	dir := t.TempDir()
	mount := exec.Command("mount", "-t", "tmpfs", "-o", "size=1m", "tmpfs", dir)
	if out, err := mount.CombinedOutput(); err != nil {
		t.Skipf("no small file system can be mounted here (export/files tests full disks with one that fails at will): %s", out)
	}
	t.Cleanup(func() { exec.Command("umount", dir).Run() })
	out := filepath.Join(dir, "out")
	code, _, stderr := call(t, "family", writeTable(t, mixedTable(100)), "-o", out, "--format", "dxf,svg")
	if code != exitFailed || !strings.Contains(stderr, "no space left") {
		t.Errorf("exits %d: %.500s", code, stderr)
	}
	got := tree(t, out)
	sets := 0
	for name := range got {
		base, isSidecar := strings.CutSuffix(name, ".json")
		switch {
		case strings.HasPrefix(name, ".") || strings.HasPrefix(name, "family"):
			t.Errorf("left behind: %s", name)
		case isSidecar && (got[base+".dxf"] == nil || got[base+".svg"] == nil):
			t.Errorf("%s has no drawings", name)
		case isSidecar:
			sets++
		}
	}
	if len(got) != 3*sets || sets < 2 {
		t.Errorf("%d files of %d sets", len(got), sets)
	}
}
