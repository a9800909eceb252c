package cgal

import (
	"math"
	"strconv"

	"enfilade/solver/exact"
)

// Seen measures a region, in grid units.
type Seen struct {
	Sectors                    int // free sectors around the eye: 1 on open floor, 2 on a thin wall
	Area                       float64
	Perimeter, Wall, Occluding float64 // of all sectors together, nothing between them
}

// Region measures what is seen from eye.
func (r *Reference) Region(eye exact.Pt) (Seen, error) {
	n, err := r.ask(5, "region", eye)
	if err != nil {
		return Seen{}, err
	}
	return Seen{int(n[0]), n[1], n[2], n[3], n[4]}, nil
}

// Sees reports whether p lies in the closed region seen from eye.
func (r *Reference) Sees(eye, p exact.Pt) (bool, error) {
	n, err := r.ask(1, "sees", eye, p)
	return err == nil && n[0] == 1, err
}

// Share returns how much of the segment from a to b lies in the closed region seen from eye, as a share of its length, and
// whether that is all of it.
func (r *Reference) Share(eye, a, b exact.Pt) (share float64, whole bool, err error) {
	n, err := r.ask(2, "share", eye, a, b)
	if err != nil {
		return 0, false, err
	}
	return n[0], n[1] == 1, nil
}

// Walk returns the length of the shortest walk from start to goal, infinite when there is none.
func (r *Reference) Walk(start, goal exact.Pt) (float64, error) {
	n, err := r.ask(1, "walk", start, goal)
	if err != nil {
		return math.NaN(), err
	}
	return n[0], nil
}

// Approach returns the length of the shortest walk from start to the region seen from target, infinite when there is none,
// and where it ends.
func (r *Reference) Approach(start, target exact.Pt) (length, x, y float64, err error) {
	n, err := r.ask(3, "approach", start, target)
	if err != nil {
		return math.NaN(), 0, 0, err
	}
	return n[0], n[1], n[2], nil
}

// Judge looks at a claimed first sight x, y: off is how far it lies from the nearest way into the region seen from target,
// walked the length of the shortest walk from start to that place.
func (r *Reference) Judge(start, target exact.Pt, x, y float64) (off, walked float64, err error) {
	full := func(v float64) string { return " " + strconv.FormatFloat(v, 'g', -1, 64) }
	r.in.WriteString("judge " + pair(start) + " " + pair(target) + full(x) + full(y) + "\n")
	n, err := r.numbers(2)
	if err != nil {
		return math.NaN(), math.NaN(), err
	}
	return n[0], n[1], nil
}

func pair(p exact.Pt) string { return strconv.Itoa(int(p.X)) + " " + strconv.Itoa(int(p.Y)) }

// BuildTime measures arrangement and triangulation with CGAL's fast kernel, in nanoseconds.
func (r *Reference) BuildTime() (float64, error) {
	n, err := r.ask(1, "time-build")
	if err != nil {
		return 0, err
	}
	return n[0], nil
}

// RegionTimes measures one region after the other as bare polygons with CGAL's fast kernel, point location included: mean
// and median in nanoseconds, and the mean count of corners.
func (r *Reference) RegionTimes(eyes []exact.Pt) (mean, median, corners float64, err error) {
	n, err := r.ask(3, "time-regions "+strconv.Itoa(len(eyes)), eyes...)
	if err != nil {
		return 0, 0, 0, err
	}
	return n[0], n[1], n[2], nil
}

// WalkTime measures one geodesic on the ready mesh, sequence tree and query, in nanoseconds.
func (r *Reference) WalkTime(start, goal exact.Pt) (float64, error) {
	n, err := r.ask(1, "time-walk", start, goal)
	if err != nil {
		return 0, err
	}
	return n[0], nil
}
