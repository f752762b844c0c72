package main

import (
	"crypto/rand"
	"errors"
	"fmt"
	"os"
)

// writeWhole writes a file so that after a crash or on a full disk either the
// old text or the new one is there, never a mixture: a file beside it is
// written, flushed to the disk and given the name.
func writeWhole(root *os.Root, name string, text []byte) error {
	beside := fmt.Sprintf("%s.%s.part", name, rand.Text()[:8])
	mode := os.FileMode(0o644)
	if old, err := root.Stat(name); err == nil {
		if !old.Mode().IsRegular() {
			return errors.New(name + " is no ordinary file")
		}
		mode = old.Mode().Perm()
	}
	f, err := root.OpenFile(beside, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	if err != nil {
		return fmt.Errorf("%s cannot be written: %s", name, reason(err))
	}
	_, err = f.Write(text)
	if err == nil {
		err = f.Sync()
	}
	if e := f.Close(); err == nil {
		err = e
	}
	if err == nil {
		err = root.Rename(beside, name)
	}
	if err != nil {
		root.Remove(beside)
		return fmt.Errorf("%s cannot be written: %s", name, reason(err))
	}
	return nil
}
