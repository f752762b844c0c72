package chart

import (
	"math"

	"example.com/dosewright/repl"
)

// family is a chart of n curves: exponentials that fall at different rates.
func family(n int) *repl.Picture {
	p := &repl.Picture{
		Title: "Transmission of a film",
		X:     repl.Axis{Name: "thickness", Unit: "nm"},
		Y:     repl.Axis{Name: "transmission"},
	}
	for k := range n {
		s := repl.Series{Name: "α = " + figure(float64(k+1), float64(n), 0) + " µm⁻¹"}
		for i := range 101 {
			x := float64(i)
			s.X = append(s.X, x)
			s.Y = append(s.Y, math.Exp(-float64(k+1)*x/300))
		}
		p.Lines = append(p.Lines, s)
	}
	return p
}

// spectrum is one curve with a narrow peak, and a gap.
func spectrum() *repl.Picture {
	s := repl.Series{Name: "reflectance"}
	for i := range 2001 {
		x := 12.5 + 2*float64(i)/2000
		d := (x - 13.5) / 0.25
		y := 0.7/(1+d*d*d*d) + 0.02*math.Cos(20*x)
		if i > 1500 && i < 1600 {
			y = math.NaN()
		}
		s.X, s.Y = append(s.X, x), append(s.Y, y)
	}
	return &repl.Picture{
		X: repl.Axis{Name: "wavelength", Unit: "nm"}, Y: repl.Axis{Name: "reflectance"},
		Lines: []repl.Series{s},
	}
}

// hill is a map with a summit, a saddle and a blank corner.
func hill(columns, rows int) *repl.Picture {
	g := &repl.Grid{Head: "width / nm"}
	for i := range columns {
		g.X = append(g.X, -80+160*float64(i)/float64(columns-1))
	}
	for j := range rows {
		g.Y = append(g.Y, 20+20*float64(j)/float64(rows-1))
		var row []float64
		for i := range columns {
			x, y := g.X[i]/40, (g.Y[j]-30)/5
			z := 16 + 6*math.Exp(-(x-1)*(x-1)-y*y) + 4*math.Exp(-(x+1)*(x+1)-y*y/2)
			if x+y > 2.8 {
				z = math.NaN()
			}
			row = append(row, z)
		}
		g.Z = append(g.Z, row)
	}
	return &repl.Picture{
		Title: "Width through focus and dose",
		X:     repl.Axis{Name: "defocus", Unit: "nm"}, Y: repl.Axis{Name: "dose", Unit: "mJ/cm²"},
		Grid: g,
	}
}

// bell is a histogram of a normal density, with an interval of 95 %.
func bell(n int) *repl.Picture {
	b := &repl.Bars{Low: 30 - 1.96*1.5, High: 30 + 1.96*1.5}
	for i := range n + 1 {
		b.Edges = append(b.Edges, 24+12*float64(i)/float64(n))
	}
	for i := range n {
		z := ((b.Edges[i]+b.Edges[i+1])/2 - 30) / 1.5
		b.Density = append(b.Density, math.Exp(-z*z/2)/(1.5*math.Sqrt(2*math.Pi)))
	}
	return &repl.Picture{
		Title: "Dose at the wafer",
		X:     repl.Axis{Name: "dose", Unit: "mJ/cm²"}, Y: repl.Axis{Name: "density", Unit: "cm²/mJ"},
		Bars: b,
	}
}

// decades is a chart with two logarithmic axes.
func decades() *repl.Picture {
	p := &repl.Picture{
		X: repl.Axis{Name: "pressure", Unit: "Pa", Log: true}, Y: repl.Axis{Name: "rate", Unit: "s⁻¹", Log: true},
		Lines: []repl.Series{{Name: "first"}, {Name: "second"}},
	}
	for i := range 61 {
		x := math.Pow(10, -3+float64(i)/10)
		p.Lines[0].X, p.Lines[0].Y = append(p.Lines[0].X, x), append(p.Lines[0].Y, 2e-9*x)
		p.Lines[1].X, p.Lines[1].Y = append(p.Lines[1].X, x), append(p.Lines[1].Y, 1e-6*math.Sqrt(x))
	}
	return p
}

// samples are pictures of all kinds, the odd ones among them.
func samples() map[string]*repl.Picture {
	plain := func(name string, x, y []float64) *repl.Picture {
		return &repl.Picture{
			X: repl.Axis{Name: "x"}, Y: repl.Axis{Name: name, Unit: "W"},
			Lines: []repl.Series{{Name: name, X: x, Y: y}},
		}
	}
	nan := math.NaN()
	long := family(3)
	long.Title = "A title that is much too long for one line and so must be cut before it leaves the picture on either side, whatever it says"
	long.Lines[0].Name = "a curve whose name is much too long to stand beside the chart as it is"
	return map[string]*repl.Picture{
		"family5": family(5), "family12": family(12), "spectrum": spectrum(), "decades": decades(),
		"hill": hill(41, 31), "hill-coarse": hill(6, 5), "bell": bell(40), "bell-fine": bell(5000),
		"long": long, "one-point": plain("power", []float64{3}, []float64{250}),
		"constant":   plain("power", []float64{1, 2, 3}, []float64{250, 250, 250}),
		"gaps":       plain("power", []float64{1, 2, 3, 4, 5, 6}, []float64{1, nan, 2, nan, 3, 4}),
		"small":      plain("power", []float64{1e-9, 2e-9, 3e-9}, []float64{1e19, 1.5e19, 3e19}),
		"close":      plain("power", []float64{1, 2, 3}, []float64{13.50001, 13.50002, 13.500015}),
		"half-cycle": plain("power", []float64{0, 1, 2, 3, 4}, []float64{0, -3, 4, -2, 1}),
	}
}
