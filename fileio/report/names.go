package report

import (
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// kindNames are the kinds of item as the plan file names one of them.
var kindNames = [...]string{
	plan.KindPlan: "plan", plan.KindFloor: "floor", plan.KindWall: "wall", plan.KindOpening: "opening",
	plan.KindBlock: "block", plan.KindZone: "zone", plan.KindObserver: "observer", plan.KindTarget: "target",
	plan.KindStart: "start", plan.KindRoute: "route", plan.KindWalker: "walker", plan.KindUnderlay: "underlay",
}

// problemNames are the kinds of problem, one word each.
var problemNames = [...]string{
	plan.ProblemInside: "inside", plan.ProblemOutside: "outside", plan.ProblemShape: "shape",
	plan.ProblemOpening: "opening", plan.ProblemMissing: "missing", plan.ProblemLow: "low", plan.ProblemMoved: "moved",
	plan.ProblemTight: "tight", plan.ProblemGap: "gap", plan.ProblemDouble: "double", plan.ProblemUnreached: "unreached",
	plan.ProblemClosed: "closed",
}

// statusNames are the ends of an approach.
var statusNames = [...]string{study.StatusNone: "none", study.StatusSeen: "seen", study.StatusApproach: "approach"}

// nameOf returns names[i], and "other" for what this package has no word for yet.
func nameOf[K ~uint8](names []string, i K) string {
	if int(i) < len(names) && names[i] != "" {
		return names[i]
	}
	return "other"
}
