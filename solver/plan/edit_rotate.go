package plan

import (
	"math"

	"enfilade/solver/exact"
)

// Rotate turns items about a point, counter-clockwise. Quarter turns are exact; by any other angle each point is rounded to
// the grid once. Openings keep their place along their wall.
type Rotate struct {
	Items   []Ref
	About   exact.Pt
	Degrees float64
	Copy    bool // leave the items where they are and turn copies of theirs
}

// Label names the item when there is but one.
func (e Rotate) Label() string { return labelled("rotate", e.Items) }

// labelled is the label of an edit of items: what it does, and the item when there is but one.
func labelled(what string, items []Ref) string {
	if len(items) == 1 {
		return what + " " + items[0].Kind.String()
	}
	return what + " items"
}

// Apply turns all items or none: an item that is not in the plan or would leave the legal range is an error, and so is an
// opening without its wall.
func (e Rotate) Apply(p *Plan) (*Plan, error) {
	if math.IsNaN(e.Degrees) || math.Abs(e.Degrees) > 3600 {
		return nil, fault(KindPlan, "", "needs an angle from -3600 to 3600 degrees")
	}
	return e.motion().apply(p, e.Items, e.Copy)
}

func (e Rotate) motion() motion {
	m := motion{what: "rotated", angle: func(deg float64) float64 { return fullTurn(deg + e.Degrees) }}
	if quarters := e.Degrees / 90; quarters == math.Trunc(quarters) {
		m.whole = true
		n := (int(quarters)%4 + 4) % 4
		m.point = func(p exact.Pt) (exact.Pt, bool) {
			x, y := int64(p.X)-int64(e.About.X), int64(p.Y)-int64(e.About.Y)
			for range n {
				x, y = -y, x
			}
			return gridPt(int64(e.About.X)+x, int64(e.About.Y)+y)
		}
		return m
	}
	sin, cos := math.Sincos(math.Mod(e.Degrees, 360) * math.Pi / 180)
	m.point = func(p exact.Pt) (exact.Pt, bool) {
		x, y := float64(p.X)-float64(e.About.X), float64(p.Y)-float64(e.About.Y)
		return gridPt(int64(math.Round(float64(e.About.X)+x*cos-y*sin)), int64(math.Round(float64(e.About.Y)+x*sin+y*cos)))
	}
	return m
}
