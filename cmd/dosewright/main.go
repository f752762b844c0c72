// Command dosewright is a prompt and a runner for the process arithmetic of
// extreme-ultraviolet lithography.
//
//	dosewright                                     the prompt; with a pipe, runs it as a session
//	dosewright eval [--json] [--import FILE] 'statement' …
//	dosewright replay [--json] [--step] [--update] [--outside] FILE …
//	dosewright page FILE -o FILE.html
//	dosewright help [topic]
//	dosewright version
//
// Exit status: 0 when all went well, 1 when a check fails or a replay drifts,
// 2 when a statement is refused, a file cannot be read or the call is wrong.
package main

import (
	"context"
	"os"
)

func main() {
	os.Exit(run(context.Background(), os.Args[1:], os.Stdin, os.Stdout, os.Stderr))
}
