package arrange_test

import (
	"context"
	"fmt"
	"math/rand/v2"
	"slices"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// shape returns what a mesh answers from, without its numbering: every triangle with its points, what it and its edges stop
// and the items on them.
// Without all, only of the triangles that are not solid: outside, the mesh depends on how far the first outline reached.
func shape(s *arrange.Site, all bool) []string {
	var lines []string
	s.Mesh.NumSectors()
	for t := range s.Mesh.Tris {
		tri := &s.Mesh.Tris[t]
		if tri.P[0] == tri.P[1] || !all && s.Mesh.Solid[t] == plan.Ceiling {
			continue // taken out, or not asked for
		}
		line := fmt.Sprint(tri.P, tri.Top, tri.Flags, s.Mesh.Solid[t])
		for i := range 3 {
			e := mesh.EdgeOf(int32(t), i)
			if c := s.Mesh.Constraint(e); c >= 0 {
				line += fmt.Sprint(" ", i, s.Graph.Items[s.Graph.Edges[c].Item])
			}
			if k := s.Mesh.SectorAt(e); k >= 0 {
				k := s.Mesh.Sector(k)
				line += fmt.Sprint(" turn ", k.At, k.Lo, k.Hi)
			}
			line += fmt.Sprint(" ", s.Mesh.OnePlace(tri.V[i]))
		}
		lines = append(lines, line)
	}
	slices.Sort(lines)
	return lines
}

// TestFollowLaws moves items of random plans about, and holds every site that followed against one made anew.
func TestFollowLaws(t *testing.T) {
	followed, anew := 0, 0
	for seed := range 120 {
		r := rand.New(rand.NewPCG(uint64(seed), 5))
		p := plantest.Tangles().Example(seed)
		switch seed % 4 {
		case 1:
			p = plantest.Office(uint64(seed), 40)
		case 2:
			p = plantest.Clutter(uint64(seed), 30)
		case 3:
			p = plantest.Lines().Example(seed)
		}
		lo, hi := exact.Pt{X: -90000, Y: -90000}, exact.Pt{X: 900000, Y: 900000}
		parts := p.Parts()
		parts.Floor = plan.ChainOf(lo, exact.Pt{X: hi.X, Y: lo.Y}, hi, exact.Pt{X: lo.X, Y: hi.Y})
		p = plan.From(parts)
		o, _ := arrange.Draw(p)
		site, err := arrange.NewSite(context.Background(), o)
		if err != nil {
			t.Fatal(err)
		}
		site.Mesh.NumSectors() // so that they are followed too
		for range 12 {
			next := nudge(r, p)
			if next == nil {
				continue
			}
			p = next
			o, _ = arrange.Draw(p)
			ok, err := site.Follow(o)
			if err != nil {
				t.Fatalf("seed %d: %v\n%s", seed, err, plantest.Text(p))
			}
			fresh, err2 := arrange.NewSite(context.Background(), o)
			if err2 != nil {
				t.Fatal(err2)
			}
			if !ok {
				anew++
				site = fresh
				continue
			}
			followed++
			if err := site.Mesh.Check(); err != nil {
				t.Fatalf("seed %d: %v", seed, err)
			}
			if got, want := shape(site, sameBox(site, fresh)), shape(fresh, sameBox(site, fresh)); !slices.Equal(got, want) {
				t.Fatalf("seed %d: the site that followed differs from a new one\n%s\n%s", seed, plantest.Text(p), firstDifference(got, want))
			}
		}
	}
	if followed < 800 {
		t.Errorf("only %d changes were followed, %d built anew", followed, anew)
	}
}

func sameBox(a, b *arrange.Site) bool {
	alo, ahi := a.Mesh.Box()
	blo, bhi := b.Mesh.Box()
	return alo == blo && ahi == bhi
}

func firstDifference(got, want []string) string {
	for i := range min(len(got), len(want)) {
		if got[i] != want[i] {
			return got[i] + "\n" + want[i]
		}
	}
	return fmt.Sprint(len(got), " triangles, want ", len(want))
}

// nudge moves a wall, a block, a wall's corner, or several items at once, by little or by much.
func nudge(r *rand.Rand, p *plan.Plan) *plan.Plan {
	step := []int32{1, 500, 10000, 30000}[r.IntN(4)]
	v := exact.Vec{X: r.Int32N(2*step+1) - step, Y: r.Int32N(2*step+1) - step}
	if step == 10000 && r.IntN(2) == 0 {
		v = exact.Vec{X: (r.Int32N(3) - 1) * step, Y: (r.Int32N(3) - 1) * step}
	}
	var refs []plan.Ref
	for _, w := range p.Walls() {
		refs = append(refs, plan.Ref{Kind: plan.KindWall, ID: w.ID})
	}
	for _, b := range p.Blocks() {
		refs = append(refs, plan.Ref{Kind: plan.KindBlock, ID: b.ID})
	}
	if len(refs) == 0 {
		return nil
	}
	r.Shuffle(len(refs), func(i, j int) { refs[i], refs[j] = refs[j], refs[i] })
	next, err := plan.MoveItems{Items: refs[:1+r.IntN(min(3, len(refs)))], By: v}.Apply(p)
	if err != nil {
		return nil
	}
	return next
}
