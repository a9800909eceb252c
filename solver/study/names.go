package study

import "enfilade/solver/plan"

// kindWords are the words of the trade for kinds of item.
var kindWords = map[plan.Kind]string{
	plan.KindWall: "wall", plan.KindOpening: "door", plan.KindBlock: "block", plan.KindZone: "zone",
	plan.KindObserver: "observer", plan.KindTarget: "target", plan.KindStart: "start", plan.KindRoute: "route",
}

// nameOf names an item in a sentence.
func nameOf(r plan.Ref) string {
	if w, ok := kindWords[r.Kind]; ok {
		return w + " " + r.ID
	}
	return "the edge of the floor"
}
