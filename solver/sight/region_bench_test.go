package sight_test

import (
	"fmt"
	"slices"
	"testing"
	"time"

	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// benchEyes is how many eyes a region is measured from, one after the other.
const benchEyes = 2000

// BenchmarkRegion measures whole regions, point location and border included, from eyes all over the plan: mean time,
// median time, and triangles entered.
func BenchmarkRegion(b *testing.B) {
	for _, kind := range plantest.Kinds {
		for _, walls := range []int{1000, 10_000, 100_000} {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", kind.Name, walls), func(b *testing.B) {
				g, err := plantest.NewGround(kind.Make(1, walls))
				if err != nil {
					b.Fatal(err)
				}
				benchRegions(b, g)
			})
		}
	}
}

func benchRegions(b *testing.B, g *plantest.Ground) {
	eyes := g.Places(1, benchEyes)
	f := sight.New(g.Mesh)
	times := make([]time.Duration, len(eyes))
	expanded, corners := 0, 0
	for _, eye := range eyes { // grows the buffers
		r, err := f.Region(eye, plantest.Eye)
		if err != nil {
			b.Fatal(err)
		}
		expanded += r.Expanded
		corners += r.Len()
	}
	for i, eye := range eyes {
		t := time.Now()
		f.Region(eye, plantest.Eye)
		times[i] = time.Since(t)
	}
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		f.Region(eyes[i%len(eyes)], plantest.Eye)
	}
	slices.Sort(times)
	perRegion := float64(expanded) / float64(len(eyes))
	b.ReportMetric(float64(times[len(times)/2]), "median-ns")
	b.ReportMetric(perRegion, "triangles")
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/perRegion, "ns/triangle")
	b.ReportMetric(float64(corners)/float64(len(eyes)), "corners")
}
