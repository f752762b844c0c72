package main

import (
	"math/rand/v2"
	"os"
	"runtime"
	"strings"
	"testing"
)

// Files that are no session are refused in one line that says why, fast and in
// bounded memory; so is a pipe.
func TestHostileFiles(t *testing.T) {
	noise := make([]byte, 1<<20)
	source := rand.NewChaCha8([32]byte{13, 5})
	if _, err := source.Read(noise); err != nil {
		t.Fatal(err)
	}
	const big = 50 << 20
	inFolder(t, map[string]string{
		"big.budget":    strings.Repeat("x = 1 nm\n", big/9),
		"one.budget":    strings.Repeat("x", big),
		"long.budget":   "x = 1" + strings.Repeat(" + 1", 1<<19) + "\n",
		"noise.budget":  string(noise),
		"nul.budget":    "x = 1 nm\x00\n",
		"latin.budget":  "x = 1 \xb5m\n",
		"wide.budget":   "\xff\xfex\x00=\x001\x00\n\x00",
		"secret.budget": "",
	})
	if err := os.Chmod("secret.budget", 0); err != nil {
		t.Fatal(err)
	}
	for name, says := range map[string]string{
		"big.budget":   "MiB",
		"one.budget":   "MiB",
		"long.budget":  "long.budget:1",
		"noise.budget": "noise.budget:1 is not UTF-8",
		"nul.budget":   "NUL",
		"latin.budget": "latin.budget:1 is not UTF-8",
		"wide.budget":  "wide.budget:1 is not UTF-8",
	} {
		t.Run(name, func(t *testing.T) {
			spent := memory(func() { call(t, "", "replay", name).wants(t, 2, "", says) })
			if most := uint64(64 << 20); spent > most {
				t.Errorf("%d MiB were allocated, at most %d", spent>>20, most>>20)
			}
			call(t, "", "eval", "--import", name, "1 nm").wants(t, 2, "", says)
			call(t, "", "replay", "--update", name).wants(t, 2, "", says)
		})
	}
	if os.Getuid() != 0 {
		call(t, "", "replay", "secret.budget").wants(t, 2, "", "permission denied")
	}
}

// memory is how many bytes are allocated while f runs.
func memory(f func()) uint64 {
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	f()
	runtime.ReadMemStats(&after)
	return after.TotalAlloc - before.TotalAlloc
}

// Lines that are no text are refused one by one; what they hold never reaches
// the screen, and the session goes on.
func TestHostilePipe(t *testing.T) {
	inFolder(t, nil)
	noise := make([]byte, 1<<16)
	source := rand.NewChaCha8([32]byte{13, 6})
	if _, err := source.Read(noise); err != nil {
		t.Fatal(err)
	}
	for name, piped := range map[string]string{
		"noise":          string(noise),
		"a NUL":          "1 nm\x00",
		"an escape":      "1 nm\x1b[2J\x1b]0;title\a",
		"no UTF-8":       "1 \xb5m",
		"a long line":    strings.Repeat("x", 50<<20),
		"deep brackets":  strings.Repeat("(", 1<<18),
		"a long sum":     "1" + strings.Repeat("+1", 1<<18),
		"a tall power":   "2" + strings.Repeat("^2", 1<<12),
		"turned letters": "x\u202e = 1 nm",
	} {
		t.Run(name, func(t *testing.T) {
			o := call(t, piped+"\n2 nm + 3 nm\n")
			if !strings.HasSuffix(o.out, "\n| 5 nm\n") {
				t.Fatalf("the session does not go on; it ends with\n%s", o.out[max(0, len(o.out)-300):])
			}
			if o.status != 2 {
				t.Errorf("status %d, want 2", o.status)
			}
			for line := range strings.Lines(o.out) {
				if !strings.HasPrefix(line, "| ") && line != "|\n" {
					t.Fatalf("%q does not begin with the margin", line)
				}
			}
			if i := strings.IndexFunc(o.out, unseen); i >= 0 {
				t.Errorf("%q reaches the screen", o.out[i:min(len(o.out), i+10)])
			}
			o.complains(t, "")
		})
	}
}

// unseen says whether a character steers a terminal.
func unseen(r rune) bool {
	return r < ' ' && r != '\n' || r >= 0x7f && r < 0xa0 || r >= 0x202a && r <= 0x202e
}
