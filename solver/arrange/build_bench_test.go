package arrange_test

import (
	"context"
	"fmt"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/plantest"
)

// BenchmarkBuild measures the graph and the mesh from an outline: snap rounding, triangulation, solid triangles.
func BenchmarkBuild(b *testing.B) {
	eachOutline(b, func(b *testing.B, o *arrange.Outline) {
		for b.Loop() {
			if _, err := arrange.NewSite(context.Background(), o); err != nil {
				b.Fatal(err)
			}
		}
	})
}

// BenchmarkRound measures snap rounding alone.
func BenchmarkRound(b *testing.B) {
	eachOutline(b, func(b *testing.B, o *arrange.Outline) {
		for b.Loop() {
			arrange.Round(o)
		}
	})
}

func eachOutline(b *testing.B, run func(b *testing.B, o *arrange.Outline)) {
	for _, kind := range plantest.Kinds {
		for _, walls := range []int{1000, 10_000, 100_000} {
			b.Run(fmt.Sprintf("plan=%s/walls=%d", kind.Name, walls), func(b *testing.B) {
				o, _ := arrange.Draw(kind.Make(1, walls))
				b.ReportAllocs()
				run(b, o)
			})
		}
	}
}
