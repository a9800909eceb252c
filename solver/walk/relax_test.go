package walk_test

import (
	"context"
	"errors"
	"fmt"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plantest"
	"enfilade/solver/walk"
)

// TestTiesAgainstWholeWalks: which of two equally long walks to a root is taken, and whether they are one walk or two, comes out
// the same whether they are compared where they differ or from end to end.
func TestTiesAgainstWholeWalks(t *testing.T) {
	ties, single := 0, 0
	check := func(t interface{ Fatalf(string, ...any) }, fast, slow []walk.Settled) {
		if !slices.Equal(fast, slow) {
			t.Fatalf("settled as\n%v, want\n%v", fast, slow)
		}
		for _, s := range fast {
			if s.Ties {
				ties++
			} else {
				single++
			}
		}
	}
	for name, plans := range plantest.Small() {
		t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
			p := plans.Draw(t, "plan")
			t.Log(plantest.Text(p))
			g, m := graphAndMesh(t, p)
			at := places(p, g)
			for _, from := range at {
				fast, slow, err := walk.New(m).SettleTwice(context.Background(), from)
				if errors.Is(err, walk.ErrInside) {
					continue
				}
				if err != nil {
					t.Fatal(err)
				}
				check(t, fast, slow)
			}
		}))
	}
	for _, c := range []struct {
		text string
		from exact.Pt
	}{
		// One of the walks passes the fork straight on.
		{"floor 0,0 20,0 20,20 0,20; block 14,10 14,14 10,14; wall 10,10 0,20", exact.Pt{X: 6 * metre, Y: 10 * metre}},
		{"floor 0,0 20,0 20,20 0,20; block 14,10 14,14 10,14; wall 10,10 20,0", exact.Pt{X: 10 * metre, Y: 6 * metre}},
		// Two walks are one, but to a corner on it leads another one, too.
		{"floor 0,0 20,0 20,20 0,20; wall 6,10 8.8,8.4; wall 10,10 10,0; wall 10,8 12,8 12,10", exact.Pt{X: 48 * metre / 10, Y: 84 * metre / 10}},
	} {
		fast, slow, err := walk.New(build(t, c.text)).SettleTwice(context.Background(), c.from)
		if err != nil {
			t.Fatal(err)
		}
		check(t, fast, slow)
	}
	for _, m := range []*mesh.Mesh{blocks(t, 0, 0), blocks(t, 0, 1), blocks(t, 1, 0), blocks(t, 1, 1)} {
		for i := range 9 {
			fast, slow, err := walk.New(m).SettleTwice(context.Background(), exact.Pt{X: int32(1+i%5) * metre, Y: int32(1+i/2) * metre})
			if err != nil {
				t.Fatal(err)
			}
			check(t, fast, slow)
		}
	}
	if ties < 400 || single < 1000 {
		t.Errorf("%d roots with ties, %d without: the plans have lost their aim", ties, single)
	}
}

// blocks returns a floor with rows of blocks of 2 m, so many metres apart from one another beside the one between them.
func blocks(t testing.TB, wider, higher int) *mesh.Mesh {
	text := "floor 0,0 30,0 30,30 0,30"
	for i := range 16 {
		x, y := 2+i%4*(4+wider), 2+i/4*(4+higher)
		text += fmt.Sprintf("; block %d,%d %d,%d %d,%d %d,%d", x, y, x+2, y, x+2, y+2, x, y+2)
	}
	return build(t, text)
}
