//go:build linux || darwin

package main

import (
	"os/signal"
	"strconv"
	"syscall"
)

// limitFiles lets this process write no file longer than so many bytes, so
// that a write fails half-way as it does on a full disk; "" sets no limit.
func limitFiles(bytes string) error {
	if bytes == "" {
		return nil
	}
	n, err := strconv.ParseUint(bytes, 10, 64)
	if err != nil {
		return err
	}
	signal.Ignore(syscall.SIGXFSZ)
	return syscall.Setrlimit(syscall.RLIMIT_FSIZE, &syscall.Rlimit{Cur: n, Max: n})
}
