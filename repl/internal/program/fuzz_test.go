package program

import (
	"errors"
	"strings"
	"testing"
	"time"

	"example.com/dosewright/repl/internal/syntax"
)

// soup is what the fuzzer makes statements of; "\n" ends one.
var soup = []string{
	"\n", "\n", " ", " ", "a", "b", "f", "g", "x", "pi", "c", "IF", "WAFER", "MASK", "(", ")", "(", ")", "{", "}", ",",
	"+", "-", "*", "/", "^", "=", "<", ">=", " = ", "f(x) = ", "a = ", "b [W] = ", "g(x [W at IF], y) = ", " at IF", " at WAFER/IF",
	"0", "1", "2", "1e300", "1e-300", "-1", "0.5", "3 m", "2 s", "250 W", "30 mJ/cm^2", "400 nm^2", "22 degC", "5 K", "66 %", "5 pulse",
	"[m]", "[W at IF]", "[", "]", "^2", "^-1", "^(1/3)", "^0.5", "^(1/2)", "ln(", "sqrt(", "sum(", "max(", "count(", "drift(", "slope(",
	"capped(", "number_of(", "quantile(", "transmission(", "carry(", "if(", "positive", "none", "tone = ", "dose = ", "\"text\"", "#",
	"chain c\n at IF\n m x2: 50 %\n at WAFER\nend\n", "chain c\n at MASK\n m x(a): b\n reduction: 4, a\n at WAFER\nend\n",
	"transmission(c, IF, WAFER)", "carry(250 W at IF, c, WAFER)", "carry(3 J/m^2 at MASK, c, WAFER)", "f(", "g(", "f(a)", "if(a < b, 1/a, f(2))",
}

// statements joins the pieces that bytes choose and cuts them at line ends;
// the lines of a block stay together.
func statements(choice []byte) []string {
	var b strings.Builder
	for _, c := range choice {
		b.WriteString(soup[int(c)%len(soup)])
	}
	var list []string
	var block []string
	for _, line := range strings.Split(b.String(), "\n") {
		_, opens := syntax.BlockHeading(line)
		switch {
		case block != nil:
			block = append(block, line)
			if syntax.BlockEnd(line) {
				list, block = append(list, strings.Join(block, "\n")), nil
			}
		case opens:
			block = []string{line}
		default:
			list = append(list, line)
		}
	}
	return list
}

// Whatever is said, nothing panics or takes long, no value is infinite or no
// number, and every mark lies inside the text that it marks.
func FuzzSession(f *testing.F) {
	for _, seed := range []string{"\x0a\x0b\x0c", "aaaa", "f(x)=", "chain", strings.Repeat("\x00\x01", 30)} {
		f.Add([]byte(seed))
	}
	f.Fuzz(func(t *testing.T, choice []byte) {
		if len(choice) > 200 {
			return
		}
		d := newDesk()
		start := time.Now()
		for _, text := range statements(choice) {
			a, err := d.say(text)
			if took := time.Since(start); took > 5*time.Second {
				t.Fatalf("%q took %v", text, took)
			}
			if err == nil {
				if a != nil && a.value-a.value != 0 {
					t.Fatalf("%q is %v", text, a.value)
				}
				continue
			}
			marksInside(t, d, text, err)
		}
	})
}

func marksInside(t *testing.T, d *desk, text string, err error) {
	t.Helper()
	var marks []syntax.Span
	var run *RunError
	var bad *syntax.Error
	switch {
	case errors.As(err, &run):
		if run.Node == nil {
			t.Fatalf("%q: no place: %v", text, err)
		}
		if run.Node.Owner != "" {
			text = d.texts[run.Node.Owner]
		}
		marks = []syntax.Span{run.At()}
	case errors.As(err, &bad):
		marks = bad.Marks
		if bad.Msg == "" || bad.Hint == "" {
			t.Fatalf("%q: message %q, way on %q", text, bad.Msg, bad.Hint)
		}
	default:
		if strings.HasSuffix(err.Error(), "is not for this test") {
			return
		}
		t.Fatalf("%q: %T %v", text, err, err)
	}
	if len(marks) == 0 {
		t.Fatalf("%q: no mark: %v", text, err)
	}
	for _, m := range marks {
		if m.Start < 0 || m.Start > m.End || m.End > len(text) {
			t.Fatalf("%q: mark %v: %v", text, m, err)
		}
	}
}
