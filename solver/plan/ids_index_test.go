package plan

import (
	"fmt"
	"math/rand/v2"
	"sync"
	"testing"

	"enfilade/solver/exact"
)

// TestLookupAgainstWalking looks items up by the thousand, by ids that are there, twice there, and not there, in plans that edits
// have made of one another, from several goroutines: each answer is that of walking the list.
func TestLookupAgainstWalking(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	parts := Parts{Walker: DefaultWalker()}
	for i := range 300 {
		at := exact.Pt{X: int32(i), Y: 5}
		parts.Walls = append(parts.Walls, Wall{ID: fmt.Sprint("W", i%290), Line: ChainOf(at, at.Add(exact.Vec{X: 9})), Height: 9})
		parts.Starts = append(parts.Starts, Start{ID: fmt.Sprint("S", i), At: at})
	}
	p := From(parts)
	tables := 0
	for range 40 {
		var wait sync.WaitGroup
		for g := range 3 {
			wait.Add(1)
			go func() {
				defer wait.Done()
				for k := range 200 {
					id := fmt.Sprint("W", (k*7+g)%320)
					got, ok := p.Wall(id)
					i := indexFrom(&p.obstacles.walls, 0, id)
					if ok != (i >= 0) || ok && !got.Line.Equal(p.obstacles.walls.at(i).Line) {
						t.Errorf("wall %s: %v, %v; walking finds %d", id, got, ok, i)
					}
					id = fmt.Sprint("S", (k*5+g)%320)
					if start, ok := p.Start(id); ok != (indexFrom(&p.marks.starts, 0, id) >= 0) || ok && start.ID != id {
						t.Errorf("start %s: %v, %v", id, start, ok)
					}
				}
			}()
		}
		wait.Wait()
		if p.obstacles.walls.ids.table.Load() != nil {
			tables++
		}
		k := fmt.Sprint("W", r.IntN(290))
		edits := []Edit{MoveItems{Items: []Ref{{KindWall, k}, {KindStart, "S5"}}, By: exact.Vec{X: 1}}, AddWall{Wall{Line: ChainOf(exact.Pt{}, exact.Pt{X: 5}), Height: 5}},
			Rotate{Items: []Ref{{KindWall, k}}, Degrees: 90}, AddStart{Start{}}, Duplicate{Items: []Ref{{KindStart, "S7"}}, Columns: 2, Rows: 1}}
		if q, err := edits[r.IntN(len(edits))].Apply(p); err == nil {
			p = q
		}
	}
	if tables < 30 {
		t.Errorf("%d tables were made: nothing was tested", tables)
	}
}
