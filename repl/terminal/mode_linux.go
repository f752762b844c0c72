package terminal

import "golang.org/x/sys/unix"

// The requests that read and set the mode of a terminal.
const getMode, setMode = unix.TCGETS, unix.TCSETS
