package study

import (
	"context"
	"fmt"
	"runtime"
)

// chunk is a piece of a task on its way: where a worker leaves what it computed.
type chunk[T any] struct {
	index int
	data  T
	done  chan error
}

// inOrder computes chunks 0 … n−1 on as many goroutines as there are processors
// and hands each to take in order, on the caller's goroutine. start makes what
// one goroutine works with; room makes the place for one chunk's result, which
// is used again, so that memory does not grow with n.
//
// The first error of a chunk, of take or of ctx ends the task; what was taken
// before stands.
func inOrder[T any](ctx context.Context, n int, start func() func(int, *T) error, room func() T, take func(int, *T) error) error {
	ctx, stop := context.WithCancel(ctx)
	workers := min(runtime.GOMAXPROCS(0), n)
	jobs, queue := make(chan *chunk[T]), make(chan *chunk[T], 2*workers)
	free := make(chan *chunk[T], 2*workers)
	for range 2 * workers {
		free <- &chunk[T]{data: room(), done: make(chan error, 1)}
	}
	ended := make(chan struct{}, workers)
	for range workers {
		work := start()
		go func() {
			for c := range jobs {
				err := ctx.Err()
				if err == nil {
					err = guarded(work, c)
				}
				c.done <- err
			}
			ended <- struct{}{}
		}()
	}
	go func() {
		defer close(queue)
		defer close(jobs)
		for i := range n {
			select {
			case c := <-free:
				c.index = i
				queue <- c
				jobs <- c
			case <-ctx.Done():
				return
			}
		}
	}()
	taken, err := collect(queue, free, take)
	if err == nil && taken < n {
		err = ctx.Err()
	}
	stop()
	for range queue { // let the dispatcher end
	}
	for range workers {
		<-ended
	}
	if f, ok := err.(*fault); ok {
		panic(f.value)
	}
	return err
}

// fault is a panic of a worker on its way to the caller's goroutine, where the
// host may recover from it.
type fault struct{ value any }

func (f *fault) Error() string { return fmt.Sprint(f.value) }

func guarded[T any](work func(int, *T) error, c *chunk[T]) (err error) {
	defer func() {
		if r := recover(); r != nil {
			err = &fault{r}
		}
	}()
	return work(c.index, &c.data)
}

// collect takes the chunks in order until one fails or the queue ends.
func collect[T any](queue <-chan *chunk[T], free chan<- *chunk[T], take func(int, *T) error) (taken int, err error) {
	for c := range queue {
		if err := <-c.done; err != nil {
			return taken, err
		}
		if err := take(c.index, &c.data); err != nil {
			return taken, err
		}
		taken++
		free <- c
	}
	return taken, nil
}
