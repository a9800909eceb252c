package gui

import (
	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// describeRoute is the form of a route: where it begins and ends, and how long it is as drawn.
func (w *window) describeRoute(c *card, p *plan.Plan, x plan.Route) {
	c.title, c.icon, c.where = "Route", "waypoint", counted(x.Via.Len(), "waypoint")+", straight from point to point"
	put := func(label string, change func(*plan.Route)) error {
		change(&x)
		return w.doEdit(tool.Named(label, plan.SetRoute{Route: x}))
	}
	var starts, targets []string
	from := field{label: "From", chosen: -1, pick: func(i int) error {
		return put("change start of route", func(x *plan.Route) { x.From = starts[i] })
	}}
	for _, s := range p.Starts() {
		if s.ID == x.From {
			from.chosen = len(starts)
		}
		starts = append(starts, s.ID)
		from.choices = append(from.choices, named(s.ID, s.Name))
	}
	to := field{label: "To", choices: []string{"its last waypoint"}, pick: func(i int) error {
		return put("change end of route", func(x *plan.Route) { x.To = targets[i] })
	}}
	targets = append(targets, "")
	for _, t := range p.Targets() {
		if t.ID == x.To {
			to.chosen = len(targets)
		}
		targets = append(targets, t.ID)
		to.choices = append(to.choices, named(t.ID, t.Name))
	}
	c.fields = []field{from, to}
	sum := 0.0
	pts := pick.RoutePoints(p, x)
	for i := 1; i < len(pts); i++ {
		sum += exact.Dist(pts[i-1], pts[i])
	}
	const perMetre = 1000 * exact.PerMM
	c.facts = []fact{{w.host.FormatLength(sum), "as drawn"}, {number(sum/perMetre/p.Walker().Pace, 1) + " s", "at the walker's pace"}}
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindRoute, ID: x.ID})
}
