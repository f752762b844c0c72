//go:build !(linux || darwin || dragonfly || freebsd || netbsd || openbsd)

package terminal

import (
	"errors"
	"os"
	"syscall"
)

// canEdit says that lines cannot be edited on this system: its terminals are
// read line by line.
const canEdit = false

func endings() []os.Signal { return []os.Signal{syscall.SIGTERM} }

func singleKeys(int, bool) error { return errors.ErrUnsupported }

func onResize(func()) (stop func()) { return func() {} }

func sleep() {}
