package main

import (
	"bufio"
	"context"
	"fmt"
	"io"
	"runtime/debug"
	"strings"

	"example.com/dosewright/repl"
)

// The exit statuses.
const (
	statusFine    = 0
	statusMoved   = 1 // a check fails, or a reply drifted
	statusRefused = 2 // refused, unreadable, or called wrongly
)

// stdio are the streams of one run; out is buffered and flushed at its end.
type stdio struct {
	in       io.Reader
	out      *bufio.Writer
	screen   io.Writer // what out writes to
	problems io.Writer
}

// run is the command: it reads its arguments and streams, and returns the exit
// status.
func run(ctx context.Context, args []string, stdin io.Reader, stdout, stderr io.Writer) (status int) {
	std := stdio{stdin, bufio.NewWriter(stdout), stdout, stderr}
	defer func() {
		if err := std.out.Flush(); err != nil {
			status = max(status, std.wrong("the output cannot be written: "+err.Error()))
		}
	}()
	if len(args) == 0 {
		return prompt(ctx, std)
	}
	for _, c := range commands() {
		if c.name == args[0] || c.flag == args[0] {
			return c.run(ctx, args[1:], std)
		}
	}
	return std.wrong(fmt.Sprintf("%s is no command; the commands are eval, replay, page, help, version", args[0]))
}

// command is one word of the command line.
type command struct {
	name, flag, usage string
	run               func(context.Context, []string, stdio) int
}

func commands() []command {
	return []command{
		{"eval", "", "dosewright eval [--json] [--import FILE] 'statement' …", eval},
		{"replay", "", "dosewright replay [--json] [--step] [--update] [--outside] FILE …", replay},
		{"page", "", "dosewright page FILE -o FILE.html", makePage},
		{"help", "--help", "dosewright help [topic]", help},
		{"version", "--version", "dosewright version", showVersion},
	}
}

// wrong says what the matter is and returns the status for it.
func (std stdio) wrong(message string) int {
	fmt.Fprintln(std.problems, "dosewright: "+message)
	return statusRefused
}

func help(_ context.Context, args []string, std stdio) int {
	topic := strings.Join(args, " ")
	s := repl.NewSession(repl.Config{})
	lines := s.Help(topic)
	if lines == nil {
		return std.wrong("there is no help on " + topic + "; dosewright help lists the topics")
	}
	if topic == "" {
		fmt.Fprintln(std.out, "dosewright is a prompt for the process arithmetic of 13.5 nm lithography.")
		for _, c := range append([]command{{usage: "dosewright"}}, commands()...) {
			fmt.Fprintln(std.out, "  "+c.usage)
		}
		fmt.Fprintln(std.out)
	}
	for _, l := range lines {
		fmt.Fprintln(std.out, l)
	}
	return statusFine
}

func showVersion(_ context.Context, _ []string, std stdio) int {
	fmt.Fprintln(std.out, "dosewright", version())
	return statusFine
}

// version is that of the module as it was built.
func version() string {
	info, ok := debug.ReadBuildInfo()
	if !ok || info.Main.Version == "" {
		return "(devel)"
	}
	return info.Main.Version
}
