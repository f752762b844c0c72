package syntax

import "slices"

// Use is a name that a statement uses, where it stands, and the set of names
// in which to look for it.
type Use struct {
	Name
	Of UseKind
}

// UseKind is a set of names.
type UseKind int

// The sets of names.
const (
	OfValue    UseKind = iota // values, lists, chains and stacks; else a material
	OfFunction                // functions of the session or the catalogue
	OfMaterial                // materials; else a value
	OfCase
	OfTable
)

// Uses lists the names that an action uses, in the order of the text. The
// parameters of a function are its own and are left out.
func Uses(a Action) []Use {
	var u uses
	switch a := a.(type) {
	case *Show:
		u.in(a.X)
	case *Define:
		u.in(a.X)
	case *DefineFunction:
		u.in(a.X)
		u = slices.DeleteFunc(u, func(x Use) bool {
			return x.Of == OfValue && slices.ContainsFunc(a.Params, func(p Param) bool { return p.Name == x.Name.Name })
		})
	case *Material:
		u.in(a.X)
	case *Block:
		for _, l := range a.Lines {
			u.in(l.Times)
			u.in(l.Items...)
		}
	case *Check:
		u.in(a.X, a.Y, a.Within)
	case *Walk:
		u.add(OfValue, Name{a.Chain, a.ChainAt})
		u.in(a.X)
	case *Command:
		u.add(OfValue, a.Names...)
	default:
		u.studied(a)
	}
	slices.SortStableFunc(u, func(a, b Use) int { return a.Where.Start - b.Where.Start })
	return u
}

// Defined is the name that an action gives, and where it stands.
func Defined(a Action) (Name, bool) {
	switch a := a.(type) {
	case *Define:
		return Name{a.Name, a.NameAt}, true
	case *DefineFunction:
		return Name{a.Name, a.NameAt}, true
	case *Block:
		return Name{a.Name, a.NameAt}, true
	case *Material:
		return Name{a.Name, a.NameAt}, true
	case *Case:
		return Name{a.Name, a.NameAt}, true
	case *Data:
		return Name{a.Name, a.NameAt}, true
	}
	return Name{}, false
}

type uses []Use

func (u *uses) add(of UseKind, names ...Name) {
	for _, n := range names {
		*u = append(*u, Use{n, of})
	}
}

// in adds the names of expressions; nil is none.
func (u *uses) in(xs ...Expr) {
	for _, x := range xs {
		if x == nil {
			continue
		}
		Each(x, func(x Expr) {
			switch x := x.(type) {
			case *Name:
				u.add(OfValue, *x)
			case *Call:
				u.add(OfFunction, Name{x.Func, x.FuncAt})
			case *Layer:
				u.add(OfMaterial, x.Material)
			}
		})
	}
}

func (u *uses) columns(list ...Column) {
	for _, c := range list {
		u.in(c.X)
	}
}

func (u *uses) axes(list ...Axis) {
	for _, x := range list {
		u.add(OfValue, Name{x.Name, x.NameAt})
		u.in(x.From, x.To, x.By, x.Points)
	}
}

// studied adds the names of a statement that runs a formula many times.
func (u *uses) studied(a Action) {
	switch a := a.(type) {
	case *Budget:
		u.columns(a.Of)
	case *Propagate:
		u.columns(a.Of)
		for _, o := range a.Options {
			u.in(o.X)
		}
	case *Correlation:
		u.add(OfValue, a.A, a.B)
		u.in(a.X)
	case *Sweep:
		u.axes(a.Axes...)
		u.columns(a.Columns...)
	case *Search:
		u.in(a.X, a.Y)
		u.axes(a.Axis)
	case *Fit:
		u.in(a.X, a.Y)
		u.add(OfTable, a.Data)
		u.add(OfValue, a.Names...)
	case *Case:
		for _, s := range a.Sets {
			u.add(OfValue, Name{s.Name, s.NameAt})
			u.in(s.X)
		}
	case *Compare:
		u.columns(a.Columns...)
		u.add(OfCase, a.Cases...)
	}
}
