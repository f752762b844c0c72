package main

import (
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
)

func TestReplayStatuses(t *testing.T) {
	inFolder(t, map[string]string{
		"holds.budget":    "# a note\nx = 2 nm\n3 * x\n| 6 nm\ncheck x <= 3 nm\n| holds: 2 nm <= 3 nm\n",
		"copied.budget":   "dose> x = 2 nm\ndose> 3 * x\n| 6 nm\n",
		"windows.budget":  "x = 2 nm\r\n3 * x\r\n| 6 nm\r\n",
		"drift.budget":    "x = 2 nm\n3 * x\n| 7 nm\n",
		"check.budget":    "check 4 nm <= 3 nm\n| fails: 4 nm <= 3 nm\n",
		"refused.budget":  "x = 2 nm\nx + 1 W\n",
		"answered.budget": "x = 2 nm\nx + 1 W\n| 3 nm\n",
		"all.budget":      "x = 2 nm\n3 * x\n| 7 nm\nx + 1 W\n",
		"open.budget":     "chain pair\n  at IF\n",
		"few.budget":      "pi\n| 3.14\n",
		"empty.budget":    "",
	})
	known := call(t, "", "eval", "2 nm + 1 W").out
	write(t, "known.budget", "2 nm + 1 W\n"+margin(known)+"1 nm\n| 1 nm\n")
	for name, c := range map[string]struct {
		args     []string
		status   int
		has      []string
		problems string
	}{
		"all holds":                     {[]string{"holds.budget"}, 0, []string{"2 of 2 recorded replies hold"}, ""},
		"copied from the prompt":        {[]string{"copied.budget"}, 0, []string{"1 of 1"}, ""},
		"lines that end with CR":        {[]string{"windows.budget"}, 0, []string{"1 of 1"}, ""},
		"recorded with fewer digits":    {[]string{"few.budget"}, 0, []string{"1 of 1"}, ""},
		"a file of nothing":             {[]string{"empty.budget"}, 0, []string{"0 of 0"}, ""},
		"a recorded refusal":            {[]string{"known.budget"}, 0, []string{"2 of 2"}, ""},
		"drift":                         {[]string{"drift.budget"}, 1, []string{"drift.budget:2", "7 nm", "6 nm"}, ""},
		"a check that fails":            {[]string{"check.budget"}, 1, []string{"check.budget:1"}, ""},
		"an answer that is now refused": {[]string{"answered.budget"}, 1, []string{"answered.budget:2", "3 nm"}, ""},
		"a refusal without record":      {[]string{"refused.budget"}, 2, []string{"refused.budget:2"}, ""},
		"drift and refusal":             {[]string{"all.budget"}, 2, []string{"all.budget:2", "all.budget:4"}, ""},
		"a block without end":           {[]string{"open.budget"}, 2, []string{"no end"}, ""},
		"several files, the worst":      {[]string{"holds.budget", "refused.budget", "drift.budget"}, 2, []string{"holds.budget", "drift.budget:2"}, ""},
		"the others after a lost one":   {[]string{"nowhere.budget", "holds.budget"}, 2, []string{"2 of 2"}, "nowhere.budget cannot be read"},
		"no such file":                  {[]string{"nowhere.budget"}, 2, nil, "nowhere.budget cannot be read"},
		"no such folder":                {[]string{"nowhere/x.budget"}, 2, nil, "nowhere"},
		"a folder":                      {[]string{"."}, 2, nil, "cannot be read"},
		"no file named":                 {nil, 2, nil, "replay needs a session file"},
		"an unknown option":             {[]string{"--quiet", "holds.budget"}, 2, nil, "--quiet is no option of replay"},
		"an unknown letter":             {[]string{"-h"}, 2, nil, "-h is no option of replay"},
		"an option behind the file":     {[]string{"holds.budget", "--update"}, 2, nil, "options stand before the files: dosewright replay --update holds.budget"},
	} {
		t.Run(name, func(t *testing.T) {
			o := call(t, "", append([]string{"replay"}, c.args...)...)
			if o.status != c.status {
				t.Errorf("status %d, want %d\n%s", o.status, c.status, o.out)
			}
			for _, text := range c.has {
				if !strings.Contains(o.out, text) {
					t.Errorf("printed\n%swant %q in it", o.out, text)
				}
			}
			if len(c.has) == 0 && o.out != "" {
				t.Errorf("printed\n%swant nothing", o.out)
			}
			o.complains(t, c.problems)
		})
	}
}

// margin makes recorded replies of printed lines.
func margin(out string) string {
	var b strings.Builder
	for line := range strings.Lines(out) {
		b.WriteString("| " + line)
	}
	return b.String()
}

