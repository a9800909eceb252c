package gui

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"enfilade/canvas/tool"
	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// describeWalker is what the form offers of the person who walks in p.
func (w *window) describeWalker(p *plan.Plan) []field {
	walker := p.Walker()
	put := func(label string, change func(*plan.Walker)) error {
		change(&walker)
		return w.doEdit(tool.Named(label, plan.SetWalker{Walker: walker}))
	}
	radius := w.lengthField("Radius", walker.Radius, func(v int32) error {
		return w.within(v, 0, plan.MaxBodyRadius, func() error {
			return put("change walker's radius", func(k *plan.Walker) { k.Radius = v })
		})
	})
	radius.under = radiusWords(walker.Radius, arrange.Sides(p))
	return append([]field{
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
	}, describeSeen(walker, put)...)
}

// errShare is what a form says of a share that is none.
var errShare = errors.New("above 0 and up to 100 %, please")

// firstShare is the share of a face that is asked for before anyone has typed one.
const firstShare = 0.5

// describeSeen is what the form offers of how much of a target's face counts as seen.
func describeSeen(walker plan.Walker, put func(string, func(*plan.Walker)) error) []field {
	kinds := []plan.SeenKind{plan.SeenAny, plan.SeenShare, plan.SeenAll}
	seen := field{label: "Seen is", choices: []string{"any part of a face", "a share of it", "all of it"},
		chosen: slices.Index(kinds, walker.Seen), pick: func(i int) error {
			return put("change what counts as seen", func(k *plan.Walker) {
				if k.Seen = kinds[i]; k.Seen == plan.SeenShare && k.Share == 0 {
					k.Share = firstShare
				}
			})
		}}
	if walker.Seen != plan.SeenShare {
		return []field{seen}
	}
	return []field{seen, {label: "Share", unit: "%", text: trimDecimals(100*walker.Share, 0, 4), note: "in one stretch",
		set: func(text string) error {
			v, err := parseNumber(strings.TrimSuffix(strings.TrimSpace(text), "%"))
			switch {
			case err != nil:
				return err
			case v <= 0 || v > 100:
				return errShare
			}
			return put("change share", func(k *plan.Walker) { k.Share = v / 100 })
		}}}
}

// radiusWords says what a walker's radius means to the walks: by how much the polygon that stands for the body, with so many
// sides, may keep them farther off.
func radiusWords(radius int32, sides int) string {
	if radius <= 0 {
		return "a point: walks touch corners"
	}
	_, excess := arrange.Disc(min(radius, plan.MaxBodyRadius), sides)
	return fmt.Sprintf("walks keep at most %.1f mm more", excess/exact.PerMM)
}
