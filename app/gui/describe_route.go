package gui

import (
	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// describeRoute is the form of a route: where it begins and ends, and how far it is on foot, leg by leg.
func (w *window) describeRoute(c *card, p *plan.Plan, x plan.Route) {
	c.title, c.icon, c.where = "Route", "waypoint", counted(x.Via.Len(), "waypoint")+", each leg by the shortest walk"
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
	walk, known := w.results.route(x.ID)
	c.facts, c.legs = w.walkFacts(walk, known), w.legRows(p, x)
	if c.fault = routeFault(walk); c.fault == "" {
		c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindRoute, ID: x.ID})
	}
}
