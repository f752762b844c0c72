package units

import (
	"math"
	"strings"
	"testing"
)

// What the prompt prints for a value in the trade's unit of its dimension, at
// five digits; every dimension with a habit stands here.
func TestText(t *testing.T) {
	s := Standard()
	covered := map[Dimension]bool{}
	for _, c := range []struct{ number, unit, want string }{
		{"13.5", "nm", "13.500 nm"},
		{"13.577", "nm", "13.577 nm"},
		{"1", "nm", "1 nm"},
		{"0.01", "nm", "0.010000 nm"},
		{"0.009", "nm", "9 pm"},
		{"0.5", "pm", "0.50000 pm"},
		{"999.9999999999999", "nm", "1 µm"},
		{"999.99999", "nm", "1000.0 nm"},
		{"999.99", "nm", "999.99 nm"},
		{"1000", "nm", "1 µm"},
		{"-13.5", "nm", "-13.500 nm"},
		{"0", "nm", "0 m"},
		{"300", "mm", "300 mm"},
		{"2", "m", "2 m"},
		{"1.5e6", "km", "1.5000e6 km"},
		{"400", "nm^2", "400 nm²"},
		{"1", "µm^2", "1 µm²"},
		{"858", "mm^2", "8.5800 cm²"},
		{"0", "m^2", "0 m²"},
		{"8", "nm^3", "8 nm³"},
		{"2", "mL", "2 cm³"},
		{"1", "L", "1 L"},
		{"3", "m^3", "3 m³"},
		{"8", "s", "8 s"},
		{"8", "ms", "8 ms"},
		{"0.3", "ns", "300 ps"},
		{"3600", "s", "1 h"},
		{"3599", "s", "3.5990 ks"},
		{"47", "h", "47 h"},
		{"14", "d", "14 d"},
		{"1.9", "year", "693.98 d"},
		{"10", "year", "10 year"},
		{"-8", "s", "-8 s"},
		{"300", "mm/s", "300 mm/s"},
		{"2", "nm/min", "0.033333 nm/s"},
		{"24", "m/s^2", "24 m/s²"},
		{"1", "µg", "1 µg"},
		{"250", "kg", "250 kg"},
		{"180", "t", "180 t"},
		{"2.33", "g/cm^3", "2.3300 g/cm³"},
		{"5", "N", "5 N"},
		{"5", "kN", "5 kN"},
		{"5", "Pa", "5 Pa"},
		{"1", "atm", "101.33 kPa"},
		{"1", "mTorr", "133.32 mPa"},
		{"91.84015", "eV", "91.840 eV"},
		{"0.5", "eV", "500 meV"},
		{"1.5", "keV", "1.5000 keV"},
		{"10", "keV", "1.6022 fJ"},
		{"21.2", "J", "21.200 J"},
		{"9.632", "kWh", "34.675 MJ"},
		{"0", "eV", "0 J"},
		{"250", "W", "250 W"},
		{"1310", "kW", "1.3100 MW"},
		{"2.1", "mW", "2.1000 mW"},
		{"30", "mJ/cm^2", "30 mJ/cm²"},
		{"30.1", "mJ/cm^2", "30.100 mJ/cm²"},
		{"2", "J/cm^2", "2000 mJ/cm²"},
		{"20", "J/cm^2", "20 J/cm²"},
		{"5", "nJ/cm^2", "5 nJ/cm²"},
		{"0", "J/m^2", "0 mJ/cm²"},
		{"-30", "mJ/cm^2", "-30 mJ/cm²"},
		{"0.5", "µJ/cm^2", "500 nJ/cm²"},
		{"1.5", "W/cm^2", "1.5000 W/cm²"},
		{"3", "mJ*nm^3", "3 mJ·nm³"},
		{"2", "nC", "2 nC"},
		{"163.3", "µC/cm^2", "163.30 µC/cm²"},
		{"3", "mA", "3 mA"},
		{"400", "V", "400 V"},
		{"50", "ohm", "50 Ω"},
		{"3", "pF", "3 pF"},
		{"0.5", "T", "500 mT"},
		{"50", "kHz", "50000 s⁻¹"},
		{"5", "/µm", "5 µm⁻¹"},
		{"12", "/nm", "12 nm⁻¹"},
		{"3", "/m", "3 m⁻¹"},
		{"0.679606", "nm^-2", "0.67961 nm⁻²"},
		{"20.388", "nm^-2", "20.388 nm⁻²"},
		{"1e12", "cm^-2", "0.010000 nm⁻²"},
		{"7", "cm^-2", "7 cm⁻²"},
		{"2", "nm^-3", "2 nm⁻³"},
		{"295", "K", "295 K"},
		{"2", "mK", "2 mK"},
		{"0.5", "ppm/K", "0.50000 ppm/K"},
		{"3", "mmol", "3 mmol"},
		{"1.5", "L/min", "1.5000 L/min"},
		{"5", "mL/min", "5 mL/min"},
		{"149", "W/(m*K)", "149 W/(m·K)"},
		{"0.702", "J/(g*K)", "702 J/(kg·K)"},
		{"3", "s/cm^2", "3 s/cm²"},
		{"4", "W/m", "4 W/m"},
		{"5", "cm^2/s", "5 cm²/s"},
		{"160", "wafer/h", "160 wafer/h"},
		{"20", "s/wafer", "20 s/wafer"},
		{"21.2", "J/wafer", "21.200 J/wafer"},
		{"9.632", "kWh/wafer", "9.6320 kWh/wafer"},
		{"5200", "J/wafer", "5.2000 kJ/wafer"},
		{"96", "field/wafer", "96 field/wafer"},
		{"9600", "field/h", "9600 field/h"},
		{"858", "mm^2/field", "8.5800 cm²/field"},
		{"706.86", "cm^2/wafer", "706.86 cm²/wafer"},
		{"257.4", "mJ/field", "257.40 mJ/field"},
		{"60", "ms/field", "60 ms/field"},
		{"600", "die/wafer", "600 die/wafer"},
		{"25", "wafer", "25 wafer"},
		{"96", "field", "96 field"},
		{"4", "die", "4 die"},
		{"60.48", "Gpulse", "60.480 Gpulse"},
		{"50", "kpulse/s", "50 kpulse/s"},
		{"5", "mJ/pulse", "5 mJ/pulse"},
		{"2", "µJ/(cm^2*pulse)", "2 µJ/(cm²·pulse)"},
		{"0.1653", "%/Gpulse", "0.16530 %/Gpulse"},
		{"0.0106", "1", "0.010600"},
		{"64", "1", "64"},
		{"1e20", "1", "1.0000e20"},
		{"70", "%", "0.70000"},
		// without a habit: base units, with counted things where there are any
		{"3", "H", "3 kg·m²/(s²·A²)"},
		{"2", "m^(1/2)", "2 m^(1/2)"},
		{"3", "W/wafer", "3 W/wafer"},
		{"5", "mJ/(cm^2*wafer)", "5 mJ/(cm²·wafer)"},
		{"7", "wafer*m", "7 wafer·m"},
		{"7", "wafer/(die*h)", "0.0019444 wafer/(die·s)"},
		{"2", "die*field", "2 field·die"},
	} {
		u := parse(t, c.unit)
		si, err := u.ReadDifference(c.number)
		if err != nil {
			t.Fatal(err)
		}
		covered[u.dim] = true
		if got := s.Text(New(si, u.dim), 5); got != c.want {
			t.Errorf("%s %s is written %s, want %s", c.number, c.unit, got, c.want)
		}
	}
	for d := range s.habits() {
		if !covered[d] {
			t.Errorf("nothing of the dimension %s (%s) is written", d, s.Name(d))
		}
	}
}

