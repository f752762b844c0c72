package main

import (
	"math/rand/v2"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"
)

// A replay that records anew and a page that is killed at any moment leave the
// old file or the new one.
func TestKilledWhileRewriting(t *testing.T) {
	kills := 30
	if testing.Short() {
		kills = 5
	}
	var session strings.Builder
	for i := range 1500 {
		session.WriteString("x" + strconv.Itoa(i) + " = " + strconv.Itoa(i) + " nm + 1 nm\n")
	}
	for name, c := range map[string]struct {
		file string // that is rewritten
		old  string
		args []string
	}{
		"update": {"day.budget", session.String(), []string{"replay", "--update", "day.budget"}},
		"page":   {"day.html", "the old page\n", []string{"page", "day.budget", "-o", "day.html"}},
	} {
		t.Run(name, func(t *testing.T) {
			inFolder(t, map[string]string{"day.budget": session.String()})
			write := func() {
				if err := os.WriteFile(c.file, []byte(c.old), 0o644); err != nil {
					t.Fatal(err)
				}
			}
			write()
			start := time.Now()
			if err := apart(t, "", c.args...).Run(); err != nil {
				t.Fatal(err)
			}
			whole := time.Since(start)
			fresh := read(t, c.file)
			if fresh == c.old {
				t.Fatal("the file is as it was")
			}
			random := rand.New(rand.NewPCG(13, 5))
			seen := map[string]int{}
			for range kills {
				write()
				cmd := apart(t, "", c.args...)
				if err := cmd.Start(); err != nil {
					t.Fatal(err)
				}
				time.Sleep(time.Duration(random.Float64() * 1.2 * float64(whole)))
				cmd.Process.Kill()
				cmd.Wait()
				switch got := read(t, c.file); got {
				case c.old, fresh:
					seen[got]++
				default:
					t.Fatalf("%d bytes are neither the old file, %d bytes, nor the new one, %d", len(got), len(c.old), len(fresh))
				}
			}
			parts, err := filepath.Glob(c.file + ".*.part")
			if err != nil {
				t.Fatal(err)
			}
			t.Logf("%d times the old file, %d times the new one, %d kills in the middle of a write", seen[c.old], seen[fresh], len(parts))
		})
	}
}
