package euv

import "fmt"

// BodyError says that a body cannot be asked for something: a rough stack for
// its transmittance, a gas column for its reflectivity.
type BodyError struct {
	Body  string // what it is, as "a stack with rough interfaces"
	Asked string // what was asked, as "transmittance"
	Why   string // why not, and one way on
}

func (e *BodyError) Error() string {
	return fmt.Sprintf("%s of %s: %s", e.Asked, e.Body, e.Why)
}
