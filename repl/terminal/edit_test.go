package terminal

import (
	"strings"
	"testing"
)

// at reads a line in which | stands for the cursor.
func at(text string) edited {
	before, behind, _ := strings.Cut(text, "|")
	return edited{[]rune(before + behind), len([]rune(before))}
}

func (e edited) String() string {
	return string(e.text[:e.at]) + "|" + string(e.text[e.at:])
}

func TestMoveOrErase(t *testing.T) {
	for _, c := range []struct {
		do         command
		from, want string
		gone       string
	}{
		{eraseWordLeft, "dose|", "|", "dose"},
		{eraseWordLeft, "do|se * 2", "|se * 2", "do"},
		{eraseWordLeft, "dose * λ_1  |+ 2", "dose * |+ 2", "λ_1  "},
		{eraseWordLeft, "|dose", "|dose", ""},
		{eraseWordRight, "dose| * k1 + 2", "dose| + 2", " * k1"},
		{eraseWordRight, "dose|", "dose|", ""},
		{eraseToStart, "dose * |2", "|2", "dose * "},
		{eraseToEnd, "dose |* 2", "dose |", "* 2"},
		{eraseRight, "do|se", "do|e", ""},
		{eraseRight, "|", "|", ""},
		{wordLeft, "2 * λ_1|", "2 * |λ_1", ""},
		{wordLeft, "|", "|", ""},
		{wordRight, "2| * λ_1 + 3", "2 * λ_1| + 3", ""},
		{wordRight, "2 * |", "2 * |", ""},
	} {
		line := at(c.from)
		next, gone := line.moveOrErase(c.do)
		if next.String() != c.want || string(gone) != c.gone {
			t.Errorf("%x on %s: %s with %q gone, want %s with %q", c.do, c.from, next, string(gone), c.want, c.gone)
		}
		if line.String() != c.from {
			t.Errorf("%x changed the line it was given: %s, was %s", c.do, line, c.from)
		}
	}
}

func TestInsert(t *testing.T) {
	line := at("a|d")
	if got := line.insert([]rune("bc")).String(); got != "abc|d" {
		t.Errorf("got %s", got)
	}
	if line.String() != "a|d" {
		t.Errorf("the line it was given became %s", line)
	}
}