// Imports stay in the folder of the session named on the command line, unless
// --outside is said.
func TestReplayOutside(t *testing.T) {
	inFolder(t, map[string]string{"site.budget": "x = 2 nm\n"})
	for _, dir := range []string{"line", "line/day"} {
		if err := os.Mkdir(dir, 0o755); err != nil {
			t.Fatal(err)
		}
	}
	write(t, "line/tool.budget", "import \"../site.budget\"\ny = 3 * x\n")
	write(t, "line/day/one.budget", "import \"../tool.budget\"\ny\n")
	write(t, "line/here.budget", "import \"day/two.budget\"\nz\n| 5 nm\n")
	write(t, "line/day/two.budget", "z = 5 nm\n")
	if o := call(t, "", "replay", "line/here.budget"); o.status != 0 {
		t.Errorf("an import from below: status %d\n%s%s", o.status, o.out, o.problems)
	}
	o := call(t, "", "replay", "line/day/one.budget")
	if o.status != 2 || !strings.Contains(o.out, "outside") {
		t.Errorf("an import from above: status %d, want 2 and the word outside\n%s%s", o.status, o.out, o.problems)
	}
	o = call(t, "", "replay", "--outside", "line/day/one.budget")
	if o.status != 0 || !strings.Contains(o.out, "2 statements") {
		t.Errorf("--outside: status %d\n%s%s", o.status, o.out, o.problems)
	}
}

// Going through a session with a reader: Enter shows a reply, a question
// changes nothing, and the file stays.
func TestReplayStep(t *testing.T) {
	const text = "# the pitch\nx = 2 nm\n3 * x\n| 6 nm\nx / 2\n| 1 nm\n"
	inFolder(t, map[string]string{"day.budget": text})
	o := call(t, "\nx + 1 nm\nx = 9 nm\n\n\n", "replay", "--step", "day.budget")
	at := 0
	for _, want := range []string{"# the pitch", "dose> x = 2 nm", "dose> 3 * x", "| 3 nm\n", "| 6 nm\n", "dose> x / 2", "| 1 nm\n"} {
		i := strings.Index(o.out[at:], want)
		if i < 0 {
			t.Fatalf("printed\n%swant %q behind the first %d bytes", o.out, want, at)
		}
		at += i + len(want)
	}
	if got := read(t, "day.budget"); o.status != 0 || got != text {
		t.Errorf("status %d, want 0; the file is\n%s", o.status, got)
	}
}

func TestReplayExamples(t *testing.T) {
	for _, name := range examples(t) {
		t.Run(filepath.Base(name), func(t *testing.T) {
			o := call(t, "", "replay", name)
			if o.status != 0 || strings.Count(o.out, "\n") != 1 {
				t.Errorf("status %d, want 0 and one line\n%s", o.status, o.out)
			}
			o.complains(t, "")
		})
	}
}

// Replaying writes nothing.
func TestReplayLeavesFiles(t *testing.T) {
	const text = "x = 2 nm\n3 * x\n| 7 nm\nsave \"other.budget\"\n"
	dir := inFolder(t, map[string]string{"day.budget": text})
	call(t, "", "replay", "day.budget")
	if got := read(t, "day.budget"); got != text {
		t.Errorf("the file is now\n%s", got)
	}
	if files := listing(t, dir); !slices.Equal(files, []string{"day.budget"}) {
		t.Errorf("the folder holds %q, want the session alone", files)
	}
}

// A changed convention moves every reply that rests on it, and no other; the
// report names it. The twin is a session that asks what each name rests on.
func TestReplayNamesWhatMoved(t *testing.T) {
	fabNorth(t)
	before := read(t, "conventions.budget")
	after := strings.Replace(before, "T_pell = 88 %", "T_pell = 85 %", 1)
	if after == before {
		t.Fatal("the conventions do not hold T_pell = 88 %")
	}
	write(t, "conventions.budget", after)
	o := call(t, "", "replay", "daily.budget")
	if o.status != 1 {
		t.Fatalf("status %d, want 1\n%s%s", o.status, o.out, o.problems)
	}
	for _, text := range []string{
		"wph [wafer/h]", "157.24 wafer/h", "150.90 wafer/h",
		"moved by  T_pell = 85 %  (was 88 %)", "changed: T_pell = 85 %  (was 88 %)",
	} {
		if !strings.Contains(o.out, text) {
			t.Errorf("the report does not hold %q\n%s", text, o.out)
		}
	}
	drifts := movedLines(t, "daily.budget")
	for _, d := range drifts {
		if len(d.MovedBy) != 1 && d.Line != drifts[0].Line || len(d.MovedBy) == 1 && d.MovedBy[0].Name != "T_pell" {
			t.Errorf("line %d is moved by %v, want T_pell alone", d.Line, d.MovedBy)
		}
	}
	for _, d := range drifts {
		checkAlone(t, d)
	}
	want := numbersThatDiffer(t, before, after)
	var got []int
	for _, d := range drifts {
		got = append(got, d.Line)
	}
	if !slices.Equal(got, want) {
		t.Errorf("the report has lines %d, want %d", got, want)
	}
}

