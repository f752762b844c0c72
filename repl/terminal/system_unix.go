//go:build linux || darwin || dragonfly || freebsd || netbsd || openbsd

package terminal

import (
	"os"
	"os/signal"
	"syscall"
	"time"

	"golang.org/x/sys/unix"
)

// canEdit says that lines can be edited on this system.
const canEdit = true

// endings are the signals that tell the process to end.
func endings() []os.Signal {
	return []os.Signal{syscall.SIGTERM, syscall.SIGHUP, syscall.SIGQUIT}
}

// singleKeys has a terminal hand over each key as it is, unseen. With signals,
// the keys that send one do so, and what waits behind them is kept: it may
// hold the end mark of a paste. The output keeps its mode, as the line editor
// expects.
func singleKeys(terminal int, signals bool) error {
	mode, err := unix.IoctlGetTermios(terminal, getMode)
	if err != nil {
		return err
	}
	mode.Iflag &^= unix.IGNBRK | unix.BRKINT | unix.PARMRK | unix.ISTRIP |
		unix.INLCR | unix.IGNCR | unix.ICRNL | unix.IXON
	mode.Lflag &^= unix.ECHO | unix.ECHONL | unix.ICANON | unix.IEXTEN | unix.ISIG
	mode.Lflag |= unix.NOFLSH
	if signals {
		mode.Lflag |= unix.ISIG
	}
	mode.Cc[unix.VMIN], mode.Cc[unix.VTIME] = 1, 0
	return unix.IoctlSetTermios(terminal, setMode, mode)
}

// onResize calls f after each change of the terminal's size, until stopped.
func onResize(f func()) (stop func()) {
	changes := make(chan os.Signal, 1)
	done := make(chan struct{})
	signal.Notify(changes, syscall.SIGWINCH)
	go func() {
		for {
			select {
			case <-changes:
				f()
			case <-done:
				return
			}
		}
	}()
	return func() {
		signal.Stop(changes)
		close(done)
	}
}

// sleep suspends the process group, as the terminal itself does on Ctrl-Z, and
// returns when it goes on. Where nobody could wake it, the system does not
// suspend it, and sleep returns after a moment.
func sleep() {
	awake := make(chan os.Signal, 1)
	signal.Notify(awake, syscall.SIGCONT)
	defer signal.Stop(awake)
	if err := syscall.Kill(0, syscall.SIGTSTP); err != nil {
		return
	}
	select {
	case <-awake:
	case <-time.After(500 * time.Millisecond):
	}
}
