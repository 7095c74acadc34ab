package main

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strconv"
	"strings"
	"sync"
	"testing"
	"time"
)

// mixedTable has rows of 12 to 120 teeth, in both unit systems, with and without
// shift and bore.
func mixedTable(rows int) string {
	var b strings.Builder
	b.WriteString("name,module,diametral-pitch,teeth,profile-shift,bore\n")
	for i := range rows {
		teeth, shift, bore := 12+i*37%109, "", ""
		if i%3 == 1 {
			shift = "0.25"
		}
		if i%2 == 1 {
			bore = "0.2"
		}
		size := fmt.Sprintf("%g,", 1+float64(i%5)/2)
		if i%4 == 3 {
			size = "," + strconv.Itoa(8+i%13)
		}
		fmt.Fprintf(&b, "part-%06d,%s,%d,%s,%s\n", i, size, teeth, shift, bore)
	}
	return b.String()
}

// memoryFolder is a new folder, in memory where the system has a place for that.
func memoryFolder(tb testing.TB) string {
	tb.Helper()
	parent := ""
	if info, err := os.Stat("/dev/shm"); err == nil && info.IsDir() {
		parent = "/dev/shm"
	}
	dir, err := os.MkdirTemp(parent, "flankwright-test-")
	if err != nil {
		tb.Fatal(err)
	}
	tb.Cleanup(func() { os.RemoveAll(dir) })
	return dir
}

// makeFamily runs the command and returns how long it took.
func makeFamily(tb testing.TB, table, dir string, more ...string) time.Duration {
	tb.Helper()
	var errOut bytes.Buffer
	args := append([]string{"family", table, "-o", dir, "--format", "dxf,svg", "--quiet"}, more...)
	started := time.Now()
	if code := run(context.Background(), args, strings.NewReader(""), io.Discard, &errOut); code != exitDone {
		tb.Fatalf("exits %d: %.2000s", code, errOut.String())
	}
	return time.Since(started)
}

// tree is every file of a folder by its name.
func tree(tb testing.TB, dir string) map[string][]byte {
	tb.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		tb.Fatal(err)
	}
	files := make(map[string][]byte, len(entries))
	for _, e := range entries {
		data, err := os.ReadFile(filepath.Join(dir, e.Name()))
		if err != nil {
			tb.Fatal(err)
		}
		files[e.Name()] = data
	}
	return files
}

// writeRaw writes files from memory as plainly as can be, each under a temporary name
// and renamed, and returns how long it took.
func writeRaw(tb testing.TB, files map[string][]byte, dir string, workers int) time.Duration {
	tb.Helper()
	if err := os.Mkdir(dir, 0o777); err != nil {
		tb.Fatal(err)
	}
	names := make([]string, 0, len(files))
	for name := range files {
		names = append(names, name)
	}
	slices.Sort(names)
	started := time.Now()
	var group sync.WaitGroup
	for w := range workers {
		group.Go(func() {
			for i := w; i < len(names); i += workers {
				path := filepath.Join(dir, names[i])
				f, err := os.OpenFile(path+".tmp", os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
				if err == nil {
					_, err = f.Write(files[names[i]])
				}
				if err == nil {
					err = f.Close()
				}
				if err == nil {
					err = os.Rename(path+".tmp", path)
				}
				if err != nil {
					tb.Error(err)
				}
			}
		})
	}
	group.Wait()
	return time.Since(started)
}

// BenchmarkFamily makes 2,000 mixed gears with one worker and with two, writes the same
// bytes raw, and reports the ratios: how much longer than raw writing it takes (3 at
// most), and how much faster two workers are (1.8 at least). Each is the ratio of the
// shortest times of the run, which the machine's other work disturbs least; run it with
// -benchtime 5x or more.
func BenchmarkFamily(b *testing.B) {
	if runtime.GOMAXPROCS(0) < 2 {
		b.Skip("needs two cores")
	}
	const rows = 2000
	dir := memoryFolder(b)
	table := filepath.Join(dir, "table.csv")
	if err := os.WriteFile(table, []byte(mixedTable(rows)), 0o666); err != nil {
		b.Fatal(err)
	}
	shortest := func(d *time.Duration, took time.Duration) {
		if *d == 0 || took < *d {
			*d = took
		}
	}
	var one, two, raw time.Duration
	bytes, i := 0, 0
	b.ReportAllocs()
	for b.Loop() {
		i++
		out := filepath.Join(dir, strconv.Itoa(i))
		shortest(&one, makeFamily(b, table, out+"-one", "--workers", "1"))
		b.StopTimer()
		os.RemoveAll(out + "-one")
		b.StartTimer()
		shortest(&two, makeFamily(b, table, out+"-two", "--workers", "2"))
		b.StopTimer()
		files := tree(b, out+"-two")
		bytes = 0
		for _, data := range files {
			bytes += len(data)
		}
		runtime.GC()
		shortest(&raw, writeRaw(b, files, out+"-raw", 2))
		os.RemoveAll(out + "-two")
		os.RemoveAll(out + "-raw")
		b.StartTimer()
	}
	b.SetBytes(int64(bytes))
	b.ReportMetric(float64(two)/float64(raw), "x-raw-writing")
	b.ReportMetric(float64(one)/float64(two), "x-two-workers")
	b.ReportMetric(float64(two.Microseconds())/rows, "us/gear-of-two")
}
