package exact_test

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"enfilade/solver/exact"
)

// slowInCircle is the sign of the in-circle determinant, its rows written out.
func slowInCircle(a, b, c, d exact.Pt) int {
	num := func(v int64) *big.Int { return big.NewInt(v) }
	mul := func(x, y *big.Int) *big.Int { return new(big.Int).Mul(x, y) }
	row := func(p exact.Pt) (x, y, l *big.Int) {
		x, y = num(int64(p.X)-int64(d.X)), num(int64(p.Y)-int64(d.Y))
		return x, y, new(big.Int).Add(mul(x, x), mul(y, y))
	}
	ax, ay, al := row(a)
	bx, by, bl := row(b)
	cx, cy, cl := row(c)
	minor := func(x, y, z, w *big.Int) *big.Int { return new(big.Int).Sub(mul(x, w), mul(y, z)) }
	det := mul(al, minor(bx, by, cx, cy))
	det.Sub(det, mul(bl, minor(ax, ay, cx, cy)))
	return det.Add(det, mul(cl, minor(ax, ay, bx, by))).Sign()
}

// TestInCircle holds both tests against the determinant: points anywhere, in the corners of the legal range, on a small grid,
// where many lie on one circle, and on circles a unit off.
func TestInCircle(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 1))
	on, inside, all := 0, 0, 0
	for k := range 200_000 {
		var p [4]exact.Pt
		for i := range p {
			p[i] = somePoint(r, k%4)
		}
		a, b, c, d := p[0], p[1], p[2], p[3]
		if exact.Orient(a, b, c) < 0 {
			b, c = c, b
		}
		want := slowInCircle(a, b, c, d)
		if got := exact.InCircle(a, b, c, d); got != want {
			t.Fatalf("InCircle(%v, %v, %v, %v) = %d, want %d", a, b, c, d, got, want)
		}
		if exact.Orient(a, b, c) > 0 && exact.Orient(a, b, d) < 0 {
			if got := exact.Inside(a, b, c, d); got != want {
				t.Fatalf("Inside(%v, %v, %v, %v) = %d, want %d", a, b, c, d, got, want)
			}
			inside++
		}
		if all++; want == 0 && exact.Orient(a, b, c) > 0 {
			on++
		}
	}
	if on < 2000 || inside < all/8 {
		t.Errorf("of %d quadruples only %d lie on a circle and %d suit Inside", all, on, inside)
	}
}

// somePoint returns a point of one of four kinds of scene.
func somePoint(r *rand.Rand, kind int) exact.Pt {
	const most = exact.Limit - 1
	switch kind {
	case 0:
		return exact.Pt{X: r.Int32N(2*most+1) - most, Y: r.Int32N(2*most+1) - most}
	case 1: // the corners of the range, and a little off
		p := exact.Pt{X: most - r.Int32N(2), Y: most - r.Int32N(2)}
		if r.IntN(2) == 0 {
			p.X = -p.X
		}
		if r.IntN(2) == 0 {
			p.Y = -p.Y
		}
		return p
	case 2:
		return exact.Pt{X: r.Int32N(6), Y: r.Int32N(6)}
	}
	// Twelve points of the circle of radius 5 · 10^7, some of them moved by a unit.
	const unit = 10_000_000
	p := [][2]int32{{3, 4}, {4, 3}, {5, 0}, {0, 5}}[r.IntN(4)]
	q := exact.Pt{X: p[0] * unit * (1 - 2*r.Int32N(2)), Y: p[1] * unit * (1 - 2*r.Int32N(2))}
	if r.IntN(3) == 0 {
		q.X += r.Int32N(3) - 1
	}
	return q
}
