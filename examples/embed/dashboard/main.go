// Command dashboard answers questions about a site's conventions over HTTP:
//
//	GET /tiles             the values of the dashboard
//	GET /eval?q=wph*24 h   any expression
//	GET /what-if?dose=30 mJ/cm^2 at WAFER
//	GET /why?name=wph      what a name rests on
//
// Questions are not trusted: their length, their time and how many run at once
// are bounded, and the session behind them is frozen.
package main

import (
	"context"
	"flag"
	"fmt"
	"net/http"
	"os"
	"os/signal"
	"path/filepath"
	"time"
)

func main() {
	listen := flag.String("listen", "localhost:8135", "address to listen on")
	file := flag.String("conventions", "conventions.budget", "session file with the conventions")
	flag.Parse()
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	defer stop()
	if err := serve(ctx, *listen, *file); err != nil {
		fmt.Fprintln(os.Stderr, "dashboard:", err)
		os.Exit(1)
	}
}

func serve(ctx context.Context, listen, file string) error {
	root, err := os.OpenRoot(filepath.Dir(file))
	if err != nil {
		return err
	}
	defer root.Close()
	board, err := newBoard(ctx, root.FS(), filepath.Base(file))
	if err != nil {
		return err
	}
	server := &http.Server{
		Addr: listen, Handler: board.handler(),
		ReadHeaderTimeout: 2 * time.Second, ReadTimeout: 5 * time.Second, WriteTimeout: 10 * time.Second, IdleTimeout: time.Minute,
		MaxHeaderBytes: 16 << 10,
	}
	ended := make(chan error, 1)
	go func() { ended <- server.ListenAndServe() }()
	select {
	case err := <-ended:
		return err
	case <-ctx.Done():
	}
	patience, stop := context.WithTimeout(context.Background(), 5*time.Second)
	defer stop()
	return server.Shutdown(patience)
}
