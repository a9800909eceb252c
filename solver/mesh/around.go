package mesh

import (
	"fmt"

	"enfilade/solver/exact"
)

// patience is how many edges around the one end of an edge are looked at before the other end is tried as well. Most points
// have six edges, so most searches end within it; any number is right.
const patience = 16

// turn goes through the half-edges that leave a point, once around: counter-clockwise, and at a corner of the box, whose star
// is open, from the first one clockwise as well.
type turn struct {
	start, at Edge
	back      bool
}

func (tr *Triangulation) turnAt(v int32) turn { return turn{start: tr.out[v], at: tr.out[v]} }

// next goes on to the next half-edge; at is None when there is none left.
func (tr *Triangulation) next(u *turn) {
	if !u.back {
		if u.at = tr.tris[u.at.Tri()].n[u.at.Prev().Corner()]; u.at == u.start {
			u.at = None
			return
		} else if u.at != None {
			return
		}
		u.at, u.back = u.start, true
	}
	if u.at = tr.tris[u.at.Tri()].n[u.at.Corner()]; u.at != None {
		u.at = u.at.Next()
	}
}

// lookup returns the half-edge from a to b, or None when there is none (any more) or it is a side of the box. It goes round
// both ends in step, so it costs the smaller of their two degrees: the end of one long edge may have edges to nearly every
// point.
func (tr *Triangulation) lookup(a, b int32) Edge {
	u, w := tr.turnAt(a), turn{at: None}
	for steps := 0; u.at != None; steps++ {
		tr.steps++
		if tr.tris[u.at.Tri()].v[inc[u.at.Corner()]] == b {
			return u.at
		}
		tr.next(&u)
		if steps < patience {
			continue
		}
		if steps == patience {
			w = tr.turnAt(b)
		}
		if w.at == None {
			return None
		}
		r := &tr.tris[w.at.Tri()]
		if r.v[inc[w.at.Corner()]] == a {
			return r.n[w.at.Corner()]
		}
		tr.next(&w)
	}
	return None
}

// towards looks around a for b: the half-edge from a to b, or else the half-edge opposite a that the segment crosses first.
// It goes round b in step, and may come back with the half-edge opposite b that the segment crosses last.
func (tr *Triangulation) towards(a, b int32) (e Edge, crossed bool, err error) {
	u, w := tr.turnAt(a), turn{at: None}
	for steps := 0; u.at != None; steps++ {
		tr.steps++
		if e, crossed, err = tr.ahead(u.at, a, b); e != None || err != nil {
			return e, crossed, err
		}
		tr.next(&u)
		if steps < patience {
			continue
		}
		if steps == patience {
			w = tr.turnAt(b)
		}
		if e, crossed, err = tr.ahead(w.at, b, a); e != None && !crossed {
			e = tr.tris[e.Tri()].n[e.Corner()]
		}
		if e != None || err != nil {
			return e, crossed, err
		}
		if tr.next(&w); w.at == None {
			break
		}
	}
	return None, false, fmt.Errorf("mesh: no triangle at %v towards %v", tr.Pts[a], tr.Pts[b])
}

// ahead answers for half-edge e, which leaves a: itself when it ends at b, the half-edge opposite a when the segment to b
// leaves the triangle through that, and None when the segment does not lead that way.
func (tr *Triangulation) ahead(e Edge, a, b int32) (on Edge, crossed bool, err error) {
	r := &tr.tris[e.Tri()]
	i := e.Corner()
	v, w := r.v[inc[i]], r.v[inc[inc[i]]]
	if v == b {
		return e, false, nil
	}
	pa, pb := tr.Pts[a], tr.Pts[b]
	sv := exact.Area2(pa, pb, tr.Pts[v])
	if sv == 0 && tr.Pts[v].Sub(pa).Dot(pb.Sub(pa)) > 0 {
		return None, false, fmt.Errorf("%w: %v lies on the edge from %v to %v", ErrCrossing, tr.Pts[v], pa, pb)
	}
	if sv < 0 && exact.Area2(pa, pb, tr.Pts[w]) > 0 {
		return e.Next(), true, nil
	}
	return None, false, nil
}
