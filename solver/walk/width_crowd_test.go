package walk_test

import (
	"context"
	"errors"
	"math"
	"strings"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/walk"
)

func meshOf(t *testing.T, p *plan.Plan) *mesh.Mesh {
	o, _ := arrange.Draw(p)
	m, err := arrange.Build(context.Background(), arrange.Round(o))
	if err != nil {
		t.Fatal(err)
	}
	return m
}

// TestWidthsOfCrowds: the gaps of crowded plans take steps in proportion to their size; most in the grid, where the ends of all
// walls face one long edge of the floor.
func TestWidthsOfCrowds(t *testing.T) {
	for _, c := range []struct {
		name string
		plan *plan.Plan
		most int64 // steps for each triangle
	}{
		{"row", plantest.Row(20_000), 10},
		{"fan", plantest.Fan(4000), 20},
		{"grid", plantest.Grid(400), 100},
		{"office", plantest.Office(1, 5000), 10},
	} {
		m := meshOf(t, c.plan)
		w := widthsOf(t, m)
		per := w.Steps() / int64(len(m.Tris))
		t.Logf("%s: %d triangles, %d gaps, %d steps for each triangle", c.name, len(m.Tris), w.Gaps(), per)
		if per > c.most {
			t.Errorf("%s: %d steps for each triangle, want %d at most", c.name, per, c.most)
		}
	}
}

// TestWidthsAreGivenUp: a row that slants by fractions of a grid unit has a long gap at each of its corners. Past a number of
// steps no gaps are made, rather than wrong ones.
func TestWidthsAreGivenUp(t *testing.T) {
	m := meshOf(t, plantest.SlantingRow(3000))
	defer walk.LimitSteps(100_000)()
	w, err := walk.NewWidths(context.Background(), m)
	if !errors.Is(err, walk.ErrCrowded) || w != nil {
		t.Errorf("widths %v, error %v; want %v", w != nil, err, walk.ErrCrowded)
	}
}

// TestWidthsOfWallsInPieces: a wall that is drawn in many pieces on one line narrows ways as the same wall drawn at once.
func TestWidthsOfWallsInPieces(t *testing.T) {
	const box = "floor 0,0 20,0 20,10 0,10; "
	var pieces strings.Builder
	for x := 4; x < 16; x++ {
		pieces.WriteString("; wall " + string("0123456789"[x/10]) + string("0123456789"[x%10]) + ",4 " + string("0123456789"[(x+1)/10]) + string("0123456789"[(x+1)%10]) + ",4")
	}
	whole := widthsOf(t, build(t, box+"wall 4,4 16,4; wall 6,6 20,6"))
	cut := widthsOf(t, build(t, box+strings.TrimPrefix(pieces.String(), "; ")+"; wall 6,6 20,6"))
	if whole.Gaps() != cut.Gaps() {
		t.Errorf("%d gaps, and %d with the wall in pieces", whole.Gaps(), cut.Gaps())
	}
	narrowed := 0
	for x := 0.5; x < 20; x += 1.5 {
		for _, y := range []float64{1, 5, 8} {
			from := at(x, y)
			if whole.From(from) != nil || cut.From(from) != nil {
				t.Fatalf("no start at %v, %v", x, y)
			}
			for gx := 0.25; gx < 20; gx += 1.25 {
				for _, gy := range []float64{2, 5, 9} {
					a, b := whole.ToPoint(at(gx, gy)), cut.ToPoint(at(gx, gy))
					if a != b {
						t.Fatalf("from %v, %v to %v, %v: %v, in pieces %v", x, y, gx, gy, a, b)
					}
					if !math.IsInf(a.Clear, 1) {
						narrowed++
					}
				}
			}
		}
	}
	if narrowed < 100 {
		t.Errorf("%d ways are narrowed: the plan lost its aim", narrowed)
	}
}
