// Command host shows how a program gives the language a function, a unit and a
// constant of its own, and answers with typed quantities.
package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

func main() {
	if err := run(context.Background(), os.Stdout); err != nil {
		fmt.Fprintln(os.Stderr, "host:", err)
		os.Exit(1)
	}
}

// stageHeat is what the drive of an invented stage gives off at a scan speed v:
// P = c·v² with c = 900 W·s²/m². Speeds are from 0 to 2 m/s.
func stageHeat(v units.Speed) (units.Power, error) {
	if v < 0 || v > 2 {
		return 0, fmt.Errorf("the stage moves at 0 to 2 m/s, not at %g m/s", float64(v))
	}
	return units.Power(900 * v * v), nil
}

// open makes a session that knows stage_heat, the unit shot and slit_width
// beside the language. Dimensions of the function are those of its Go types.
func open() (*repl.Session, error) {
	shot, err := units.Standard().WithUnit("shot", "3.5 mJ/cm^2")
	if err != nil {
		return nil, err
	}
	return repl.Open(repl.Config{
		Units: shot,
		Functions: []repl.Function{repl.Bind1(repl.Row{
			Name: "stage_heat", Summary: "heat of our stage at a scan speed", Args: []string{"speed: of the scan"}, Valid: "0 to 2 m/s",
		}, stageHeat)},
		Constants: []repl.Constant{{Name: "slit_width", Doc: "across the scan, of our tools", Value: units.Of(units.Length(26e-3))}},
		Limits:    repl.Limits{Statement: 1000, Definitions: 100, Trials: 100_000},
	})
}

func run(ctx context.Context, out io.Writer) error {
	s, err := open()
	if err != nil {
		return err
	}
	if err := s.Define(ctx, "speed = scan_speed(2 W at WAFER, dose, slit_width)"); !errors.Is(err, repl.ErrUnknown) {
		return fmt.Errorf("dose is not defined yet, and the session says %w", err)
	}
	for _, text := range []string{"dose = 10 shot at WAFER", "speed = scan_speed(2 W at WAFER, dose, slit_width)"} {
		if err := s.Define(ctx, text); err != nil {
			return err
		}
	}
	for _, text := range []string{"dose [mJ/cm^2]", "speed", "stage_heat(speed)", "stage_heat(dose)", "stage_heat(3 m/s)"} {
		fmt.Fprintf(out, "%-17s  %s\n", text, answer(ctx, s, text))
	}
	v, err := s.Eval(ctx, "stage_heat(speed)")
	if err != nil {
		return err
	}
	heat, err := units.As[units.Power](v.Quantity())
	fmt.Fprintf(out, "a float64 in Go    %.3f W\n", float64(heat))
	return err
}

// answer is a value or why there is none, as a host would log it.
func answer(ctx context.Context, s *repl.Session, text string) string {
	v, err := s.Eval(ctx, text)
	var sides *units.DimensionError
	switch {
	case errors.As(err, &sides):
		return fmt.Sprintf("refused: %s is given, %s is taken", sides.Have, sides.Rhs)
	case err != nil:
		return "refused: " + err.Error()
	}
	return v.Text(repl.DefaultDigits)
}
