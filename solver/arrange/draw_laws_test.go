package arrange_test

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// drawn returns what an outline draws, without its order: one row a segment with what it stops and whose body it bounds.
func drawn(o *arrange.Outline) []string {
	rows := make([]string, 0, len(o.Segments))
	for _, s := range o.Segments {
		rows = append(rows, fmt.Sprint(s.A, s.B, s.Stops, o.Items[s.Item], s.Body == arrange.NoBody))
	}
	slices.Sort(rows)
	return rows
}

// genParts draws a crowded plan: walls of few thicknesses whose ends often meet, with openings.
func genParts(t *rapid.T) plan.Parts {
	coord := rapid.Int32Range(-6, 6)
	spread := rapid.SampledFrom([]int32{1, 7, 100, 1000}).Draw(t, "spread")
	point := rapid.Custom(func(t *rapid.T) exact.Pt { return pt(coord.Draw(t, "x")*spread, coord.Draw(t, "y")*spread) })
	p := plan.Parts{Floor: chain("-100000,-100000 100000,-100000 100000,100000 -100000,100000")}
	for i := range rapid.IntRange(1, 5).Draw(t, "walls") {
		w := plan.Wall{ID: fmt.Sprint("W", i), Height: plan.Ceiling,
			Thickness: rapid.SampledFrom([]int32{0, 1, 20, 20, 21, 200}).Draw(t, "thickness"),
			Justify:   rapid.SampledFrom([]plan.Justify{plan.Centre, plan.Left, plan.Right}).Draw(t, "justify"),
			Line:      plan.ChainOf(rapid.SliceOfN(point, 2, 6).Draw(t, "line")...)}
		if rapid.Bool().Draw(t, "closed") {
			w.Line = plan.ChainOf(append(w.Line.Points(), w.Line.At(0))...)
		}
		p.Walls = append(p.Walls, w)
		for range rapid.IntRange(0, 2).Draw(t, "openings") {
			k := rapid.IntRange(0, w.Line.Len()-2).Draw(t, "segment")
			l := int32(exact.Dist(w.Line.At(k), w.Line.At(k+1)))
			if l < 2 {
				continue
			}
			at := rapid.Int32Range(0, l-1).Draw(t, "at")
			o := door(fmt.Sprint("D", len(p.Openings)), w.ID, k, at, rapid.Int32Range(1, l-at).Draw(t, "width"))
			o.Shut, o.Leaf = rapid.Bool().Draw(t, "shut"), rapid.SampledFrom([]plan.Leaf{plan.SolidLeaf, plan.GlazedLeaf}).Draw(t, "leaf")
			p.Openings = append(p.Openings, o)
		}
	}
	return p
}

// carried returns the plan with every point carried over by f; flip says that f mirrors.
func carried(p plan.Parts, f func(exact.Pt) exact.Pt, flip bool) plan.Parts {
	over := func(c plan.Chain) plan.Chain {
		pts := c.Points()
		for i := range pts {
			pts[i] = f(pts[i])
		}
		return plan.ChainOf(pts...)
	}
	p.Floor = over(p.Floor)
	p.Walls = slices.Clone(p.Walls)
	for i := range p.Walls {
		p.Walls[i].Line = over(p.Walls[i].Line)
		if flip && p.Walls[i].Justify != plan.Centre {
			p.Walls[i].Justify = plan.Left + plan.Right - p.Walls[i].Justify
		}
	}
	return p
}

func TestDrawLaws(t *testing.T) {
	moves := []struct {
		name string
		f    func(exact.Pt) exact.Pt
		flip bool
	}{
		{"shift", func(p exact.Pt) exact.Pt { return pt(p.X+1_234_567, p.Y-7_654_321) }, false},
		{"quarter turn", func(p exact.Pt) exact.Pt { return pt(-p.Y, p.X) }, false},
		{"half turn", func(p exact.Pt) exact.Pt { return pt(-p.X, -p.Y) }, false},
		{"mirror in y", func(p exact.Pt) exact.Pt { return pt(-p.X, p.Y) }, true},
		{"mirror in the diagonal", func(p exact.Pt) exact.Pt { return pt(p.Y, p.X) }, true},
	}
	rapid.Check(t, func(t *rapid.T) {
		parts := genParts(t)
		before, _ := arrange.Draw(plan.From(parts))
		for _, m := range moves {
			after, _ := arrange.Draw(plan.From(carried(parts, m.f, m.flip)))
			moved := *before
			moved.Segments = slices.Clone(before.Segments)
			for i := range moved.Segments {
				s := &moved.Segments[i]
				s.A, s.B = m.f(s.A), m.f(s.B)
				if m.flip && s.Body != arrange.NoBody {
					s.A, s.B = s.B, s.A
				}
			}
			if got, want := drawn(after), drawn(&moved); !slices.Equal(got, want) {
				t.Fatalf("%s: got\n%v\nwant\n%v", m.name, got, want)
			}
		}
		shuffled := parts
		shuffled.Walls = rapid.Permutation(parts.Walls).Draw(t, "walls")
		shuffled.Openings = rapid.Permutation(parts.Openings).Draw(t, "openings")
		after, _ := arrange.Draw(plan.From(shuffled))
		if got, want := drawn(after), drawn(before); !slices.Equal(got, want) {
			t.Fatalf("order: got\n%v\nwant\n%v", got, want)
		}
	})
}

