package gui

import "enfilade/solver/plan"

// newBody chooses where the body of new walls lies, or that they have none; J and H do the same while a wall is drawn.
func (w *window) newBody() field {
	d := &w.measures
	f := field{label: "Body", choices: []string{"centred on the line", "left of the line", "right of the line", "none, a thin line"},
		chosen: int(d.Justify), pick: func(i int) error {
			d.Thin = i == 3
			if !d.Thin {
				d.Justify = plan.Justify(i)
			}
			w.acted()
			return nil
		}}
	if d.Thin {
		f.chosen = 3
	}
	return f
}
