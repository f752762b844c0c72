package euv

import "example.com/dosewright/units"

// A plan is a stack with everything that stands twice found once: media, films
// (a medium and a thickness) and faces (two media and a roughness, whichever
// lies above). A mirror of fifty bilayers with a cap has four media, three
// films and three faces; only for those are exponentials and roots computed.
type plan struct {
	media  []Medium // the first is vacuum
	films  []film
	faces  []face
	steps  []step
	top    turn    // from the vacuum above into what lies there
	blocks []block // from the top
}

type film struct {
	medium    int
	thickness float64
}

// face is an interface seen from above.
type face struct {
	above, below int
	variance     float64 // σ²
}

// turn is a face as it occurs in the stack: seen from above or from below,
// which turns the sign of its coefficient. It is the index of the face, plus
// one, negative when seen from below; 0 is no face at all, since the media are
// the same.
type turn int

// block is a sequence of films that repeats: steps from to to.
type block struct {
	times    int
	from, to int
	wrap     turn // from the last film into the first one of the next period
	below    turn // from the last film of all into what lies below
}

// step is a film and the face that leads into it from the film above in the
// same period; the first film has none.
type step struct {
	into turn
	film int
}

// lookBack is how far back a plan looks for what stands twice, so that a stack
// of thousands of different films is planned in little time.
const lookBack = 32

// make plans a checked stack, into the memory of the plan before.
func (p *plan) make(s *Stack) {
	p.media = append(p.media[:0], Index{})
	p.films, p.faces, p.steps, p.blocks = p.films[:0], p.faces[:0], p.steps[:0], p.blocks[:0]
	above := 0
	for i := range s.Repeats {
		above = p.block(&s.Repeats[i], above)
	}
	below := 0
	if s.Substrate != nil {
		below = p.medium(s.Substrate)
	}
	p.into(p.turn(above, below, s.BottomRoughness))
}

// into takes the face below all that is planned so far.
func (p *plan) into(t turn) {
	if n := len(p.blocks); n > 0 {
		p.blocks[n-1].below = t
	} else {
		p.top = t
	}
}

// block plans one sequence below a medium and returns the medium of its last
// film.
func (p *plan) block(r *Repeat, above int) int {
	b := block{times: r.Times, from: len(p.steps)}
	last := above
	for i := range r.Layers {
		l := &r.Layers[i]
		m := p.medium(l.Medium)
		into := p.turn(last, m, l.Roughness)
		if i == 0 {
			p.into(into)
			into = 0
		}
		p.steps = append(p.steps, step{into, p.film(film{m, float64(l.Thickness)})})
		last = m
	}
	if b.to = len(p.steps); b.times > 1 {
		b.wrap = p.turn(last, p.films[p.steps[b.from].film].medium, r.Layers[0].Roughness)
	}
	p.blocks = append(p.blocks, b)
	return last
}

func (p *plan) medium(m Medium) int {
	for i := max(0, len(p.media)-lookBack); i < len(p.media); i++ {
		if p.media[i] == m {
			return i
		}
	}
	p.media = append(p.media, m)
	return len(p.media) - 1
}

func (p *plan) film(f film) int {
	for i := max(0, len(p.films)-lookBack); i < len(p.films); i++ {
		if p.films[i] == f {
			return i
		}
	}
	p.films = append(p.films, f)
	return len(p.films) - 1
}

func (p *plan) turn(above, below int, roughness units.Length) turn {
	if above == below {
		return 0
	}
	f := face{above, below, float64(roughness) * float64(roughness)}
	for i := max(0, len(p.faces)-lookBack); i < len(p.faces); i++ {
		switch p.faces[i] {
		case f:
			return turn(i + 1)
		case face{below, above, f.variance}:
			return -turn(i + 1)
		}
	}
	p.faces = append(p.faces, f)
	return turn(len(p.faces))
}