// winding returns the winding number of a body's outline about q, which lies on no segment's line by its half-unit place.
func winding(o *arrange.Outline, body int32, x, y float64) int {
	w := 0
	for _, s := range o.Segments {
		if s.Body != body {
			continue
		}
		ax, ay, bx, by := float64(s.A.X), float64(s.A.Y), float64(s.B.X), float64(s.B.Y)
		if (ay > y) == (by > y) {
			continue
		}
		if side := (bx-ax)*(y-ay) - (by-ay)*(x-ax); side > 0 && by > ay {
			w++
		} else if side < 0 && by < ay {
			w--
		}
	}
	return w
}

// TestDrawAgainstRectangles compares wall bodies with their meaning: what lies well inside the rectangle of a stretch of
// wall is inside a body; what lies well outside of all rectangles and of all discs a mitre can reach is inside none; and no
// place is wound about backwards.
func TestDrawAgainstRectangles(t *testing.T) {
	inside, outside := 0, 0
	rapid.Check(t, func(t *rapid.T) {
		parts := genParts(t)
		o, _ := arrange.Draw(plan.From(parts))
		for range 40 {
			x := rapid.Float64Range(-7000, 7000).Draw(t, "x")
			y := rapid.Float64Range(-7000, 7000).Draw(t, "y")
			if rapid.Bool().Draw(t, "near") {
				x, y = x/100, y/100
			}
			in, far := place(parts, x, y)
			some := false
			for i, b := range o.Bodies {
				if i == 0 || o.Items[b.Item].Kind != plan.KindWall {
					continue
				}
				w := winding(o, int32(i), x, y)
				some = some || w != 0
				if w < 0 && !nearOutline(o, int32(i), x, y) {
					t.Fatalf("%v,%v is wound about backwards", x, y)
				}
			}
			if in {
				inside++
			}
			if far {
				outside++
			}
			if in && !some {
				t.Fatalf("%v,%v lies within a wall but in no body", x, y)
			}
			if far && some {
				t.Fatalf("%v,%v lies in a body but away from every wall", x, y)
			}
		}
	})
	if inside < 20 || outside < 500 {
		t.Errorf("%d places inside and %d outside: the generator lost its aim", inside, outside)
	}
}

// nearOutline reports whether a place lies within two units of a body's outline, where rounding may fold it over.
func nearOutline(o *arrange.Outline, body int32, x, y float64) bool {
	for _, s := range o.Segments {
		if s.Body != body {
			continue
		}
		dx, dy := float64(s.B.X-s.A.X), float64(s.B.Y-s.A.Y)
		px, py := x-float64(s.A.X), y-float64(s.A.Y)
		u := min(1, max(0, (px*dx+py*dy)/(dx*dx+dy*dy)))
		if math.Hypot(px-u*dx, py-u*dy) < 2 {
			return true
		}
	}
	return false
}

// place says whether a place lies at least two units inside the rectangle of a stretch between openings, and whether it lies
// at least two units outside of all of them and of what mitres may reach.
func place(parts plan.Parts, x, y float64) (in, far bool) {
	far = true
	for _, w := range parts.Walls {
		r2, l2 := w.Sides2()
		right, left := float64(r2)/2, float64(l2)/2
		rim := rimOf(parts, w)
		for k := 0; k+1 < w.Line.Len(); k++ {
			a, b := w.Line.At(k), w.Line.At(k+1)
			l := exact.Dist(a, b)
			if l == 0 {
				continue
			}
			dx, dy := float64(b.X-a.X)/l, float64(b.Y-a.Y)/l
			u := (x-float64(a.X))*dx + (y-float64(a.Y))*dy
			v := (y-float64(a.Y))*dx - (x-float64(a.X))*dy
			reach := 4*max(right, left) + 2
			if math.Hypot(x-float64(a.X), y-float64(a.Y)) < reach || math.Hypot(x-float64(b.X), y-float64(b.Y)) < reach {
				far = false
			}
			if u > -2 && u < l+2 && v > -right-2 && v < left+2 {
				far = false
			}
			open := false
			for _, d := range parts.Openings {
				open = open || d.Wall == w.ID && d.Segment == k && u > float64(d.At)-2 && u < float64(d.At+d.Width)+2
			}
			if !open && u > rim && u < l-rim && v > -right+2 && v < left-2 {
				in = true
			}
		}
	}
	return in, far
}

// rimOf returns how far from the ends of its legs a wall's rectangles are held to be inside. A mitre cuts a rectangle's
// corner off where the thickness lies on one side only, and where the leg beside it is shorter than the corner.
func rimOf(parts plan.Parts, w plan.Wall) float64 {
	plain := w.Justify == plan.Centre
	for _, d := range parts.Openings {
		plain = plain && d.Wall != w.ID
	}
	for k := 0; k+1 < w.Line.Len(); k++ {
		plain = plain && exact.Dist(w.Line.At(k), w.Line.At(k+1)) > 4*float64(w.Thickness)
	}
	if plain {
		return 2
	}
	return 2 + 2*float64(w.Thickness)
}
