package plan

import "enfilade/solver/exact"

// MaxCoord bounds every coordinate of a drawing in absolute value: 50 km. It lies below exact.Limit by more than any
// wall's corners can reach beyond its line.
const MaxCoord int32 = 50_000_000 * exact.PerMM

// MaxThickness bounds the thickness of a wall: 100 m. A mitre then reaches at most 200 m beyond the line.
const MaxThickness int32 = 100_000 * exact.PerMM

// InRange reports whether a point lies within the legal range of a drawing.
func InRange(p exact.Pt) bool {
	return p.X >= -MaxCoord && p.X <= MaxCoord && p.Y >= -MaxCoord && p.Y <= MaxCoord
}

// Limits of what a walker and a mark may be.
const (
	MaxBodyRadius       = 2000 * exact.PerMM    // of the walker: 2 m
	MaxPace             = 100                   // metres per second
	MaxColour           = 255                   // index of a colour
	MaxRound      int32 = 100_000 * exact.PerMM // radius of a round block: 100 m
)
