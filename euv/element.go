package euv

import (
	_ "embed"
	"encoding/binary"
	"math"
	"sync"

	"example.com/dosewright/units"
)

// packedElements holds the published tables; tables/SOURCES.txt says where
// they are from and how they are laid out.
//
//go:embed tables/elements.bin
var packedElements []byte

// state says what a tabulated density is of.
type state byte

const (
	stateUnknown state = iota
	stateSolid
	stateBoilingLiquid
	stateRoomLiquid
)

// element is one chemical element of the tables. Its scattering factors are
// unpacked when they are first asked for.
type element struct {
	symbol  string
	state   state
	weight  float64       // atomic weight; 0 when the tables have none
	density units.Density // of the state; 0 when the tables have none
	alone   *compound     // the formula that is this element alone
	factors func() *factors
}

// elements finds an element by its symbol. The tables are walked at the first
// question, so that a program which asks none pays nothing.
var elements = sync.OnceValue(func() map[string]*element {
	all := make(map[string]*element, 100)
	for r := (unpacker{packedElements}); len(r.rest) > 0; {
		e := r.element()
		all[e.symbol] = e
	}
	return all
})

// unpacker reads the packed tables from the front.
type unpacker struct{ rest []byte }

func (r *unpacker) bytes(n int) []byte {
	out := r.rest[:n]
	r.rest = r.rest[n:]
	return out
}

func (r *unpacker) number() uint64 {
	v, n := binary.Uvarint(r.rest)
	r.rest = r.rest[n:]
	return v
}

// decimal gives the float64 nearest to the printed number: digits and power of
// ten are both exact, so that one division rounds once.
func (r *unpacker) decimal() float64 {
	v := r.number()
	zigzag := v >> 4
	digits := int64(zigzag>>1) ^ -int64(zigzag&1)
	return float64(digits) / powersOfTen[v&15]
}

var powersOfTen = [16]float64{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15}

const gramPerCubicCentimetre = units.Density(1000) // kg/m³

func (r *unpacker) element() *element {
	symbol := string(r.bytes(int(r.bytes(1)[0])))
	e := &element{symbol: symbol, state: state(r.bytes(1)[0]), weight: r.decimal()}
	e.density = units.Density(r.decimal()) * gramPerCubicCentimetre
	e.alone = &compound{text: symbol, atoms: []atoms{{e, 1}}, weight: e.weight}
	points := unpacker{r.bytes(int(r.number()))}
	e.factors = sync.OnceValue(func() *factors { return points.factors() })
	return e
}

// factors unpacks the points of one element.
func (r *unpacker) factors() *factors {
	f := new(factors)
	for len(r.rest) > 0 {
		energy, f1, f2 := r.decimal(), r.decimal(), r.decimal()
		f.energy = append(f.energy, energy)
		f.f1 = append(f.f1, f1)
		f.f2 = append(f.f2, f2)
	}
	f.power = make([]float64, len(f.energy))
	for i := range len(f.energy) - 1 {
		f.power[i] = math.Log(f.f2[i+1]/f.f2[i]) / math.Log(f.energy[i+1]/f.energy[i])
	}
	return f
}
