package paint

import (
	"image"
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Photo is a picture to trace over, ready to be drawn at any zoom. It never changes; raster.NewPhoto makes it.
type Photo struct {
	W, H   int           // pixels
	Levels []*image.RGBA // the picture itself, then each half as large as the one before
	Light  bool          // dark lines on a light ground, as a drawing on paper
}

// ImageStyle is a photo in its place.
type ImageStyle struct {
	Photo *Photo
	// Place takes a photo's pixels to device pixels: x = Place[0]·px + Place[1]·py + Place[2], and y likewise with the other
	// three.
	Place    [6]float64
	Strength float64 // 0 to 1
	Inverse  bool    // its lightness is turned round, and its hues are kept: chalk on slate
}

// UnderlayCorners returns the corners of an underlay of so many pixels, counter-clockwise from its lower left one, in mm.
func UnderlayCorners(u *plan.Underlay, w, h int) [4]orb.Point {
	x, y := float64(u.At.X)/exact.PerMM, float64(u.At.Y)/exact.PerMM
	sin, cos := math.Sincos(u.Turn * math.Pi / 180)
	a, b := float64(w)*u.MMPerPixel, float64(h)*u.MMPerPixel
	return [4]orb.Point{{x, y}, {x + cos*a, y + sin*a}, {x + cos*a - sin*b, y + sin*a + cos*b}, {x - sin*b, y + cos*b}}
}

// underlay lists the picture to trace over. It follows the plan that is shown, also while it is being moved.
func (p *pen) underlay() {
	u, photo := p.s.Plan.Sheet().Underlay, p.s.Photo
	if u == nil || photo == nil || u.Hidden || u.Opacity <= 0 || !p.s.layer(LayerUnderlay) {
		return
	}
	c := UnderlayCorners(u, photo.W, photo.H)
	if !p.sees([]place{p.mm(c[0]), p.mm(c[1]), p.mm(c[2]), p.mm(c[3])}) {
		return
	}
	top, s := p.mm(c[3]), u.MMPerPixel*p.cam.Scale
	sin, cos := math.Sincos(u.Turn * math.Pi / 180)
	p.Images = append(p.Images, ImageStyle{Photo: photo, Strength: u.Opacity, Inverse: photo.Light && luma(p.theme.Floor) < 0.5,
		Place: [6]float64{cos * s, sin * s, top.x, -sin * s, cos * s, top.y}})
	p.Ops = append(p.Ops, Op{Kind: Image, Style: int32(len(p.Images) - 1)})
}

// underlayOutline adds the border of the underlay.
func (p *pen) underlayOutline() {
	u, photo := p.s.Plan.Sheet().Underlay, p.s.Photo
	if u == nil || photo == nil || u.Hidden {
		return
	}
	ring := p.work.ring[:0]
	for _, q := range UnderlayCorners(u, photo.W, photo.H) {
		ring = append(ring, p.mm(q))
	}
	p.work.ring = ring
	p.addRing(p.frame, ring)
}

// luma is how light a colour is, 0 to 1, by the weights of ITU-R BT.601.
func luma(c interface{ RGBA() (r, g, b, a uint32) }) float64 {
	r, g, b, _ := c.RGBA()
	return (0.299*float64(r) + 0.587*float64(g) + 0.114*float64(b)) / 0xFFFF
}
