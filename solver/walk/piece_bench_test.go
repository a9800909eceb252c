package walk_test

import (
	"context"
	"fmt"
	"slices"
	"testing"

	"enfilade/solver/plantest"
	"enfilade/solver/sight"
	"enfilade/solver/walk"
)

// BenchmarkFlood floods an office for the approaches to eight targets: their regions given as cones of sight, and as pieces.
func BenchmarkFlood(b *testing.B) {
	for _, walls := range []int{1000, 10000} {
		p := plantest.Office(1, walls)
		_, m := graphAndMesh(b, p)
		eyes := sight.New(m)
		var cones, pieces []walk.Goal
		for _, t := range p.Parts().Targets[:8] {
			k, err := eyes.Cones(t.At, eye, sight.Clip{})
			if err != nil {
				b.Fatal(err)
			}
			cones = append(cones, walk.Goal{Eye: t.At, Cones: slices.Clone(k)})
			pieces = append(pieces, walk.Goal{Pieces: piecesOf(t.At, k)})
		}
		start := p.Parts().Starts[0].At
		for _, goals := range []struct {
			name string
			list []walk.Goal
		}{{"cones", cones}, {"pieces", pieces}} {
			b.Run(fmt.Sprintf("plan=office/walls=%d/goals=%s", walls, goals.name), func(b *testing.B) {
				f := walk.New(m)
				for b.Loop() {
					if _, err := f.Flood(context.Background(), start, goals.list); err != nil {
						b.Fatal(err)
					}
				}
				b.ReportMetric(float64(f.Expanded), "cones")
			})
		}
	}
}
