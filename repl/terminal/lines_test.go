package terminal

import (
	"errors"
	"io"
	"runtime"
	"strings"
	"testing"
)

func TestLines(t *testing.T) {
	const limit = 10
	in := newLines(strings.NewReader("one\r\n\n"+
		strings.Repeat("x", limit)+"\r\n"+
		strings.Repeat("x", limit+1)+"\n"+
		strings.Repeat("x", 100_000)+"\n"+
		"two\nlast"), limit)
	for _, want := range []string{"one", "", "xxxxxxxxxx", "!", "!", "two", "last"} {
		got, err := in.next()
		if errors.Is(err, errTooLong) {
			got, err = "!", nil
		}
		if got != want || err != nil {
			t.Errorf("got %q, %v, want %q", got, err, want)
		}
	}
	for range 2 {
		if got, err := in.next(); err != io.EOF {
			t.Errorf("at the end: %q, %v", got, err)
		}
	}
}

// endless gives a line that never ends, and counts.
type endless struct{ left int }

func (e *endless) Read(p []byte) (int, error) {
	if e.left <= 0 {
		return 0, io.EOF
	}
	n := min(len(p), e.left)
	for i := range p[:n] {
		p[i] = 'x'
	}
	e.left -= n
	return n, nil
}

func TestLinesInBoundedMemory(t *testing.T) {
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	if _, err := newLines(&endless{64 << 20}, maxLine).next(); !errors.Is(err, errTooLong) {
		t.Fatal(err)
	}
	runtime.ReadMemStats(&after)
	if allocated := after.TotalAlloc - before.TotalAlloc; allocated > 16*maxLine {
		t.Errorf("64 MiB without a line break took %d bytes", allocated)
	}
}
