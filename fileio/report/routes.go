package report

import (
	"strconv"

	"github.com/paulmach/orb"

	"enfilade/solver/study"
)

// jsonRoute is one entry of "routes".
type jsonRoute struct {
	Route     string      `json:"route"`
	From      string      `json:"from"`
	To        *string     `json:"to"` // null where it ends at its last waypoint
	Problem   *string     `json:"problem"`
	LengthMM  *float64    `json:"length_mm"`
	Seconds   *float64    `json:"seconds"`
	Legs      []jsonLeg   `json:"legs"` // up to the first that is closed
	Points    []orb.Point `json:"points"`
	ClosedLeg *int        `json:"closed_leg"` // from 1
	Reason    *string     `json:"reason"`
}

// jsonLeg is one leg of a route.
type jsonLeg struct {
	To       string   `json:"to"`
	LengthMM *float64 `json:"length_mm"`
	Seconds  *float64 `json:"seconds"`
}

func routeEntry(r study.Route) any {
	e := &jsonRoute{Route: r.ID, From: r.From, To: words(r.To), Problem: words(r.Problem), Reason: words(r.Reason)}
	if r.Problem != "" && r.Closed == 0 {
		return e
	}
	e.Legs, e.Points = make([]jsonLeg, 0, len(r.Legs)), points(r.Points)
	for _, l := range r.Legs {
		e.Legs = append(e.Legs, jsonLeg{l.To, number(l.Length), number(l.Seconds)})
	}
	if r.Closed > 0 {
		e.ClosedLeg = &r.Closed
		return e
	}
	e.LengthMM, e.Seconds = number(r.Length), number(r.Seconds)
	return e
}

// routes is left out where there is nothing to tell: not every plan has routes. Each leg has a line of its own.
func (t *texter) routes() {
	if len(t.result.Routes) == 0 {
		return
	}
	u := t.unit
	pace := strconv.FormatFloat(t.plan.Walker().Pace, 'g', -1, 64)
	t.b.WriteString("\nEach route on foot over its waypoints, every leg by the shortest walk, at " + pace + " m/s\n")
	table := table{columns: []column{{"route", false}, {"from", false}, {"to", false}, {"walk " + u.name, true}, {"s", true}, {"", false}}}
	for _, r := range t.result.Routes {
		start, _ := t.plan.Start(r.From)
		row := []string{r.ID, label(r.From, start.Name), t.routeEnd(r)}
		switch {
		case r.Problem != "" && len(r.Legs) == 0:
			table.add(append(row, r.Problem)...)
			continue
		case r.Problem != "":
			table.add(append(row, "none", "", r.Problem)...)
		case r.Closed > 0:
			table.add(append(row, "none", "", "to "+r.ClosedTo+": "+r.Reason)...)
		default:
			table.add(append(row, u.length(r.Length), decimal(r.Seconds, 1), "")...)
		}
		if len(r.Legs)+min(r.Closed, 1) < 2 {
			continue
		}
		for _, l := range r.Legs {
			table.add("", "", "  "+l.To, u.length(l.Length), decimal(l.Seconds, 1), "")
		}
		if r.Closed > 0 {
			table.add("", "", "  "+r.ClosedTo, "none", "", "")
		}
	}
	table.write(&t.b)
}

// routeEnd names what a route leads to.
func (t *texter) routeEnd(r study.Route) string {
	if r.To == "" {
		return "its last waypoint"
	}
	target, _ := t.plan.Target(r.To)
	return label(r.To, target.Name)
}
