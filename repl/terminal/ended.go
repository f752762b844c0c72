package terminal

import (
	"context"
	"fmt"
	"os"
	"os/signal"
)

// Ended is the error of a session that a signal ended. The terminal is as it
// was before.
type Ended struct{ Signal os.Signal }

func (e *Ended) Error() string { return fmt.Sprintf("ended by the signal %q", e.Signal.String()) }

// untilTold gives a context that is cancelled, with an *Ended as its cause,
// when the process is told to end. A second signal then ends the process as if
// nobody listened. stop must be called.
func untilTold(parent context.Context) (ctx context.Context, stop func()) {
	ctx, cancel := context.WithCancelCause(parent)
	told := make(chan os.Signal, 1)
	for _, s := range endings() {
		if !signal.Ignored(s) {
			signal.Notify(told, s)
		}
	}
	go func() {
		select {
		case s := <-told:
			signal.Stop(told)
			cancel(&Ended{s})
		case <-ctx.Done():
		}
	}()
	return ctx, func() {
		signal.Stop(told)
		cancel(nil)
	}
}
