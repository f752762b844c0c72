package syntax

import (
	"strings"
	"testing"
)

// hostile texts with the refusal that each must get; "" for none.
func TestHostileTexts(t *testing.T) {
	long := strings.Repeat("1+", 50_000)
	for _, c := range []struct{ what, text, want string }{
		{"100,000 characters", long + "1", "this line has 100001 bytes; a line may have 65536"},
		{"65,536 bytes", strings.Repeat("1+", 32_767) + "11", ""},
		{"10,000 parentheses", strings.Repeat("(", 10_000) + "1" + strings.Repeat(")", 10_000), "this nests deeper than 200"},
		{"10,000 open parentheses", strings.Repeat("(", 10_000), "this nests deeper than 200"},
		{"190 parentheses", strings.Repeat("(", 190) + "1" + strings.Repeat(")", 190), ""},
		{"10,000 signs", strings.Repeat("-", 10_000) + "1", "this nests deeper than 200"},
		{"10,000 powers", "2" + strings.Repeat("^2", 10_000), "this nests deeper than 200"},
		{"10,000 braces", strings.Repeat("{", 10_000), "this nests deeper than 200"},
		{"10,000 calls", strings.Repeat("f(", 10_000), "this nests deeper than 200"},
		{"10,000 closings", strings.Repeat(")", 10_000), ") is not expected here"},
		{"10,000 planes", "P" + strings.Repeat(" at IF", 10_000), ""},
		{"a list of 20,000", "{" + strings.Repeat("1,", 20_000) + "1}", ""},
		{"20,000 arguments", "f(" + strings.Repeat("1,", 20_000) + "1)", ""},
		{"20,000 names", "forget " + strings.Repeat("a ", 20_000), "two values stand side by side"},
		{"a name of 60,000", strings.Repeat("a", 60_000), "this name has 60000 bytes; a name may have 128"},
		{"a name of 128", strings.Repeat("a", 128), ""},
		{"a unit of 60,000", "1 " + strings.Repeat("a", 60_000), ""},
		{"a unit of 60,000 in powers", "1 m" + strings.Repeat("^(", 30_000), "^ is not expected here"},
		{"a number of 60,000", strings.Repeat("1", 60_000), ""},
		{"60,000 raised digits", "x" + strings.Repeat("²", 30_000), ""},
		{"60,000 open quotes", strings.Repeat(`"`, 60_000), "two values stand side by side"},
		{"60,000 brackets", "x" + strings.Repeat("[", 60_000), "this bracket is not closed"},
		{"concise forms without end", strings.Repeat("1(1 ", 15_000), "two values stand side by side"},
		{"a formula of 60,000", "material a = " + strings.Repeat("C", 60_000) + " 1 g/cm^3", "this formula has 60000 bytes; a formula may have 128"},
		{"60,000 NULs", strings.Repeat("\x00", 60_000), "<U+0000> is not seen on a screen and has no meaning here"},
		{"a megabyte of note", "#" + strings.Repeat("a", 1<<20), "this line has 1048577 bytes; a line may have 65536"},
		{"a long heading", "chain " + strings.Repeat("a", 1<<20), "this heading is too long"},
		{"a block of 3,000 lines", "chain c" + strings.Repeat("\n", 3000) + "end", "this block has 3001 lines; a block may have 2000"},
		{"a block of 1,900 lines", "chain c" + strings.Repeat("\n m: 1", 1900) + "\nend", ""},
		{"a block of 100,000 bytes", "chain c" + strings.Repeat("\n m: "+strings.Repeat("1", 1000), 100) + "\nend", "this block has more than 65536 bytes"},
		{"a block without end", "chain c" + strings.Repeat("\n m: 1", 1900), "the block that begins here has no end"},
	} {
		_, err := Parse(c.text)
		got := ""
		if err != nil {
			got = err.Msg
			if n := len(err.Error()); n > 300 {
				t.Errorf("%s: a refusal of %d bytes", c.what, n)
			}
			if err.Hint == "" {
				t.Errorf("%s: no way on", c.what)
			}
		}
		if got != c.want {
			t.Errorf("%s: got %q, want %q", c.what, got, c.want)
		}
	}
}

// What reading refuses names the whole of what is wrong with its bytes, and an
// action is never half there.
func TestNothingBesideAnError(t *testing.T) {
	for _, text := range []string{"1 +", "chain c\nend\n5", "chain 5\nend", "x = ", "\xff", "check a", "sweep x"} {
		if st, err := Parse(text); err == nil || st != nil {
			t.Errorf("%q: %v beside %v", text, st, err)
		}
	}
	if b, err := ParseHeading("chain 5"); err == nil || b != nil {
		t.Errorf("%v beside %v", b, err)
	}
	if l, err := ParseBlockLine("m: 5 5"); err == nil || l != nil {
		t.Errorf("%v beside %v", l, err)
	}
}
