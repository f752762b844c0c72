package main

import (
	"bufio"
	"crypto/rand"
	"errors"
	"fmt"
	"os"
)

// beside is a file that is written under another name and takes its own when
// it is whole: after a crash or on a full disk either the old text or the new
// one is there, never a mixture.
type beside struct {
	root       *os.Root
	name, part string
	file       *os.File
	text       *bufio.Writer
}

func createBeside(root *os.Root, name string) (*beside, error) {
	part := fmt.Sprintf("%s.%s.part", name, rand.Text()[:8])
	mode := os.FileMode(0o644)
	if old, err := root.Stat(name); err == nil {
		if !old.Mode().IsRegular() {
			return nil, errors.New(name + " is no ordinary file")
		}
		mode = old.Mode().Perm()
	}
	f, err := root.OpenFile(part, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	if err != nil {
		return nil, fmt.Errorf("%s cannot be written: %s", name, reason(err))
	}
	return &beside{root, name, part, f, bufio.NewWriterSize(f, 1<<16)}, nil
}

// Write takes a part of the text.
func (b *beside) Write(p []byte) (int, error) { return b.text.Write(p) }

// Commit flushes the text to the disk and gives the file its name.
func (b *beside) Commit() error {
	err := b.text.Flush()
	if err == nil {
		err = b.file.Sync()
	}
	if e := b.file.Close(); err == nil {
		err = e
	}
	if err == nil {
		err = b.root.Rename(b.part, b.name)
	}
	if err != nil {
		return fmt.Errorf("%s cannot be written: %s", b.name, reason(err))
	}
	return nil
}

// Abort leaves nothing behind.
func (b *beside) Abort() {
	b.file.Close()
	b.root.Remove(b.part)
}

// writeWhole writes a file in one go.
func writeWhole(root *os.Root, name string, text []byte) error {
	b, err := createBeside(root, name)
	if err != nil {
		return err
	}
	if _, err = b.Write(text); err == nil {
		err = b.Commit()
	}
	if err != nil {
		b.Abort()
	}
	return err
}
