package report

import (
	"fmt"
	"io"
	"slices"
	"strconv"
	"strings"

	"github.com/paulmach/orb"

	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// Text writes the result as tables: what each observer sees, where each target is seen from, the approaches, how
// far the zones are, the routes, the problems, and the caution. Whose eye each table is for stands in its heading.
//
//   - Units: the plan's display unit, named in the headings; areas in m², or square feet.
//   - Errors: those of w.
func Text(w io.Writer, p *plan.Plan, r *study.Result) error {
	t := &texter{plan: p, result: r, unit: measureFor(p.Sheet().Unit)}
	t.title()
	t.sight()
	t.seenFrom()
	t.approaches()
	t.reach()
	t.routes()
	t.problems()
	t.b.WriteString("\n" + Caution + "\n")
	_, err := io.WriteString(w, t.b.String())
	return err
}

type texter struct {
	b      strings.Builder
	plan   *plan.Plan
	result *study.Result
	unit   measure
}

func (t *texter) title() {
	sheet := t.plan.Sheet()
	parts := []string{"Untitled plan"}
	if sheet.Title != "" {
		parts[0] = sheet.Title
	}
	if sheet.Place != "" {
		parts = append(parts, sheet.Place)
	}
	t.b.WriteString(strings.Join(parts, " · ") + "\n")
}

// eye names the walker's eye, which all but the observers' own regions are for.
func (t *texter) eye() string {
	return "in the plane of the walker's eye, " + t.unit.named(t.result.WalkerEye) + " up"
}

func (t *texter) sight() {
	if len(t.result.Sight) == 0 {
		t.b.WriteString("\nNo observers.\n")
		return
	}
	t.b.WriteString("\nWhat each observer sees, in the plane of the observer's own eye\n")
	u := t.unit
	table := table{columns: []column{{"", false}, {"observer", false}, {"eye " + u.name, true}, {"seen " + u.areaName(), true},
		{"border " + u.name, true}, {"on walls", true}, {"open", true}, {"view and range", true}, {"targets seen", false}}}
	for _, s := range t.result.Sight {
		if s.Problem != "" {
			table.add(s.Item.ID, s.Name, u.length(s.Eye), s.Problem)
			continue
		}
		seen := fmt.Sprintf("%d of %d", len(s.TargetsSeen), t.plan.NumTargets())
		if len(s.TargetsSeen) > 0 {
			seen += ": " + strings.Join(s.TargetsSeen, " ")
		}
		table.add(append([]string{s.Item.ID, s.Name, u.length(s.Eye)}, append(t.borders(s), seen)...)...)
	}
	table.write(&t.b)
}

// borders returns the area of a region and the lengths of its border.
func (t *texter) borders(s study.Sight) []string {
	u := t.unit
	return []string{u.area(s.Area), u.length(1000 * s.Perimeter), u.length(1000 * s.Wall), u.length(1000 * s.Occluding),
		u.length(1000 * s.Clip)}
}

func (t *texter) seenFrom() {
	if len(t.result.SeenFrom) == 0 {
		t.b.WriteString("\nNo targets.\n")
		return
	}
	t.b.WriteString("\nWhere each target is seen from, " + t.eye() + "\n")
	asked := make([]study.Asked, len(t.result.SeenFrom))
	for i, s := range t.result.SeenFrom {
		asked[i] = s.Asked
	}
	t.asked(asked)
	u := t.unit
	table := table{columns: []column{{"", false}, {"target", false}, {"seen from " + u.areaName(), true},
		{"border " + u.name, true}, {"on walls", true}, {"open", true}, {"limits", true}}}
	for _, s := range t.result.SeenFrom {
		if s.Problem != "" {
			table.add(s.Item.ID, s.Name, s.Problem)
			continue
		}
		table.add(append([]string{s.Item.ID, s.Name}, t.borders(s)...)...)
	}
	table.write(&t.b)
}

func (t *texter) approaches() {
	if len(t.result.Approaches) == 0 {
		t.b.WriteString("\nNo approaches: the plan needs a start and a target.\n")
		return
	}
	pace := strconv.FormatFloat(t.plan.Walker().Pace, 'g', -1, 64)
	u := t.unit
	t.b.WriteString("\nWalk from each start until each target first comes into sight, " + t.eye() + ", at " + pace + " m/s\n")
	if t.result.WalkerRadius > 0 {
		fmt.Fprintf(&t.b, "  keeping %s clear of what stops walking, and at most %s mm more\n", u.named(t.result.WalkerRadius),
			decimal(t.result.RadiusExcess, 1))
	}
	asked := make([]study.Asked, len(t.result.Approaches))
	for i, a := range t.result.Approaches {
		asked[i] = a.Asked
	}
	t.asked(asked)
	t.b.WriteString("  clear for: the widest body that can make some such walk, and where it is tightest on the full walk\n")
	table := table{columns: []column{{"start", false}, {"target", false}, {"walk " + u.name, true}, {"s", true},
		{"first sight at", true}, {"sight line " + u.name, true}, {"clear for " + u.name, true}, {"full walk " + u.name, true},
		{"clear for " + u.name, true}, {"tightest between", false}, {"", false}}}
	ties := false
	for _, a := range t.result.Approaches {
		table.add(t.approach(a)...)
		ties = ties || a.Ties && a.Problem == ""
	}
	table.write(&t.b)
	if ties {
		t.b.WriteString("  * another way is equally short\n")
	}
}

func (t *texter) approach(a study.Approach) []string {
	start, _ := t.plan.Start(a.Start)
	target, _ := t.plan.Target(a.Target)
	row := []string{label(a.Start, start.Name), label(a.Target, target.Name)}
	if a.Problem != "" {
		return append(row, a.Problem)
	}
	u, note := t.unit, a.Reason
	full := []string{"none", t.clear(a, a.FullClearWidth, a.HasFullClearWidth, a.HasFullWalk), t.tightest(a)}
	if a.HasFullWalk {
		full[0] = u.length(a.FullWalk)
	}
	clear := t.clear(a, a.ClearWidth, a.HasClearWidth, a.Status == study.StatusApproach)
	if a.Status == study.StatusNone {
		return append(append(row, "none", "", "", "", clear), append(full, note)...)
	}
	if a.Status == study.StatusSeen {
		note = strings.TrimPrefix(note+"; in sight at the start", "; ")
	}
	walk := u.length(a.Length)
	if a.Ties {
		walk = "*" + walk
	}
	row = append(row, walk, decimal(a.Seconds, 1), t.place(a.FirstSight), u.length(a.SightLine), clear)
	return append(row, append(full, note)...)
}

// clear writes a clear width; "any" where there is a way and nothing narrows it, "not known" where it was given up.
func (t *texter) clear(a study.Approach, mm float64, has, way bool) string {
	switch {
	case a.WidthsUnknown && way:
		return "not known"
	case has:
		return t.unit.length(mm)
	case way:
		return "any"
	}
	return ""
}

// tightest writes the two points of the tightest gap.
func (t *texter) tightest(a study.Approach) string {
	if !a.HasClearWidth && !a.HasFullClearWidth {
		return ""
	}
	return t.place(a.Tightest[0]) + " and " + t.place(a.Tightest[1])
}

// reach is left out where there is nothing to tell: not every plan has zones.
func (t *texter) reach() {
	if len(t.result.Reach) == 0 {
		return
	}
	u := t.unit
	t.b.WriteString("\nHow far each zone is from each start on foot\n")
	table := table{columns: []column{{"start", false}, {"zone", false}, {"nearest " + u.name, true}, {"at", true},
		{"farthest " + u.name, true}, {"at", true}, {"", false}}}
	for _, r := range t.result.Reach {
		start, _ := t.plan.Start(r.Start)
		row := []string{label(r.Start, start.Name), label(r.Zone, zoneName(t.plan, r.Zone))}
		switch {
		case r.Problem != "":
			row = append(row, r.Problem)
		case !r.Found:
			row = append(row, "none", "", "none", "", "no walk leads there")
		default:
			note := ""
			if r.Cut {
				note = "no walk leads to the rest of it"
			}
			row = append(row, u.length(r.Nearest), t.place(r.NearestAt), u.length(r.Farthest), t.place(r.FarthestAt), note)
		}
		table.add(row...)
	}
	table.write(&t.b)
}

func (t *texter) problems() {
	all := allProblems(t.result)
	if len(all) == 0 {
		t.b.WriteString("\nNo problems in the plan.\n")
		return
	}
	t.b.WriteString("\nProblems in the plan\n")
	for _, p := range all {
		blame := "plan"
		if len(p.Items) > 0 { // the text names the others
			blame = strings.TrimSpace(nameOf(kindNames[:], p.Items[0].Kind) + " " + p.Items[0].ID)
		}
		t.b.WriteString("  " + blame + " at " + t.place(millimetres(p.At)) + ": " + p.Text + "\n")
	}
}

// allProblems are the problems of the plan, and what else looks wrong in it.
func allProblems(r *study.Result) []plan.Problem { return slices.Concat(r.Problems, r.Doubts) }

// place writes a point in the display unit.
func (t *texter) place(p orb.Point) string { return t.unit.length(p[0]) + ", " + t.unit.length(p[1]) }

// label writes an item's id and name.
func label(id, name string) string { return strings.TrimSpace(id + " " + name) }
