package tool

import (
	"slices"
	"strconv"

	"enfilade/canvas/pick"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// WithWaypoint returns the edit that puts a new waypoint on leg i of a route.
func WithWaypoint(r plan.Route, i int, at exact.Pt) plan.Edit {
	r.Via = plan.ChainOf(slices.Insert(r.Via.Points(), i, at)...)
	return Named("add waypoint", plan.SetRoute{Route: r})
}

// WithoutWaypoint returns the edit that takes waypoint i out of a route: the route itself, when it has nothing else to lead to.
func WithoutWaypoint(r plan.Route, i int) plan.Edit {
	if r.Via.Len() == 1 && r.To == "" {
		return plan.Delete{Items: []plan.Ref{{Kind: plan.KindRoute, ID: r.ID}}}
	}
	r.Via = plan.ChainOf(slices.Delete(r.Via.Points(), i, i+1)...)
	return Named("delete waypoint", plan.SetRoute{Route: r})
}

// WaypointSooner returns the edit that lets a route call at waypoint i before the one before it.
func WaypointSooner(r plan.Route, i int) plan.Edit {
	via := r.Via.Points()
	via[i-1], via[i] = via[i], via[i-1]
	r.Via = plan.ChainOf(via...)
	return Named("reorder waypoints", plan.SetRoute{Route: r})
}

// waypointPlace snaps a waypoint to the grid, where people walk, and not to walls, where they do not.
func waypointPlace(h Host, e Pointer) pick.Snap {
	return h.Snapper().At(plan.New(), h.Camera(), e.X, e.Y, pick.SnapTo{Free: e.Ctrl})
}

// legEdit drags a new waypoint out of a leg.
func legEdit(h Host, g *grip, e Pointer) (plan.Edit, *pick.Snap) {
	r, ok := h.Plan().Route(g.hit.Ref.ID)
	if !ok || g.hit.Index > r.Via.Len() {
		return nil, nil
	}
	snap := waypointPlace(h, e)
	g.to, g.label = snap.At, "waypoint "+strconv.Itoa(g.hit.Index+1)
	return WithWaypoint(r, g.hit.Index, snap.At), &snap
}

// addWaypoint puts a waypoint where a route was clicked twice, and reports whether it was one.
func (t *Select) addWaypoint(h Host, hit pick.Hit, e Pointer) bool {
	r, ok := h.Plan().Route(hit.Ref.ID)
	if hit.Ref.Kind != plan.KindRoute || hit.Part != pick.Body && hit.Part != pick.LegMiddle || !ok || r.Locked {
		return false
	}
	t.grip, t.last, t.fault = nil, nil, ""
	i := pick.LegAt(h.Plan(), h.Camera(), e.X, e.Y, r, h.Walked)
	if err := h.Do(WithWaypoint(r, min(i, r.Via.Len()), waypointPlace(h, e).At)); err != nil {
		t.fault = reason(err)
	}
	return true
}

// OverWaypoint reports whether Delete takes out the waypoint under the pointer, and not what is selected.
func (t *Select) OverWaypoint(h Host) bool { return t.withoutWaypoint(h) != nil }

// withoutWaypoint returns the edit that takes out the waypoint under the pointer, when its route alone is selected; else nil.
func (t *Select) withoutWaypoint(h Host) plan.Edit {
	sel := h.Selection()
	if !t.hovered || t.hover.Part != pick.Corner || t.hover.Ref.Kind != plan.KindRoute || len(sel) != 1 || sel[0] != t.hover.Ref {
		return nil
	}
	r, ok := h.Plan().Route(t.hover.Ref.ID)
	if !ok || r.Locked || t.hover.Index >= r.Via.Len() || r.Via.At(t.hover.Index) != t.hover.At {
		return nil
	}
	return WithoutWaypoint(r, t.hover.Index)
}

// cornerHint says what a drag of a corner does.
func cornerHint(h Host, r plan.Ref) string {
	switch {
	case r.Kind != plan.KindRoute:
		return "drag to move this corner"
	case slices.Equal(h.Selection(), []plan.Ref{r}):
		return "drag to move this waypoint, Delete takes it away"
	}
	return "drag to move this waypoint, click to select the route"
}
