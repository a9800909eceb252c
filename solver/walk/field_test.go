package walk_test

import (
	"context"
	"errors"
	"fmt"
	"math"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/mesh"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/walk"
)

func fieldOf(t interface{ Fatal(...any) }, m *mesh.Mesh, start exact.Pt) *walk.Field {
	f, err := walk.New(m).Field(context.Background(), start)
	if err != nil {
		t.Fatal(err)
	}
	return f
}

// zoneMesh returns a mesh whose only floor is what a ring winds around.
func zoneMesh(t interface{ Fatal(...any) }, ring []exact.Pt) *mesh.Mesh {
	o := arrange.Outline{Items: make([]plan.Ref, 1), Bodies: make([]arrange.Body, 1)}
	for i, a := range ring {
		if b := ring[(i+1)%len(ring)]; a != b {
			o.Segments = append(o.Segments, arrange.Segment{A: a, B: b})
		}
	}
	m, err := arrange.Build(context.Background(), arrange.Round(&o))
	if err != nil {
		t.Fatal(err)
	}
	return m
}

func ringOf(coords ...float64) []exact.Pt {
	var ring []exact.Pt
	for i := 0; i < len(coords); i += 2 {
		ring = append(ring, at(coords[i], coords[i+1]))
	}
	return ring
}

// TestFieldSpan holds nearest and farthest figures of zones against figures worked out by hand, in metres.
func TestFieldSpan(t *testing.T) {
	ten := math.Sqrt(10)
	for _, c := range []struct {
		name, plan   string
		start        exact.Pt
		zone         []exact.Pt
		near, far    float64
		nearX, nearY float64
		farX, farY   float64
		cut          bool
	}{
		{"in the open", lRoom, at(1, 1), ringOf(3, 0.5, 5, 0.5, 5, 1.5, 3, 1.5), 2, math.Hypot(4, .5), 3, 1, 5, .5, false},
		{"around the start", lRoom, at(1, 1), ringOf(0, 0, 2, 0, 2, 2, 0, 2), 0, math.Sqrt2, 1, 1, 0, 0, false},
		{"round the bend", lRoom, at(5, 1), ringOf(0, 5, 1, 5, 1, 6, 0, 6), ten + ten, ten + math.Hypot(2, 4), 1, 5, 0, 6, false},
		{"farther than the floor", lRoom, at(5, 1), ringOf(-9, 4, 9, 4, 9, 9, -9, 9), ten + 2, ten + math.Hypot(2, 4), 2, 4, 0, 6, false},
		// Behind the pillar both ways are as long along the line x = 5, which leaves the zone at (5, 9).
		{"between two ways", pillar, at(5, 1), ringOf(4.5, 8, 5.5, 8, 5.5, 9, 4.5, 9), ten + 2 + math.Hypot(.5, 2), 2 + 2*ten, 4.5, 8, 5, 9, false},
		{"a ring that is not convex", "floor 0,0 9,0 9,9 0,9", at(8, 8), ringOf(0, 0, 9, 0, 9, 1, 1, 1, 1, 9, 0, 9), 7, 8 * math.Sqrt2, 1, 8, 0, 0, false},
		{"half of it shut off", "floor 0,0 9,0 9,9 0,9; wall 5,0 5,9", at(1, 1), ringOf(4, 0, 8, 0, 8, 2, 4, 2), 3, math.Hypot(4, 1), 4, 1, 5, 0, true},
		{"all of it shut off", "floor 0,0 9,0 9,9 0,9; wall 5,0 5,9", at(1, 1), ringOf(6, 0, 8, 0, 8, 2, 6, 2), math.NaN(), 0, 0, 0, 0, 0, false},
		{"off the floor", lRoom, at(1, 1), ringOf(3, 3, 6, 3, 6, 6, 3, 6), math.NaN(), 0, 0, 0, 0, 0, false},
	} {
		m := build(t, c.plan)
		s := fieldOf(t, m, c.start).Span(walk.NewZone(m, zoneMesh(t, c.zone)))
		if math.IsNaN(c.near) {
			if s.Found {
				t.Errorf("%s: %+v", c.name, s)
			}
			continue
		}
		for _, f := range [][2]float64{{s.Near, c.near}, {s.Far, c.far}, {s.NearAt[0], c.nearX}, {s.NearAt[1], c.nearY}, {s.FarAt[0], c.farX}, {s.FarAt[1], c.farY}} {
			if math.Abs(f[0]/metre-f[1]) > 1e-9 {
				t.Errorf("%s: %+v, want %v to %v", c.name, s, c.near, c.far)
				break
			}
		}
		if s.Cut != c.cut {
			t.Errorf("%s: cut %v", c.name, s.Cut)
		}
	}
}

