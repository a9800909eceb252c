package exact

import "math/bits"

// Int128 is a signed 128-bit integer in two's complement. The zero value is 0.
type Int128 struct {
	Hi int64
	Lo uint64
}

// Mul returns the product of a and b, exactly.
func Mul(a, b int64) Int128 {
	hi, lo := bits.Mul64(uint64(a), uint64(b))
	// bits.Mul64 multiplies unsigned; each negative factor adds 2^64 times the other one too much.
	return Int128{int64(hi) - a>>63&b - b>>63&a, lo}
}

// Add returns a + b. The caller keeps the sum below 2^127.
func (a Int128) Add(b Int128) Int128 {
	lo, carry := bits.Add64(a.Lo, b.Lo, 0)
	return Int128{a.Hi + b.Hi + int64(carry), lo}
}

// Sub returns a - b. The caller keeps the difference below 2^127.
func (a Int128) Sub(b Int128) Int128 {
	lo, borrow := bits.Sub64(a.Lo, b.Lo, 0)
	return Int128{a.Hi - b.Hi - int64(borrow), lo}
}

// Neg returns -a.
func (a Int128) Neg() Int128 { return Int128{}.Sub(a) }

// Sign returns -1, 0 or +1.
func (a Int128) Sign() int {
	switch {
	case a.Hi < 0:
		return -1
	case a.Hi > 0 || a.Lo > 0:
		return 1
	}
	return 0
}

// Float returns the nearest float64 up to two roundings; it only measures.
func (a Int128) Float() float64 {
	if a.Hi < 0 {
		return -Int128{}.Sub(a).Float()
	}
	return float64(a.Hi)*0x1p64 + float64(a.Lo)
}

// FloorDiv returns the greatest integer not above a / d, for d > 0. The quotient must fit an int64.
func (a Int128) FloorDiv(d int64) int64 {
	if a.Hi >= 0 {
		q, _ := bits.Div64(uint64(a.Hi), a.Lo, uint64(d))
		return int64(q)
	}
	n := Int128{}.Sub(a)
	q, r := bits.Div64(uint64(n.Hi), n.Lo, uint64(d))
	if r > 0 {
		q++
	}
	return -int64(q)
}

// CompareFractions compares n1/d1 with n2/d2 for positive denominators: negative, zero or positive.
func CompareFractions(n1, d1, n2, d2 int64) int {
	return Mul(n1, d2).Sub(Mul(n2, d1)).Sign()
}
