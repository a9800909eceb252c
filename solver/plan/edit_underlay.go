package plan

import "math"

// SetUnderlay places a picture to trace over, or changes the one that is there.
type SetUnderlay struct{ Underlay Underlay }

// Label says what the edit does.
func (s SetUnderlay) Label() string { return "place underlay" }

// Apply puts the underlay in the place of the one before, if any.
func (s SetUnderlay) Apply(p *Plan) (*Plan, error) {
	u := s.Underlay
	if text := u.fault(); text != "" {
		return nil, fault(KindUnderlay, "", text)
	}
	d := draftOf(p)
	d.sheet().Underlay = &u
	return d.plan(), nil
}

// MaxMMPerPixel is the largest scale of an underlay: one pixel is a kilometre wide.
const MaxMMPerPixel = 1e6

func (u *Underlay) fault() string {
	return firstOf(
		unless(u.Image != "", "needs a picture"),
		unless(InRange(u.At), outOfRange),
		unless(u.MMPerPixel > 0 && u.MMPerPixel <= MaxMMPerPixel, "needs a pixel above 0 and up to 1000000 mm wide"),
		unless(u.Opacity >= 0 && u.Opacity <= 1, "needs an opacity from 0 to 1"),
		unless(!math.IsNaN(u.Turn) && !math.IsInf(u.Turn, 0), "needs an angle"),
	)
}