// TestFieldContours draws contours where they are known: circles around the start in the open, and around the bend behind it.
func TestFieldContours(t *testing.T) {
	m := build(t, lRoom)
	d := fieldOf(t, m, at(5, 1))
	length := map[float64]float64{}
	err := d.Contours(context.Background(), metre, 1, func(level float64, line [][2]float64) {
		for i := 1; i < len(line); i++ {
			length[level/metre] += math.Hypot(line[i][0]-line[i-1][0], line[i][1]-line[i-1][1]) / metre
		}
		for _, p := range line {
			x, y, want := p[0]/metre-5, p[1]/metre-1, level/metre
			if r := math.Hypot(x, y); p[0] > 2*metre && math.Abs(r-want) > 1e-9 {
				t.Errorf("the contour of %v m passes %v, %v m from the start", want, p, r)
			}
		}
	})
	if err != nil {
		t.Fatal(err)
	}
	// At 1 m a whole circle, at 2 m what of one lies in the arm of the room. At 5 m the end of the arm to the line over the bend,
	// 1 to sqrt 10, and from there on an arc around the bend.
	bend := 1 / math.Sqrt(10)
	for level, want := range map[float64]float64{
		1: 2 * math.Pi,
		2: 2 * 2 * math.Asin(.5),
		5: 5*(math.Asin(.2)+math.Asin(bend)) + (5-math.Sqrt(10))*math.Acos(bend),
	} {
		if math.Abs(length[level]-want) > 1e-3*want {
			t.Errorf("the contour of %v m is %v m long, want %v", level, length[level], want)
		}
	}
}

func TestFieldErrors(t *testing.T) {
	f := walk.New(build(t, pillar))
	if _, err := f.Field(context.Background(), at(5, 5)); !errors.Is(err, walk.ErrInside) {
		t.Errorf("from inside the pillar: %v", err)
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	d, err := f.Field(context.Background(), at(1, 1))
	if err != nil {
		t.Fatal(err)
	}
	if err := d.Contours(ctx, metre, 1, func(float64, [][2]float64) {}); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
	if far, ok := d.At(at(5, 5)); ok {
		t.Errorf("inside the pillar at %v", far)
	}
}

func BenchmarkField(b *testing.B) {
	for _, walls := range []int{1000, 10_000, 100_000} {
		p := plantest.Office(1, walls)
		o, _ := arrange.Draw(p)
		m, err := arrange.Build(context.Background(), arrange.Round(o))
		if err != nil {
			b.Fatal(err)
		}
		start, other := p.Parts().Starts[0].At, p.Parts().Starts[1].At
		f := walk.New(m)
		b.Run(fmt.Sprintf("plan=office/walls=%d/flood", walls), func(b *testing.B) {
			for b.Loop() {
				if _, err := f.Field(context.Background(), start); err != nil {
					b.Fatal(err)
				}
			}
		})
		d := fieldOf(b, m, start)
		b.Run(fmt.Sprintf("plan=office/walls=%d/query", walls), func(b *testing.B) {
			for b.Loop() {
				d.At(other)
			}
		})
		b.Run(fmt.Sprintf("plan=office/walls=%d/contours", walls), func(b *testing.B) {
			for b.Loop() {
				if err := d.Contours(context.Background(), 5*metre, 10, func(float64, [][2]float64) {}); err != nil {
					b.Fatal(err)
				}
			}
		})
		lo, hi := p.Floor().At(0), p.Floor().At(2)
		z := walk.NewZone(m, zoneMesh(b, []exact.Pt{lo, {X: hi.X, Y: lo.Y}, hi, {X: lo.X, Y: hi.Y}}))
		b.Run(fmt.Sprintf("plan=office/walls=%d/span", walls), func(b *testing.B) {
			for b.Loop() {
				d.Span(z)
			}
		})
	}
}
