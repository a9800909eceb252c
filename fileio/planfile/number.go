package planfile

import (
	"bytes"
	"strconv"

	"enfilade/solver/exact"
)

// tenths reads a JSON number of millimetres as grid units, exactly. big tells that it is 10^11 units or more, offGrid that it
// has more than one decimal that counts.
func tenths(text []byte) (units int64, big, offGrid bool) {
	negative := text[0] == '-'
	if negative {
		text = text[1:]
	}
	exponent := 0
	if i := bytes.IndexAny(text, "eE"); i >= 0 {
		exponent = clampedInt(text[i+1:])
		text = text[:i]
	}
	var buffer [32]byte
	digits := buffer[:0]
	whole, part, _ := bytes.Cut(text, []byte("."))
	digits = append(append(digits, whole...), part...)
	exponent -= len(part)
	digits = bytes.TrimLeft(digits, "0")
	short := bytes.TrimRight(digits, "0")
	exponent += len(digits) - len(short) + 1 // counted in tenths from here on
	switch {
	case len(short) == 0:
		return 0, false, false
	case len(short)+exponent > 11:
		return 0, true, false
	case exponent < 0:
		return 0, false, true
	}
	for _, b := range short {
		units = units*10 + int64(b-'0')
	}
	for range exponent {
		units *= 10
	}
	if negative {
		units = -units
	}
	return units, false, false
}

// clampedInt reads a signed whole number, cut off at a million either way.
func clampedInt(text []byte) int {
	n, negative := 0, false
	for _, b := range text {
		switch {
		case b == '-':
			negative = true
		case isDigit(b) && n < 1_000_000:
			n = min(n*10+int(b-'0'), 1_000_000)
		}
	}
	if negative {
		return -n
	}
	return n
}

// appendMM writes grid units as millimetres with at most one decimal.
func appendMM(out []byte, units int32) []byte {
	n := int64(units)
	if n < 0 {
		out = append(out, '-')
		n = -n
	}
	out = strconv.AppendInt(out, n/exact.PerMM, 10)
	if n%exact.PerMM != 0 {
		out = append(out, '.', byte('0'+n%exact.PerMM))
	}
	return out
}
