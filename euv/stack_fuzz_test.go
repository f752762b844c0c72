package euv

import (
	"encoding/binary"
	"errors"
	"math"
	"testing"

	"example.com/dosewright/units"
)

// numbers reads a fuzzer's bytes as numbers: some as they come, NaN included,
// most squeezed into a range in which stacks mean something.
type numbers struct{ rest []byte }

func (n *numbers) whole(below int) int {
	if len(n.rest) == 0 {
		return 0
	}
	b := n.rest[0]
	n.rest = n.rest[1:]
	return int(b) % below
}

func (n *numbers) float(low, high float64) float64 {
	raw := n.whole(16) == 0
	var b [8]byte
	n.rest = n.rest[copy(b[:], n.rest):]
	u := binary.LittleEndian.Uint64(b[:])
	if raw {
		return math.Float64frombits(u)
	}
	return low + (high-low)*float64(u>>11)/(1<<53)
}

func (n *numbers) stack() Stack {
	media := []Medium{
		Index{},
		Index{n.float(-0.2, 0.9), n.float(0, 1)},
		Index{n.float(-0.01, 0.2), 0},
		sure(SolidElement("Si")), sure(SolidElement("Mo")), sure(SolidElement("Sn")), nil,
	}
	var s Stack
	for range n.whole(4) {
		r := Repeat{Times: n.whole(100)}
		for range n.whole(5) {
			l := Layer{Medium: media[n.whole(len(media))], Thickness: units.Length(n.float(0, 20e-9))}
			if n.whole(4) == 0 {
				l.Roughness = units.Length(n.float(0, 1e-9))
			}
			if n.whole(16) == 0 {
				l.Thickness *= 1e5
			}
			r.Layers = append(r.Layers, l)
		}
		s.Repeats = append(s.Repeats, r)
	}
	s.Substrate = media[n.whole(len(media))]
	return s
}

// Whatever the stack: a typed error, or R and T between 0 and 1, their sum at
// most 1.
func FuzzStack(f *testing.F) {
	f.Add([]byte{})
	f.Add([]byte("a stack of some layers, in some order, on some substrate, seen at some angle, as these letters say"))
	f.Add([]byte{1, 9, 9, 9, 9, 9, 9, 9, 9, 1, 9, 9, 9, 9, 9, 9, 9, 9, 1, 9, 9, 9, 9, 9, 9, 9, 9, 1, 50, 2, 3, 1, 0, 0, 0, 0, 0, 0, 0, 128, 1, 1, 4, 1, 0, 0, 0, 0, 0, 0, 0, 64, 1, 1, 3, 0})
	f.Fuzz(func(t *testing.T, data []byte) {
		n := &numbers{data}
		s := n.stack()
		wavelength, angle := units.Length(n.float(4.2e-9, 40e-9)), units.Angle(n.float(0, math.Pi/2))
		pol := Polarization(n.whole(4))
		r, err := Reflectivity(s, wavelength, angle, pol, 0)
		checkShare(t, s, r.Value, err)
		passed, err2 := Transmittance(s, wavelength, angle, pol)
		checkShare(t, s, passed.Value, err2)
		if err == nil && err2 == nil && r.Value+passed.Value > 1+1e-9 {
			t.Fatalf("%v: R + T − 1 = %g", s, r.Value+passed.Value-1)
		}
	})
}

func checkShare(t *testing.T, s Stack, v units.Ratio, err error) {
	t.Helper()
	var asBody *BodyError
	var asArgument *ArgumentError
	var asFormula *FormulaError
	switch {
	case err == nil && !(v >= 0 && v <= 1):
		t.Fatalf("%v gives %g", s, v)
	case err != nil && (v != 0 || !errors.As(err, &asBody) && !errors.As(err, &asArgument) && !errors.As(err, &asFormula)):
		t.Fatalf("%v gives %g with %v", s, v, err)
	}
}
