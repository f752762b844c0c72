package syntax

// Span is a range of bytes in the text of a statement.
type Span struct{ Start, End int }

// Join returns the smallest span that holds both.
func (s Span) Join(t Span) Span { return Span{min(s.Start, t.Start), max(s.End, t.End)} }

// Error is the one error of the language: what is wrong, with both sides
// named, one way on, and where. Cause is for errors.Is and errors.As.
type Error struct {
	Marks []Span
	Msg   string
	Hint  string
	Cause error
}

func (e *Error) Error() string {
	if e.Hint == "" {
		return e.Msg
	}
	return e.Msg + "; " + e.Hint
}

func (e *Error) Unwrap() error { return e.Cause }

// Fail makes an error with one mark.
func Fail(at Span, msg, hint string) *Error {
	return &Error{Marks: []Span{at}, Msg: msg, Hint: hint}
}
