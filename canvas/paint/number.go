package paint

import (
	"math"
	"strconv"
	"unicode"
	"unicode/utf8"

	"enfilade/solver/plan"
)

// unit is how lengths are told in the plan's display unit.
type unit struct {
	name     string
	mm       float64 // length of one
	decimals int     // of a distance on the plan
}

func unitOf(p *plan.Plan) unit {
	switch p.Sheet().Unit {
	case "cm":
		return unit{"cm", 10, 0}
	case "mm":
		return unit{"mm", 1, 0}
	case "ft":
		return unit{"ft", 304.8, 1}
	}
	return unit{"m", 1000, 1}
}

// text is a run of letters in List.Chars.
type text [2]int32

// say begins a run of letters; the calls that follow append to it until said.
func (l *List) say() int32 { return int32(len(l.Chars)) }

func (l *List) said(from int32) text { return text{from, int32(len(l.Chars))} }

func (l *List) words(s string) { l.Chars = append(l.Chars, s...) }

// capitals appends s in capitals.
func (l *List) capitals(s string) {
	for _, r := range s {
		l.Chars = utf8.AppendRune(l.Chars, unicode.ToUpper(r))
	}
}

// distance appends a length in mm with its unit, to the unit's decimals.
func (l *List) distance(mm float64, u unit) {
	l.number(mm/u.mm, u.decimals)
	l.words(" ")
	l.words(u.name)
}

// number appends v with so many decimals; a minus is the typographic one, and there is no minus nought.
func (l *List) number(v float64, decimals int) {
	scale := math.Pow10(decimals)
	v = math.Round(v*scale) / scale
	if v < 0 {
		l.words("−")
	}
	l.Chars = strconv.AppendFloat(l.Chars, math.Abs(v), 'f', decimals, 64)
}
