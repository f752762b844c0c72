package terminal

import (
	"io"
	"strings"
)

// margin stands before every line that the tool prints in a session.
const margin = "| "

// printer writes replies.
type printer struct {
	out     io.Writer
	colours bool
	columns func() int
}

func newPrinter(options Options) *printer {
	file := terminalOf(options.Out)
	return &printer{
		out:     options.Out,
		colours: options.colours(),
		columns: func() int { return columns(file) },
	}
}

// print writes an answer in one piece, so that nothing comes between its lines.
func (p *printer) print(answer Answer) error {
	text := p.format(answer)
	if text == "" {
		return nil
	}
	_, err := io.WriteString(p.out, text)
	return err
}

func (p *printer) format(answer Answer) string {
	var b strings.Builder
	for _, line := range answer.Lines {
		p.line(&b, line)
	}
	if answer.Chart != nil {
		for _, text := range answer.Chart(p.columns() - len(margin)) {
			p.line(&b, Line{Text: text})
		}
	}
	return b.String()
}

// line writes one line behind the margin. A text with line breaks becomes
// several.
func (p *printer) line(b *strings.Builder, line Line) {
	for text := range strings.SplitSeq(line.Text, "\n") {
		text = visible(strings.TrimSuffix(text, "\r"))
		b.WriteString(p.paint(margin, dim))
		b.WriteString(p.paint(text, line.Kind.colour()))
		b.WriteByte('\n')
	}
}

func (p *printer) paint(text, code string) string {
	if !p.colours || code == "" || text == "" {
		return text
	}
	return "\x1b[" + code + "m" + text + "\x1b[0m"
}

// dim is the colour of the margin (ECMA-48, select graphic rendition).
const dim = "2"

// colour gives the code of a kind: weights, and hues that can be read on dark
// and on light.
func (k Kind) colour() string {
	switch k {
	case Mark:
		return "31"
	case Refusal:
		return "1"
	case Warning:
		return "35"
	case Good:
		return "32"
	case Bad:
		return "1;31"
	}
	return ""
}
