package study

import (
	"context"
	"testing"
)

// A panic of a worker reaches the goroutine that called, where it can be
// recovered from.
func TestPanicReachesCaller(t *testing.T) {
	defer func() {
		if r := recover(); r != "broken" {
			t.Errorf("recovered %v", r)
		}
	}()
	work := func() func(int, *int) error {
		return func(i int, _ *int) error {
			if i == 7 {
				panic("broken")
			}
			return nil
		}
	}
	err := inOrder(context.Background(), 100, work, func() int { return 0 }, func(int, *int) error { return nil })
	t.Errorf("no panic, error %v", err)
}
