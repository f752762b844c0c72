package euv

import (
	"fmt"
	"strings"

	"example.com/dosewright/units"
)

// wordOf is the String of the types whose values are words.
func wordOf(typeName string, words []string, i int) string {
	if i < 0 || i >= len(words) {
		return fmt.Sprintf("%s(%d)", typeName, i)
	}
	return words[i]
}

// known refuses a value that is none of the words.
func known(name string, words []string, i int) error {
	if i < 0 || i >= len(words) {
		return outside(name, units.Count(i), strings.Join(words, " or "))
	}
	return nil
}
