package walk_test

import (
	"context"
	"errors"
	"math"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

func widthsOf(t interface{ Fatal(...any) }, m *mesh.Mesh) *walk.Widths {
	w, err := walk.NewWidths(context.Background(), m)
	if err != nil {
		t.Fatal(err)
	}
	return w
}

// TestWidths holds clear widths against figures worked out by hand, in metres.
func TestWidths(t *testing.T) {
	const (
		room     = "floor 0,0 10,0 10,10 0,10; "
		pillars  = "floor 0,0 9,0 9,9 0,9; block 0,0 4,0 4,4 0,4; block 5,5 9,5 9,9 5,9; "
		twoDoors = room + "wall 5,0 5,2; wall 5,2.8 5,7; wall 5,8.1 5,10"
	)
	free := math.Inf(1)
	for _, c := range []struct {
		name, plan     string
		start, goal    exact.Pt
		clear          float64
		ax, ay, bx, by float64
	}{
		{"between two pillars", pillars, at(2, 7), at(7, 2), math.Sqrt2, 4, 4, 5, 5},
		{"the same, off their diagonal", pillars, at(2, 7), at(5, 4.5), math.Sqrt2, 4, 4, 5, 5},
		{"a door", room + "wall 5,0 5,4; wall 5,4.8 5,10", at(2, 5), at(8, 5), .8, 5, 4, 5, 4.8},
		{"a door in a thick wall", room + "wall 5,0 5,10 th=0.3; door W1 at=4 w=0.8", at(2, 5), at(8, 5), .8, 5.15, 4, 5.15, 4.8},
		{"the wider of two doors", twoDoors, at(2, 1), at(8, 1), 1.1, 5, 7, 5, 8.1},
		{"a corner and a wall", room + "block 3,3 5,1 7,3", at(1, 1), at(9, 1), 3, 7, 3, 10, 3},
		{"below the corner, the way round being shut", room + "block 3,3 5,1 7,3; wall 5,3 5,10", at(1, 1), at(9, 1), 1, 5, 0, 5, 1},
		{"a corner and a slanted wall", room + "block 0,6 8,10 0,10; wall 4,4 4,0", at(1, 1), at(9, 1), 4 * 2 / math.Sqrt(5) * 5 / 5, 2.4, 7.2, 4, 4},
		{"from the jambs' own line", room + "wall 5,0 5,4; wall 5,4.8 5,10", at(5, 4.4), at(8, 4.5), free, 0, 0, 0, 0},
		{"from a jamb", room + "wall 5,0 5,4; wall 5,4.8 5,10", at(5, 4), at(8, 4.5), free, 0, 0, 0, 0},
		{"along a corridor, past a jamb", room + "wall 5,0 5,4; wall 5,4.8 5,10", at(8, 4.5), at(8, 5), 5, 5, 4.8, 10, 4.8},
		{"to the back of a wall, on any side", room + "wall 5,0 5,4; wall 5,4.8 5,10", at(2, 2), at(5, 2), free, 0, 0, 0, 0},
		{"within a room", room, at(1, 1), at(9, 9), free, 0, 0, 0, 0},
		{"around a pillar in the open", room + "block 4,4 6,4 6,6 4,6", at(1, 5), at(9, 5), 4, 6, 4, 10, 4}, // of four as wide, the last
		{"through glass", room + "glass 5,0 5,10", at(1, 5), at(9, 5), 0, 0, 0, 0, 0},
		{"through a curtain", room + "wall 5,0 5,4; screen 5,4 5,4.8; wall 5,4.8 5,10", at(2, 5), at(8, 5), .8, 5, 4, 5, 4.8},
		{"between walls that touch", room + "wall 5,0 5,5; wall 5,5 5,10", at(2, 5), at(8, 5), 0, 0, 0, 0, 0},
	} {
		w := widthsOf(t, build(t, c.plan))
		if err := w.From(c.start); err != nil {
			t.Fatalf("%s: %v", c.name, err)
		}
		got := w.ToPoint(c.goal)
		if got.Found != (c.clear > 0) || got.Clear != c.clear*metre && math.Abs(got.Clear/metre-c.clear) > 1e-12 {
			t.Errorf("%s: %v m, found %v, want %v", c.name, got.Clear/metre, got.Found, c.clear)
		}
		for i, want := range [2][2]float64{{c.ax, c.ay}, {c.bx, c.by}} {
			if math.Abs(got.Gap[i][0]/metre-want[0]) > 1e-9 || math.Abs(got.Gap[i][1]/metre-want[1]) > 1e-9 {
				t.Errorf("%s: the gap is %v, want its end at %v m", c.name, got.Gap, want)
			}
		}
		if err := w.From(c.goal); err != nil {
			t.Fatal(err)
		}
		if back := w.ToPoint(c.start); back != got {
			t.Errorf("%s: %v there, %v back", c.name, got, back)
		}
	}
}

// TestWidthsToCones holds the clear width of approaches, from a start to wherever a target is first seen, worked out by hand.
func TestWidthsToCones(t *testing.T) {
	const doors = "floor 0,0 12,0 12,4 0,4; wall 4,0 4,0.3; wall 4,1.2 4,4; wall 8,0 8,2.5; wall 8,3.2 8,4; "
	for _, c := range []struct {
		name, plan    string
		start, target exact.Pt
		clear         float64
	}{
		{"seen through the second door", doors, at(1, 3), at(10, 3), .9}, // past the first door only
		{"seen only beyond both", doors + "screen 8,2.5 8,3.2", at(1, 3), at(10, 3), .7},
		{"seen from the start", doors, at(7, 2), at(5, 3), math.Inf(1)},
		{"seen through glass, and no way to it", doors + "glass 8,2.5 8,3.2", at(1, 3), at(10, 3), .9},
		{"the region is only behind glass", "floor 0,0 12,0 12,4 0,4; wall 4,0 4,3; glass 4,3 4,4; wall 8,0 8,4", at(1, 1), at(10, 3), 0},
	} {
		m := build(t, c.plan)
		cones, err := sight.New(m).Cones(c.target, eye, sight.Clip{})
		if err != nil {
			t.Fatal(err)
		}
		w := widthsOf(t, m)
		if err := w.From(c.start); err != nil {
			t.Fatal(err)
		}
		got := w.ToCones(c.target, cones)
		if got.Found != (c.clear > 0) || got.Clear != c.clear*metre && math.Abs(got.Clear/metre-c.clear) > 1e-12 {
			t.Errorf("%s: %v m, found %v, want %v", c.name, got.Clear/metre, got.Found, c.clear)
		}
		var pieces []sight.Piece
		for _, k := range cones {
			p := sight.Piece{Tri: k.Tri, N: 2}
			p.Lines[0], p.Lines[1] = exact.Line{At: c.target, Dir: k.R}, exact.Line{At: c.target, Dir: k.L.Neg()}
			pieces = append(pieces, p)
		}
		if again := w.ToPieces(pieces); again != got {
			t.Errorf("%s: %v to its cones, %v to the same as pieces", c.name, got, again)
		}
	}
}

func TestWidthsErrors(t *testing.T) {
	m := build(t, pillar)
	w := widthsOf(t, m)
	if err := w.From(at(5, 5)); !errors.Is(err, walk.ErrInside) {
		t.Errorf("from inside the pillar: %v", err)
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := walk.NewWidths(ctx, m); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
}
