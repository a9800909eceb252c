package paint_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/canvas/paint"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

func TestChoose(t *testing.T) {
	if o, s, g := paint.Choose(plan.New()); o != "" || s != "" || g != "" {
		t.Errorf("an empty plan chooses %q, %q, %q", o, s, g)
	}
	if o, s, g := paint.Choose(plantest.Parse(t, "observer 1,1; observer 2,2; start 1,1; target 3,3; target 4,4")); o != "O1" || s != "S1" || g != "T1" {
		t.Errorf("chosen are %q, %q, %q, want the first of each", o, s, g)
	}
}

func TestBounds(t *testing.T) {
	if b := paint.Bounds(plan.New()); b.Max[0] >= b.Min[0] {
		t.Errorf("an empty plan has bounds %v", b)
	}
	want := orb.Bound{Min: orb.Point{0, 0}, Max: orb.Point{8000, 5000}}
	if b := paint.Bounds(plantest.Parse(t, "floor 0,0 8,0 8,5 0,5; wall 1,1 2,1")); b != want {
		t.Errorf("bounds with a floor are %v, want %v", b, want)
	}
	want = orb.Bound{Min: orb.Point{-1000, -1000}, Max: orb.Point{4000, 3000}}
	if b := paint.Bounds(plantest.Parse(t, "wall 1,1 2,1")); b != want {
		t.Errorf("bounds without a floor are %v, want two metres around the wall: %v", b, want)
	}
}

// TestHatchPans: a hatch moves with the plan, it does not stay with the picture.
func TestHatchPans(t *testing.T) {
	s := sceneOf(t, named(t, twoRooms), 520, 360, 1)
	offset := func() paint.HatchStyle { return paint.Base(s).Hatches[0] }
	before := offset()
	s.Camera = s.Camera.Pan(3, -4)
	after := offset()
	period := float64(before.Gap) * math.Sqrt2
	moved := math.Mod(float64(after.Offset-before.Offset)-7+10*period, period) // falling: x - y grows by 3 + 4
	if min(moved, period-moved) > 1e-3 {
		t.Errorf("after a pan by 3, -4 the hatch moved by %g, want 7 modulo %g", after.Offset-before.Offset, period)
	}
}

// TestGeometry: the handle and the mat, which hands hit, lie where the picture draws them.
func TestGeometry(t *testing.T) {
	s := sceneOf(t, named(t, twoRooms), 520, 360, 2)
	o := s.Plan.Parts().Observers[0]
	x, y := paint.HandlePlace(s.Camera, o)
	cx, cy := s.Camera.Pixel(o.At)
	if math.Abs(math.Hypot(x-cx, y-cy)-paint.HandleDistance*2) > 1e-9 || y >= cy || x <= cx {
		t.Errorf("the handle of an observer that looks to the upper right lies at %g, %g of it", x-cx, y-cy)
	}
	st := s.Plan.Parts().Starts[0] // faces up
	x, y = paint.MatPlace(s.Camera, st)
	cx, cy = s.Camera.Pixel(st.At)
	if want := max(paint.MatDistance*s.Camera.Scale, paint.MatLeast*2); math.Abs(y-cy-want) > 1e-9 || math.Abs(x-cx) > 1e-9 {
		t.Errorf("the mat lies at %g, %g of its start, want %g below", x-cx, y-cy, want)
	}
}

func ExampleOverlay() {
	s := &paint.Scene{Plan: plan.New(), Theme: paint.Light()}
	s.Camera.W, s.Camera.H, s.Camera.K, s.Camera.Scale = 300, 200, 1, 0.037
	var l paint.List // kept from frame to frame
	paint.Overlay(s, &l)
	op := l.Ops[0]
	fmt.Println(op.Kind == paint.Fill, len(l.Path(&op)), l.Points[0])
	// Output: true 1 {46 176}
}
