package walk_test

import (
	"context"
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/walk"
)

// TestWidthsLaws: the clear width of a way, and the gap that bounds it, are the same when the plan is shifted and when its
// walls come in another order, and as wide when it is turned or mirrored, unless a crossing lies on a border between pixels.
func TestWidthsLaws(t *testing.T) {
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			if p.Floor().Len() == 0 {
				t.Skip("no floor: the box would follow the marks")
			}
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			pick := rapid.IntRange(0, len(at)-1)
			from, to := at[pick.Draw(t, "from")], at[pick.Draw(t, "to")]
			want := wayOf(t, m, from, to)
			law := func(what string, q *plan.Plan, move plantest.Motion, sameGap bool) {
				_, n := graphAndMesh(t, q)
				got := wayOf(t, n, move.Point(from), move.Point(to))
				if got.Found != want.Found || got.Clear != want.Clear {
					t.Errorf("%s: from %v to %v %v, want %v", what, from, to, got, want)
				}
				for i, p := range want.Gap {
					shift := move.Shift
					if sameGap && !math.IsInf(want.Clear, 1) && want.Found && (math.Abs(got.Gap[i][0]-p[0]-float64(shift.X)) > 1e-6 ||
						math.Abs(got.Gap[i][1]-p[1]-float64(shift.Y)) > 1e-6) {
						t.Errorf("%s: from %v to %v between %v, want %v", what, from, to, got.Gap, want.Gap)
					}
				}
			}
			shift := plantest.Motion{Shift: exact.Vec{X: rapid.Int32Range(-1e6, 1e6).Draw(t, "dx"), Y: rapid.Int32Range(-1e6, 1e6).Draw(t, "dy")}}
			law("shifted", plantest.Moved(p, shift), shift, true)
			law("shuffled", plantest.Shuffled(p, rapid.Uint64().Draw(t, "seed")), plantest.Motion{}, true)
			if o, _ := arrange.Draw(p); !plantest.Halves(o) {
				turn := plantest.Motion{Mirror: rapid.Bool().Draw(t, "mirror"), Turns: rapid.IntRange(0, 3).Draw(t, "turns")}
				law("turned", plantest.Moved(p, turn), turn, false)
			}
		}))
	}
}

func wayOf(t interface{ Fatal(...any) }, m *mesh.Mesh, from, to exact.Pt) walk.Width {
	w := widthsOf(t, m)
	if w.From(from) != nil {
		return walk.Width{}
	}
	return w.ToPoint(to)
}

func BenchmarkWidths(b *testing.B) {
	for _, walls := range []int{1000, 10_000, 100_000} {
		p := plantest.Office(1, walls)
		o, _ := arrange.Draw(p)
		m, err := arrange.Build(context.Background(), arrange.Round(o))
		if err != nil {
			b.Fatal(err)
		}
		b.Run(fmt.Sprintf("plan=office/walls=%d/make", walls), func(b *testing.B) {
			for b.Loop() {
				widthsOf(b, m)
			}
		})
		w := widthsOf(b, m)
		var from, to exact.Pt
		for i, s := range p.Starts() {
			if i == 0 {
				from = s.At
			}
			to = s.At
		}
		b.Run(fmt.Sprintf("plan=office/walls=%d/way", walls), func(b *testing.B) {
			for b.Loop() {
				if err := w.From(from); err != nil {
					b.Fatal(err)
				}
				w.ToPoint(to)
			}
		})
	}
}
