package tool

import "strings"

// Field is one of the small fields at the pointer, in which a measure is typed.
type Field struct {
	Label string
	Text  string // what was typed; empty while the pointer gives the measure
	Live  string // the measure as it stands, shown while nothing is typed
	Here  bool   // what is typed next goes in here
}

// typing is what was typed into the fields at the pointer: up to two, with Tab between them.
type typing struct {
	text [2]string
	at   int
	on   bool // Tab or a character was typed since the last point
	one  bool // there is but one field
}

func (t *typing) clear() { *t = typing{one: t.one} }

// some reports whether anything is typed.
func (t *typing) some() bool { return t.text[0] != "" || t.text[1] != "" }

// key takes a key into the fields and reports whether it was one for them.
func (t *typing) key(k Key) bool {
	field := &t.text[t.at]
	switch k.Name {
	case KeyTab:
		t.on = true
		if !t.one {
			t.at = 1 - t.at
		}
		return true
	case KeyBackspace:
		r := []rune(*field)
		switch {
		case len(r) > 0:
			*field = string(r[:len(r)-1])
		case t.on && !t.some():
			t.clear() // the next one takes back a point
		default:
			return t.on
		}
		return true
	case KeyEscape:
		if !t.on {
			return false
		}
		t.clear()
		return true
	case KeyRune:
		if !fits(k.Rune, t.some()) {
			return false
		}
		*field, t.on = *field+string(k.Rune), true
		return true
	}
	return false
}

// fits reports whether a character belongs to a measure: digits and marks begin one, units go on with it.
func fits(r rune, begun bool) bool {
	switch {
	case strings.ContainsRune("0123456789.,-−'\"′″/", r):
		return true
	case strings.ContainsRune("mcftin° ", r):
		return begun
	}
	return false
}

// fields returns the fields as they are drawn, nil while nothing was typed.
func (t *typing) fields(labels, live [2]string) []Field {
	if !t.on {
		return nil
	}
	out := []Field{{labels[0], t.text[0], live[0], t.at == 0}}
	if !t.one {
		out = append(out, Field{labels[1], t.text[1], live[1], t.at == 1})
	}
	return out
}

// length returns the length typed into a field, else the one that the pointer gives; fault says why the text is none.
func (t *typing) length(h Host, field int, live float64) (v float64, fault string) {
	text := t.text[field]
	if text == "" {
		return live, ""
	}
	n, err := h.ParseLength(text)
	if err != nil {
		return live, text + ": " + reason(err)
	}
	return float64(n), ""
}

// angle returns the angle typed into a field, else the one that the pointer gives.
func (t *typing) angle(field int, live float64) (deg float64, fault string) {
	text := t.text[field]
	if text == "" {
		return live, ""
	}
	v, err := parseAngle(text)
	if err != nil {
		return live, text + ": an angle in degrees, please: 45 or 22,5"
	}
	return v, ""
}
