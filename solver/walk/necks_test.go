package walk_test

import (
	"context"
	"fmt"
	"reflect"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// reached returns the triangles that are reached from t without crossing edge e, in no order.
func reached(m *mesh.Mesh, t int32, e mesh.Edge) map[int32]bool {
	seen := map[int32]bool{t: true}
	for stack := []int32{t}; len(stack) > 0; {
		u := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		for i, n := range m.Tris[u].N {
			if k := mesh.EdgeOf(u, i); !m.Tris[u].StopsWalk(i) && k != e && n != e && !seen[n.Tri()] {
				seen[n.Tri()] = true
				stack = append(stack, n.Tri())
			}
		}
	}
	return seen
}

// TestNecksAgainstTakingEachEdgeOut: two neighbours are of different parts just if nothing else joins the two sides when the edge
// between them is taken out; one of their parts then hangs on the other; and rooms are as Rooms tells them.
func TestNecksAgainstTakingEachEdgeOut(t *testing.T) {
	necks, loops := 0, 0
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			_, m := graphAndMesh(t, p)
			part, up, depth, room := walk.Necks(m)
			rooms := walk.Rooms(m)
			first := map[int32]int32{}
			for u := range m.Tris {
				if (part[u] < 0) != (rooms[u] < 0) {
					t.Fatalf("triangle %d: part %d, room %d", u, part[u], rooms[u])
				}
				if part[u] < 0 {
					continue
				}
				if r, ok := first[rooms[u]]; ok && r != room[part[u]] {
					t.Fatalf("triangle %d: room %d, that of its neighbours %d", u, room[part[u]], r)
				}
				first[rooms[u]] = room[part[u]]
				for i, n := range m.Tris[u].N {
					if m.Tris[u].StopsWalk(i) {
						continue
					}
					a, b := part[u], part[n.Tri()]
					neck := !reached(m, int32(u), mesh.EdgeOf(int32(u), i))[n.Tri()]
					if neck != (a != b) {
						t.Fatalf("edge %d of triangle %d: a neck %v, between parts %d and %d", i, u, neck, a, b)
					}
					if neck && !(up[a] == b && depth[a] == depth[b]+1 || up[b] == a && depth[b] == depth[a]+1) {
						t.Fatalf("neck between parts %d and %d: up %d and %d, depth %d and %d", a, b, up[a], up[b], depth[a], depth[b])
					}
					if neck {
						necks++
					} else {
						loops++
					}
				}
			}
			if len(slices.Compact(slices.Sorted(slices.Values(room)))) != len(first) {
				t.Fatalf("rooms %v, %d of them", room, len(first))
			}
		}))
	}
	if necks < 1000 || loops < 1000 {
		t.Errorf("only %d necks and %d other edges: the plans have lost their aim", necks, loops)
	}
}

// TestFloodEntersWhatIsWanted: a part is entered just if it holds the start or a goal, or if without it some of them would be
// parted from others in their room. Several starts and goals at the corners of the mesh touch several parts and rooms.
func TestFloodEntersWhatIsWanted(t *testing.T) {
	entered, left, far := 0, 0, 0
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			pick := rapid.IntRange(0, len(at)-1)
			from := at[pick.Draw(t, "from")]
			goals := []walk.Goal{{Spot: walk.At(at[pick.Draw(t, "first")])}, {Spot: walk.At(at[pick.Draw(t, "second")])}}
			part, up, _, room := walk.Necks(m)
			ends := map[int32]bool{}
			rooms := map[int32]bool{}
			around := func(p exact.Pt, do func(part int32)) {
				walk.Holders(m, p, func(t int32) {
					if part[t] >= 0 {
						do(part[t])
					}
				})
			}
			around(from, func(part int32) { ends[part], rooms[room[part]] = true, true })
			var wantNear []bool
			for _, g := range goals {
				near := false
				around(g.Spot.On.At, func(part int32) {
					if rooms[room[part]] {
						ends[part], near = true, true
					}
				})
				wantNear = append(wantNear, near)
			}
			got, near := walk.New(m).Wanted(from, goals)
			if !slices.Equal(near, wantNear) {
				t.Fatalf("goals in the start's rooms %v, want %v", near, wantNear)
			}
			for k := range up {
				want := ends[int32(k)] || parts(up, ends, int32(k))
				if got[k] != want {
					t.Fatalf("part %d: wanted %v, want %v", k, got[k], want)
				}
				if got[k] {
					entered++
				} else if rooms[room[k]] {
					left++
				}
			}
			for _, n := range near {
				if !n {
					far++
				}
			}
		}))
	}
	if entered < 1000 || left < 1000 || far < 100 {
		t.Errorf("%d parts entered, %d left out, %d goals in other rooms: the plans have lost their aim", entered, left, far)
	}
}

// parts reports whether some of the ends hang together in the tree given by up only through k.
func parts(up []int32, ends map[int32]bool, k int32) bool {
	// Name each end by the part next to k, or the first part of the room, that it hangs on.
	name := func(p int32) (branch int32, below bool) {
		for p >= 0 && p != k {
			branch, p = p, up[p]
		}
		return branch, p == k
	}
	root := func(p int32) int32 {
		for up[p] >= 0 {
			p = up[p]
		}
		return p
	}
	branches := map[int32]bool{}
	for e := range ends {
		if root(e) != root(k) {
			continue
		}
		if branch, below := name(e); below {
			branches[branch] = true
		} else {
			branches[-1] = true
		}
	}
	return len(branches) > 1
}

// TestFloodNarrowed: on mazes, combs and offices a flood that leaves out what lies behind necks looks at less than two thirds
// and finds the same walks, bit for bit.
func TestFloodNarrowed(t *testing.T) {
	for _, kind := range plantest.Kinds {
		g, err := plantest.NewGround(kind.Make(5, 1000))
		if err != nil {
			t.Fatal(err)
		}
		eyes, walker := sight.New(g.Mesh), walk.New(g.Mesh)
		walker.KnowNecks()
		places := g.Places(8, 80)
		narrowed, all := 0, 0
		for k := range 40 {
			goals := goalsAt(eyes, places[79-k:80-k])
			got, err := walker.Flood(context.Background(), places[k], goals)
			if err != nil {
				t.Fatal(err)
			}
			narrowed += walker.Expanded
			want, err := walker.FloodNotNarrowed(context.Background(), places[k], goals)
			if err != nil {
				t.Fatal(err)
			}
			all += walker.Expanded
			if !reflect.DeepEqual(got, want) {
				t.Errorf("%s: from %v to %v:\n%v, want\n%v", kind.Name, places[k], places[79-k], got, want)
			}
		}
		t.Logf("%s: %d cones, %d when nothing is left out", kind.Name, narrowed, all)
		if kind.Name != "clutter" && 3*narrowed > 2*all {
			t.Errorf("%s: %d cones, %d when nothing is left out", kind.Name, narrowed, all)
		}
	}
}

// BenchmarkNecks measures what a finder does once for its mesh.
func BenchmarkNecks(b *testing.B) {
	for _, kind := range plantest.Kinds {
		for _, walls := range []int{1000, 10_000, 100_000} {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", kind.Name, walls), func(b *testing.B) {
				g, err := plantest.NewGround(kind.Make(1, walls))
				if err != nil {
					b.Fatal(err)
				}
				b.ReportAllocs()
				for b.Loop() {
					walk.Necks(g.Mesh)
				}
			})
		}
	}
}
