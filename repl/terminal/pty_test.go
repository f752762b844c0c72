//go:build linux && !race

package terminal

import (
	"context"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"strings"
	"syscall"
	"testing"
	"time"

	"golang.org/x/sys/unix"
)

// The test binary is also the program on the other end of the pseudo-terminal.
func TestMain(m *testing.M) {
	if os.Getenv("PROMPT_UNDER_TEST") == "" {
		os.Exit(m.Run())
	}
	progress := NewProgress(os.Stderr, os.Getenv("TERM"))
	waiting := func() { progress.Show("waiting") }
	if progress == nil {
		waiting = func() { fmt.Fprint(os.Stderr, "waiting") }
	}
	err := Run(context.Background(), &adder{waiting: waiting}, Options{
		In: os.Stdin, Out: os.Stdout, Err: os.Stderr,
		Term: os.Getenv("TERM"), NoColor: os.Getenv("NO_COLOR") != "",
		HistoryFile: os.Getenv("HISTORY"), Greeting: os.Getenv("GREETING"), Progress: progress,
	})
	var ended *Ended
	switch {
	case errors.As(err, &ended):
		os.Exit(128 + int(ended.Signal.(syscall.Signal)))
	case err != nil:
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
	os.Exit(0)
}

// patience bounds the wait for what must come.
const patience = 20 * time.Second

// seat is a user at a pseudo-terminal on which the prompt runs.
type seat struct {
	t       *testing.T
	user    *os.File // what the user types into and reads from
	line    *os.File // what the program has as its terminal
	before  *unix.Termios
	program *exec.Cmd
	keys    chan string
	output  chan string
	seen    string
	read    int // how much of it was looked for
	screen  *screen
}

func openTerminal(t *testing.T, width int) (user, line *os.File) {
	t.Helper()
	user, err := os.OpenFile("/dev/ptmx", os.O_RDWR|syscall.O_NOCTTY, 0)
	if err != nil {
		t.Fatal(err)
	}
	fd := int(user.Fd())
	if err := unix.IoctlSetPointerInt(fd, unix.TIOCSPTLCK, 0); err != nil {
		t.Fatal(err)
	}
	number, err := unix.IoctlGetInt(fd, unix.TIOCGPTN)
	if err != nil {
		t.Fatal(err)
	}
	line, err = os.OpenFile(fmt.Sprint("/dev/pts/", number), os.O_RDWR|syscall.O_NOCTTY, 0)
	if err != nil {
		t.Fatal(err)
	}
	resize(t, user, width)
	return user, line
}

func resize(t *testing.T, user *os.File, width int) {
	t.Helper()
	size := &unix.Winsize{Row: 50, Col: uint16(width)}
	if err := unix.IoctlSetWinsize(int(user.Fd()), unix.TIOCSWINSZ, size); err != nil {
		t.Fatal(err)
	}
}

func termios(t *testing.T, line *os.File) *unix.Termios {
	t.Helper()
	state, err := unix.IoctlGetTermios(int(line.Fd()), unix.TCGETS)
	if err != nil {
		t.Fatal(err)
	}
	return state
}

// sit starts the prompt. Settings are environment variables; with replies, the
// replies go there.
func sit(t *testing.T, width int, replies *os.File, settings ...string) *seat {
	t.Helper()
	user, line := openTerminal(t, width)
	s := &seat{
		t: t, user: user, line: line, before: termios(t, line),
		keys: make(chan string, 1000), output: make(chan string), screen: newScreen(width),
	}
	s.program = exec.Command(os.Args[0])
	s.program.Env = append([]string{"PROMPT_UNDER_TEST=1", "TERM=xterm", "NO_COLOR=1"}, settings...)
	s.program.Stdin, s.program.Stdout, s.program.Stderr = line, line, line
	if replies != nil {
		s.program.Stdout = replies
	}
	s.program.SysProcAttr = &syscall.SysProcAttr{Setsid: true, Setctty: true, Ctty: 0}
	if err := s.program.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(s.clear)
	go s.listen()
	go s.press()
	return s
}

func (s *seat) clear() {
	close(s.keys)
	if s.program.ProcessState == nil {
		_ = s.program.Process.Kill()
		_ = s.program.Wait()
	}
	s.line.Close()
	s.user.Close()
}

func (s *seat) listen() {
	chunk := make([]byte, 1<<16)
	for {
		n, err := s.user.Read(chunk)
		if err != nil {
			close(s.output)
			return
		}
		select {
		case s.output <- string(chunk[:n]):
		case <-s.t.Context().Done():
			return
		}
	}
}

// types sends keys as the terminal would, and does not wait until they are
// taken.
func (s *seat) types(keys string) { s.keys <- keys }

func (s *seat) press() {
	for keys := range s.keys {
		if _, err := s.user.WriteString(keys); err != nil {
			return // the test has ended, or misses what the keys would do
		}
	}
}

// until takes what the program prints until done.
func (s *seat) until(done func() bool, want string) {
	s.t.Helper()
	late := time.After(patience)
	for !done() {
		select {
		case text, open := <-s.output:
			if !open {
				s.t.Fatalf("the terminal is closed; want\n%s\nseen\n%s", want, s.screen)
			}
			s.seen += text
			s.screen.write(text)
		case <-late:
			s.t.Fatalf("want\n%s\nseen\n%s\n%q", want, s.screen, s.seen)
		}
	}
}

// sees waits until the screen looks so; the cursor is a block.
func (s *seat) sees(rows ...string) {
	s.t.Helper()
	want := strings.Join(rows, "\n") + "\n"
	s.until(func() bool { return s.screen.String() == want }, want)
	s.read = len(s.seen)
}

// reads waits for a text in what is printed behind what was waited for before.
func (s *seat) reads(text string) {
	s.t.Helper()
	s.until(func() bool { return strings.Contains(s.seen[s.read:], text) }, text)
	s.read += strings.Index(s.seen[s.read:], text) + len(text)
}

// leaves waits for the end of the program, which must give its terminal back.
func (s *seat) leaves(status int) {
	s.t.Helper()
	ended := make(chan struct{})
	go func() {
		_ = s.program.Wait()
		close(ended)
	}()
	select {
	case <-ended:
	case <-time.After(patience):
		s.t.Fatalf("does not end; seen\n%s", s.screen)
	}
	code := s.program.ProcessState.ExitCode()
	if killed := s.program.ProcessState.Sys().(syscall.WaitStatus); killed.Signaled() {
		code = -int(killed.Signal())
	}
	if code != status {
		s.t.Errorf("ended with %d, want %d; seen\n%s", code, status, s.screen)
	}
	if after := termios(s.t, s.line); *after != *s.before {
		s.t.Errorf("the terminal was %+v and is %+v", *s.before, *after)
	}
}
