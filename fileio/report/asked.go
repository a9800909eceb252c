package report

import (
	"strconv"

	"github.com/paulmach/orb"

	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// jsonAsked says how much of a target's face had to be in view: "any", "all", or the share; null for a point.
type jsonAsked struct {
	Seen       any      `json:"seen"`
	ShareError *float64 `json:"share_error"` // who sees less than the share does not count, who sees wider by this does
}

func askedEntry(a study.Asked) jsonAsked {
	switch {
	case !a.Face:
		return jsonAsked{}
	case a.Seen == plan.SeenShare:
		return jsonAsked{Seen: a.Share, ShareError: number(a.ShareError)}
	case a.Seen == plan.SeenAll:
		return jsonAsked{Seen: "all"}
	}
	return jsonAsked{Seen: "any"}
}

// otherRings returns the rings of a region besides its boundary, as a list that is never null.
func otherRings(more []study.Border) []orb.Ring {
	rings := make([]orb.Ring, 0, len(more))
	for _, b := range more {
		rings = append(rings, points(b.Ring))
	}
	return rings
}

// asked tells how much of a face must be in view, when some target in the table has one.
func (t *texter) asked(all []study.Asked) {
	for _, a := range all {
		if !a.Face {
			continue
		}
		switch a.Seen {
		case plan.SeenAll:
			t.b.WriteString("  of a face all must be in view\n")
		case plan.SeenShare:
			worst := 0.0
			for _, b := range all {
				worst = max(worst, b.ShareError)
			}
			share := strconv.FormatFloat(100*a.Share, 'g', 4, 64)
			t.b.WriteString("  of a face " + share + " % must be in view in one stretch; who sees " + decimal(100*worst, 1) + " % more is sure to count\n")
		default:
			t.b.WriteString("  of a face any part counts\n")
		}
		return
	}
}
