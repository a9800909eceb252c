package study

import (
	"fmt"

	"github.com/paulmach/orb"

	"enfilade/solver/exact"
)

// mm turns a length in grid units into millimetres.
func mm[T int32 | float64](v T) float64 { return float64(v) / exact.PerMM }

// pointMM turns a grid point into millimetres.
func pointMM(p exact.Pt) orb.Point { return orb.Point{mm(p.X), mm(p.Y)} }

// millimetres writes a grid point for people.
func millimetres(p exact.Pt) string { return fmt.Sprintf("%.1f, %.1f mm", mm(p.X), mm(p.Y)) }

// Grid units in a metre, and in a square metre.
const (
	perM  = 1000 * exact.PerMM
	perM2 = float64(perM) * perM
)
