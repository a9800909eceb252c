package report

import (
	"bufio"
	"bytes"
	"encoding/json"
	"io"
	"math"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// jsonRegion is what the entries of "sight" and "seen_from" have in common.
type jsonRegion struct {
	Name       string   `json:"name"`
	EyeMM      *float64 `json:"eye_mm"`
	Problem    *string  `json:"problem"`
	AreaM2     *float64 `json:"area_m2"`
	PerimeterM *float64 `json:"perimeter_m"`
	WallM      *float64 `json:"wall_m"`
	OccludingM *float64 `json:"occluding_m"`
	ClipM      *float64 `json:"clip_m"`
	Boundary   orb.Ring `json:"boundary"`

	OtherRings []orb.Ring `json:"other_rings"` // further parts counter-clockwise, holes clockwise
}

// jsonObserver is one entry of "sight".
type jsonObserver struct {
	Observer string `json:"observer"`
	jsonRegion
	TargetsSeen []string `json:"targets_seen"`
}

// jsonTarget is one entry of "seen_from".
type jsonTarget struct {
	Target string `json:"target"`
	jsonAsked
	jsonRegion
}

// jsonApproach is one entry of "approaches".
type jsonApproach struct {
	Start  string `json:"start"`
	Target string `json:"target"`
	jsonAsked
	EyeMM            *float64      `json:"eye_mm"`
	Problem          *string       `json:"problem"`
	Status           *string       `json:"status"`
	LengthMM         *float64      `json:"length_mm"`
	FirstSight       *orb.Point    `json:"first_sight"`
	Points           []orb.Point   `json:"points"`
	SightLineMM      *float64      `json:"sight_line_mm"`
	SightTo          *orb.Point    `json:"sight_to"`
	Seconds          *float64      `json:"seconds"`
	ClearWidthMM     *float64      `json:"clear_width_mm"`
	WidthsUnknown    bool          `json:"widths_unknown,omitempty"`
	FullWalkMM       *float64      `json:"full_walk_mm"`
	FullWalkPoints   []orb.Point   `json:"full_walk_points"`
	FullClearWidthMM *float64      `json:"full_clear_width_mm"`
	Tightest         *[2]orb.Point `json:"tightest"`
	Reason           *string       `json:"reason"`
	Ties             bool          `json:"ties"`
}

// jsonReach is one entry of "reach".
type jsonReach struct {
	Start      string     `json:"start"`
	Zone       string     `json:"zone"`
	Name       string     `json:"name"` // of the zone
	Problem    *string    `json:"problem"`
	NearestMM  *float64   `json:"nearest_mm"`
	NearestAt  *orb.Point `json:"nearest_at"`
	FarthestMM *float64   `json:"farthest_mm"`
	FarthestAt *orb.Point `json:"farthest_at"`
	Cut        bool       `json:"cut"` // to some of the zone's floor no walk leads
}

// jsonWalker is the person who walks, as the walks were solved for.
type jsonWalker struct {
	EyeMM          *float64 `json:"eye_mm"`
	RadiusMM       *float64 `json:"radius_mm"`
	RadiusExcessMM *float64 `json:"radius_excess_mm"` // what walks may keep clear beyond the radius
	PaceMS         *float64 `json:"pace_m_s"`
}

// jsonItem names one item.
type jsonItem struct {
	Kind string `json:"kind"`
	ID   string `json:"id"`
}

// jsonProblem is one entry of "problems".
type jsonProblem struct {
	Kind  string     `json:"kind"`
	Items []jsonItem `json:"items"`
	At    orb.Point  `json:"at"`
	Text  string     `json:"text"`
}

// JSON writes the result as one JSON object, one entry a line.
//
//   - Members: title, walker, sight, seen_from, approaches, reach, routes, problems, caution; their entries as in README.
//   - Units: as the end of each name says; coordinates in mm, rings counter-clockwise, first point not repeated.
//   - Errors: those of w.
func JSON(w io.Writer, p *plan.Plan, r *study.Result) error {
	j := &jsonWriter{out: bufio.NewWriter(w)}
	j.write("{\"title\": ", p.Sheet().Title)
	j.write(",\n\"walker\": ", jsonWalker{number(r.WalkerEye), number(r.WalkerRadius), number(r.RadiusExcess), number(p.Walker().Pace)})
	list(j, ",\n\"sight\": [", r.Sight, observerEntry)
	list(j, ",\n\"seen_from\": [", r.SeenFrom, targetEntry)
	list(j, ",\n\"approaches\": [", r.Approaches, func(a study.Approach) any { return approachEntry(a, r.WalkerEye) })
	list(j, ",\n\"reach\": [", r.Reach, func(a study.Reach) any { return reachEntry(p, a) })
	list(j, ",\n\"routes\": [", r.Routes, routeEntry)
	list(j, ",\n\"problems\": [", allProblems(r), problemEntry)
	j.write(",\n\"caution\": ", Caution)
	j.text("}\n")
	if j.err != nil {
		return j.err
	}
	return j.out.Flush()
}

// jsonWriter keeps the first error and writes nothing after it.
type jsonWriter struct {
	out *bufio.Writer
	err error
}

func (j *jsonWriter) text(s string) {
	if j.err == nil {
		_, j.err = j.out.WriteString(s)
	}
}

// write writes before, then v as JSON on one line, with <, > and & left as they are.
func (j *jsonWriter) write(before string, v any) {
	j.text(before)
	var b bytes.Buffer
	enc := json.NewEncoder(&b)
	enc.SetEscapeHTML(false)
	if err := enc.Encode(v); err != nil && j.err == nil {
		j.err = err
	}
	j.text(string(bytes.TrimRight(b.Bytes(), "\n")))
}

// list writes a JSON array with one entry a line.
func list[T any](j *jsonWriter, head string, all []T, entry func(T) any) {
	j.text(head)
	for i, v := range all {
		if i > 0 {
			j.text(",")
		}
		j.write("\n  ", entry(v))
	}
	j.text("]")
}

func observerEntry(s study.Sight) any {
	e := jsonObserver{Observer: s.Item.ID, jsonRegion: region(s)}
	if s.Problem == "" {
		e.TargetsSeen = append([]string{}, s.TargetsSeen...) // none is [], not null
	}
	return e
}

func targetEntry(s study.Sight) any { return jsonTarget{s.Item.ID, askedEntry(s.Asked), region(s)} }

// region leaves the numbers out where there is a problem.
func region(s study.Sight) jsonRegion {
	e := jsonRegion{Name: s.Name, EyeMM: number(s.Eye), Problem: words(s.Problem)}
	if s.Problem == "" {
		e.AreaM2, e.PerimeterM = number(s.Area), number(s.Perimeter)
		e.WallM, e.OccludingM, e.ClipM = number(s.Wall), number(s.Occluding), number(s.Clip)
		e.Boundary, e.OtherRings = points(s.Boundary), otherRings(s.More)
	}
	return e
}

func approachEntry(a study.Approach, eye float64) any {
	e := &jsonApproach{Start: a.Start, Target: a.Target, jsonAsked: askedEntry(a.Asked), EyeMM: number(eye), Problem: words(a.Problem),
		Reason: words(a.Reason), Ties: a.Ties}
	if a.Problem != "" {
		return e
	}
	e.Status = words(nameOf(statusNames[:], a.Status))
	if a.Status != study.StatusNone {
		e.LengthMM, e.SightLineMM, e.Seconds = number(a.Length), number(a.SightLine), number(a.Seconds)
		first, to := unsigned(a.FirstSight), unsigned(a.SightTo)
		e.FirstSight, e.SightTo, e.Points = &first, &to, points(a.Points)
	}
	if a.HasFullWalk {
		e.FullWalkMM, e.FullWalkPoints = number(a.FullWalk), points(a.FullPoints)
	}
	e.clear(a)
	return e
}

// clear fills in the clear widths, which do not depend on whether the walker finds a way.
func (e *jsonApproach) clear(a study.Approach) {
	e.WidthsUnknown = a.WidthsUnknown
	if a.HasClearWidth {
		e.ClearWidthMM = number(a.ClearWidth)
	}
	if a.HasFullClearWidth {
		e.FullClearWidthMM = number(a.FullClearWidth)
	}
	if a.HasClearWidth || a.HasFullClearWidth {
		e.Tightest = &[2]orb.Point{unsigned(a.Tightest[0]), unsigned(a.Tightest[1])}
	}
}

func reachEntry(p *plan.Plan, r study.Reach) any {
	e := jsonReach{Start: r.Start, Zone: r.Zone, Name: zoneName(p, r.Zone), Problem: words(r.Problem), Cut: r.Cut}
	if r.Found {
		near, far := unsigned(r.NearestAt), unsigned(r.FarthestAt)
		e.NearestMM, e.NearestAt = number(r.Nearest), &near
		e.FarthestMM, e.FarthestAt = number(r.Farthest), &far
	}
	return e
}

// zoneName returns the name of the zone with an id.
func zoneName(p *plan.Plan, id string) string {
	for _, z := range p.Zones() {
		if z.ID == id {
			return z.Name
		}
	}
	return ""
}

func problemEntry(p plan.Problem) any {
	e := jsonProblem{Kind: nameOf(problemNames[:], p.Kind), Items: []jsonItem{}, At: millimetres(p.At), Text: p.Text}
	for _, item := range p.Items {
		e.Items = append(e.Items, jsonItem{nameOf(kindNames[:], item.Kind), item.ID})
	}
	return e
}

func millimetres(p exact.Pt) orb.Point {
	return orb.Point{float64(p.X) / exact.PerMM, float64(p.Y) / exact.PerMM}
}

// number returns nil for what JSON has no number for, and 0 for negative zero.
func number(v float64) *float64 {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil
	}
	v += 0
	return &v
}

// words returns nil for no words.
func words(s string) *string {
	if s == "" {
		return nil
	}
	return &s
}

// points copies a list, with 0 for negative zero; an empty list stays a list.
func points[L ~[]orb.Point](all L) L {
	out := make(L, len(all))
	for i, p := range all {
		out[i] = unsigned(p)
	}
	return out
}

// unsigned turns the negative zeros of a point into zeros.
func unsigned(p orb.Point) orb.Point { return orb.Point{p[0] + 0, p[1] + 0} }