// checkAlone compares what the one change is said to move alone with the
// difference of the replies, where a reply is one number in one unit.
func checkAlone(t *testing.T, d driftObject) {
	t.Helper()
	number := func(s string) (float64, bool) {
		first, _, _ := strings.Cut(s, " ")
		x, err := strconv.ParseFloat(first, 64)
		return x, err == nil
	}
	if len(d.Recorded) != 1 || len(d.Now) != 1 || len(d.MovedBy) != 1 {
		return
	}
	was, ok1 := number(d.Recorded[0])
	now, ok2 := number(d.Now[0])
	if !ok1 || !ok2 {
		return
	}
	alone, ok := number(d.MovedBy[0].Alone)
	// The replies have five digits, and what is moved alone has three.
	if slack := 1e-4*math.Abs(was) + 0.01*math.Abs(now-was); !ok || !(math.Abs(alone-(now-was)) <= slack) {
		t.Errorf("line %d goes from %s to %s, and the one change alone is said to move it by %q", d.Line, d.Recorded[0], d.Now[0], d.MovedBy[0].Alone)
	}
}

func movedLines(t *testing.T, name string) []driftObject {
	t.Helper()
	var list []driftObject
	for _, line := range objects(t, call(t, "", "replay", "--json", name).out) {
		if strings.Contains(line, `"moved_by":`) {
			list = append(list, strict[driftObject](t, line))
		}
	}
	if len(list) == 0 {
		t.Fatal("nothing has moved")
	}
	return list
}

// numbersThatDiffer runs the day with either text of the conventions, reads
// what is printed for each statement, and lists the lines where it differs.
func numbersThatDiffer(t *testing.T, before, after string) []int {
	t.Helper()
	day := read(t, "daily.budget")
	text := map[string][]string{}
	for _, conventions := range []string{before, after} {
		write(t, "conventions.budget", conventions)
		bare := []string{}
		for line := range strings.Lines(day) {
			if !strings.HasPrefix(line, "|") {
				bare = append(bare, line)
			}
		}
		write(t, "bare.budget", strings.Join(bare, ""))
		if o := call(t, "", "replay", "--update", "bare.budget"); o.status != 0 {
			t.Fatalf("status %d\n%s%s", o.status, o.out, o.problems)
		}
		text[conventions] = strings.Split(strings.TrimRight(read(t, "bare.budget"), "\n"), "\n")
	}
	was, now := text[before], text[after]
	if len(was) != len(now) || strings.Join(was, "\n") != strings.TrimRight(day, "\n") {
		t.Fatalf("the day does not come out as it is recorded:\n%s", strings.Join(was, "\n"))
	}
	var lines []int
	statement := 0
	for i := range was {
		if !strings.HasPrefix(was[i], "|") {
			statement = i + 1
		}
		if was[i] != now[i] && !slices.Contains(lines, statement) {
			lines = append(lines, statement)
		}
	}
	return lines
}

func TestUpdateRewrites(t *testing.T) {
	const text = "# a note stays\n\ndose> x = 2 nm   # as written\n  3 * x\n| 7 nm\n| and an old second line\nx / 2\nchain pair\n  at IF\n  mirror: 50 %\n  at WAFER\nend\n"
	const want = "# a note stays\n\ndose> x = 2 nm   # as written\n  3 * x\n| 6 nm\nx / 2\n| 1 nm\nchain pair\n  at IF\n  mirror: 50 %\n  at WAFER\nend\n"
	dir := inFolder(t, map[string]string{"day.budget": text})
	o := call(t, "", "replay", "--update", "day.budget")
	if o.status == 2 || !strings.Contains(o.out, "day.budget:4") {
		t.Errorf("status %d; the drift must be named before it is recorded\n%s%s", o.status, o.out, o.problems)
	}
	if got := read(t, "day.budget"); got != want {
		t.Errorf("the file is now\n%s\nwant\n%s", got, want)
	}
	if files := listing(t, dir); !slices.Equal(files, []string{"day.budget"}) {
		t.Errorf("the folder holds %q, want the session alone", files)
	}
	o = call(t, "", "replay", "day.budget")
	if o.status != 0 || !strings.Contains(o.out, "2 of 2") {
		t.Errorf("status %d after the update\n%s", o.status, o.out)
	}
}

// An update of a file that holds changes nothing in it, byte by byte.
func TestUpdateKeepsExamples(t *testing.T) {
	for _, name := range fabNorth(t) {
		before := read(t, name)
		call(t, "", "replay", "--update", name)
		was, now := strings.Split(before, "\n"), strings.Split(read(t, name), "\n")
		for i := range max(len(was), len(now)) {
			if i >= len(was) || i >= len(now) || was[i] != now[i] {
				t.Errorf("%s had %d lines and has %d; the first that differs is line %d", name, len(was), len(now), i+1)
				break
			}
		}
	}
}
