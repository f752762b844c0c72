package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// What the command must answer, one line each: the values of the main job.
// Sources: exact SI constants (SI Brochure, 9th edition, table 1) for the
// first two; the Bragg condition for the periods; energy balance for the
// power and its limit, 1 / 9.5 s per wafer.
func TestEvalMainJob(t *testing.T) {
	for _, c := range []struct {
		statement string
		digits    string
		want      string
	}{
		{"photon_energy(13.5 nm)", "9", "91.8401470 eV"},
		{"photon_energy(13.5 nm)", "5", "91.840 eV"},
		{"photon_density(1 mJ/cm^2) [photon/nm^2]", "6", "0.679606 photon/nm²"},
		{"bragg_period(13.5 nm)", "3", "6.75 nm"},
		{"bragg_period(13.5 nm, delta = 0.03108)", "5", "6.9665 nm"},
		{"source_power(34 mJ/cm^2, 150 wafer/h, 96 field/wafer, 8.58 cm^2/field, 9.5 s/wafer, 0.9 %)", "4", "214.6 W at IF"},
		{"0.70^9 [%]", "4", "4.035 %"},
		{"0.70^11 [%]", "4", "1.977 %"},
		{"0.70^12 [%]", "4", "1.384 %"},
		{"complete_fields(26 mm, 33 mm)", "5", "64 field/wafer"},
		{"30 mJ/cm^2 * 8.58 cm^2 [mJ]", "5", "257.40 mJ"},
	} {
		call(t, "", "eval", "digits "+c.digits, c.statement).wants(t, 0, c.want+"\n", "")
	}
}

func TestEvalRefusesThroughputBeyondOverhead(t *testing.T) {
	const statement = "source_power(34 mJ/cm^2, 400 wafer/h, 96 field/wafer, 8.58 cm^2/field, 9.5 s/wafer, 0.9 %)"
	o := call(t, "", "eval", statement)
	if o.status != 2 || !strings.Contains(o.out, "378.9") || !strings.Contains(o.out, "400 wafer/h") {
		t.Errorf("status %d, want 2 and both 400 wafer/h and the limit of 378.9 wafer/h\n%s", o.status, o.out)
	}
}

func TestEvalStatuses(t *testing.T) {
	dir := inFolder(t, map[string]string{
		"site.budget": "dose_here = 34 mJ/cm^2 at WAFER  # invented\n",
		"bad.budget":  "x = 1 nm + 1 W\n",
	})
	if err := os.Mkdir("lines", 0o755); err != nil {
		t.Fatal(err)
	}
	write(t, "lines/three.budget", "dose_3 = 40 mJ/cm^2 at WAFER\n")
	for name, c := range map[string]struct {
		args     []string
		status   int
		out      string
		problems string
	}{
		"an answer":                   {[]string{"2 nm + 3 nm"}, 0, "5 nm\n", ""},
		"in order":                    {[]string{"a = 2 nm", "b = 2 * a", "b"}, 0, "4 nm\n4 nm\n", ""},
		"a check that holds":          {[]string{"check 2 nm <= 3 nm"}, 0, "holds: 2 nm <= 3 nm\n", ""},
		"a check that fails":          {[]string{"check 4 nm <= 3 nm"}, 1, "fails: 4 nm <= 3 nm\n", ""},
		"the rest after a check":      {[]string{"check 4 nm <= 3 nm", "1 nm"}, 1, "fails: 4 nm <= 3 nm\n1 nm\n", ""},
		"the end of an early quit":    {[]string{"1 nm", "quit", "2 nm"}, 0, "1 nm\n", ""},
		"a minus and a digit":         {[]string{"-3^2"}, 0, "-9\n", ""},
		"a temperature below zero":    {[]string{"-5 degC"}, 0, "-5 °C\n", ""},
		"an option behind":            {[]string{"1 nm", "--json"}, 2, "1 nm\n--json\n…", ""},
		"a block in one argument":     {[]string{"chain pair\n  at IF\n  mirror x2: 50 %\n  at WAFER\nend", "carry(8 W at IF, pair, WAFER)"}, 0, "2 W at WAFER\n", ""},
		"a block in many arguments":   {[]string{"chain pair", "at IF", "mirror: 50 %", "at WAFER", "end", "carry(8 W at IF, pair, WAFER)"}, 0, "4 W at WAFER\n", ""},
		"lines of one argument":       {[]string{"a = 2 nm\na * a"}, 0, "4 nm²\n", ""},
		"a block without end":         {[]string{"chain pair\n  at IF"}, 2, "", "no end"},
		"no statement":                {nil, 2, "", "eval needs a statement"},
		"an unknown option":           {[]string{"--quiet", "1 nm"}, 2, "", "--quiet is no option of eval"},
		"an import":                   {[]string{"--import", "site.budget", "dose_here"}, 0, "34 mJ/cm² at WAFER\n", ""},
		"an import with =":            {[]string{"--import=site.budget", "dose_here"}, 0, "34 mJ/cm² at WAFER\n", ""},
		"an import of no file":        {[]string{"--import", "nowhere.budget", "1 nm"}, 2, "", "nowhere.budget cannot be read"},
		"an import without a name":    {[]string{"--import"}, 2, "", "--import"},
		"an import that is refused":   {[]string{"--import", "bad.budget", "1 nm"}, 2, "", "bad.budget:1"},
		"an import from a folder":     {[]string{"--import", "lines/three.budget", "dose_3"}, 0, "40 mJ/cm² at WAFER\n", ""},
		"an import by its full path":  {[]string{"--import", filepath.Join(dir, "site.budget"), "dose_here"}, 0, "34 mJ/cm² at WAFER\n", ""},
		"a statement that is refused": {[]string{"1 nm + 1 W"}, 2, "1 nm + 1 W\n~~~~   ~~~\n…", ""},
	} {
		t.Run(name, func(t *testing.T) {
			call(t, "", append([]string{"eval"}, c.args...)...).wants(t, c.status, c.out, c.problems)
		})
	}
}

