package view

import (
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
)

// Camera says which part of the plan a picture shows.
//
//   - The plan's point (CX, CY), in mm, lies at the picture's centre (W/2, H/2).
//   - Scale is positive; a picture without one (the zero Camera) shows nothing.
//   - W and H include the rulers along the top and the left.
type Camera struct {
	CX, CY float64 // mm at the picture's centre
	Scale  float64 // device pixels per mm
	W, H   int     // device pixels
	K      float64 // device pixels per px at 100 %
}

// The zoom's ends, in px per mm: the legal range of the plan (100 km) fits into 500 px, and a grid unit has 10 px.
const (
	MinZoom = 5e-6
	MaxZoom = 100
)

// Pixel returns the place of a grid point in the picture, in device pixels from its upper left corner.
func (c Camera) Pixel(p exact.Pt) (x, y float64) {
	return c.PixelMM(orb.Point{float64(p.X) / exact.PerMM, float64(p.Y) / exact.PerMM})
}

// PixelMM returns the place of a point given in mm.
func (c Camera) PixelMM(p orb.Point) (x, y float64) {
	return float64(c.W)/2 + (p[0]-c.CX)*c.Scale, float64(c.H)/2 - (p[1]-c.CY)*c.Scale
}

// MM returns the plan's point under a pixel place, in mm. It is the inverse of PixelMM but for rounding.
func (c Camera) MM(x, y float64) orb.Point {
	return orb.Point{c.CX + (x-float64(c.W)/2)/c.Scale, c.CY - (y-float64(c.H)/2)/c.Scale}
}

// Grid returns the grid point nearest to a pixel place, held inside the legal range.
func (c Camera) Grid(x, y float64) exact.Pt {
	p := c.MM(x, y)
	return exact.Pt{X: toGrid(p[0]), Y: toGrid(p[1])}
}

func toGrid(mm float64) int32 {
	const end = exact.Limit - 1
	return int32(math.Round(min(max(mm*exact.PerMM, -end), end)))
}

// Length returns the length of so many grid units in device pixels.
func (c Camera) Length(units int32) float64 { return float64(units) / exact.PerMM * c.Scale }

// PerMetre returns the px at 100 % that one metre takes: what fades and ruler steps go by.
func (c Camera) PerMetre() float64 { return c.Scale * 1000 / c.K }

// ZoomAt returns the camera magnified by factor, with the plan's point under the pixel place (x, y) staying there.
// The zoom stops at its ends.
func (c Camera) ZoomAt(x, y, factor float64) Camera {
	p := c.MM(x, y)
	c.Scale = min(max(c.Scale*factor, MinZoom*c.K), MaxZoom*c.K)
	c.CX = p[0] - (x-float64(c.W)/2)/c.Scale
	c.CY = p[1] + (y-float64(c.H)/2)/c.Scale
	return c
}

// Pan returns the camera with the plan moved by (dx, dy) device pixels, y down: what a drag by that much wants.
func (c Camera) Pan(dx, dy float64) Camera {
	c.CX -= dx / c.Scale
	c.CY += dy / c.Scale
	return c
}

// Resize returns the camera for another picture size, with the same centre and the same scale in px at 100 %.
func (c Camera) Resize(w, h int, k float64) Camera {
	if c.K > 0 {
		c.Scale *= k / c.K
	}
	c.W, c.H, c.K = w, h, k
	return c
}

// Window returns the part of the plan inside the picture, in mm, with a rim of so many device pixels around it.
func (c Camera) Window(rim float64) orb.Bound {
	a := c.MM(-rim, float64(c.H)+rim)
	b := c.MM(float64(c.W)+rim, -rim)
	return orb.Bound{Min: a, Max: b}
}
