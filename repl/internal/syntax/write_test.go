package syntax

import (
	"fmt"
	"strings"
	"testing"
)

// written writes a tree with every operator in front: "(+ a (* 2{m} b))".
func written(x Expr) string {
	switch x := x.(type) {
	case *Literal:
		return literalText(x)
	case *Name:
		return x.Name
	case *String:
		return `"` + x.Text + `"`
	case *Unary:
		return "(- " + written(x.X) + ")"
	case *Binary:
		return "(" + x.Op + " " + written(x.X) + " " + written(x.Y) + ")"
	case *At:
		return "(at " + written(x.X) + " " + x.Plane + ")"
	case *Layer:
		s := "layer " + x.Material.Name + " " + written(x.X)
		if x.Rough != nil {
			s += " rough " + written(x.Rough)
		}
		return "(" + s + ")"
	case *List:
		var items []string
		for _, item := range x.Items {
			items = append(items, written(item))
		}
		return "{" + strings.Join(items, " ") + "}"
	case *Call:
		var args []string
		for _, a := range x.Args {
			s := written(a.X)
			if a.Label != "" {
				s = a.Label + "=" + s
			}
			args = append(args, s)
		}
		return x.Func + "(" + strings.Join(args, " ") + ")"
	}
	return fmt.Sprintf("%T", x)
}

func literalText(x *Literal) string {
	s := x.Number
	if x.Unit != "" {
		s += "{" + x.Unit + "}"
	}
	if x.Spread == nil {
		return s
	}
	if x.Spread.Number != "" {
		s += "±" + x.Spread.Number
	}
	if x.Spread.Unit != "" {
		s += "{" + x.Spread.Unit + "}"
	}
	if x.Spread.Inner {
		s = "both " + s
	}
	for _, a := range x.Spread.Says {
		s += " " + a.Name + "=" + a.Number + a.Unit
	}
	return "<" + s + ">"
}

func stated(s *Stated) string {
	switch {
	case s == nil:
		return ""
	case s.Plane == "":
		return " [" + s.Unit + "]"
	}
	return strings.Replace(" ["+s.Unit+" at "+s.Plane+"]", "[ at", "[at", 1)
}

func columnsText(list []Column) string {
	var parts []string
	for _, c := range list {
		parts = append(parts, written(c.X)+stated(c.Stated))
	}
	return strings.Join(parts, ", ")
}

func namesText(list []Name) string {
	var parts []string
	for _, n := range list {
		parts = append(parts, n.Name)
	}
	return strings.Join(parts, " ")
}

func outputText(out Output) string {
	s := ""
	if out.Plot {
		s += " plot"
	}
	for _, to := range out.To {
		s += ` to "` + to.Text + `"`
	}
	return s
}

func axisText(a Axis) string {
	s := a.Name + " " + written(a.From) + ".." + written(a.To)
	if a.By != nil {
		s += " by " + written(a.By)
	}
	if a.Points != nil {
		s += " points " + written(a.Points)
	}
	if a.Log {
		s += " log"
	}
	return s
}

// said writes what a statement asks for.
func said(a Action) string {
	switch a := a.(type) {
	case nil:
		return "nothing"
	case *Show:
		return "show " + written(a.X) + stated(a.Stated)
	case *Define:
		return "define " + a.Name + stated(a.Stated) + " " + written(a.X)
	case *DefineFunction:
		s := "function " + a.Name
		for _, p := range a.Params {
			s += " " + p.Name + stated(p.Stated)
		}
		return s + " is" + stated(a.Stated) + " " + written(a.X)
	case *Check:
		s := "check " + a.Op + " " + written(a.X) + " " + written(a.Y)
		if a.Within != nil {
			s += " within " + written(a.Within)
		}
		return s
	case *Command:
		s := a.Word
		for _, n := range a.Names {
			s += " " + n.Name
		}
		if a.Text != "" {
			s += ` "` + a.Text + `"`
		}
		return s + a.Number
	case *Prefer:
		return "prefer" + stated(a.Stated)
	case *Material:
		return "material " + a.Name + " " + a.Formula + " " + written(a.X)
	case *Walk:
		return "walk " + a.Chain + " " + written(a.X)
	case *Block:
		return blockText(a)
	}
	return studyText(a)
}

