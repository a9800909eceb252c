package sight_test

import (
	"context"
	"fmt"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/sight"
)

// BenchmarkFace finds the places that see all of a face two metres wide, and any part of it, and their border, on the lean
// mesh of a plan; the faces stand about the plan's targets.
func BenchmarkFace(b *testing.B) {
	for _, n := range []int{1000, 10000} {
		for _, kind := range []struct {
			name string
			plan *plan.Plan
		}{{"office", plantest.Office(1, n)}, {"clutter", plantest.Clutter(1, n)}} {
			_, m := graphAndMesh(b, kind.plan)
			l := lean(b, m, 16000, true)
			f := sight.New(l)
			var faces []sight.Face
			for _, t := range kind.plan.Targets() {
				for _, d := range []exact.Vec{{X: 10000}, {Y: 10000}, {X: -10000}, {Y: -10000}} {
					if c := (sight.Face{A: t.At.Add(d), B: t.At.Add(d.Neg())}); f.Free(c, 16000) {
						faces = append(faces, c)
						break
					}
				}
			}
			name := fmt.Sprintf("plan=%s/walls=%d", kind.name, n)
			run := func(what string, do func(c sight.Face) int) {
				b.Run(name+"/"+what, func(b *testing.B) {
					pieces, i := 0, 0
					for b.Loop() {
						pieces += do(faces[i%len(faces)])
						i++
					}
					b.ReportMetric(float64(pieces)/float64(i), "pieces")
				})
			}
			var got []sight.Piece
			run("seen=all", func(c sight.Face) int {
				got, _ = f.Whole(got[:0], c, 16000)
				return len(got)
			})
			run("seen=any", func(c sight.Face) int {
				got, _ = f.Partly(context.Background(), got[:0], c, 16000)
				return len(got)
			})
			run("seen=any,border", func(c sight.Face) int {
				got, _ = f.Partly(context.Background(), got[:0], c, 16000)
				f.Outline(got, c.A, 16000)
				return len(got)
			})
		}
	}
}
