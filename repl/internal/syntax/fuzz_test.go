package syntax

import (
	"reflect"
	"strings"
	"testing"
	"time"
)

// FuzzParse reads any text: nothing panics or takes long, every mark and every
// span lies inside the text, and a part of an expression reads again as itself.
func FuzzParse(f *testing.F) {
	for _, text := range []string{
		"x = 1 + 2*3", "250 W at WAFER/IF [W at IF]", "(30 ± 0.6) mJ/cm^2 (k=2)", "-5 degC ± 1 K", "f(P [W at IF], t) = P*t # note",
		"chain c\n at IF\n m x4 independent: 5 %, 2\n reduction: 4, 4\n at WAFER\nend", "check a = b within 2 %", "if(a <= b, {1, 2}, \"t\")",
		"20 /µm - 3 m²·s⁻¹/(kg*K)^(1/2)", "sweep x = 1 .. 2 by 1, y = 1 .. 2 41 points log : x [m], y plot to \"f\"", "fit d.y = a over d for a",
		"1,5", "\x00\xff\u202E", "names [", "13.50(2)e-3 nm", "2^-3^2²", "propagate x : trials = 1, plot", "compare a : b",
	} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		start := time.Now()
		st, err := Parse(text)
		if took := time.Since(start); took > 20*time.Second {
			t.Fatalf("%d bytes took %v", len(text), took)
		}
		if (st == nil) != (err != nil) {
			t.Fatalf("%v beside %v", st, err)
		}
		if err != nil {
			marksInside(t, text, err)
			return
		}
		if st.Do != nil {
			spansInside(t, text, reflect.ValueOf(st.Do))
			Names(st.Do)
		}
	})
}

// FuzzBlock reads any lines as those of a block.
func FuzzBlock(f *testing.F) {
	f.Add("at IF\nm x4: 66 %\nreduction: 4, 4\nat WAFER")
	f.Add("m x(n) independent: T*R # note\n\nend\n5")
	f.Add("cap: Ru 2.5 nm\nb x50: Si 4.15 nm, Mo(d) rough 0.6 nm\nsubstrate: Si")
	f.Fuzz(func(t *testing.T, lines string) {
		text := "chain c\n" + lines + "\nend"
		st, err := Parse(text)
		if err != nil {
			marksInside(t, text, err)
		} else {
			spansInside(t, text, reflect.ValueOf(st.Do))
		}
		for _, line := range strings.Split(lines, "\n") {
			if _, err := ParseBlockLine(line); err != nil {
				marksInside(t, line, err)
			}
			if _, err := ParseHeading(line); err != nil {
				marksInside(t, line, err)
			}
		}
	})
}

func marksInside(t *testing.T, text string, err *Error) {
	t.Helper()
	if len(err.Marks) == 0 || err.Msg == "" || err.Hint == "" {
		t.Fatalf("%q: marks %v, message %q, way on %q", text, err.Marks, err.Msg, err.Hint)
	}
	for _, m := range err.Marks {
		if m.Start < 0 || m.Start > m.End || m.End > len(text) {
			t.Fatalf("%q: mark %v: %v", text, m, err)
		}
	}
}

// spansInside walks all that an action holds.
func spansInside(t *testing.T, text string, v reflect.Value) {
	t.Helper()
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		if v.IsNil() {
			return
		}
		if x, ok := v.Interface().(Expr); ok && v.Kind() == reflect.Interface {
			again(t, text, x)
		}
		spansInside(t, text, v.Elem())
	case reflect.Slice:
		for i := range v.Len() {
			spansInside(t, text, v.Index(i))
		}
	case reflect.Struct:
		if s, ok := v.Interface().(Span); ok {
			if s.Start < 0 || s.Start > s.End || s.End > len(text) {
				t.Fatalf("%q: span %v", text, s)
			}
			return
		}
		for i := range v.NumField() {
			spansInside(t, text, v.Field(i))
		}
	}
}

// again reads the text of a part of an expression: it is that part. A raised
// exponent is no text of its own, and a condition stands in calls alone.
func again(t *testing.T, text string, x Expr) {
	t.Helper()
	if _, layer := x.(*Layer); layer {
		return // stands in blocks alone
	}
	part := text[x.Span().Start:x.Span().End]
	if lit, ok := x.(*Literal); ok && strings.ContainsAny(part, raisedDigits+"⁻") && lit.Unit == "" {
		return
	}
	st, err := Parse(part)
	if b, ok := x.(*Binary); ok && strings.Contains("< <= > >=", b.Op) {
		st, err = Parse("f(" + part + ")")
		if err == nil {
			st.Do = &Show{X: st.Do.(*Show).X.(*Call).Args[0].X}
		}
	}
	if err != nil {
		if strings.Contains(err.Msg, "nests deeper") || strings.Contains(err.Msg, "bytes") {
			return
		}
		t.Fatalf("%q: its part %q: %v", text, part, err)
	}
	show, ok := st.Do.(*Show)
	if !ok || written(show.X) != written(x) {
		t.Fatalf("%q: its part %q is %s, and reads as %s", text, part, written(x), said(st.Do))
	}
}