// Every word of the table of habits is read, no dimension stands there twice,
// and every unit of a row has the dimension of the row.
func TestHabitRows(t *testing.T) {
	s := Standard()
	rows, seen := 0, map[Dimension]string{}
	for line := range strings.Lines(habitRows) {
		words := strings.Fields(line)
		if len(words) == 0 {
			continue
		}
		rows++
		if len(words) < 2 {
			t.Fatalf("%q is no row", line)
		}
		first := s.readRungs(words[1])
		if len(first) == 0 {
			t.Fatalf("%s: %s is no unit", words[0], words[1])
		}
		d := first[0].unit.dim
		if other, ok := seen[d]; ok {
			t.Errorf("%s and %s are one dimension, %s", words[0], other, d)
		}
		seen[d] = words[0]
		for _, word := range words[1:] {
			rungs := s.readRungs(word)
			if len(rungs) == 0 {
				t.Errorf("%s: %s is no unit", words[0], word)
			}
			for _, r := range rungs {
				if r.unit.dim != d || r.from <= 0 || math.IsInf(r.from, 0) {
					t.Errorf("%s: %s is %s from %g", words[0], r.unit, r.unit.dim, r.from)
				}
			}
		}
		if s.Name(d) == "" || s.UnitText(d) == "" {
			t.Errorf("%s has no name or no unit", d)
		}
	}
	if rows != len(s.habits()) {
		t.Errorf("%d rows make %d habits", rows, len(s.habits()))
	}
}

func TestNames(t *testing.T) {
	s := Standard()
	for text, want := range map[string][2]string{
		"1": {"number", "1"}, "J/m^2": {"fluence", "mJ/cm²"}, "W": {"power", "W"}, "m": {"length", "m"}, "J": {"energy", "J"},
		"N": {"force", "N"}, "T": {"magnetic flux density", "T"}, "wafer/h": {"throughput", "wafer/h"}, "H": {"", "kg·m²/(s²·A²)"},
		"kat": {"", "mol/s"}, "J*m^3": {"energy·volume", "mJ·nm³"}, "s/wafer": {"time/wafer", "s/wafer"}, "W/m^2": {"irradiance", "W/cm²"},
	} {
		d := parse(t, text).dim
		if s.Name(d) != want[0] || s.UnitText(d) != want[1] {
			t.Errorf("%s is called %q in %q, want %q", text, s.Name(d), s.UnitText(d), want)
		}
	}
}

