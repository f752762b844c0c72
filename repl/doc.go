// Package repl is the engine of dosewright: sessions of unit-checked
// expressions over the physics of package euv, for a prompt, for saved files
// and for programs that embed it.
//
// A Session takes one line at a time with Feed and answers with a Reply, which
// holds the printed lines and the same as plain values. It reads files through
// the fs.FS that it was given and writes none: what is to be written is handed
// to the host. It has no global state, no clock and no log.
//
// A program asks with Eval, Check, Explain, Sweep, Solve and the others, which
// give results in the place of printed lines. Session.Freeze gives what may be
// asked from many goroutines at once; Frozen.Compile makes a Formula with open
// inputs, for many runs. Config.Limits and the context bound what a statement
// costs.
package repl
