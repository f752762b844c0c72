package program

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"
	"time"
)

// blockNames are the open inputs of the formulas below.
var blockNames = []string{"a", "b", "c", "d"}

// written makes a random formula: arithmetic, powers of all kinds, branches,
// calls of the catalogue with words and with a limit that is not there, and the
// names y and z, which hold formulas themselves.
func written(random *rand.Rand, depth int) string {
	if depth == 0 || random.IntN(6) == 0 {
		leaves := []string{"a", "b", "c", "d", "y", "z", "1.5", "0", "2", "u", "pi"}
		return leaves[random.IntN(len(leaves))]
	}
	x, y := written(random, depth-1), written(random, depth-1)
	switch random.IntN(16) {
	case 0:
		return "(-" + x + ")"
	case 1:
		return fmt.Sprintf("(%s)^%d", x, random.IntN(25)-8)
	case 2:
		return "(" + x + ")^" + []string{"(1/2)", "(1/3)", "(-1/2)", "(5/6)", "0.5"}[random.IntN(5)]
	case 3:
		return "(" + x + ")^(" + y + ")"
	case 4:
		return fmt.Sprintf("if(%s %s %s, %s, %s)", x, []string{"<", "<=", ">", ">="}[random.IntN(4)], y, written(random, depth-1), written(random, depth-1))
	case 5:
		return "max(" + x + ", " + y + ")"
	case 6:
		return []string{"ln", "sqrt", "slope", "capped"}[random.IntN(4)] + "(" + x + ")"
	case 7:
		return "capped(" + x + ", " + []string{"none", "1.5", y}[random.IntN(3)] + ")"
	case 8:
		return "slope(" + x + ", tone = negative)"
	case 9, 10:
		return "(" + x + "/" + y + ")"
	case 11, 12:
		return "(" + x + "+" + y + ")"
	case 13:
		return "(" + x + "-" + y + ")"
	}
	return "(" + x + "*" + y + ")"
}

// lanesOf draws inputs, among them exact zeros and values that overflow soon.
func lanesOf(random *rand.Rand, slots, width int) [][]float64 {
	rows := make([][]float64, slots)
	for i := range rows {
		for range width {
			x := 4*random.Float64() - 2
			switch random.IntN(60) {
			case 0:
				x = 0
			case 1:
				x = 1.5
			case 2:
				x *= 1e200
			}
			rows[i] = append(rows[i], x)
		}
	}
	return rows
}

// A block of lanes gives what single runs give, bit for bit, stops at the same
// lane and for the same reason, and goes on behind it.
func TestBlocksAreRunsBitForBit(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 8))
	stopped, whole, single := 0, 0, 0
	for range 3000 {
		d := newDesk()
		holds(t, d, "a = 1\nb = 1\nc = 1\nd = 1\nu = 1.2 ± 0.1\ny = a*b + c\nz = y/d")
		texts := []string{written(random, 4)}
		if random.IntN(3) == 0 {
			texts = append(texts, written(random, 3), "y*"+texts[0])
		}
		var nodes []*Node
		for _, text := range texts {
			nodes = append(nodes, checked(t, d, text))
		}
		p, err := CompileAll(nodes, d.resolve, Opening{Inputs: blockNames, Sources: true})
		if err != nil {
			t.Fatal(err)
		}
		width := 1 + random.IntN(40)
		in := lanesOf(random, len(blockNames)+len(p.Sources), width)
		block, f := p.Block(), p.NewFrame()
		want, slots := make([]float64, len(nodes)), make([]float64, len(in))
		for start := 0; start < width; {
			n, blockErr := block(from(in, start), from(room(len(nodes), width), start))
			out := room(len(nodes), width-start)
			if n2, _ := block(from(in, start), out); n2 != n {
				t.Fatalf("%q: stops at %d, then at %d", texts, n, n2)
			}
			for lane := start; lane < width; lane++ {
				for s := range in {
					slots[s] = in[s][lane]
				}
				err := p.RunAll(f, slots, want)
				if reached := lane-start < n; reached != (err == nil) {
					t.Fatalf("%q, lane %d: a run says %v, the block %d and %v", texts, lane, err, n, blockErr)
				}
				if err != nil {
					if blockErr.Error() != err.Error() || !sameNode(blockErr, err) {
						t.Fatalf("%q, lane %d: a run says %v, the block %v", texts, lane, err, blockErr)
					}
					break
				}
				for k := range want {
					if math.Float64bits(want[k]) != math.Float64bits(out[k][lane-start]) {
						t.Fatalf("%q, lane %d: a run gives %v, the block %v", texts[k], lane, want[k], out[k][lane-start])
					}
				}
			}
			if blockErr != nil {
				stopped++
			} else {
				whole++
			}
			start += n + 1
		}
		if strings.Contains(texts[0], "if(") {
			single++
		}
	}
	t.Logf("%d blocks had values in all lanes, %d stopped; %d formulas with branches", whole, stopped, single)
	if stopped < 1000 || whole < 1000 || single < 300 {
		t.Error("the formulas do not cover what they should")
	}
}

