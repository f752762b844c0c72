package terminal

import (
	"context"
	"fmt"
	"strconv"
	"strings"
)

// adder is a small engine: it adds whole numbers, counts the lines of a block
// from "open" to "end", and can be told to take long, to fail and to leave.
type adder struct {
	open    bool
	lines   int
	waiting func() // called when it takes long
}

var adderWords = []string{"photon_count", "photon_energy", "power", "λ_peak", "λ_rest"}

func (a *adder) Feed(ctx context.Context, line string) Answer {
	word := strings.TrimSpace(line)
	switch {
	case a.open && word != "end":
		a.lines++
		return Answer{More: true}
	case a.open:
		a.open = false
		return answer(Plain, fmt.Sprintf("%d lines", a.lines))
	}
	switch word {
	case "":
		return Answer{}
	case "open":
		a.open, a.lines = true, 0
		return Answer{More: true}
	case "wait":
		a.waiting()
		<-ctx.Done()
		return answer(Refusal, "stopped")
	case "hang":
		a.waiting()
		select {}
	case "fail":
		panic("out of cheese")
	case "draw":
		return Answer{Chart: func(int) []string { panic("out of paint") }}
	case "quit":
		return Answer{Quit: true}
	}
	return sum(word)
}

func sum(text string) Answer {
	total := 0
	for part := range strings.SplitSeq(text, "+") {
		n, err := strconv.Atoi(strings.TrimSpace(part))
		if err != nil {
			return Answer{Lines: []Line{
				{Text: text},
				{Text: strings.Repeat("~", len([]rune(text))), Kind: Mark},
				{Text: strings.TrimSpace(part) + " is no number", Kind: Refusal},
			}}
		}
		total += n
	}
	return answer(Good, strconv.Itoa(total))
}

func (a *adder) Abandon() { a.open = false }

func (a *adder) Complete(line string, cursor int) (int, []string) {
	if line == "fail" {
		panic("out of cheese")
	}
	start := strings.LastIndexAny(line[:cursor], " (+") + 1
	var fit []string
	for _, word := range adderWords {
		if strings.HasPrefix(word, line[start:cursor]) {
			fit = append(fit, word)
		}
	}
	return start, fit
}

func (a *adder) Hint(line string, cursor int) string {
	name, arguments, inCall := strings.Cut(line[:cursor], "(")
	if !inCall || strings.Contains(arguments, ")") {
		return ""
	}
	return name + "(wavelength)"
}

func answer(kind Kind, text string) Answer {
	return Answer{Lines: []Line{{Text: text, Kind: kind}}}
}
