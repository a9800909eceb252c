package paint

import "enfilade/solver/study"

// Layers is a set of parts of the picture.
type Layers uint16

// The parts of the picture that can be left out. What people draw and put down is always there.
const (
	LayerRegions    Layers = 1 << iota // the washes and borders of sight regions
	LayerApproaches                    // the walks to first sight, and their marks
	LayerFullWalks
	LayerSightLines
	LayerLabels
	LayerRulers
	LayerGrid
	LayerUnderlay
)

// Has reports whether all of some layers are in the set.
func (l Layers) Has(some Layers) bool { return l&some == some }

// layer reports whether a layer is drawn.
func (s *Scene) layer(l Layers) bool { return !s.Without.Has(l) }

// Walk names one approach.
type Walk struct{ Start, Target string }

// WalkChoice says which approaches are drawn thin beside the chosen one.
type WalkChoice uint8

// The choices of approaches beside the chosen one.
const (
	WalksToTarget WalkChoice = iota // those from other starts to the chosen target
	WalksNone
	WalksPicked // those that Scene.Walks names
)

// beside reports whether an approach is drawn thin beside the chosen one.
func (s *Scene) beside(a *study.Approach) bool {
	if a.Problem != "" || a.Start == s.Start && a.Target == s.Target {
		return false
	}
	switch s.WalkChoice {
	case WalksNone:
		return false
	case WalksPicked:
		for _, w := range s.Walks {
			if w.Start == a.Start && w.Target == a.Target {
				return true
			}
		}
		return false
	}
	return a.Target == s.Target
}

// bordered reports whether the border of an observer's region is drawn though it is not the one that is washed.
func (s *Scene) bordered(observer string) bool {
	if s.AllRegions {
		return true
	}
	for _, id := range s.Regions {
		if id == observer {
			return true
		}
	}
	return false
}
