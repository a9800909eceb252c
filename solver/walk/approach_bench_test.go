package walk_test

import (
	"context"
	"fmt"
	"slices"
	"testing"
	"time"

	"enfilade/solver/exact"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// trip is a start and a target at opposite ends of a list of places.
type trip struct{ start, target exact.Pt }

// BenchmarkApproach measures one approach, the target's cones of sight included, between places all over the plan.
func BenchmarkApproach(b *testing.B) {
	eachTrip(b, func(b *testing.B, eyes *sight.Finder, walker *walk.Finder, t trip) error {
		cones, err := eyes.Cones(t.target, plantest.Eye, sight.Clip{})
		if err != nil {
			return err
		}
		_, err = walker.Flood(context.Background(), t.start, []walk.Goal{{Eye: t.target, Cones: cones}})
		return err
	})
}

// BenchmarkFullWalk measures one shortest walk between places all over the plan.
func BenchmarkFullWalk(b *testing.B) {
	eachTrip(b, func(b *testing.B, _ *sight.Finder, walker *walk.Finder, t trip) error {
		_, err := walker.Flood(context.Background(), t.start, []walk.Goal{{Spot: walk.At(t.target)}})
		return err
	})
}

func eachTrip(b *testing.B, run func(b *testing.B, eyes *sight.Finder, walker *walk.Finder, t trip) error) {
	for _, kind := range plantest.Kinds {
		for _, walls := range []int{1000, 10_000, 100_000} {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", kind.Name, walls), func(b *testing.B) {
				g, err := plantest.NewGround(kind.Make(1, walls))
				if err != nil {
					b.Fatal(err)
				}
				places := g.Places(2, 64)
				eyes, walker := sight.New(g.Mesh), walk.New(g.Mesh)
				expanded := make([]int, 0, 32)
				times := make([]time.Duration, 0, 5*32)
				for i := range 5 * 32 {
					began := time.Now()
					if err := run(b, eyes, walker, trip{places[i%32], places[63-i%32]}); err != nil {
						b.Fatal(err)
					}
					times = append(times, time.Since(began))
				}
				slices.Sort(times)
				b.ReportAllocs()
				for i := 0; b.Loop(); i++ {
					k := i % 32
					if err := run(b, eyes, walker, trip{places[k], places[63-k]}); err != nil {
						b.Fatal(err)
					}
					if i < 32 {
						expanded = append(expanded, walker.Expanded)
					}
				}
				slices.Sort(expanded)
				b.ReportMetric(float64(expanded[len(expanded)/2]), "median-cones")
				b.ReportMetric(float64(times[len(times)/2]), "median-ns")
			})
		}
	}
}
