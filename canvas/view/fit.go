package view

import (
	"math"

	"github.com/paulmach/orb"
)

// The frame around the plan, in px at 100 %.
const (
	Ruler        = 22 // width of the rulers along the top and the left
	MarginTop    = 22 // between the upper ruler and a fitted plan
	MarginBottom = 32 // below a fitted plan: scale bar and title slip stand there
	MarginSide   = 64 // beside a fitted plan: start mats stand outside the doors
)

// A plan with nothing in it opens on so many mm about this place: some rooms side by side, in a picture of any size.
const (
	emptyWide, emptyHigh = 24500, 19500
	emptyCX, emptyCY     = 10000, 8000
	wholePixelPerMetre   = 8 // from here on a fitted plan has a whole number of device pixels per metre
)

// Fit returns the camera that shows bounds, in mm, inside the rulers and margins of a picture of w by h device pixels.
//
// Its scale is cut to a whole number of device pixels per metre and the lower left corner of bounds lies on a pixel's
// corner, so that walls and grid lines on whole metres are sharp. Bounds without extent in either direction (an empty
// plan, a single point) are shown with as much around them as some rooms take.
func Fit(bounds orb.Bound, w, h int, k float64) Camera {
	left, top := (Ruler+MarginSide)*k, (Ruler+MarginTop)*k
	right, bottom := float64(w)-MarginSide*k, float64(h)-MarginBottom*k
	c := Camera{W: w, H: h, K: k, Scale: wholePixels(fitScale(right-left, emptyWide, bottom-top, emptyHigh, k)), CX: emptyCX, CY: emptyCY}
	bw, bh := bounds.Max[0]-bounds.Min[0], bounds.Max[1]-bounds.Min[1]
	switch {
	case !(bw >= 0 && bh >= 0): // the empty bound has Max below Min
		bounds = orb.Bound{Min: orb.Point{emptyCX, emptyCY}, Max: orb.Point{emptyCX, emptyCY}}
		bw, bh = 0, 0
	case bw > 0 || bh > 0:
		c.Scale = wholePixels(fitScale(right-left, bw, bottom-top, bh, k))
	}
	c.CX, c.CY = bounds.Min[0], bounds.Min[1]
	// Shift the lower left corner from the picture's centre to its place in the frame, on a whole pixel.
	x := math.Round(left + (right-left-bw*c.Scale)/2)
	y := math.Round(bottom - (bottom-top-bh*c.Scale)/2)
	return c.Pan(x-float64(w)/2, y-float64(h)/2)
}

// fitScale returns the largest scale at which bw by bh mm fit into w by h pixels, within the zoom's ends.
func fitScale(w, bw, h, bh, k float64) float64 {
	s := MaxZoom * k
	if bw > 0 {
		s = min(s, max(w, 1)/bw)
	}
	if bh > 0 {
		s = min(s, max(h, 1)/bh)
	}
	return max(s, MinZoom*k)
}

func wholePixels(scale float64) float64 {
	if perMetre := scale * 1000; perMetre >= wholePixelPerMetre {
		return math.Floor(perMetre) / 1000
	}
	return scale
}
