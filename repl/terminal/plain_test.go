package terminal

import (
	"context"
	"errors"
	"io"
	"strings"
	"testing"
)

// said gives what a run over a pipe prints.
func said(t *testing.T, input string) string {
	t.Helper()
	var out strings.Builder
	err := Run(t.Context(), &adder{}, Options{
		In: strings.NewReader(input), Out: &out, Err: io.Discard, Greeting: "hello",
	})
	if lost := len(input) > maxLine; lost != errors.Is(err, ErrLost) || !lost && err != nil {
		t.Fatal(err)
	}
	return out.String()
}

func TestPlain(t *testing.T) {
	for _, c := range []struct{ what, input, want string }{
		{"nothing", "", ""},
		{"statements", "1 + 2\n\n3+4\r\n5", "| 3\n| 7\n| 5\n"},
		{"a refusal", "1 + x\n2\n", "| 1 + x\n| ~~~~~\n| x is no number\n| 2\n"},
		{"a block", "open\n  a\n  b\nend\n1\n", "| 2 lines\n| 1\n"},
		{"a block that does not end", "open\na\n", "| the input ended inside a block, which was dropped\n"},
		{"quit", "1\nquit\n2\n", "| 1\n"},
		{
			"a fault", "fail\n1\n",
			"| a fault of this program, not of the statement: out of cheese; please report it with the line\n| 1\n",
		},
		{
			"keys are no keys here", "1\x01+2\x7f\n",
			"| 1\\x01+2\\x7f\n| ~~~~~\n| 1\\x01 is no number\n",
		},
		{"a sign of a recalled block is text here", "1 ↵ 2\n", "| 1 ↵ 2\n| ~~~~~\n| 1 ↵ 2 is no number\n"},
		{
			"a line that is too long", strings.Repeat("1+", maxLine) + "1\n2\n",
			"| the line is too long and was left out: make several lines of it\n| 2\n",
		},
		{"a long line", strings.Repeat("1+", 50_000) + "1\n", "| 50001\n"},
	} {
		if got := said(t, c.input); got != c.want {
			t.Errorf("%s: got\n%s\nwant\n%s", c.what, got, c.want)
		}
	}
}

func TestPlainEndsWithItsContext(t *testing.T) {
	ctx, cancel := context.WithCancelCause(t.Context())
	in, lines := io.Pipe()
	defer lines.Close()
	out, replies := io.Pipe()
	ended := make(chan error)
	go func() { ended <- Run(ctx, &adder{}, Options{In: in, Out: replies, Err: io.Discard}) }()
	if _, err := io.WriteString(lines, "1+1\n"); err != nil {
		t.Fatal(err)
	}
	if _, err := io.ReadFull(out, make([]byte, len("| 2\n"))); err != nil {
		t.Fatal(err)
	}
	why := errors.New("enough")
	cancel(why)
	if err := <-ended; !errors.Is(err, why) {
		t.Errorf("ended with %v", err)
	}
}

// full cannot be written to.
type full struct{}

func (full) Write([]byte) (int, error) { return 0, errFull }

var errFull = errors.New("no room")

func TestPlainTellsThatItCannotWrite(t *testing.T) {
	err := Run(t.Context(), &adder{}, Options{In: strings.NewReader("1\n2\n"), Out: full{}, Err: io.Discard})
	if !errors.Is(err, errFull) {
		t.Errorf("ended with %v", err)
	}
}

// broken cannot be read.
type broken struct{}

var errBroken = errors.New("gone")

func (broken) Read([]byte) (int, error) { return 0, errBroken }

func TestPlainTellsThatItCannotRead(t *testing.T) {
	err := Run(t.Context(), &adder{}, Options{In: broken{}, Out: io.Discard, Err: io.Discard})
	if !errors.Is(err, errBroken) {
		t.Errorf("ended with %v", err)
	}
}
