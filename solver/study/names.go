package study

import "enfilade/solver/plan"

// kindWords are the words of the trade for kinds of item whose name does not depend on what they are made of.
var kindWords = map[plan.Kind]string{
	plan.KindBlock: "block", plan.KindZone: "zone", plan.KindObserver: "observer", plan.KindTarget: "target",
	plan.KindStart: "start", plan.KindRoute: "route",
}

// What a wall and an opening are called, by what they are made of.
var (
	wallWords = map[plan.WallKind]string{plan.Solid: "wall", plan.Glazing: "glazing", plan.Screen: "screen", plan.Low: "low wall"}
	leafWords = map[plan.Leaf]string{plan.NoLeaf: "gap", plan.SolidLeaf: "door", plan.GlazedLeaf: "glazed door"}
)

// nameOf names an item of the scene's plan in a sentence: "glazing G1".
func (sc *scene) nameOf(r plan.Ref) string {
	word, ok := kindWords[r.Kind]
	switch r.Kind {
	case plan.KindWall:
		w, _ := sc.plan.Wall(r.ID)
		word, ok = wallWords[w.Kind], true
	case plan.KindOpening:
		o, _ := sc.plan.Opening(r.ID)
		word, ok = leafWords[o.Leaf], true
	}
	if !ok {
		return "the edge of the floor"
	}
	return word + " " + r.ID
}