func studyText(a Action) string {
	switch a := a.(type) {
	case *Budget:
		return "budget " + columnsText([]Column{a.Of})
	case *Propagate:
		s := "propagate " + columnsText([]Column{a.Of})
		for _, o := range a.Options {
			s += " " + o.Name + "=" + written(o.X)
		}
		return s + outputText(a.Out)
	case *Correlation:
		return "correlation " + a.A.Name + " " + a.B.Name + " " + written(a.X)
	case *Sweep:
		s := "sweep"
		for _, x := range a.Axes {
			s += " " + axisText(x) + ";"
		}
		return s + " " + columnsText(a.Columns) + outputText(a.Out)
	case *Search:
		s := a.Word + " " + written(a.X)
		if a.Y != nil {
			s += " = " + written(a.Y)
		}
		return s + " for " + axisText(a.Axis)
	case *Fit:
		return "fit " + written(a.X) + " = " + written(a.Y) + " over " + a.Data.Name + " for " + namesText(a.Names)
	case *Case:
		s := "case " + a.Name
		for _, x := range a.Sets {
			s += " " + x.Name + "=" + written(x.X)
		}
		return s
	case *Compare:
		return "compare " + columnsText(a.Columns) + " : " + namesText(a.Cases)
	case *Data:
		return "data " + a.Name + ` "` + a.File.Text + `"`
	}
	return fmt.Sprintf("%T", a)
}

func blockText(b *Block) string {
	s := b.Kind + " " + b.Name
	for _, l := range b.Lines {
		s += "; "
		if l.Plane != "" {
			s += "at " + l.Plane
			continue
		}
		s += l.Label
		if l.Times != nil {
			s += " x" + written(l.Times)
		}
		if l.Independent {
			s += " independent"
		}
		s += ":"
		for _, x := range l.Items {
			s += " " + written(x)
		}
		if l.Note != "" {
			s += " #" + l.Note
		}
	}
	return s
}

// reads runs cases, a line each: "statement => what it asks for" or
// "statement ! marked texts: message; way on". \n in a statement is a line end.
func reads(t *testing.T, cases string) {
	t.Helper()
	for _, line := range strings.Split(cases, "\n") {
		line = strings.TrimSpace(line)
		text, want, answers := strings.Cut(line, " => ")
		wrong, message, refuses := strings.Cut(line, " ! ")
		switch {
		case answers:
			text = unescaped(text)
			if got := outcome(text); got != want {
				t.Errorf("%s\n got %s\nwant %s", line[:len(line)-len(want)-4], got, want)
			}
		case refuses:
			if got := outcome(unescaped(wrong)); got != message {
				t.Errorf("%s\n got %s\nwant %s", wrong, got, message)
			}
		case line != "" && !strings.HasPrefix(line, "##"):
			t.Errorf("no case: %s", line)
		}
	}
}

func unescaped(text string) string {
	return strings.NewReplacer(`\n`, "\n", `\t`, "\t", `\0`, "\x00", `\x`, "\xff").Replace(text)
}

// outcome is what is said, or the refusal with its marked texts.
func outcome(text string) string {
	st, err := Parse(text)
	if err == nil {
		s := said(st.Do)
		if st.Note != "" {
			s += " #" + st.Note
		}
		return s
	}
	return refusal(text, err)
}

func refusal(text string, err *Error) string {
	var marks []string
	for _, m := range err.Marks {
		if m.Start < 0 || m.Start > m.End || m.End > len(text) {
			return fmt.Sprintf("the mark %v lies outside of the text: %v", m, err)
		}
		marks = append(marks, Visible(strings.ReplaceAll(text[m.Start:m.End], "\n", `\n`)))
	}
	return strings.Join(marks, " | ") + ": " + err.Error()
}
