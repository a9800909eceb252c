// Package walk finds shortest routes and the place of first sight along a route.
//
// A shortest walk is a chain of corners, and from each corner (a root) the walker sees onwards exactly as an eye does. So the
// search keeps cones: a root, its distance from the start, and two grid vectors that bound the cone on the edge it is about
// to cross (Cui, Harabor and Grastien, "Compromise-free pathfinding on a navigation mesh", IJCAI 2017, whose successors and
// pruning by root distance these are). Whether a corner splits a cone, and whether a walk may turn there, is decided by
// exact signs. Lengths are sums of square roots in float64.
//
// An approach is the shortest walk to a region, not to a point (the quickest visibility query: Arkin, Efrat, Knauer,
// Mitchell, Polishchuk, Rote, Schlipf and Talvitie, JoCG 7, 2016). The target's region is known as cones of sight in each
// triangle. Where a walking cone enters such a triangle, the point nearest to the root within triangle, walking cone and
// cone of sight is a candidate end; whether those three share more than a border is decided exactly. The search stops when
// nothing in its queue can be better. One flood from a start serves all goals. It goes towards them first, and does not enter
// floor from which one comes back only by the edge one came in by, when there is no goal.
//
// Walking may touch walls, a gap of zero width is no gap, and a walk turns at a point only within one sector between the
// walls there: the sides of a thin wall are different places.
package walk