// The first refusal ends it, and says no more than the refusal.
func TestEvalStopsAtRefusal(t *testing.T) {
	alone := call(t, "", "eval", "1 nm + 1 W")
	call(t, "", "eval", "1 nm + 1 W", "2 nm", "check 1 >= 2").wants(t, 2, alone.out, "")
	call(t, "", "eval", "2 nm\n1 nm + 1 W\n3 nm").wants(t, 2, "2 nm\n"+alone.out, "")
}

func TestOtherCalls(t *testing.T) {
	for name, c := range map[string]struct {
		args     []string
		status   int
		has      string
		problems string
	}{
		"no such command":   {[]string{"evaluate"}, 2, "", "evaluate is no command"},
		"help":              {[]string{"help"}, 0, "dosewright replay", ""},
		"help by option":    {[]string{"--help"}, 0, "dosewright eval", ""},
		"help on a topic":   {[]string{"help", "planes"}, 0, "WAFER", ""},
		"help on a row":     {[]string{"help", "throughput"}, 0, "wafer/h", ""},
		"help on nothing":   {[]string{"help", "nowhere"}, 2, "", "no help on nowhere"},
		"version":           {[]string{"version"}, 0, "dosewright ", ""},
		"version by option": {[]string{"--version"}, 0, "dosewright ", ""},
	} {
		t.Run(name, func(t *testing.T) {
			o := call(t, "", c.args...)
			if o.status != c.status || !strings.Contains(o.out, c.has) || c.has == "" && o.out != "" {
				t.Errorf("status %d, printed\n%swant %d and %q", o.status, o.out, c.status, c.has)
			}
			o.complains(t, c.problems)
		})
	}
}

// A new value of an input reaches everything that rests on it, through
// whatever stands between: the answer is that of a session that had the value
// from the start.
func TestEvalNamesStayLive(t *testing.T) {
	for name, between := range map[string]string{
		"a formula":  "y = 3 * x",
		"a chain":    "chain c\n  at IF\n  mirror: x\n  at WAFER\nend\ny = carry(8 W at IF, c, WAFER)",
		"a function": "f(a) = a * x\ny = f(2)",
		"a list":     "l = {x, 2 * x}\ny = mean(l)",
		"a stack":    "stack s\n  bilayer x40: Si x * 8 nm, Mo 2.8 nm\n  substrate: Si\nend\ny = reflectivity(s, 13.5 nm)",
		"a body":     "b = film(Si, x * 100 nm)\ny = transmittance(b)",
		"a material": "material m = Si x * 4.66 g/cm^3\ny = attenuation(m)",
		"two chains": "chain c\n  at IF\n  mirror: x\n  at MID\nend\nchain d\n  at MID\n  rest: number_of(transmission(c, IF, MID))\n  at WAFER\nend\ny = carry(8 W at MID, d, WAFER)",
	} {
		t.Run(name, func(t *testing.T) {
			rest := strings.Split(between, "\n")
			ask := func(first ...string) string {
				o := call(t, "", append([]string{"eval"}, append(first, "z")...)...)
				if o.status != 0 {
					t.Fatalf("status %d\n%s%s", o.status, o.out, o.problems)
				}
				lines := strings.Split(strings.TrimSpace(o.out), "\n")
				return lines[len(lines)-1]
			}
			session := append(append([]string{"x = 50 %"}, rest...), "z = 2 * y")
			was := ask(session...)
			session[0] = "x = 45 %"
			want := ask(session...)
			session[0] = "x = 50 %"
			got := ask(append(session, "x = 45 %")...)
			if got != want || want == was {
				t.Errorf("x from 50 %% to 45 %%: z is %s, want %s (it was %s)", got, want, was)
			}
		})
	}
}
