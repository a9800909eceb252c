package study

import (
	"context"
	"math/rand/v2"
	"testing"

	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// waysSlowly finds the best way from a place to every triangle by going over all edges again and again until nothing changes.
func waysSlowly(b *barrierFinder) []way {
	g := b.scene.wide
	ways := make([]way, len(g.mesh.Tris))
	for t := range ways {
		ways[t] = noWay
	}
	g.holding(b.start, func(t int32) {
		if !g.shut(t) {
			ways[t] = way{0, -1}
		}
	})
	for changed := true; changed; {
		changed = false
		for t := range ways {
			for i, n := range g.mesh.Tris[t].N {
				if n == mesh.None || ways[t] == noWay {
					continue
				}
				w := ways[t]
				if con := g.mesh.Constraint(mesh.EdgeOf(int32(t), i)); con >= 0 {
					item, walk := g.line(con)
					switch kind := g.items[item].Kind; {
					case kind == plan.KindFloor:
						continue
					case walk && kind != plan.KindWalker:
						if w.crossed++; w.first < 0 {
							w.first = item
						}
					}
				}
				if w.before(ways[n.Tri()]) {
					ways[n.Tri()], changed = w, true
				}
			}
		}
	}
	return ways
}

// TestBarrierAgainstTwin asks what closes the way from random places to random groups of triangles, several groups in a row.
func TestBarrierAgainstTwin(t *testing.T) {
	asked, open, crossed, apart := 0, 0, 0, 0
	for seed := range plantest.Seeds(12) {
		random := rand.New(rand.NewPCG(seed, 11))
		for _, p := range []*plan.Plan{plantest.Tangles().Example(int(seed)), plantest.Office(seed, 40), plantest.Clutter(seed, 30), plantest.Maze(seed, 40)} {
			parts := p.Parts()
			parts.Walker.Radius = []int32{0, 300, 2500}[random.IntN(3)]
			s := NewSolver()
			if err := s.Mesh(context.Background(), plan.From(parts)); err != nil {
				t.Fatal(err)
			}
			m := s.scene.wide.mesh
			for range 6 {
				n := random.IntN(len(m.Tris))
				for tries := 0; s.scene.wide.shut(int32(n)) && tries < 50; tries++ {
					n = random.IntN(len(m.Tris))
				}
				tri := m.Tris[n]
				b := barrierFinder{scene: s.scene, start: tri.P[random.IntN(3)]}
				slow := waysSlowly(&b)
				for range 5 {
					var tris []int32
					want := noWay
					for range random.IntN(4) {
						n := int32(random.IntN(len(m.Tris)))
						if tris = append(tris, n); slow[n].before(want) {
							want = slow[n]
						}
					}
					if got := b.best(tris); got != want {
						t.Fatalf("seed %d: from %v to triangles %v: %v, the twin says %v\n%s", seed, b.start, tris, got, want, plantest.Text(p))
					}
					asked++
					switch {
					case want == noWay:
						apart++
					case want.crossed == 0:
						open++
					case want.crossed > 1:
						crossed++
					}
				}
			}
		}
	}
	t.Logf("%d asked: %d open, %d over several things, %d off the floor", asked, open, crossed, apart)
	if open < asked/4 || crossed < asked/30 || apart < asked/50 {
		t.Error("the places have lost their aim")
	}
}
