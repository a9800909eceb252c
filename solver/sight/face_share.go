package sight

import (
	"context"
	"math"

	"enfilade/solver/exact"
)

// shareSteps is how many windows beside the first a share of a face is looked for through. A place that sees the share with a
// thirty-second of the rest of the face to spare sees one of the windows.
const shareSteps = 32

// Share appends to dst the places that see, in one stretch, at least a share of a face, 0 < share < 1: those that see all of
// one of the face's windows, stretches of that share at equal steps from one end to the other, or all of the face. Their ends
// are taken outwards to the grid, on the front of the face or level with it. The Origin of each piece is the index of its
// window.
//
// So no place counts that sees less than the share, and one that sees wider than the share by ShareError does. The windows of a
// slanting face lie up to a grid unit before it: there both may fail for what stands between, and the second within a few
// degrees of the face's line.
//
//   - Errors: ErrOutside, ErrBlind; the context's when it is cancelled.
//   - Cost: that of Whole for each window.
func (f *Finder) Share(ctx context.Context, dst []Piece, c Face, share float64, height int32) (pieces []Piece, windows []Face, err error) {
	n := len(dst)
	windows = c.windows(share)
	for i, w := range windows {
		if err := ctx.Err(); err != nil {
			return dst, windows, err
		}
		before := len(dst)
		if dst, err = f.Whole(dst, w, height); err != nil {
			return dst, windows, err
		}
		level := exact.Orient(c.A, c.B, w.A) == 0 && exact.Orient(c.A, c.B, w.B) == 0
		for k := before; k < len(dst); k++ {
			dst[k].Origin = int32(i)
			if !level {
				dst[k].add(c.front(), true)
			}
		}
	}
	return append(dst[:n], f.Reduced(dst[n:])...), windows, nil
}

// ShareError returns by how much more than a share of a face a place must see in one stretch to be sure to count: a step
// between windows, and what taking both ends of a window to the grid may add.
func ShareError(c Face, share float64) float64 {
	return (1-share)/shareSteps + 4/exact.Dist(c.A, c.B)
}

// windows returns the stretches of a face through which a share of it is looked for, and the face itself.
func (c Face) windows(share float64) []Face {
	length := exact.Dist(c.A, c.B)
	list := []Face{c}
	for i := range shareSteps + 1 {
		from := (1 - share) * length * float64(i) / shareSteps
		w := Face{c.gridAt(from, -1), c.gridAt(from+share*length, 1)}
		if i == 0 {
			w.A = c.A
		}
		if i == shareSteps {
			w.B = c.B
		}
		if w != c && w.A != w.B && w != list[len(list)-1] {
			list = append(list, w)
		}
	}
	return list
}

// gridAt returns the grid point nearest to the face's point at distance s from A that lies on the front or level with it, and
// not further towards B than s, if way is -1, or not less far, if it is 1.
func (c Face) gridAt(s float64, way float64) exact.Pt {
	d := c.B.Sub(c.A)
	length := math.Sqrt(float64(d.Len2()))
	x, y := s*float64(d.X)/length, s*float64(d.Y)/length
	best, found := c.A, math.Inf(1)
	if way > 0 {
		best = c.B
	}
	for dx := -2; dx <= 2; dx++ {
		for dy := -2; dy <= 2; dy++ {
			v := exact.Vec{X: int32(math.Round(x)) + int32(dx), Y: int32(math.Round(y)) + int32(dy)}
			along := float64(d.Dot(v)) / length
			if d.Cross(v) < 0 || (along-s)*way < 0 || along < 0 || along > length {
				continue
			}
			if off := math.Hypot(float64(v.X)-x, float64(v.Y)-y); off < found {
				best, found = c.A.Add(v), off
			}
		}
	}
	return best
}
