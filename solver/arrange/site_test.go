package arrange_test

import (
	"context"
	"math/rand/v2"
	"reflect"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// TestSiteAgainstSteps: a site, whose points are triangulated while its segments are drawn, is what rounding and building one
// after the other make, also where outlines run there and back and leave points behind that no edge ends at.
func TestSiteAgainstSteps(t *testing.T) {
	left := 0
	for seed := range uint64(120) {
		r := rand.New(rand.NewPCG(seed, 12))
		o := &arrange.Outline{Items: []plan.Ref{{}}, Bodies: []arrange.Body{{}}}
		square(o, 0, 0, 0, 1000, 1000, arrange.Stops{})
		for range r.IntN(60) {
			at := func() exact.Pt { return exact.Pt{X: 1 + r.Int32N(998), Y: 1 + r.Int32N(998)} }
			a, b := at(), at()
			if a == b {
				continue
			}
			s := arrange.Segment{A: a, B: b, Stops: arrange.Stops{Top: plan.Ceiling}, Body: arrange.NoBody}
			if r.IntN(3) == 0 { // a body without an inside
				body := int32(len(o.Bodies))
				o.Bodies = append(o.Bodies, arrange.Body{Stops: arrange.Stops{Walk: true}})
				s = arrange.Segment{A: a, B: b, Body: body}
				o.Segments = append(o.Segments, arrange.Segment{A: b, B: a, Body: body})
			}
			o.Segments = append(o.Segments, s)
		}
		site, err := arrange.NewSite(context.Background(), o)
		if err != nil {
			t.Fatal(err)
		}
		g := arrange.Round(o)
		if !reflect.DeepEqual(site.Graph, g) {
			t.Fatalf("seed %d: another graph", seed)
		}
		m, err := arrange.Build(context.Background(), g)
		if err != nil {
			t.Fatal(err)
		}
		if !reflect.DeepEqual(site.Mesh.Tris, m.Tris) || !reflect.DeepEqual(site.Mesh.Solid, m.Solid) {
			t.Fatalf("seed %d: another mesh", seed)
		}
		for _, s := range o.Segments {
			if !hasPoint(g, s.A) {
				left++
			}
		}
	}
	if left < 500 {
		t.Errorf("only %d ends were left behind", left)
	}
}

func hasPoint(g *arrange.Graph, p exact.Pt) bool {
	for _, q := range g.Pts {
		if p == q {
			return true
		}
	}
	return false
}
