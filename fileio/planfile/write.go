package planfile

import (
	"io"
	"strconv"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Write writes a plan in the newest version of the format.
//
//   - Errors: a *Fault if the plan breaks the format's rules, so that it could not be read again: then nothing is written.
//     Otherwise the writer's own.
//   - Law: Read gives back an equal plan; writing that gives the same bytes.
//   - Cost: linear in the size of the text, which is read back once.
func Write(w io.Writer, p *plan.Plan) error {
	text := appendPlan(nil, p.Parts())
	if _, fault := parse(text); fault != nil {
		return fault
	}
	_, err := w.Write(text)
	return err
}

func appendPlan(out []byte, p plan.Parts) []byte {
	out = append(out, `{"enfilade": `...)
	out = strconv.AppendInt(out, version, 10)
	out = appendHead(out, "title", p.Sheet.Title)
	out = appendHead(out, "place", p.Sheet.Place)
	unit := p.Sheet.Unit
	if unit == "" {
		unit = units[0]
	}
	out = appendHead(out, "display_unit", unit)
	if p.Floor.Len() > 0 {
		out = appendPoints(append(out, ",\n \"floor\": "...), p.Floor)
	}
	out = appendList(out, walls, p.Walls)
	out = appendList(out, openings, p.Openings)
	out = appendList(out, blocks, p.Blocks)
	out = appendList(out, zones, p.Zones)
	out = appendList(out, observers, p.Observers)
	out = appendList(out, targets, p.Targets)
	out = appendList(out, starts, p.Starts)
	out = appendList(out, routes, p.Routes)
	if p.Walker != plan.DefaultWalker() {
		out = appendWalker(append(out, ",\n \"walker\": "...), &p.Walker)
	}
	if p.Sheet.Brief != "" {
		out = appendBrief(append(out, ",\n \"brief\": "...), p.Sheet.Brief)
	}
	if p.Sheet.Underlay != nil {
		out = appendUnderlay(append(out, ",\n \"underlay\": "...), p.Sheet.Underlay)
	}
	out = appendExtra(out, p.Sheet.Extra, ",\n ", ": ")
	return append(out, "}\n"...)
}

// appendHead writes one of the short members on the first line, if there is anything to say.
func appendHead(out []byte, name, text string) []byte {
	if text == "" {
		return out
	}
	out = append(out, `, "`...)
	out = append(out, name...)
	out = append(out, `": `...)
	return appendText(out, text)
}

// appendList writes a list, one item a line.
func appendList[T any](out []byte, k kind[T], items []T) []byte {
	if len(items) == 0 {
		return out
	}
	out = append(out, ",\n \""...)
	out = append(out, k.list...)
	out = append(out, "\": ["...)
	for i := range items {
		if i > 0 {
			out = append(out, ',')
		}
		out = append(out, "\n  {\"id\":"...)
		out = appendText(out, *k.id(&items[i]))
		out = k.append(out, &items[i])
		out = appendMeta(out, k.meta(&items[i]))
		out = append(out, '}')
	}
	return append(out, "\n ]"...)
}

// appendBrief writes the brief, one requirement a line.
func appendBrief(out []byte, brief string) []byte {
	text := []byte(brief)
	if fault := checkSyntax(text); fault != nil || text[0] != '[' {
		return append(out, text...) // reading it back tells
	}
	out = append(out, '[')
	first := true
	for c := inside(text); ; first = false {
		v, ok := c.value()
		if !ok {
			break
		}
		if !first {
			out = append(out, ',')
		}
		out = compact(append(out, "\n  "...), v)
	}
	if !first {
		out = append(out, "\n "...)
	}
	return append(out, ']')
}

func appendMeta(out []byte, m *plan.Meta) []byte {
	if m.Locked {
		out = append(out, `,"locked":true`...)
	}
	if m.Hidden {
		out = append(out, `,"hidden":true`...)
	}
	return appendExtra(out, m.Extra, ",", ":")
}

// appendExtra writes the unknown members, each with what stands before it and between its name and its value.
func appendExtra(out []byte, extra, before, between string) []byte {
	if extra == "" {
		return out
	}
	text := []byte(extra)
	if fault := checkSyntax(text); fault != nil || text[0] != '{' {
		return append(append(out, before...), text...) // reading it back tells
	}
	for c := inside(text); ; {
		name, value, ok := c.member()
		if !ok {
			return out
		}
		out = append(append(out, before...), name...)
		out = compact(append(out, between...), value)
	}
}

// appendText writes a string, escaping only what JSON wants escaped.
func appendText(out []byte, s string) []byte {
	const hex = "0123456789abcdef"
	out = append(out, '"')
	for i := range len(s) {
		switch b := s[i]; {
		case b == '"' || b == '\\':
			out = append(out, '\\', b)
		case b == '\n':
			out = append(out, `\n`...)
		case b == '\t':
			out = append(out, `\t`...)
		case b < ' ':
			out = append(out, '\\', 'u', '0', '0', hex[b>>4], hex[b&15])
		default:
			out = append(out, b)
		}
	}
	return append(out, '"')
}

func appendPoint(out []byte, p exact.Pt) []byte {
	out = appendMM(append(out, '['), p.X)
	out = appendMM(append(out, ','), p.Y)
	return append(out, ']')
}

func appendPoints(out []byte, c plan.Chain) []byte {
	out = append(out, '[')
	for i, p := range c.All() {
		if i > 0 {
			out = append(out, ',')
		}
		out = appendPoint(out, p)
	}
	return append(out, ']')
}

// appendFloat writes the shortest decimal that reads back the same; 0 has no sign.
func appendFloat(out []byte, v float64) []byte {
	v += 0
	format := byte('f')
	if v != 0 && (v < 1e-6 && v > -1e-6 || v >= 1e15 || v <= -1e15) {
		format = 'e'
	}
	return strconv.AppendFloat(out, v, format, -1, 64)
}