func room(rows, width int) [][]float64 {
	out := make([][]float64, rows)
	for k := range out {
		out[k] = make([]float64, width)
	}
	return out
}

func from(rows [][]float64, start int) [][]float64 {
	var cut [][]float64
	for _, r := range rows {
		cut = append(cut, r[start:])
	}
	return cut
}

func sameNode(a, b error) bool {
	var x, y *RunError
	return errors.As(a, &x) && errors.As(b, &y) && x.Node == y.Node
}

// Products of many factors and sums of products are fused into few passes; what
// is used elsewhere too is computed once and kept.
func TestFusedLoops(t *testing.T) {
	d := newDesk()
	holds(t, d, "a = 1\nb = 1\nc = 1\nd = 1\ny = a*b*c")
	for text, loops := range map[string]int{
		"a*b": 1, "a*b*c": 1, "a*b*c*d*a*b*c": 1, "a*b + c": 1, "c + a*b": 1, "a*b*c + d": 2, "a*b + c*d": 2,
		"y + y": 2, "y*d": 1, "y*d + y": 2, "2*a": 1, "a": 0, "a*b*c^2*d/(a*b + c)": 4,
	} {
		p, err := Compile(checked(t, d, text), d.resolve, blockNames...)
		if err != nil {
			t.Fatal(err)
		}
		b := &blocks{program: p, of: map[*Node]*lane{}, parents: map[*Node]int{}, named: p.Inputs}
		for i := range p.Inputs {
			b.inputs = append(b.inputs, &lane{slot: i})
		}
		b.count(p.nodes[0])
		b.emit(p.nodes[0])
		if len(b.loops) != loops || b.single {
			t.Errorf("%s takes %d passes, want %d", text, len(b.loops), loops)
		}
	}
}

func TestBlockAllocatesNothing(t *testing.T) {
	p := compiled(t)
	block, random := p.Block(), rand.New(rand.NewPCG(1, 2))
	in, out := lanesOf(random, len(formulaNames), Lanes), room(1, Lanes)
	for i := range in {
		for k := range in[i] {
			in[i][k] = 1 + math.Abs(math.Mod(in[i][k], 1))
		}
	}
	if n := testing.AllocsPerRun(100, func() {
		if n, err := block(in, out); n != Lanes || err != nil {
			t.Fatal(n, err)
		}
	}); n != 0 {
		t.Errorf("a block of %s allocates %v times", formula, n)
	}
}

// BenchmarkBlock reports the time for one sample, in the fastest block: other work
// on the machine only slows.
func BenchmarkBlock(b *testing.B) {
	p := compiled(b)
	block, v := p.Block(), formulaValues()
	in, out := room(len(v), Lanes), room(1, Lanes)
	for i := range in {
		for k := range in[i] {
			in[i][k] = v[i] * (1 + float64(k)/1e4)
		}
	}
	fastest := time.Hour
	for b.Loop() {
		start := time.Now()
		if _, err := block(in, out); err != nil {
			b.Fatal(err)
		}
		fastest = min(fastest, time.Since(start))
	}
	b.ReportMetric(float64(fastest.Nanoseconds())/Lanes, "ns/sample")
}
