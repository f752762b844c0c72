package program

import (
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Node is one checked piece of a formula. Nodes are never changed once made,
// and they share: a node may have several parents.
type Node struct {
	Type  Type
	At    syntax.Span // in the text of the owner's statement
	Owner string      // the name whose formula this is; "" for the statement at hand
	op    op
	args  []*Node
	value float64   // of a constant; exponent of a power
	name  string    // of a reference
	text  string    // of a text
	fn    *Function // of a call
	cmp   string    // of a comparison
	chain *Chain

	spread *Spread // of an uncertain input

	body     Body      // of a body
	spectral *spectral // of an in-band factor
	inner    []*Node   // formulas of a program of its own, over the running wavelength
}

type op int

const (
	opConst op = iota
	opRef
	opNeg
	opAdd
	opSub
	opMul
	opDiv
	opPower // constant exponent in value
	opPow   // both operands are numbers
	opCompare
	opIf
	opCall
	opList
	opText
	opChain
	opInput    // a place that whoever runs the program fills
	opSame     // its operand, of another type
	opBody     // its numbers are its operands
	opSpectral // an in-band factor of a chain
	opSource   // an uncertain input: its value, unless whoever runs the program fills it
)

// Text returns the text of a text.
func (n *Node) Text() string { return n.text }

// Chain returns the chain of a chain.
func (n *Node) Chain() *Chain { return n.chain }

// Constant returns the value of a constant.
func (n *Node) Constant() (float64, bool) { return n.value, n.op == opConst }

// Names calls yield for every name that the formula rests on directly, in the
// order of the text, again for every time it stands there.
func (n *Node) Names(yield func(name string)) { n.names(map[*Node]bool{}, yield) }

func (n *Node) names(seen map[*Node]bool, yield func(string)) {
	n.each(seen, func(n *Node) {
		if n.op == opRef {
			yield(n.name)
		}
	})
}

// each calls visit for the node and all below it, chains included, once each.
func (n *Node) each(seen map[*Node]bool, visit func(*Node)) {
	if seen[n] {
		return
	}
	seen[n] = true
	visit(n)
	for _, a := range n.args {
		a.each(seen, visit)
	}
	for _, a := range n.inner {
		a.each(seen, visit)
	}
	if n.chain != nil {
		for _, s := range n.chain.Steps {
			for _, a := range s.nodes() {
				a.each(seen, visit)
			}
		}
	}
}

// NewConstant makes the node of a named constant.
func NewConstant(v units.Quantity) *Node {
	return &Node{op: opConst, value: v.SI(), Type: Type{Dim: v.Dimension()}}
}

// NewList makes the node of a list of quantities of one dimension.
func NewList(values []units.Quantity, points bool) *Node {
	n := &Node{op: opList, Type: Type{Kind: List, Points: points}}
	for _, v := range values {
		n.Type.Dim = v.Dimension()
		item := NewConstant(v)
		if points {
			item.Type.Kind = Point
		}
		n.args = append(n.args, item)
	}
	return n
}

// Item is the type of one value of a list.
func Item(list *Node) Type { return list.Type.item() }

// Items returns the nodes of a list's items.
func Items(n *Node, resolve Resolve) []*Node {
	for n.op == opRef {
		to, err := resolve(n.name)
		if err != nil {
			return nil
		}
		n = to
	}
	return n.args
}