func TestTextIn(t *testing.T) {
	s := Standard()
	for _, c := range []struct {
		si     float64
		unit   string
		digits int
		want   string
	}{
		{295.15, "°C", 5, "22 °C"},
		{273.15, "degC", 5, "0 °C"},
		{300, "°C", 5, "26.850 °C"},
		{0, "°C", 5, "-273.15 °C"},
		{math.Pi / 30, "deg", 5, "6°"},
		{math.Pi / 10800, "arcmin", 5, "1′"},
		{math.Pi / 648000, "arcsec", 5, "1″"},
		{math.Pi / 180, "deg^2", 3, "57.3 °²"},
		{0.7, "%", 5, "70 %"},
		{0.0106, "%", 3, "1.06 %"},
		{13.5e-9, "Å", 5, "135 Å"},
		{0.5, "1", 3, "0.500"},
		{6e23, "photon", 3, "6.00e23 photon"},
		{-1e-3, "K", 1, "-0.001 K"},
		{1e3, "nm/nm", 2, "1000 nm/nm"},
	} {
		if got := s.TextIn(c.si, parse(t, c.unit), c.digits); got != c.want {
			t.Errorf("%g in %s is written %s, want %s", c.si, c.unit, got, c.want)
		}
	}
	if got := Of(Fluence(300)).String(); got != "30 mJ/cm²" {
		t.Errorf("as a Stringer: %s", got)
	}
}

func TestFormatNumber(t *testing.T) {
	for _, c := range []struct {
		v      float64
		digits int
		want   string
	}{
		{0, 5, "0"},
		{math.Copysign(0, -1), 5, "0"},
		{64, 5, "64"},
		{-64, 1, "-64"},
		{999999, 2, "999999"},
		{1e6, 5, "1.0000e6"},
		{91.84015, 5, "91.840"},
		{1.69901e19, 5, "1.6990e19"},
		{12345.6, 5, "12346"},
		{123456.7, 5, "123457"},
		{999999.6, 5, "1.0000e6"},
		{999.996, 5, "1000.0"},
		{0.00012345, 5, "0.00012345"},
		{0.000099999999, 5, "0.00010000"},
		{1e-5, 5, "1.0000e-5"},
		{-1e-5, 1, "-1e-5"},
		{0.99999999, 5, "1.0000"},
		{0.9999999999999999, 5, "1"},
		{64.00000000000001, 5, "64"},
		{64.00000000000001, 17, "64.000000000000014"},
		{1. / 3, 3, "0.333"},
		{1. / 3, 17, "0.33333333333333331"},
		{1. / 3, 99, "0.33333333333333331"},
		{1. / 3, 0, "0.3"},
		{1. / 3, -5, "0.3"},
		{2.5, 1, "2"},
		{5e-324, 3, "4.94e-324"},
		{math.MaxFloat64, 3, "1.80e308"},
		{math.Inf(-1), 3, "-Inf"},
		{math.NaN(), 3, "NaN"},
	} {
		if got := FormatNumber(c.v, c.digits); got != c.want {
			t.Errorf("%.17g with %d digits is %s, want %s", c.v, c.digits, got, c.want)
		}
	}
}

func TestBetween(t *testing.T) {
	s, lot, err := Standard().WithCounted("lot")
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ from, to, want string }{
		{"J/m^2", "W", "area/time"},
		{"W", "J", "time"},
		{"J", "W", "1/time"},
		{"W/m^2", "J/m^2", "time"},
		{"m", "m^4", "volume"},
		{"W", "W/m^3", "1/volume"},
		{"s", "m", "length/time"},
		{"m", "s", "time/length"},
		{"C", "A", "1/time"},
		{"1", "A/K", "current/temperature"},
		{"1", "1/(m*s)", "1/(length·time)"},
		{"1", "m*s", "length·time"},
		{"J", "J/wafer", "1/wafer"},
		{"wafer", "1", "1/wafer"},
		{"s", "s*field^2/wafer", "field²/wafer"},
		{"m", "mol*m", "amount of substance"},
		{"J", "J", ""},
		{"J", "kg", "time²/area"},
		{"J", "J^2", ""},
		{"m", "m^5", ""},
		{"1", "m^(1/2)", ""},
		{"1", "mol^2", ""},
		{"1", "cd", ""},
		{"m^-21", "m^21", ""},
		{"m", "wafer^4*m", ""},
	} {
		if got := s.Between(parse(t, c.from).dim, parse(t, c.to).dim); got != c.want {
			t.Errorf("from %s to %s: %q, want %q", c.from, c.to, got, c.want)
		}
	}
	if got := s.Between(Dimension{}, lot.Of()); got != "lot" {
		t.Errorf("from a number to lots: %q", got)
	}
}
