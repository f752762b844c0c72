package main

import (
	"os"
	"strings"
	"testing"
)

// A page is written whole, with status 0, whatever the session says; a call
// that is wrong, or a file that cannot be used, is status 2 and writes nothing.
func TestPage(t *testing.T) {
	files := map[string]string{
		"day.budget":     "# A day.\nimport \"c.budget\"\nx = 2*k\nsweep y = 1 .. 3 by 1 : y*x to \"p.svg\"\nsave \"q.budget\"",
		"c.budget":       "k = 1 nm",
		"refused.budget": "1 nm + 1 s\nimport \"gone\"\ncheck 1 > 2",
		"bad.budget":     "\xff",
	}
	for name, c := range map[string]struct {
		args     []string
		status   int
		problems string
		writes   string
	}{
		"a page":               {[]string{"day.budget", "-o", "day.html"}, 0, "", "day.html"},
		"the name first":       {[]string{"-o", "day.HTM", "day.budget"}, 0, "", "day.HTM"},
		"refusals":             {[]string{"refused.budget", "-o", "r.html"}, 0, "", "r.html"},
		"no file":              {nil, 2, "page needs a session file", ""},
		"no page":              {[]string{"day.budget"}, 2, "page needs a name to write to", ""},
		"nothing behind -o":    {[]string{"day.budget", "-o"}, 2, "behind -o stands the name", ""},
		"two pages":            {[]string{"day.budget", "-o", "a.html", "-o", "b.html"}, 2, "-o stands twice", ""},
		"two sessions":         {[]string{"day.budget", "c.budget", "-o", "a.html"}, 2, "page takes one session file", ""},
		"an option":            {[]string{"--dark", "day.budget", "-o", "a.html"}, 2, "--dark is no option of page", ""},
		"the session's name":   {[]string{"day.budget", "-o", "day.budget"}, 2, "end it in .html", ""},
		"a session not there":  {[]string{"gone.budget", "-o", "a.html"}, 2, "gone.budget cannot be read", ""},
		"a folder not there":   {[]string{"gone/day.budget", "-o", "a.html"}, 2, "gone cannot be opened", ""},
		"no text":              {[]string{"bad.budget", "-o", "a.html"}, 2, "is not UTF-8 text", ""},
		"no folder for a page": {[]string{"day.budget", "-o", "gone/a.html"}, 2, "gone/ cannot be opened", ""},
	} {
		t.Run(name, func(t *testing.T) {
			dir := inFolder(t, files)
			o := call(t, "", append([]string{"page"}, c.args...)...)
			o.wants(t, c.status, "", c.problems)
			got := listing(t, dir)
			want := len(files)
			if c.writes != "" {
				want++
				if page := read(t, c.writes); !strings.HasPrefix(page, "<!DOCTYPE html>") || !strings.HasSuffix(page, "</html>\n") {
					t.Errorf("the page is %d bytes from %.20q", len(page), page)
				}
			}
			if len(got) != want {
				t.Errorf("the folder holds %q", got)
			}
		})
	}
}

// A page that cannot be written leaves the old one.
func TestPageKeepsTheOldOne(t *testing.T) {
	dir := inFolder(t, map[string]string{"day.budget": "1 nm", "day.html": "old"})
	if call(t, "", "page", "day.budget", "-o", "day.html").wants(t, 0, "", ""); read(t, "day.html") == "old" {
		t.Error("the page is the old one")
	}
	if err := os.Mkdir("folder.html", 0o755); err != nil {
		t.Fatal(err)
	}
	call(t, "", "page", "day.budget", "-o", "folder.html").wants(t, 2, "", "no ordinary file")
	if got := listing(t, dir); len(got) != 3 {
		t.Errorf("the folder holds %q", got)
	}
}

// The name of a page may lead anywhere; the session reads its own folder.
func TestPageElsewhere(t *testing.T) {
	inFolder(t, map[string]string{"day.budget": "1 nm"})
	to := t.TempDir() + "/day.html"
	call(t, "", "page", "day.budget", "-o", to).wants(t, 0, "", "")
	if !strings.Contains(read(t, to), "1 nm") {
		t.Error("the page does not hold the session")
	}
}
