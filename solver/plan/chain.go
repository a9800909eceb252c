package plan

import (
	"iter"
	"slices"

	"enfilade/solver/exact"
)

// Chain is a fixed sequence of points. The zero Chain is empty.
type Chain struct{ pts []exact.Pt }

// ChainOf returns the chain through pts, which it copies.
func ChainOf(pts ...exact.Pt) Chain {
	if len(pts) == 0 {
		return Chain{}
	}
	return Chain{slices.Clone(pts)}
}

// Len returns the number of points.
func (c Chain) Len() int { return len(c.pts) }

// At returns point i.
func (c Chain) At(i int) exact.Pt { return c.pts[i] }

// All yields the points in order.
func (c Chain) All() iter.Seq2[int, exact.Pt] { return slices.All(c.pts) }

// Points returns a copy of the points.
func (c Chain) Points() []exact.Pt { return slices.Clone(c.pts) }

// Closed reports whether the chain repeats its first point at its end and encloses something.
func (c Chain) Closed() bool { return len(c.pts) > 3 && c.pts[0] == c.pts[len(c.pts)-1] }

// Equal reports whether both chains run through the same points.
func (c Chain) Equal(d Chain) bool { return slices.Equal(c.pts, d.pts) }
