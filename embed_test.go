package dosewright_test

import (
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
)

// offline runs the go tool in a folder, with nothing but what is fetched
// already, and gives its output.
func offline(t *testing.T, dir string, args ...string) (string, error) {
	t.Helper()
	if _, err := exec.LookPath("go"); err != nil {
		t.Skip("the go tool, with which this test builds programs, is not here")
	}
	run := exec.CommandContext(t.Context(), "go", args...)
	run.Dir = dir
	run.Env = append(os.Environ(), "GOPROXY=off", "GOWORK=off", "GOFLAGS=")
	out, err := run.CombinedOutput()
	return string(out), err
}

func TestEmbeddingHost(t *testing.T) {
	out, err := offline(t, "examples/embed/host", "run", ".")
	if err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	for _, want := range []string{
		"dose [mJ/cm^2]     35 mJ/cm² at WAFER\n", // ten shots of 3.5 mJ/cm²
		"speed              219.78 mm/s\n",        // 2 W over 35 mJ/cm² times 26 mm
		"stage_heat(speed)  43.473 W\n",           // 900 W·s²/m² times its square
		"stage_heat(dose)   refused: kg·s⁻² is given, m·s⁻¹ is taken\n",
		"stage_heat(3 m/s)  refused: the stage moves at 0 to 2 m/s, not at 3 m/s",
		"a float64 in Go    43.473 W\n",
	} {
		if !strings.Contains(out, want) {
			t.Errorf("%q is not in\n%s", want, out)
		}
	}
}

func TestEmbeddingLots(t *testing.T) {
	const dir = "examples/embed/lots"
	program := filepath.Join(t.TempDir(), "lots.exe")
	if out, err := offline(t, dir, "build", "-o", program, "."); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	wrong := filepath.Join(t.TempDir(), "wrong.csv")
	for name, text := range map[string]string{
		wrong: "lot, dose / W, power / W, fields / (field/wafer)\nB01, 30, 2.4, 96\n",
	} {
		if err := os.WriteFile(name, []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	for _, c := range []struct {
		file   string
		status int
		says   []string
	}{
		{"lots.csv", 1, []string{
			"A02  157.65 wafer/h  28.005 J/wafer\n",
			"A03  98.458 wafer/h  37.889 J/wafer  ! throughput below 120 wafer/h  ! heat above 29 J/wafer\n",
			"A05  373.94 wafer/h  0.28005 J/wafer  ! a dose of 0.34000 mJ/cm², below 5 mJ/cm²\n",
			"3 of 5 lots leave the budget\n",
		}},
		{wrong, 2, []string{"line 2: dose: cannot convert kg·m²·s⁻³ and kg·s⁻²"}},
		{"none.csv", 2, []string{"none.csv"}},
	} {
		run := exec.CommandContext(t.Context(), program, c.file)
		run.Dir = dir
		out, err := run.CombinedOutput()
		var ended *exec.ExitError
		if !errors.As(err, &ended) || ended.ExitCode() != c.status {
			t.Errorf("%s: %v, want the exit status %d", c.file, err, c.status)
		}
		for _, want := range c.says {
			if !strings.Contains(string(out), want) {
				t.Errorf("%s: %q is not in\n%s", c.file, want, out)
			}
		}
	}
}

// The handler is tested where it stands, over HTTP.
func TestEmbeddingDashboard(t *testing.T) {
	out, err := offline(t, "examples/embed/dashboard", "test", "-count=1", "-v", ".")
	if err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	for _, name := range []string{"TestTiles", "TestQuestions", "TestRefusals", "TestManyAtOnce"} {
		if !strings.Contains(out, "--- PASS: "+name) {
			t.Errorf("%s has not run:\n%s", name, out)
		}
	}
	if out, err := offline(t, "examples/embed/dashboard", "build", "-o", os.DevNull, "."); err != nil {
		t.Errorf("%v\n%s", err, out)
	}
}

// The engine draws nothing, edits no line and opens no connection; a program
// that embeds it links none of what does.
func TestEngineLinksNoTerminalAndNoCharts(t *testing.T) {
	out, err := offline(t, ".", "list", "-deps", "./repl")
	if err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	linked := strings.Fields(out)
	if len(linked) < 50 {
		t.Fatalf("only %d packages: %s", len(linked), out)
	}
	never := []string{
		"github.com/chzyer/readline", "gonum.org/v1/plot", "golang.org/x", "github.com/guptarohit/asciigraph",
		module + "/repl/chart", module + "/repl/terminal", module + "/repl/page", "net", "net/http", "os/exec", "os/signal", "log",
	}
	for _, name := range linked {
		for _, n := range never {
			if name == n || strings.HasPrefix(name, n+"/") && n != "net" {
				t.Errorf("repl links %s", name)
			}
		}
	}
}

// most is how much the engine may add to a stripped binary, in bytes.
const most = 4_000_000

func TestEngineIsSmall(t *testing.T) {
	if testing.Short() {
		t.Skip("builds two programs")
	}
	without := built(t, "package main\n\nimport (\n\t\"context\"\n\t\"fmt\"\n)\n\nfunc main() { fmt.Println(context.Background()) }\n")
	with := built(t, `package main

import (
	"context"
	"fmt"

	"example.com/dosewright/repl"
)

func main() {
	for _, l := range repl.NewSession(repl.Config{}).Feed(context.Background(), "photon_energy(13.5 nm)").Lines() {
		fmt.Println(l.Text)
	}
}
`)
	t.Logf("%s/%s: %d bytes without the engine, %d with it, %.2f MB more", runtime.GOOS, runtime.GOARCH, without, with, float64(with-without)/1e6)
	if with-without > most {
		t.Errorf("the engine adds %d bytes, at most %d", with-without, most)
	}
}

// built is the size of a program without symbols, built in a module of its own.
func built(t *testing.T, program string) int64 {
	t.Helper()
	home, err := os.Getwd()
	if err != nil {
		t.Fatal(err)
	}
	mod, err := os.ReadFile("examples/embed/host/go.mod")
	if err != nil {
		t.Fatal(err)
	}
	sum, err := os.ReadFile("examples/embed/host/go.sum")
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	for name, text := range map[string]string{
		"go.mod": strings.Replace(string(mod), "=> ../../..", "=> "+filepath.ToSlash(home), 1), "go.sum": string(sum), "main.go": program,
	} {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	if out, err := offline(t, dir, "build", "-trimpath", "-ldflags", "-s -w", "-o", "program", "."); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	info, err := os.Stat(filepath.Join(dir, "program"))
	if err != nil {
		t.Fatal(err)
	}
	return info.Size()
}
