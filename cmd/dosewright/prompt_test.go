package main

import (
	"bufio"
	"context"
	"io"
	"os"
	"strings"
	"testing"
	"time"
)

func TestPipedStatuses(t *testing.T) {
	inFolder(t, nil)
	for name, c := range map[string]struct {
		piped  string
		status int
		out    string
	}{
		"nothing":             {"", 0, ""},
		"a note":              {"# a note\n\n", 0, ""},
		"an answer":           {"2 nm + 3 nm\n", 0, "| 5 nm\n"},
		"no line end":         {"2 nm + 3 nm", 0, "| 5 nm\n"},
		"a byte order mark":   {"\uFEFF2 nm + 3 nm\n", 0, "| 5 nm\n"},
		"a transcript":        {"dose> x = 2 nm\ndose> 3 * x\n| 9 nm\n", 0, "| 6 nm\n"},
		"a block":             {"chain pair\n  at IF\n  mirror x2: 50 %\n  at WAFER\nend\ncarry(8 W at IF, pair, WAFER)\n", 0, "| 2 W at WAFER\n"},
		"a check that fails":  {"check 4 nm <= 3 nm\n1 nm\n", 1, "| fails: 4 nm <= 3 nm\n| 1 nm\n"},
		"a refusal and on":    {"1 +\n2 nm\n", 2, "| 1 +\n|    ~\n…"},
		"quit ends it":        {"1 nm\nquit\n2 nm\n", 0, "| 1 nm\n"},
		"replies passed over": {"| 1 nm\n|\n2 nm\n", 0, "| 2 nm\n"},
	} {
		t.Run(name, func(t *testing.T) { call(t, c.piped).wants(t, c.status, c.out, "") })
	}
	if o := call(t, "1 +\n2 nm\n"); !strings.HasSuffix(o.out, "\n| 2 nm\n") {
		t.Errorf("printed\n%swant the answer behind the refusal", o.out)
	}
}

// What was piped in and saved replays, and holds everything said.
func TestPipedSave(t *testing.T) {
	dir := inFolder(t, nil)
	o := call(t, "# a site\nx = 2 nm  # a note\n3 * x\n1 nm + 1 W\nchain pair\n  at IF\n  mirror: 50 %\n  at WAFER\nend\nsave \"day.budget\"\n")
	if o.status != 2 || !strings.Contains(o.out, "day.budget") {
		t.Errorf("status %d, want 2 for the refusal, and word of the file\n%s", o.status, o.out)
	}
	text := read(t, "day.budget")
	if begin := "# a site\nx = 2 nm  # a note\n3 * x\n| 6 nm\n1 nm + 1 W\n| 1 nm + 1 W\n| ~~~~   ~~~\n"; !strings.HasPrefix(text, begin) {
		t.Errorf("the file is\n%s", text)
	}
	if end := "chain pair\n  at IF\n  mirror: 50 %\n  at WAFER\nend\n"; !strings.HasSuffix(text, end) {
		t.Errorf("the file is\n%s", text)
	}
	o = call(t, "", "replay", "day.budget")
	if o.status != 0 || !strings.Contains(o.out, "2 of 2") {
		t.Errorf("status %d\n%s", o.status, o.out)
	}
	if files := listing(t, dir); len(files) != 1 {
		t.Errorf("the folder holds %q, want the session alone", files)
	}
}

func TestSaveRefusals(t *testing.T) {
	dir := inFolder(t, nil)
	if err := os.Mkdir("taken", 0o755); err != nil {
		t.Fatal(err)
	}
	for _, name := range []string{"../out.budget", "/tmp/out.budget", "taken", "nowhere/out.budget", ""} {
		o := call(t, "1 nm\nsave \""+name+"\"\n2 nm\n")
		if o.status != 2 || !strings.HasSuffix(o.out, "\n| 2 nm\n") {
			t.Errorf("save %q: status %d, want 2 and the next answer\n%s", name, o.status, o.out)
		}
	}
	if files := listing(t, dir); len(files) != 1 {
		t.Errorf("the folder holds %q, want what it held", files)
	}
}

// A reply is there as soon as its line is in: another program may talk to the
// command through pipes.
func TestPipedAnswersAtOnce(t *testing.T) {
	inFolder(t, nil)
	in, typed := io.Pipe()
	printed, out := io.Pipe()
	done := make(chan int)
	go func() {
		status := run(context.Background(), nil, in, out, io.Discard)
		out.Close()
		done <- status
	}()
	late := time.AfterFunc(time.Minute, func() { printed.CloseWithError(os.ErrDeadlineExceeded) })
	defer late.Stop()
	reader := bufio.NewReader(printed)
	for _, c := range []struct{ say, hear string }{{"2 nm + 3 nm\n", "| 5 nm\n"}, {"7 * 6\n", "| 42\n"}} {
		if _, err := io.WriteString(typed, c.say); err != nil {
			t.Fatal(err)
		}
		if line, err := reader.ReadString('\n'); err != nil || line != c.hear {
			t.Fatalf("said %q, heard %q (%v), want %q", c.say, line, err, c.hear)
		}
	}
	typed.Close()
	if status := <-done; status != 0 {
		t.Errorf("status %d, want 0", status)
	}
}

// An output that cannot be written is no success.
func TestOutputLost(t *testing.T) {
	full, err := os.OpenFile("/dev/full", os.O_WRONLY, 0)
	if err != nil {
		t.Skip("this system has no /dev/full")
	}
	defer full.Close()
	inFolder(t, map[string]string{"day.budget": "1 nm\n| 1 nm\n"})
	for _, args := range [][]string{{"eval", "1 nm"}, {"eval", "--json", "1 nm"}, {"replay", "day.budget"}, {"help"}, {"version"}, nil} {
		var problems strings.Builder
		status := run(context.Background(), args, strings.NewReader("1 nm\n"), full, &problems)
		outcome{status, "", problems.String()}.wants(t, 2, "", "no space left")
	}
}

// The time left counts from the start of its own computation.
func TestPace(t *testing.T) {
	var p pace
	start := time.Unix(0, 0)
	for _, c := range []struct{ second, done, total, gone int }{
		{0, 10, 100, 0}, {3, 60, 100, 3}, {5, 100, 100, 5}, // the first
		{90, 200, 1000, 0}, {92, 400, 1000, 2}, // longer than the first
		{95, 200, 1000, 0}, {96, 300, 1000, 1}, // the same, after an interruption
	} {
		now := start.Add(time.Duration(c.second) * time.Second)
		if got := p.at(now, c.done, c.total); got != time.Duration(c.gone)*time.Second {
			t.Errorf("%d of %d at %d s: %v, want %d s", c.done, c.total, c.second, got, c.gone)
		}
	}
}
