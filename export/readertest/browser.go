package readertest

import (
	"encoding/json"
	"fmt"
	"html"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"gonum.org/v1/gonum/spatial/r2"
)

// PointsInFill asks a browser (Chromium) which points, in the user units of the SVG
// file, lie in the fill of its part.
func PointsInFill(t testing.TB, path string, points []r2.Vec) []bool {
	t.Helper()
	browser := program(t, "chromium", "chromium")
	drawing, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	_, body, _ := strings.Cut(string(drawing), "?>")
	asked, err := json.Marshal(points)
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	page := filepath.Join(dir, "page.html")
	const script = `const part = document.getElementById("part"), svg = part.ownerSVGElement;
const inside = asked.map(q => { const p = svg.createSVGPoint(); p.x = q.X; p.y = q.Y; return part.isPointInFill(p); });
document.getElementById("answer").textContent = JSON.stringify(inside);`
	text := fmt.Sprintf("<!DOCTYPE html><body>%s<pre id=answer></pre><script>const asked = %s;\n%s</script></body>", body, asked, script)
	if err := os.WriteFile(page, []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
	out := run(t, nil, browser, "--headless", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run",
		"--disable-background-networking", "--disable-component-update", "--disable-sync",
		"--user-data-dir="+filepath.Join(dir, "profile"), "--dump-dom", "file://"+page)
	match := regexp.MustCompile(`(?s)<pre id="answer">(.*?)</pre>`).FindSubmatch(out)
	if match == nil {
		t.Fatalf("the page has no answer: %.300s", out)
	}
	var inside []bool
	if err := json.Unmarshal([]byte(html.UnescapeString(string(match[1]))), &inside); err != nil {
		t.Fatalf("%v: %s", err, match[1])
	}
	return inside
}
