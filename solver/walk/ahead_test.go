package walk_test

import (
	"context"
	"reflect"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// goalsAt returns two goals for each place: to come into sight of it, and to reach it.
func goalsAt(eyes *sight.Finder, places []exact.Pt) (goals []walk.Goal) {
	for _, p := range places {
		cones, err := eyes.Cones(p, plantest.Eye, sight.Clip{})
		if err == nil {
			goals = append(goals, walk.Goal{Eye: p, Cones: append([]sight.Cone(nil), cones...)})
		}
		goals = append(goals, walk.Goal{Spot: walk.At(p)})
	}
	return goals
}

// TestFloodAgainstFloodOfAll: a flood that makes for its goals finds the walks, bit for bit, that one finds which goes over all
// of the floor in the order of distance; and it looks at less than half as much.
func TestFloodAgainstFloodOfAll(t *testing.T) {
	aimed, all := 0, 0
	for _, kind := range plantest.Kinds {
		g, err := plantest.NewGround(kind.Make(3, 400))
		if err != nil {
			t.Fatal(err)
		}
		eyes, walker := sight.New(g.Mesh), walk.New(g.Mesh)
		walker.KnowNecks()
		places := g.Places(7, 60)
		for k := range 20 {
			goals := goalsAt(eyes, places[20+k:21+k+k%5/4*9]) // 2 of them, or 20
			want, _, err := walker.FloodField(context.Background(), places[k], goals)
			if err != nil {
				t.Fatal(err)
			}
			all += walker.Expanded
			got, err := walker.Flood(context.Background(), places[k], goals)
			if err != nil {
				t.Fatal(err)
			}
			aimed += walker.Expanded
			if !reflect.DeepEqual(got, want) {
				t.Errorf("%s: from %v:\n%v, want\n%v", kind.Name, places[k], got, want)
			}
		}
	}
	t.Logf("%d cones towards the goals, %d over all of the floor", aimed, all)
	if 2*aimed > all {
		t.Errorf("%d cones towards the goals, %d over all of the floor", aimed, all)
	}
}

// TestFloodAgainstFloodOfAllSmall is the same on plans crowded with degeneracies, where many walks are equally long.
func TestFloodAgainstFloodOfAllSmall(t *testing.T) {
	ties := 0
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			eyes, walker := sight.New(m), walk.New(m)
			walker.KnowNecks()
			goals := goalsAt(eyes, at)
			from := at[rapid.IntRange(0, len(at)-1).Draw(t, "from")]
			want, _, err := walker.FloodField(context.Background(), from, goals)
			if err != nil {
				t.Skip(err)
			}
			for i := range goals {
				got, err := walker.Flood(context.Background(), from, goals[i:i+1])
				if err != nil {
					t.Fatal(err)
				}
				if !reflect.DeepEqual(got[0], want[i]) {
					t.Errorf("goal %d from %v: %v, want %v", i, from, got[0], want[i])
				}
				if got[0].Ties {
					ties++
				}
			}
		}))
	}
	if ties < 100 {
		t.Errorf("only %d ties: the plans have lost their aim", ties)
	}
}

// TestFloodGivesUp: a goal behind walls is given up after a part of the floor, and by and by costs nothing at all.
func TestFloodGivesUp(t *testing.T) {
	g, err := plantest.NewGround(plantest.Office(1, 1000))
	if err != nil {
		t.Fatal(err)
	}
	rooms := walk.Rooms(g.Mesh)
	room := func(p exact.Pt) int32 {
		place, _ := g.Mesh.Locate(p)
		return rooms[place.Tri]
	}
	size := map[int32]int{}
	for _, r := range rooms {
		size[r]++
	}
	walker := walk.New(g.Mesh)
	apart := 0
	places := g.Places(4, 200)
	for i, p := range places[1:] {
		q := places[i]
		paths, err := walker.Flood(context.Background(), p, []walk.Goal{{Spot: walk.At(q)}})
		if err != nil {
			t.Fatal(err)
		}
		if paths[0].Found != (room(p) == room(q)) {
			t.Errorf("from %v to %v: found %v, in one room %v", p, q, paths[0].Found, room(p) == room(q))
		}
		if room(p) != room(q) && size[room(p)] > len(rooms)/3 {
			apart++
			if walker.Expanded > len(rooms)/4 {
				t.Errorf("from %v to %v: %d cones of %d triangles before giving up", p, q, walker.Expanded, len(rooms))
			}
		}
	}
	if apart < 10 {
		t.Errorf("only %d walks to give up", apart)
	}
}
