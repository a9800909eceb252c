package walk

import (
	"math/big"
	"math/rand/v2"
	"testing"

	"enfilade/solver/exact"
)

// TestDiscAgainstFractions holds both questions of a disc against plain fractions, on small lattices full of ties and at the
// legal limit.
func TestDiscAgainstFractions(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 9))
	touched, met := 0, 0
	for _, span := range []int32{5, 9, 40, 1000, exact.Limit - 1} {
		point := func() exact.Pt { return exact.Pt{X: r.Int32N(2*span+1) - span, Y: r.Int32N(2*span+1) - span} }
		for range 20000 {
			at, u, v := point(), point(), point()
			along := v.Sub(u)
			d := disc{at: at, dir: along.Left().Neg(), num: along.Cross(at.Sub(u)), den: along.Len2()}
			if r.IntN(4) == 0 {
				d = disc{at: at, dir: u.Sub(at), num: 1, den: 1}
			}
			if d.num <= 0 || d.dir == (exact.Vec{}) {
				continue
			}
			p, q := point(), point()
			if r.IntN(4) == 0 && span < 1000 { // parallel to the diameter, where an edge touches
				q = p.Add(d.dir)
			}
			power := powerOf(&d, p)
			if got := d.holds(p); got != (power.Sign() <= 0) {
				t.Fatalf("%+v holds %v: %v, its power is %v", d, p, got, power)
			}
			if p == q || d.holds(p) || d.holds(q) {
				continue
			}
			want := leastPower(&d, p, q).Sign()
			if got := d.meets(p, q); got != (want <= 0) {
				t.Fatalf("%+v meets %v %v: %v, the least power has sign %d", d, p, q, got, want)
			}
			if want == 0 {
				touched++
			}
			if want < 0 {
				met++
			}
		}
	}
	if touched < 40 || met < 5000 {
		t.Errorf("the lattices lost their aim: %d edges touch, %d cross", touched, met)
	}
}

// powerOf returns the power of p with respect to the circle: (p - at)·(p - far end).
func powerOf(d *disc, p exact.Pt) *big.Rat { return powerAt(d, p, exact.Vec{}, new(big.Rat)) }

// powerAt returns the power of p + k f.
func powerAt(d *disc, p exact.Pt, f exact.Vec, k *big.Rat) *big.Rat {
	coord := func(at, p, f, dir int32) (*big.Rat, *big.Rat) {
		x := new(big.Rat).Mul(k, big.NewRat(int64(f), 1))
		x.Add(x, big.NewRat(int64(p)-int64(at), 1))
		far := big.NewRat(d.num, d.den)
		far.Mul(far, big.NewRat(int64(dir), 1))
		return x, far.Sub(x, far)
	}
	ax, bx := coord(d.at.X, p.X, f.X, d.dir.X)
	ay, by := coord(d.at.Y, p.Y, f.Y, d.dir.Y)
	return ax.Add(ax.Mul(ax, bx), ay.Mul(ay, by))
}

// leastPower returns the least power on the edge from p to q: at the foot of the centre, or at an end.
func leastPower(d *disc, p, q exact.Pt) *big.Rat {
	f := q.Sub(p)
	// 2 (centre - p)·f = 2 (at - p)·f + dir·f num/den
	k := new(big.Rat).Mul(big.NewRat(d.num, d.den), big.NewRat(d.dir.Dot(f), 1))
	k.Add(k, big.NewRat(2*d.at.Sub(p).Dot(f), 1))
	k.Quo(k, big.NewRat(2*f.Len2(), 1))
	if k.Sign() < 0 || k.Cmp(big.NewRat(1, 1)) > 0 {
		k = new(big.Rat)
		if powerOf(d, q).Cmp(powerOf(d, p)) < 0 {
			k.SetInt64(1)
		}
	}
	return powerAt(d, p, f, k)
}
