package page

import (
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/fstest"
	"time"
)

// mostPage is the promise for a session of 5,000 lines with 50 imports.
const mostPage = 5 * time.Second

// longSession has 5,000 lines: 50 imports of 20 names each, headings, formulas
// on what was imported and on one another, checks, a picture and a table now
// and then, and refusals.
func longSession() fstest.MapFS {
	files := fstest.MapFS{}
	var b strings.Builder
	lines := 0
	say := func(format string, args ...any) {
		fmt.Fprintf(&b, format+"\n", args...)
		lines++
	}
	say("# A long session.")
	for i := range 50 {
		var c strings.Builder
		for k := range 20 {
			fmt.Fprintf(&c, "c%d_%d = %d nm  # a convention\n", i, k, k+1)
		}
		name := fmt.Sprintf("lib/c%d.budget", i)
		files[name] = &fstest.MapFile{Data: []byte(c.String())}
		say("import %q", name)
	}
	for i := 0; lines < 5000; i++ {
		switch i % 25 {
		case 0:
			say("# %d. What comes next?", i)
		case 5:
			say("check v%d > 0 nm", i-1)
		case 10:
			say("v%d + 1 s", i-1)
		case 15:
			say("sweep x = 1 nm .. 9 nm by 1 nm : x * c1_1, x^2")
		case 20:
			if i%500 == 20 {
				say("sweep x = 1 nm .. 9 nm 41 points : x * c1_1 plot")
			} else {
				say("why v%d", i-1)
			}
		case 6, 11, 16, 21, 1:
			say("v%d = c%d_%d * 2  # from a convention", i, i%50, i%20)
		default:
			say("v%d = v%d + c%d_%d", i, i-1, i%50, i%20)
		}
	}
	files["day.budget"] = &fstest.MapFile{Data: []byte(b.String())}
	return files
}

// BenchmarkPage makes the page of a long session.
func BenchmarkPage(b *testing.B) {
	files := longSession()
	d := read(b, paged(b, files, "day.budget"))
	if n := len(d.all("figure")); n < 5 {
		b.Fatalf("%d pictures", n)
	}
	if got := d.text(".tally")[0]; !strings.Contains(got, "checks hold") || !strings.Contains(got, "statements refused") {
		b.Fatalf("the session is %s", got)
	}
	b.ReportAllocs()
	for b.Loop() {
		start := time.Now()
		if err := Write(b.Context(), configOf(files), "day.budget", io.Discard); err != nil {
			b.Fatal(err)
		}
		if took := time.Since(start); took > mostPage {
			b.Errorf("%v for 5,000 lines, at most %v", took, mostPage)
		}
	}
}
