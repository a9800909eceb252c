package cgal_test

import (
	"fmt"
	"slices"
	"testing"

	"enfilade/solver/plantest"
	"enfilade/solver/plantest/cgal"
)

// The benchmarks here are those of solver/arrange, solver/sight and solver/walk put to CGAL, on the same plans and places.
// CGAL measures itself, so one iteration tells: -benchtime=1x -count=5.

func eachGround(b *testing.B, run func(b *testing.B, r *cgal.Reference, g *plantest.Ground)) {
	for _, kind := range plantest.Kinds {
		for _, walls := range []int{1000, 10_000, 100_000} {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", kind.Name, walls), func(b *testing.B) {
				r := cgal.Start(b)
				g, err := plantest.NewGround(kind.Make(1, walls))
				if err != nil {
					b.Fatal(err)
				}
				r.Plan(g.Graph, plantest.Eye)
				run(b, r, g)
			})
		}
	}
}

// BenchmarkCGALBuild measures arrangement and triangulation of the rounded graph with the fast kernel.
func BenchmarkCGALBuild(b *testing.B) {
	eachGround(b, func(b *testing.B, r *cgal.Reference, _ *plantest.Ground) {
		var ns float64
		for b.Loop() {
			var err error
			if ns, err = r.BuildTime(); err != nil {
				b.Fatal(err)
			}
		}
		b.ReportMetric(ns, "ns/op")
	})
}

// BenchmarkCGALRegion measures regions as bare polygons with the fast kernel, point location included. That kernel rounds
// its crossings, and on a comb of 100,000 teeth CGAL finds a ray and a wall not to meet and gives up: there is no figure then.
func BenchmarkCGALRegion(b *testing.B) {
	eachGround(b, func(b *testing.B, r *cgal.Reference, g *plantest.Ground) {
		eyes := g.Places(1, 2000)
		var mean, median, corners float64
		for b.Loop() {
			var err error
			if mean, median, corners, err = r.RegionTimes(eyes); err != nil {
				b.Skipf("CGAL gives up: %v", err)
			}
		}
		b.ReportMetric(mean, "ns/op")
		b.ReportMetric(median, "median-ns")
		b.ReportMetric(corners, "corners")
	})
}

// BenchmarkCGALWalk measures geodesics on the flat mesh, sequence tree and query, up to 10,000 walls: beyond, the tree takes
// gigabytes.
func BenchmarkCGALWalk(b *testing.B) {
	eachGround(b, func(b *testing.B, r *cgal.Reference, g *plantest.Ground) {
		if g.Plan.NumWalls() > 10_000 {
			b.Skip("too large for CGAL's sequence tree")
		}
		places := g.Places(2, 64)
		var times []float64
		for b.Loop() {
			times = times[:0]
			for k := range 3 {
				ns, err := r.WalkTime(places[k], places[63-k])
				if err != nil {
					b.Fatal(err)
				}
				times = append(times, ns)
			}
		}
		slices.Sort(times)
		b.ReportMetric(times[1], "ns/op")
	})
}
