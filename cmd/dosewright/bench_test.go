//go:build linux || darwin

package main

import (
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"syscall"
	"testing"
	"time"
)

// The promises that are measured here.
const (
	mostStart  = 3.0   // ms from the start to an answer, beyond a program that links the same
	mostReplay = 2.0   // s for 10,000 statements
	mostMemory = 200.0 // MB for the same
)

// BenchmarkStart runs eval and a program that links the same libraries and
// prints one line, one after the other, and reports the difference of the
// medians.
func BenchmarkStart(b *testing.B) {
	eval, bare := build(b), buildBare(b)
	timed(b, bare) // the first start of a file reads it from the disk
	timed(b, eval, "eval", "photon_energy(13.5 nm)")
	var evals, bares []float64
	for b.Loop() {
		evals = append(evals, milliseconds(timed(b, eval, "eval", "photon_energy(13.5 nm)")))
		bares = append(bares, milliseconds(timed(b, bare)))
	}
	extra := median(evals) - median(bares)
	b.ReportMetric(median(bares), "ms-bare")
	b.ReportMetric(median(evals), "ms-eval")
	b.ReportMetric(extra, "ms-extra")
	b.ReportMetric(mostStart, "ms-limit")
	if len(evals) >= 20 && extra > mostStart {
		b.Errorf("an answer takes %.2f ms more than a bare program, at most %g", extra, mostStart)
	}
}

// BenchmarkReplay runs saved sessions of 10,000 statements with their replies.
func BenchmarkReplay(b *testing.B) {
	for _, c := range []struct{ name, text string }{
		{"day", daySession(10_000)},
		{"live", liveSession(10_000)},
	} {
		b.Run(c.name, func(b *testing.B) {
			command := build(b)
			name := filepath.Join(b.TempDir(), "long.budget")
			if err := os.WriteFile(name, []byte(c.text), 0o644); err != nil {
				b.Fatal(err)
			}
			if out, err := exec.Command(command, "replay", "--update", name).CombinedOutput(); err != nil {
				b.Fatalf("%v\n%s", err, out)
			}
			var seconds, peak []float64
			for b.Loop() {
				replay := exec.Command(command, "replay", name)
				start := time.Now()
				out, err := replay.CombinedOutput()
				seconds = append(seconds, time.Since(start).Seconds())
				if err != nil || !strings.Contains(string(out), "10000 statements") {
					b.Fatalf("%v\n%s", err, out)
				}
				peak = append(peak, megabytes(replay))
			}
			b.ReportMetric(median(seconds), "s/replay")
			b.ReportMetric(mostReplay, "s-limit")
			b.ReportMetric(slices.Max(peak), "MB-peak")
			b.ReportMetric(mostMemory, "MB-limit")
			if median(seconds) > mostReplay || slices.Max(peak) > mostMemory {
				b.Errorf("%.2f s and %.0f MB, at most %g s and %g MB", median(seconds), slices.Max(peak), mostReplay, mostMemory)
			}
		})
	}
}

// daySession is a long day: inputs, what rests on them, questions and checks.
func daySession(statements int) string {
	var s strings.Builder
	for n := 0; n < statements; n += 5 {
		fmt.Fprintf(&s, "P%d [W] = %d W at WAFER  # in-band, at the resist\n", n, 1+n%7)
		fmt.Fprintf(&s, "D%d [mJ/cm^2] = %d mJ/cm^2 at WAFER\n", n, 25+n%20)
		fmt.Fprintf(&s, "wph%d [wafer/h] = throughput(D%d, 96 field/wafer, 8.58 cm^2/field, P%d, 9.5 s/wafer)\n", n, n, n)
		fmt.Fprintf(&s, "1 / sqrt(number_of(photon_count(D%d, hole_area(20 nm)))) [%%]\n", n)
		fmt.Fprintf(&s, "check wph%d >= 1 wafer/h\n", n)
	}
	return s.String()
}

// liveSession gives one input a new value over and over, with 100 names that
// rest on it in a row and are asked for.
func liveSession(statements int) string {
	const row = 100
	var s strings.Builder
	s.WriteString("x0 = 1 nm\n")
	for n := 1; n < row; n++ {
		fmt.Fprintf(&s, "x%d = x%d + x0 / %d\n", n, n-1, n)
	}
	for n := row; n < statements; n += 2 {
		fmt.Fprintf(&s, "x0 = %d nm\nx%d\n", n, n%row)
	}
	return s.String()
}

// build makes the command as a user has it.
func build(b *testing.B) string {
	b.Helper()
	return compile(b, ".", ".")
}

// buildBare makes a program that imports what the command imports and prints
// one line.
func buildBare(b *testing.B) string {
	b.Helper()
	list, err := exec.Command("go", "list", "-f", `{{range .Imports}}{{println .}}{{end}}`, ".").Output()
	if err != nil {
		b.Fatal(err)
	}
	text := "package main\n\nimport (\n"
	for _, name := range strings.Fields(string(list)) {
		if name != "fmt" && name != "os" {
			text += fmt.Sprintf("\t_ %q\n", name)
		}
	}
	text += "\t\"fmt\"\n\t\"os\"\n)\n\nfunc main() { fmt.Fprintln(os.Stdout, \"91.840 eV\") }\n"
	dir := b.TempDir()
	home, err := filepath.Abs("../..")
	if err != nil {
		b.Fatal(err)
	}
	ours, err := os.ReadFile(filepath.Join(home, "go.mod"))
	if err != nil {
		b.Fatal(err)
	}
	sums, err := os.ReadFile(filepath.Join(home, "go.sum"))
	if err != nil {
		b.Fatal(err)
	}
	head, rest, _ := strings.Cut(string(ours), "\n")
	module := strings.TrimPrefix(head, "module ")
	theirs := "module bare\n" + rest + "\nrequire " + module + " v0.0.0\nreplace " + module + " => " + filepath.ToSlash(home) + "\n"
	for name, content := range map[string]string{"go.mod": theirs, "go.sum": string(sums), "main.go": text} {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(content), 0o644); err != nil {
			b.Fatal(err)
		}
	}
	return compile(b, dir, ".", "-mod=mod")
}

func compile(b *testing.B, dir, name string, flags ...string) string {
	b.Helper()
	file := filepath.Join(b.TempDir(), "program")
	c := exec.Command("go", append(append([]string{"build", "-o", file}, flags...), name)...)
	c.Dir = dir
	c.Env = append(os.Environ(), "GOPROXY=off")
	if out, err := c.CombinedOutput(); err != nil {
		b.Fatalf("%v\n%s", err, out)
	}
	return file
}

// timed runs a program that must print the energy of a photon.
func timed(b *testing.B, program string, args ...string) time.Duration {
	b.Helper()
	start := time.Now()
	out, err := exec.Command(program, args...).CombinedOutput()
	spent := time.Since(start)
	if err != nil || string(out) != "91.840 eV\n" {
		b.Fatalf("%v\n%s", err, out)
	}
	return spent
}

func milliseconds(d time.Duration) float64 { return float64(d.Nanoseconds()) / 1e6 }

func median(x []float64) float64 {
	s := slices.Sorted(slices.Values(x))
	return (s[(len(s)-1)/2] + s[len(s)/2]) / 2
}

// megabytes is the most memory that a finished process held.
func megabytes(c *exec.Cmd) float64 {
	use, ok := c.ProcessState.SysUsage().(*syscall.Rusage)
	if !ok {
		return 0
	}
	if runtime.GOOS == "darwin" {
		return float64(use.Maxrss) / 1e6 // in bytes there
	}
	return float64(use.Maxrss) * 1024 / 1e6
}
