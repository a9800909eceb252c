package gui

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"

	"enfilade/solver/exact"
)

// errNumber is what a form says of a text that is no measure.
var errNumber = errors.New("a number, please: 2.40 or 2,40")

// errRange is what a form says of a measure beyond the legal range of the plan.
var errRange = errors.New("more than 50 km does not fit a plan")

// unitSizes gives the grid units in one of each unit of length; the international foot is 0.3048 m.
var unitSizes = map[string]float64{
	"mm": exact.PerMM, "cm": 10 * exact.PerMM, "m": 1000 * exact.PerMM,
	"ft": 304.8 * exact.PerMM, "'": 304.8 * exact.PerMM, "′": 304.8 * exact.PerMM,
	"in": 25.4 * exact.PerMM, `"`: 25.4 * exact.PerMM, "″": 25.4 * exact.PerMM,
}

// lengthPiece is one number with its unit, as in 5 ft or 11 1/2" or 2,40.
var lengthPiece = regexp.MustCompile(`^\s*(\d*[.,]?\d*)(?:\s+(\d+)/(\d+)|/(\d+))?\s*(mm|cm|m|ft|in|'|"|′|″)?`)

// parseLength reads a length in grid units. A number without a unit is in the display unit; a comma is a decimal point;
// feet and inches may follow each other.
func parseLength(text, unit string) (int32, error) {
	rest := strings.ToLower(strings.TrimSpace(text))
	rest = strings.ReplaceAll(rest, "−", "-")
	sign := 1.0
	if r, ok := strings.CutPrefix(rest, "-"); ok {
		rest, sign = r, -1
	}
	if rest == "" {
		return 0, errNumber
	}
	sum, last, first := 0.0, "", true
	for rest != "" {
		m := lengthPiece.FindStringSubmatch(rest)
		if m == nil || m[0] == "" || !first && last == "" {
			return 0, errNumber
		}
		first = false
		v, err := pieceValue(m)
		if err != nil {
			return 0, err
		}
		u := m[5]
		if u == "" {
			u = unitAfter(last, unit)
		}
		if unitSizes[u] == 0 {
			return 0, errNumber
		}
		sum, last, rest = sum+v*unitSizes[u], m[5], strings.TrimSpace(rest[len(m[0]):])
	}
	v := math.Round(sign * sum)
	if math.Abs(v) >= exact.Limit {
		return 0, errRange
	}
	return int32(v), nil
}

// unitAfter is the unit of a number that names none: inches after feet, the display unit at the beginning, else none.
func unitAfter(last, unit string) string {
	switch last {
	case "ft", "'", "′":
		return "in"
	case "":
		if unit == "" {
			return "m"
		}
		return unit
	}
	return ""
}

// pieceValue is the number of one piece: a decimal, a fraction, or a whole number and a fraction.
func pieceValue(m []string) (float64, error) {
	whole := strings.Replace(m[1], ",", ".", 1)
	v, err := strconv.ParseFloat(whole, 64)
	if err != nil {
		return 0, errNumber
	}
	num, den := m[2], m[3]
	if m[4] != "" { // 1/2 without a whole number before it
		num, den, v = m[1], m[4], 0
	}
	if den != "" {
		n, err1 := strconv.Atoi(num)
		d, err2 := strconv.Atoi(den)
		if err1 != nil || err2 != nil || d == 0 {
			return 0, errNumber
		}
		v += float64(n) / float64(d)
	}
	return v, nil
}

// formatLength writes a length of grid units in the display unit, without the unit's name but for feet and inches: at
// least the decimals people expect, and as many as the length needs to read back the same.
func formatLength(v int32, unit string) string {
	switch unit {
	case "mm":
		return trimDecimals(float64(v)/exact.PerMM, 0, 1)
	case "cm":
		return trimDecimals(float64(v)/(10*exact.PerMM), 1, 2)
	case "ft":
		return formatFeet(v)
	}
	return trimDecimals(float64(v)/(1000*exact.PerMM), 2, 4)
}

// trimDecimals writes v with as few decimals as it needs, from least to most.
func trimDecimals(v float64, least, most int) string {
	s := strconv.FormatFloat(v, 'f', most, 64)
	for n := most; n > least && strings.HasSuffix(s, "0"); n-- {
		s = s[:len(s)-1]
	}
	return strings.TrimSuffix(s, ".")
}

// formatFeet writes feet and inches. An inch is 254 grid units: a length within half a unit of a sixteenth is written as
// that sixteenth, so what was typed reads back as typed; any other gets decimals.
func formatFeet(v int32) string {
	sign := ""
	if v < 0 {
		sign, v = "-", -v
	}
	const inch = 25.4 * exact.PerMM
	n := int64(math.Round(float64(v) * 16 / inch))
	if int32(math.Round(float64(n)*inch/16)) != v {
		feet := v / (12 * inch)
		return fmt.Sprintf(`%s%d' %s"`, sign, feet, trimDecimals(float64(v-feet*12*inch)/inch, 0, 3))
	}
	feet, sixteenths := n/(12*16), n%(12*16)
	inches, part := sixteenths/16, sixteenths%16
	if part == 0 {
		return fmt.Sprintf(`%s%d' %d"`, sign, feet, inches)
	}
	den := int64(16)
	for part%2 == 0 {
		part, den = part/2, den/2
	}
	return fmt.Sprintf(`%s%d' %d %d/%d"`, sign, feet, inches, part, den)
}

// unitMark is what stands behind a length's entry; feet and inches carry their own.
func unitMark(unit string) string {
	switch unit {
	case "ft":
		return ""
	case "":
		return "m"
	}
	return unit
}

// parseNumber reads a plain number such as an angle; a comma is a decimal point and a trailing degree sign is allowed.
func parseNumber(text string) (float64, error) {
	s := strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(text), "°"))
	v, err := strconv.ParseFloat(strings.Replace(strings.ReplaceAll(s, "−", "-"), ",", ".", 1), 64)
	if err != nil || math.IsInf(v, 0) || math.IsNaN(v) {
		return 0, errNumber
	}
	return v + 0, nil // -0 is 0
}

// metres writes a length of millimetres as metres with the given decimals.
func metres(mm float64, decimals int) string {
	return strconv.FormatFloat(mm/1000, 'f', decimals, 64)
}
