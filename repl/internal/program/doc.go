// Package program gives a tree its meaning: it checks names, dimensions,
// planes and counted things, and compiles what it checked to a program over
// plain float64 values.
package program

// Notes for maintainers.
//
// Checking turns a syntax tree into a graph of Nodes; the tree stays as it
// is. A Node knows its Type (kind, dimension, plane), its place in the text and
// the name that owns that text. At run time only numbers are left: planes,
// units and kinds live in the checker and cost nothing when a program runs.
//
// The graph shares: an argument that a session function uses twice is one
// Node with two parents, and so is a name. Compile gives every shared Node a
// place of its own in the Frame and computes it once. What stands in a branch
// of an if alone is computed only when the branch is taken.
//
// A reference to a name is resolved when a graph is compiled, not when it is
// checked: to a number where the session knows the value, which is the cheap
// way to print an answer, or to the name's own Node where a study varies what
// it rests on.
