package mesh

import (
	"math/rand/v2"
	"testing"
)

// slowHilbert walks down the curve bit by bit.
func slowHilbert(x, y uint32) (d uint32) {
	for s := uint32(1) << 15; s > 0; s >>= 1 {
		rx, ry := x/s&1, y/s&1
		d += s * s * (3*rx ^ ry)
		if ry == 0 {
			if rx == 1 {
				x, y = 1<<16-1-x, 1<<16-1-y
			}
			x, y = y, x
		}
	}
	return d
}

func TestHilbert(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 3))
	for k := range uint32(100_000) {
		x, y := r.Uint32N(1<<16), r.Uint32N(1<<16)
		if k < 1<<12 {
			x, y = k>>6*1023, k&63*1023 // corners and sides too
		}
		if got, want := hilbert(x, y), slowHilbert(x, y); got != want {
			t.Fatalf("cell %d, %d lies at %d, want %d", x, y, got, want)
		}
	}
}
