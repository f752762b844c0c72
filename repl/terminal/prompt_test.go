//go:build linux && !race

package terminal

import (
	"io"
	"os"
	"path/filepath"
	"strings"
	"syscall"
	"testing"

	"golang.org/x/sys/unix"
)

const (
	ctrlC = "\x03"
	ctrlD = "\x04"
)

func TestPromptAnswers(t *testing.T) {
	s := sit(t, 80, nil, "GREETING=adder 1, help with Tab")
	s.sees("| adder 1, help with Tab", "dose> █")
	if raw := termios(t, s.line); raw.Lflag&unix.ICANON != 0 {
		t.Error("the lines are not edited")
	}
	s.types("1 + 2\r")
	s.sees("| adder 1, help with Tab", "dose> 1 + 2", "| 3", "dose> █")
	s.types("1+µ\r")
	s.sees("| adder 1, help with Tab", "dose> 1 + 2", "| 3",
		"dose> 1+µ", "| 1+µ", "| ~~~", "| µ is no number", "dose> █")
	s.types("open\r")
	s.reads("      ")
	s.types("a\rend\r")
	s.reads("| 1 lines\r\n")
	s.types("fail\r")
	s.reads("| a fault of this program, not of the statement: out of cheese")
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptQuits(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("quit\r")
	s.leaves(0)
}

func TestPromptEdits(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	for _, c := range []struct{ keys, want string }{
		{"\x1b[3~", "█"},               // Delete on an empty line
		{"\x00", "█"},                  // Ctrl-Blank
		{"a\x14", "a█"},                // Ctrl-T behind one character
		{"\x7f\x7f", "█"},              // Backspace, once too often
		{"dose\x1b[D\x1b[D\x17", "█e"}, // Ctrl-W inside the first word; the cursor stands on the s
		{"\x0b", "█"},
		{"dose * λ_1\x1b[1~2\x1b[4~3", "2dose * λ_13█"}, // Home, End
		{"\x17", "2dose * █"},
		{"\x19\x19", "2dose * λ_13λ_13█"}, // Ctrl-Y
		{"\x1b[1;5D\x1b[3~", "2dose * █13λ_13"},
		{"\x15\x0b", "█"},
	} {
		s.types(c.keys)
		s.sees("dose> " + c.want)
	}
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptCompletes(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("2 + pho\t")
	s.sees("dose> 2 + photon_█")
	s.types("\t")
	s.sees("dose> 2 + photon_█", "| photon_count   photon_energy")
	s.types("\x7f\x7f") // Backspace behind a list
	s.sees("dose> 2 + photo█")
	s.types("n_e\t")
	s.sees("dose> 2 + photon_energy█")
	s.types("\x15zz\t\x7f\x7f") // nothing fits
	s.sees("dose> █")
	s.types("\t\t5\r") // what is listed is no part of what was said
	s.sees("dose> 5", "| 5", "dose> █")
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptHints(t *testing.T) {
	s := sit(t, 32, nil)
	s.sees("dose> █")
	s.types("power(1")
	s.sees("dose> power(1█", "| power(wavelength)")
	s.types("\x1b[D")
	s.sees("dose> power(█", "| power(wavelength)") // the cursor stands on the 1
	s.types("\t")
	s.sees("dose> power(█", "| photon_count   λ_peak", "| photon_energy  λ_rest", "| power")
	s.types("\x1b[C)")
	s.sees("dose> power(1)█")
	s.types("\x1b[D\x17wavelength+wavelength+1")
	s.sees("dose> power(wavelength+wavelengt", "h+1█", "| power(wavelength)")
	s.types("\x01")
	s.sees("dose> █ower(wavelength+wavelengt", "h+1)")
	s.types("\x1b[C\x1b[C\x1b[C\x1b[C\x1b[C\x1b[C")
	s.sees("dose> power(█avelength+wavelengt", "h+1)", "| power(wavelength)")
	s.types(ctrlC)
	s.sees("dose> power(wavelength+wavelengt", "h+1)^C", "dose> █")
	s.types("\x1b[200~power(\x1b[201~")
	s.sees("dose> power(wavelength+wavelengt", "h+1)^C", "dose> power(█", "| power(wavelength)")
	resize(t, s.user, 12)
	s.types("1")
	s.reads("\n\x1b[J| power(wav\x1b[") // cut
	s.types("\r")
	s.reads("is no number")
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptTakesAPaste(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("\x1b[200~open\r\ta\r\n\tb\rend\n1+1\r2 +\t\x04\x1b[A2\x1b[201~")
	s.sees("dose> open", "       a", "       b", "      end", "| 2 lines", "dose> 1+1", "| 2", "dose> 2 + [A2█")
	s.types("\x7f\x7f\x7f5\r")
	s.reads("| 7\r\n")
	s.types("1\x1b[200~+2\x1b[201~+3\x1b[1~\x1b[200~9+\x1b[201~")
	s.reads("9+1+2+3")
	s.types("\r")
	s.reads("| 15\r\n")
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptTakesAHugePaste(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("\x1b[200~" + strings.Repeat("x", maxEdited+5) + "\r1+1\r" + strings.Repeat("x", maxEdited+5) + "\x1b[201~2+2\r")
	s.reads("| the line is too long and was left out: make several lines of it\r\n")
	s.reads("| 2\r\n")
	s.reads("| the line is too long and was left out: make several lines of it\r\n")
	s.reads("| 4\r\n")
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptIsInterrupted(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("1+" + ctrlC)
	s.sees("dose> 1+^C", "dose> █")
	s.types("wait\r")
	s.sees("dose> 1+^C", "dose> wait", "waiting█")
	s.types(ctrlC)
	s.sees("dose> 1+^C", "dose> wait", "| stopped", "dose> █")
	s.types("open\ra\rb")
	s.reads("\r      b")
	s.types(ctrlC)
	s.reads("      b^C\r\n\x1b[J\x1b[2K\r      ")
	s.types(ctrlC)
	s.reads("| the block was dropped\r\n")
	s.reads("dose> ")
	s.types(ctrlD)
	s.leaves(0)
}

// What is typed while an answer is computed is seen when its turn comes.
func TestPromptIsTypedAheadOf(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("wait\r")
	s.reads("waiting")
	s.types("1+x\x7f1\r" + ctrlC)
	s.sees("dose> wait", "| stopped", "dose> 1+1", "| 2", "dose> █")
	s.types("2+2\r" + ctrlD)
	s.leaves(0)
	s.reads("| 4\r\n")
}

func TestPromptDropsAPaste(t *testing.T) {
	rest := strings.Repeat("1+1\r", 5000) // more than a terminal keeps
	for _, end := range []string{"\x1b[201~", ctrlC} {
		s := sit(t, 80, nil)
		s.sees("dose> █")
		s.types("\x1b[200~wait\r" + rest + end)
		s.reads("waiting")
		if err := s.program.Process.Signal(os.Interrupt); err != nil {
			t.Fatal(err)
		}
		s.reads("| stopped\r\n")
		s.types("2+2\r")
		s.reads("| 4\r\n")
		if strings.Contains(s.seen, "| 2\r\n") {
			t.Errorf("the rest of the paste was evaluated:\n%s", s.screen)
		}
		s.types(ctrlD)
		s.leaves(0)
	}
}

func TestPromptSearches(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("\x12\x07\x12" + ctrlC + "\x12x\x07") // in an empty history, given up
	s.types("\x151+1\r")
	s.reads("| 2\r\n")
	s.types("2+2\r")
	s.reads("| 4\r\n")
	s.types("\x121+")
	s.reads("said before: 1+")
	s.types("\x1b[1;5C\r") // a word key takes what was found
	s.reads("| 2\r\n")
	s.types("\x1b[A\x1b[A\x1b[A\x1b[B\r")
	s.reads("| 4\r\n")
	s.types(ctrlD)
	s.leaves(0)
}

// A wrapped line, with the cursor over its edges, leaves what stands above.
func TestPromptWraps(t *testing.T) {
	s := sit(t, 20, nil)
	s.sees("dose> █")
	s.types("1+1\r")
	s.reads("| 2\r\n")
	s.types(strings.Repeat("1+", 17))
	s.sees("dose> 1+1", "| 2", "dose> 1+1+1+1+1+1+1+", "1+1+1+1+1+1+1+1+1+1+", "█")
	s.types(strings.Repeat("\x1b[D", 33))
	s.sees("dose> 1+1", "| 2", "dose> 1█1+1+1+1+1+1+", "1+1+1+1+1+1+1+1+1+1+")
	s.types("\x05" + "2")
	s.sees("dose> 1+1", "| 2", "dose> 1+1+1+1+1+1+1+", "1+1+1+1+1+1+1+1+1+1+", "2█")
	s.types("\x15" + ctrlD)
	s.leaves(0)
}

func TestPromptIsResized(t *testing.T) {
	for _, width := range []int{40, 6, 1, 0, 300} {
		s := sit(t, 80, nil)
		s.sees("dose> █")
		s.types(strings.Repeat("1+", 60))
		s.until(func() bool { return strings.HasSuffix(s.screen.String(), "+█\n") }, "the line")
		resize(t, s.user, width)
		s.types(strings.Repeat("\x1b[D", 30) + "\x1b[1~\x1b[4~5\r")
		s.reads("| 65\r\n")
		s.types(ctrlD)
		s.leaves(0)
	}
}

func TestPromptIsNarrowFromTheStart(t *testing.T) {
	for _, width := range []int{0, 1, 3, 6} {
		s := sit(t, width, nil)
		s.reads("dose> ")
		s.types("1+1+1\x1b[D\x1b[D\x1b[1~pho\t\t\x15\r")
		s.reads("| 3\r\n")
		s.reads("dose> ")
		s.types("\x12x" + ctrlC + ctrlD)
		s.leaves(0)
	}
}

// An engine that does not return keeps the program, but not the terminal.
func TestPromptIsToldTwice(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("hang\r")
	s.reads("waiting")
	for range 2 {
		if err := s.program.Process.Signal(syscall.SIGTERM); err != nil {
			t.Fatal(err)
		}
		s.reads(askForNone)
		s.read = 0 // once is enough for both
	}
	s.leaves(-int(syscall.SIGTERM))
}

// A fault gives the terminal back, or does not end the session.
func TestPromptFaults(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("fail\t\r")
	s.reads("| a fault of this program, not of the statement: out of cheese")
	s.types("draw\r")
	s.leaves(2)
	s.reads("out of paint")
}

func TestPromptIsTold(t *testing.T) {
	for _, signal := range []syscall.Signal{syscall.SIGTERM, syscall.SIGHUP, syscall.SIGQUIT} {
		for _, typed := range []string{"", "1+1", "\x12", "open\ra", "\x1b[200~1+1", "wait\r"} {
			s := sit(t, 80, nil)
			s.sees("dose> █")
			s.types(typed)
			if typed == "wait\r" {
				s.reads("waiting")
			}
			if err := s.program.Process.Signal(signal); err != nil {
				t.Fatal(err)
			}
			s.leaves(128 + int(signal))
			if strings.Contains(s.seen, "| 2") {
				t.Errorf("%v evaluated the line that was being typed", signal)
			}
		}
	}
}

func TestPromptRemembers(t *testing.T) {
	history := filepath.Join(t.TempDir(), "history")
	s := sit(t, 80, nil, "HISTORY="+history)
	s.sees("dose> █")
	s.types("1+1\r")
	s.reads("| 2\r\n")
	s.types("open\r  a\rb\rend\r")
	s.reads("| 2 lines\r\n")
	s.types("open\rc\r") // a block that was dropped is no entry
	s.reads("      c\r\n\x1b[J\x1b[2K\r      ")
	s.types(ctrlC)
	s.reads("was dropped")
	s.types(ctrlD)
	s.leaves(0)
	if got, want := written(t, history), "1+1\nopen ↵ a ↵ b ↵ end\n"; got != want {
		t.Errorf("the file is\n%s\nwant\n%s", got, want)
	}

	s = sit(t, 20, nil, "HISTORY="+history)
	s.sees("dose> █")
	s.types("\x1b[A")
	s.sees("dose> open ↵ a ↵ b ↵", " end█")
	s.types("\x1b[D\x1b[D\x1b[Dc ↵ \r")
	s.sees("dose> open", "      a", "      b", "      c", "      end", "| 3 lines", "dose> █")
	s.types("\x1b[A\x1b[A\x1b[A\r")
	s.reads("| 2\r\n")
	s.types(ctrlD)
	s.leaves(0)
	want := "1+1\nopen ↵ a ↵ b ↵ end\nopen ↵ a ↵ b ↵ c ↵ end\n1+1\n"
	if got := written(t, history); got != want {
		t.Errorf("the file is\n%s\nwant\n%s", got, want)
	}
}

func TestPromptTellsThatItCannotRemember(t *testing.T) {
	s := sit(t, 80, nil, "HISTORY=/dev/null/history")
	s.reads("| lines are not kept for the next session: ")
	s.types("1+1\r")
	s.reads("| 2\r\n")
	s.types(ctrlD)
	s.leaves(0)
}

// When the replies go to a file, the lines are edited on standard error.
func TestPromptWithItsRepliesInAFile(t *testing.T) {
	replies, err := os.Create(filepath.Join(t.TempDir(), "replies"))
	if err != nil {
		t.Fatal(err)
	}
	defer replies.Close()
	s := sit(t, 80, replies, "GREETING=hello", "NO_COLOR=")
	s.sees("| hello", "dose> █")
	s.types("1+x\x7f1\r")
	s.sees("| hello", "dose> 1+1", "dose> █")
	s.types("power(\t\x15" + ctrlD)
	s.leaves(0)
	got, err := os.ReadFile(replies.Name())
	if err != nil || string(got) != "| 2\n" {
		t.Errorf("the file has %q, %v", got, err)
	}
}

func TestPromptWithColours(t *testing.T) {
	s := sit(t, 80, nil, "NO_COLOR=")
	s.reads("dose> ")
	s.types("1+x\r")
	s.reads("\x1b[2m| \x1b[0m\x1b[31m~~~\x1b[0m\r\n\x1b[2m| \x1b[0m\x1b[1mx is no number\x1b[0m\r\n")
	s.types(ctrlD)
	s.leaves(0)
}

func TestPromptOnADumbTerminal(t *testing.T) {
	s := sit(t, 80, nil, "TERM=dumb", "NO_COLOR=", "GREETING=hello")
	s.reads("dose> ")
	s.types("1+x\n")
	s.sees("| hello", "dose> 1+x", "| 1+x", "| ~~~", "| x is no number", "dose> █")
	s.types("open\n")
	s.reads("      ")
	s.types("a\n")
	s.reads("      ")
	s.types("b" + ctrlC)
	s.reads("| the block was dropped\r\ndose> ") // the terminal dropped the line
	s.types("wait\n")
	s.reads("waiting")
	s.types(ctrlC)
	s.reads("\r\n| stopped\r\n")
	s.types("1+1\n")
	s.reads("| 2\r\n")
	if strings.ContainsRune(s.seen, keyEscape) {
		t.Errorf("something was drawn: %q", s.seen)
	}
	s.types(ctrlD)
	s.leaves(0)
}

// Where nobody could wake the process again, Ctrl-Z changes nothing.
func TestPromptIsNotSuspendedForEver(t *testing.T) {
	s := sit(t, 80, nil)
	s.sees("dose> █")
	s.types("1+\x1a")
	s.reads(askForNone)
	s.types("1\r")
	s.reads("| 2\r\n")
	s.types(ctrlD)
	s.leaves(0)
}

// Progress is one line, drawn over and cleared.
func TestProgressOnATerminal(t *testing.T) {
	user, line := openTerminal(t, 20)
	defer user.Close()
	p := NewProgress(line, "xterm")
	if p == nil {
		t.Fatal("nothing is drawn on a terminal")
	}
	p.Show("sweep: 17 of 4100 points are done")
	p.Clear()
	if _, err := io.WriteString(line, "done\n"); err != nil {
		t.Fatal(err)
	}
	line.Close()
	seen := newScreen(20)
	got, _ := io.ReadAll(user) // ends with an error when the line is closed
	seen.write(string(got))
	if want := "done\n█\n"; seen.String() != want || !strings.Contains(string(got), "sweep: 17 of 4100 p\x1b") {
		t.Errorf("got %q, want\n%s", got, want)
	}
}
