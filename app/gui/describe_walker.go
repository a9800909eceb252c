package gui

import (
	"errors"
	"fmt"

	"enfilade/canvas/tool"
	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// describeWalker is what the form offers of the person who walks.
func (w *window) describeWalker(walker plan.Walker) []field {
	put := func(label string, change func(*plan.Walker)) error {
		change(&walker)
		return w.doEdit(tool.Named(label, plan.SetWalker{Walker: walker}))
	}
	radius := w.lengthField("Radius", walker.Radius, func(v int32) error {
		switch {
		case v < 0:
			return errors.New("not below 0, please")
		case v > arrange.MaxRadius:
			return errors.New("2 m at most, please")
		}
		return put("change walker's radius", func(k *plan.Walker) { k.Radius = v })
	})
	radius.under = radiusWords(walker.Radius)
	return []field{
		headed("Walker", w.lengthField("Eye height", walker.Eye, func(v int32) error {
			return put("change walker's eye", func(k *plan.Walker) { k.Eye = v })
		})),
		radius,
		{label: "Pace", unit: "m/s", text: trimDecimals(walker.Pace, 1, 3), set: func(text string) error {
			v, err := parseNumber(text)
			if err != nil {
				return err
			}
			return put("change pace", func(k *plan.Walker) { k.Pace = v })
		}},
	}
}

// radiusWords says what a walker's radius means to the walks: by how much the polygon that stands for the body may keep them
// farther off.
func radiusWords(radius int32) string {
	if radius <= 0 {
		return "a point: walks touch corners"
	}
	_, excess := arrange.Disc(min(radius, arrange.MaxRadius))
	return fmt.Sprintf("walks keep at most %.1f mm more", excess/exact.PerMM)
}
