package plan

import (
	"fmt"
	"runtime"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// TestListLaws makes lists of one another at random beside slices that do the same, and holds after each step that every list made
// so far is what its slice is: what is shared is not changed.
func TestListLaws(t *testing.T) {
	type pair struct {
		list  list[Start]
		slice []Start
	}
	long := 0
	rapid.Check(t, func(t *rapid.T) {
		fresh := 0
		some := func(n int) (items []Start) {
			for range n {
				items = append(items, Start{ID: fmt.Sprint("S", fresh)})
				fresh++
			}
			return items
		}
		first := some(rapid.IntRange(0, 200).Draw(t, "length"))
		made := []pair{{listOf(first), first}}
		for range 8 {
			from := made[rapid.IntRange(0, len(made)-1).Draw(t, "from")]
			now := pair{from.list, slices.Clone(from.slice)}
			n := len(now.slice)
			switch what := rapid.IntRange(0, 3).Draw(t, "what"); {
			case what == 0:
				items := some(rapid.IntRange(0, 150).Draw(t, "more"))
				now.list, now.slice = now.list.with(items...), append(now.slice, items...)
			case n == 0:
			case what == 1:
				i := rapid.IntRange(0, n-1).Draw(t, "place")
				now.slice[i].Name = "put"
				now.list = now.list.put(i, now.slice[i])
			case what == 2:
				i, step := rapid.IntRange(0, n-1).Draw(t, "first"), rapid.IntRange(1, 90).Draw(t, "step")
				gone := map[string]bool{}
				for k := i; k < n; k += step {
					gone[now.slice[k].ID] = true
				}
				now.list, _ = now.list.without(func(_ int, s *Start) bool { return gone[s.ID] })
				now.slice = slices.DeleteFunc(now.slice, func(s Start) bool { return gone[s.ID] })
			default:
				number := func(s *Start) int { return Ref{KindStart, s.ID}.Number() }
				now.list = now.list.changed(func(s *Start) bool { return number(s)%7 == 0 }, func(s *Start) { s.Name += "!" })
				for i := range now.slice {
					if number(&now.slice[i])%7 == 0 {
						now.slice[i].Name += "!"
					}
				}
			}
			made = append(made, now)
			for k, p := range made {
				if p.list.n > 2*chunkLen {
					long++
				}
				if !slices.Equal(p.list.slice(), p.slice) {
					t.Fatalf("list %d of %d: %v, want %v", k, len(made), p.list.slice(), p.slice)
				}
				for i, it := range p.list.all() {
					if it != p.slice[i] || *p.list.at(i) != it {
						t.Fatalf("list %d: item %d is %v, want %v", k, i, it, p.slice[i])
					}
				}
			}
		}
	})
	if long < 1000 {
		t.Errorf("%d long lists: the generator lost its aim", long)
	}
}

// TestListShares: a list with one item of many changed copies one chunk and the row of chunks.
func TestListShares(t *testing.T) {
	walls := make([]Wall, 20_000)
	for i := range walls {
		walls[i].ID = fmt.Sprint("W", i)
	}
	l := listOf(walls)
	kept := make([]list[Wall], 100)
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	for i := range kept {
		kept[i] = l.put(777, walls[777])
	}
	runtime.ReadMemStats(&after)
	per := (after.TotalAlloc - before.TotalAlloc) / uint64(len(kept))
	if kept[99].n != l.n || per > 20_000 {
		t.Errorf("one wall of 20,000 changed: %d bytes", per)
	}
	p := From(Parts{Walls: walls})
	q := &Plan{&Obstacles{walls: p.obstacles.walls.put(777, walls[777])}, p.marks, p.sheet}
	if n := Unshared(p, q); n < 10_000 || n > 20_000 {
		t.Errorf("one wall of 20,000 changed: %d bytes unshared", n)
	}
}
