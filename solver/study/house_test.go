package study_test

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"enfilade/solver/study"
)

// house is the ground floor of a two-storey research house with its inner doors open and its outer doors shut, in metres.
//
// Source: the IFC4 sample model of a research house published by the Karlsruhe Institute of Technology for work on IFC and
// CityGML; these figures were read out of it. The answers below were worked out apart, by an exact rational program.
const house = `floor 0.3,0.3 11.7,0.3 11.7,4.01 7.41,4.01 7.41,4.5575 7.65,4.5575 7.65,4.25 11.7,4.25 11.7,9.7 7.65,9.7 7.65,5.4425
 7.41,5.4425 7.41,5.75 6.1025,5.75 6.1025,5.99 7.41,5.99 7.41,9.7 4.04,9.7 4.04,5.99 5.2175,5.99 5.2175,5.75 2.4925,5.75
 2.4925,5.99 3.8,5.99 3.8,9.7 0.3,9.7 0.3,5.99 1.6075,5.99 1.6075,5.75 0.3,5.75 0.3,4.25 3.8,4.25 3.8,4.01 0.3,4.01;`

// metres writes grid units as metres.
func metres(units float64) string { return strconv.FormatFloat(units/1e4, 'f', 4, 64) }

func TestHouseSight(t *testing.T) {
	plan := strings.ReplaceAll(house, "\n", " ") + "observer 0.4,5; observer 6,2; observer 2.05,7.8"
	for i, want := range []struct{ area, wall, occluding float64 }{
		{20.852678, 14.832141, 25.460677}, {57.077231, 34.984463, 26.301387}, {15.010571, 15.547561, 3.069094},
	} {
		s := solve(t, plan).Sight[i]
		if !printed(s.Area, want.area, 6) || !printed(s.Wall, want.wall, 6) || !printed(s.Occluding, want.occluding, 6) {
			t.Errorf("observer %d: area %.6f, wall %.6f, occluding %.6f, want %+v", i, s.Area, s.Wall, s.Occluding, want)
		}
	}
}

func TestHouseApproaches(t *testing.T) {
	plan := strings.ReplaceAll(house, "\n", " ") + "start 0.4,5; target 11.5,9.5; target 7.2,9.5; target 0.5,9.5; target 11.5,0.5; target 0.5,0.5"
	for i, want := range []struct{ length, x, y, full float64 }{
		{5.453760, 5.2305, 2.8926, 12.856863}, {4.033834, 4.2881, 3.9920, 9.117324}, {1.449433, 1.7823, 5.4361, 5.342041},
		{0.814398, 0.7566, 5.7322, 12.046345}, {3.646132, 3.9198, 4.1374, 8.539424},
	} {
		a := solve(t, plan).Approaches[i]
		if a.Status != study.StatusApproach || !printed(a.Length/1000, want.length, 6) || !printed(a.FullWalk/1000, want.full, 6) ||
			!printed(a.FirstSight[0]/1000, want.x, 4) || !printed(a.FirstSight[1]/1000, want.y, 4) {
			t.Errorf("target %d: status %v, %.6f m to %.4f, %.4f, full walk %.6f m, want %+v", i, a.Status, a.Length/1000,
				a.FirstSight[0]/1000, a.FirstSight[1]/1000, a.FullWalk/1000, want)
		}
	}
}

// printed reports whether a figure is the one that was printed with the given number of decimals.
func printed(got, want float64, decimals int) bool {
	return math.Abs(got-want) <= 0.5001*math.Pow10(-decimals)
}
