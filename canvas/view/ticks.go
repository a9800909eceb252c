package view

import "math"

// Steps says at which distances a ruler bears marks, in the ruler's unit.
type Steps struct {
	Minor, Mid, Major float64 // short, middling and long marks; each is a multiple of the one before
	Label             float64 // distance between figures, a multiple of Minor
}

// The narrowest a ruler's short marks and its figures may stand, in px at 100 %.
const (
	minorPx = 8
	labelPx = 60
)

// RulerSteps returns the marks of a ruler on which one unit takes perUnit px at 100 %.
func RulerSteps(perUnit float64) Steps {
	minor, digit := nice(minorPx / perUnit)
	s := Steps{Minor: minor, Mid: 2 * minor, Major: 10 * minor}
	switch digit {
	case 1:
		s.Mid, s.Major = 5*minor, 10*minor
	case 2:
		s.Mid, s.Major = 5*minor, 25*minor
	}
	s.Label, _ = nice(labelPx / perUnit)
	return s
}

// BarSteps returns the length of a scale bar of five pieces, in the ruler's unit: between 120 and 300 px at 100 %.
func BarSteps(perUnit float64) float64 {
	piece, _ := nice(24 / perUnit)
	return 5 * piece
}

// nice returns the smallest of 1, 2, 5 times a power of ten that is at least v, and that digit.
func nice(v float64) (step float64, digit int) {
	exp := math.Floor(math.Log10(v))
	for {
		for _, d := range [...]int{1, 2, 5} {
			// Powers of ten are divided where they are not whole: 5/10 is exact to the last bit, 5*0.1 is not.
			if step := scaled(float64(d), int(exp)); step >= v {
				return step, d
			}
		}
		exp++
	}
}

func scaled(d float64, exp int) float64 {
	if exp < 0 {
		return d / math.Pow10(-exp)
	}
	return d * math.Pow10(exp)
}
