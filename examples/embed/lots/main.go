// Command lots reads a table of lots and says which of them leave the budget of
// an exposure line: lots FILE. The exit status is 1 when one does, 2 when the
// table cannot be used.
package main

import (
	"context"
	"fmt"
	"io"
	"os"

	"example.com/dosewright/units"
)

func main() { os.Exit(run(context.Background(), os.Args[1:], os.Stdout, os.Stderr)) }

func run(ctx context.Context, args []string, out, problems io.Writer) int {
	violated, err := check(ctx, args, out)
	switch {
	case err != nil:
		fmt.Fprintln(problems, "lots:", err)
		return 2
	case violated > 0:
		return 1
	}
	return 0
}

func check(ctx context.Context, args []string, out io.Writer) (violated int, err error) {
	if len(args) != 1 {
		return 0, fmt.Errorf("name one table: lots lots.csv")
	}
	f, err := os.Open(args[0])
	if err != nil {
		return 0, err
	}
	defer f.Close()
	lots, err := readLots(f)
	if err != nil {
		return 0, fmt.Errorf("%s: %w", args[0], err)
	}
	b, err := newBudget(ctx)
	if err != nil {
		return 0, err
	}
	for _, l := range lots {
		v, err := b.judge(l)
		if err != nil {
			return violated, fmt.Errorf("lot %s: %w", l.name, err)
		}
		fmt.Fprintf(out, "%s  %-14s  %-14s", l.name, units.Of(v.throughput), units.Of(v.heat))
		for _, text := range v.violations {
			fmt.Fprintf(out, "  ! %s", text)
		}
		fmt.Fprintln(out)
		if len(v.violations) > 0 {
			violated++
		}
	}
	fmt.Fprintf(out, "%d of %d lots leave the budget\n", violated, len(lots))
	return violated, nil
}
