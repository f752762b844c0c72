package terminal

import (
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/iotest"
	"unicode/utf8"
)

// spelled gives what the editor gets for what the terminal sends, commands and
// parts by name.
func spelled(t *testing.T, in io.Reader) string {
	t.Helper()
	k := newKeys(in)
	got, err := io.ReadAll(k)
	if err != nil {
		t.Fatal(err)
	}
	if !k.stopped.Load() {
		t.Error("the end of the input is not told")
	}
	names := map[command]string{
		complete: "complete", wordLeft: "word-left", wordRight: "word-right",
		eraseWordLeft: "erase-left", eraseWordRight: "erase-right", eraseToStart: "erase-start",
		eraseToEnd: "erase-end", eraseRight: "delete", bringBack: "back", suspend: "suspend",
		pasteStarts: "paste", pasteEnds: "end",
	}
	var b strings.Builder
	for _, r := range string(got) {
		c, ok := asCommand(r)
		switch {
		case c == pastePart:
			fmt.Fprintf(&b, "{%s}", k.texts.pop())
		case ok:
			fmt.Fprintf(&b, "<%s>", names[c])
		case r < ' ' || r == keyBackspace:
			fmt.Fprintf(&b, "^%c", r^0x40)
		default:
			b.WriteRune(r)
		}
	}
	return b.String()
}

var keyCases = []struct{ what, sent, want string }{
	{"text", "dose * 2 µ², λ", "dose * 2 µ², λ"},
	{"enter", "a\rb\n", "a^Mb^M"},
	{"editor keys", "\x01\x02\x03\x04\x05\x06\x07\x08\x0c\x0e\x10\x12\x13\x7f", "^A^B^C^D^E^F^G^H^L^N^P^R^S^?"},
	{"own keys", "\t\x0b\x15\x17\x19\x1a", "<complete><erase-end><erase-start><erase-left><back><suspend>"},
	{"keys of no meaning", "a\x00\x0f\x11\x14\x16\x18\x1c\x1d\x1e\x1fb\u0085\u009b", "ab"},
	{"arrows", "\x1b[A\x1b[B\x1b[C\x1b[D\x1bOA\x1bOB\x1bOC\x1bOD", "^P^N^F^B^P^N^F^B"},
	{"home and end", "\x1b[H\x1b[F\x1b[1~\x1b[4~\x1b[7~\x1b[8~\x1bOH\x1bOF", "^A^E^A^E^A^E^A^E"},
	{"delete", "\x1b[3~", "<delete>"},
	{
		"words", "\x1b[1;5D\x1b[1;5C\x1b[1;3Dab\x1bb\x1bf\x1bd\x1b\x7f\x1b\x08",
		"<word-left><word-right><word-left>ab<word-left><word-right><erase-right><erase-left><erase-left>",
	},
	{"unknown sequences", "a\x1b[2~\x1b[5~\x1b[15~\x1b[?1;2c\x1b[<0;1;1Mb\x1b[[Ac\x1bOPd", "abcd"},
	{"lone escape", "\x1bxy\x1b\x1b[A", "xy^P"},
	{"broken sequence", "\x1b[12\x03a", "^Ca"},
	{"endless sequence", "\x1b[" + strings.Repeat("1", maxSequence+2) + "a", "11a"},
	{"bytes that are no UTF-8", "a\xb5b", "a\uFFFDb"},
	{"marks that reorder", "a\u202eb", "ab"},
	{"runes of the commands", "a" + string(rune(complete)) + string(rune(pastePart)) + "b", "ab"},
	{"many characters at once", strings.Repeat("x", minRun) + "\r", "{" + strings.Repeat("x", minRun) + "}^M"},
	{"a paste", "a\x1b[200~b\tc\x1b[201~d", "a<paste>{b c}<end>d"},
	{
		"lines of a paste", "\x1b[200~one\rtwo\nthree\r\nfour\n\rfive\x1b[201~",
		"<paste>{one}^J{two}^J{three}^J{four}^J^J{five}<end>",
	},
	{"keys in a paste", "\x1b[200~a\x04\x14\x1b[A\x1bbc\x1b[20~\x1b[201~\x03", "<paste>{a[Abc[20~}<end>^C"},
	{"a way out of a paste", "\x1b[200~a\rb\x03c\x1b[D", "<paste>{a}^J{b}<end>^Cc^B"},
	{"escape before the end of a paste", "\x1b[200~a\x1b\x1b[201~b", "<paste>{a}<end>b"},
	{"a mark of a paste in a paste", "\x1b[200~a\x1b[200~b\x1b[201~c", "<paste>{a[200~b}<end>c"},
	{"commands in a paste", "\x1b[200~a" + string(rune(suspend)) + "\x1b[201~", "<paste>{a}<end>"},
	{"an end without a start", "a\x1b[201~b", "ab"},
	{"a paste that never ends", "\x1b[200~a\rb", "<paste>{a}^J"},
}

func TestKeys(t *testing.T) {
	for _, c := range keyCases {
		if got := spelled(t, strings.NewReader(c.sent)); got != c.want {
			t.Errorf("%s: %q gives\n%s, want\n%s", c.what, c.sent, got, c.want)
		}
	}
}

// A terminal may send its bytes in any portions.
func TestKeysByteByByte(t *testing.T) {
	for _, c := range keyCases {
		if c.what == "many characters at once" {
			continue // they come at once or they do not
		}
		if got := spelled(t, iotest.OneByteReader(strings.NewReader(c.sent))); got != c.want {
			t.Errorf("%s: %q gives\n%s, want\n%s", c.what, c.sent, got, c.want)
		}
	}
}

func TestLongPasteComesInParts(t *testing.T) {
	k := newKeys(strings.NewReader("\x1b[200~" + strings.Repeat("x", 3*maxPart) + "\x1b[201~"))
	got, err := io.ReadAll(k)
	if err != nil {
		t.Fatal(err)
	}
	total := 0
	for _, r := range string(got) {
		if c, _ := asCommand(r); c == pastePart {
			part := len(k.texts.pop())
			if part > maxPart+4096 {
				t.Errorf("a part of %d bytes", part)
			}
			total += part
		}
	}
	if total != 3*maxPart {
		t.Errorf("%d bytes arrived, want %d", total, 3*maxPart)
	}
}

func FuzzKeys(f *testing.F) {
	for _, c := range keyCases {
		f.Add([]byte(c.sent))
	}
	f.Fuzz(func(t *testing.T, sent []byte) {
		k := newKeys(strings.NewReader(string(sent)))
		got, err := io.ReadAll(k)
		if err != nil || !utf8.Valid(got) {
			t.Fatalf("%q gives %q, %v", sent, got, err)
		}
		for _, r := range string(got) {
			switch c, ok := asCommand(r); {
			case c == pastePart:
				if part := k.texts.pop(); part == "" || strings.ContainsFunc(part, unprintable) {
					t.Fatalf("%q gives the part %q", sent, part)
				}
			case !ok && r != keySubmit && unprintable(r) && control(r) != r:
				t.Fatalf("%q gives %q", sent, r)
			}
		}
	})
}

func unprintable(r rune) bool { return !printable(r) }
