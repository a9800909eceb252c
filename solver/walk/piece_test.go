package walk_test

import (
	"context"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// piecesOf turns cones into pieces.
func piecesOf(eye exact.Pt, cones []sight.Cone) []sight.Piece {
	var list []sight.Piece
	for _, k := range cones {
		p := sight.Piece{Tri: k.Tri, N: 2}
		p.Lines[0], p.Lines[1] = exact.Line{At: eye, Dir: k.R}, exact.Line{At: eye, Dir: k.L.Neg()}
		list = append(list, p)
	}
	return list
}

// TestFloodToPieces holds that a region given as pieces is walked to as the same region given as cones, in whatever order and
// however often its pieces are named; and that the walk ends at the piece it says.
func TestFloodToPieces(t *testing.T) {
	walks := 0
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			height := heights.Draw(t, "height")
			pick := rapid.IntRange(0, len(at)-1)
			start, target := at[pick.Draw(t, "start")], at[pick.Draw(t, "target")]
			cones, err := sight.New(m).Cones(target, height, sight.Clip{})
			if err != nil {
				return
			}
			pieces := piecesOf(target, cones)
			pieces = rapid.Permutation(append(pieces, pieces...)).Draw(t, "order")
			paths, err := walk.New(m).Flood(context.Background(), start, []walk.Goal{{Eye: target, Cones: cones}, {Pieces: pieces}})
			if err != nil {
				return
			}
			a, b := paths[0], paths[1]
			if a.Found != b.Found || a.Length != b.Length || a.End != b.End || !slices.Equal(a.Turns, b.Turns) || a.Ties != b.Ties {
				t.Errorf("from %v to %v at %v: over cones %+v, over pieces %+v", start, target, height, a, b)
			}
			if a.Piece != -1 || b.Found != (b.Piece >= 0) {
				t.Errorf("ends at pieces %d and %d", a.Piece, b.Piece)
			}
			if !b.Found {
				return
			}
			if b.Length > 0 {
				walks++
			}
			if off := beyond(m.Tris[pieces[b.Piece].Tri].P, &pieces[b.Piece], b.End); off > 1e-4 {
				t.Errorf("from %v to %v at %v: ends %v units off its piece", start, target, height, off)
			}
		}))
	}
	if walks < 20 {
		t.Errorf("only %d walks: the test has lost its aim", walks)
	}
}

// beyond returns how far a point lies outside a piece, measured to the line that it is farthest beyond.
func beyond(tri [3]exact.Pt, p *sight.Piece, at [2]float64) float64 {
	off := 0.0
	for _, l := range append([]exact.Line{exact.Through(tri[0], tri[1]), exact.Through(tri[1], tri[2]), exact.Through(tri[2], tri[0])}, p.Lines[:p.N]...) {
		x, y := at[0]-float64(l.At.X), at[1]-float64(l.At.Y)
		off = max(off, -(float64(l.Dir.X)*y-float64(l.Dir.Y)*x)/math.Sqrt(float64(l.Dir.Len2())))
	}
	return off
}
