package report

import (
	"math"
	"strconv"
)

// measure writes lengths and areas in a plan's display unit, rounded for reading.
type measure struct {
	name  string  // of the unit of length
	mm    float64 // millimetres in it
	digit int     // decimals
	feet  bool
}

// measures are the display units by their name in the plan file.
var measures = map[string]measure{
	"m":  {"m", 1000, 2, false},
	"cm": {"cm", 10, 1, false},
	"mm": {"mm", 1, 0, false},
	"ft": {"ft", 304.8, 0, true},
}

// measureFor returns the display unit of that name, metres for any other.
func measureFor(unit string) measure {
	if m, ok := measures[unit]; ok {
		return m
	}
	return measures["m"]
}

// length writes a length in mm: "9.86", or "32' 4.2\"" where the unit is feet and inches.
func (m measure) length(mm float64) string {
	if !m.feet {
		return decimal(mm/m.mm, m.digit)
	}
	sign, tenths := "", math.Round(math.Abs(mm)/2.54) // tenths of an inch
	if mm < 0 && tenths > 0 {
		sign = "-"
	}
	feet := math.Floor(tenths / 120)
	return sign + decimal(feet, 0) + "' " + decimal((tenths-120*feet)/10, 1) + `"`
}

// named writes a length in mm with its unit.
func (m measure) named(mm float64) string {
	if m.feet {
		return m.length(mm)
	}
	return m.length(mm) + " " + m.name
}

// area writes an area in m², or in square feet where the unit is feet and inches.
func (m measure) area(m2 float64) string {
	if m.feet {
		return decimal(m2/(0.3048*0.3048), 1)
	}
	return decimal(m2, 2)
}

// areaName is the unit of area.
func (m measure) areaName() string {
	if m.feet {
		return "sq ft"
	}
	return "m²"
}

// decimal writes v with n decimals, and never "-0".
func decimal(v float64, n int) string {
	s := strconv.FormatFloat(v, 'f', n, 64)
	if f, err := strconv.ParseFloat(s, 64); err == nil && f == 0 {
		return strconv.FormatFloat(0, 'f', n, 64)
	}
	return s
}
