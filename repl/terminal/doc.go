// Package terminal is the prompt: it reads lines from a terminal or a pipe,
// hands them to an engine and prints the replies, each line behind the margin
// "| ".
//
// On a terminal the line can be edited. The keys:
//
//	Left Right Home End           move; with Ctrl (or Alt-B, Alt-F) by words
//	Backspace Delete              erase one character
//	Ctrl-W Alt-Backspace Alt-D    erase the word before, before, behind the cursor
//	Ctrl-U Ctrl-K Ctrl-Y          erase to the start, to the end, bring back what was erased
//	Up Down Ctrl-R Ctrl-S         earlier and later lines, search in them
//	Tab                           complete the word, or list what fits
//	Ctrl-C                        drop the line; on an empty line inside a block, drop the
//	                              block; while an answer is computed, stop it
//	Ctrl-D                        on an empty line, leave
//	Ctrl-L Ctrl-Z                 clear the screen, suspend
//
// Below the line stand the arguments of the call that is being typed, or what
// Tab lists. They vanish with the next key, so that what stays on the screen is
// what was said and answered.
//
// A pasted text is submitted line by line, and what stands behind its last
// line break stays in the line to be edited. A block that is recalled stands on
// one line, its line breaks shown as ↵.
//
// When standard input is no terminal, or TERM is dumb, lines are read as they
// are and nothing is drawn. Ctrl-C then drops the block at once, since the
// terminal keeps the line to itself.
package terminal

// For maintainers.
//
// The package knows nothing of the language. It sees an Engine, and the
// command joins the two.
//
// The line editor is github.com/chzyer/readline, which nothing but editor.go
// and below.go names. It has faults that no release mends, so it is kept on a
// short lead:
//
//   - keys.go stands before it and lets through only keys that it handles
//     well. Escape sequences never reach it. What it does badly (Tab, word
//     keys, erasing, Delete, suspend, a paste) becomes a command: a rune of a
//     private range.
//   - The library's filter of input runes turns a command into Tab with a
//     completer that never offers anything, the one key that changes nothing
//     and leaves a search with what it found. Its listener, which runs behind
//     each key and may replace the line, then carries the command out
//     (commands.go, edit.go). So the library's completion menus, kill ring and
//     transposition, which can panic, are never entered.
//   - The filter must not drop a rune by saying so: that wakes the library's
//     reader one time too often, and it then reads while an answer is computed.
//     The one rune that may be dropped is a line feed (the end of a pasted
//     line), at which the reader sleeps.
//   - A NUL means end of input to the library, a width that divides the
//     length of the prompt makes it loop for ever, and a search in an empty
//     history that is given up dereferences nil. keys.go drops the first,
//     editor.go avoids the others.
//   - On the end of input it submits a half-typed line. editor.go throws it
//     away.
//   - canvas.go mends the cursor movement over a wrapped line. It also draws
//     what stands below the line, which the library knows nothing of and clears
//     all the same before each redrawing.
//   - history.go keeps the file, since the library writes it for everybody to
//     read and one entry as many.
//   - Closing hangs while a read waits, unless the source is closed first.
//
// rawmode.go says what the terminal does between two lines. A panic in a
// goroutine that the engine started cannot be caught here and would leave it
// so: the engine's goroutines recover.
//
// The library's goroutines race on Close and on resizing by design, which
// does no harm here; the tests on a pseudo-terminal are therefore not built
// under the race detector.
