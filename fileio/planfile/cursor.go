package planfile

import (
	"unicode/utf16"
	"unicode/utf8"
)

// cursor walks the members of one array or object in text that checkSyntax has passed.
type cursor struct {
	text []byte
	pos  int
}

// inside returns a cursor over an array's or object's text, brackets included.
func inside(text []byte) cursor { return cursor{text, 1} }

// value returns the text of an array's next value, and false at its end.
func (c *cursor) value() ([]byte, bool) {
	if !c.more() {
		return nil, false
	}
	return c.one(), true
}

// count returns the number of values in an array's text.
func count(text []byte) int {
	n := 0
	for c := inside(text); c.more(); n++ {
		c.one()
	}
	return n
}

// member returns an object's next name, quotes included, and the text of its value; false at its end.
func (c *cursor) member() (name, value []byte, ok bool) {
	if !c.more() {
		return nil, nil, false
	}
	name = c.one()
	c.space()
	c.pos++ // the colon
	c.space()
	return name, c.one(), true
}

// more skips to the next value and reports whether there is one.
func (c *cursor) more() bool {
	c.space()
	if c.text[c.pos] == ',' {
		c.pos++
		c.space()
	}
	return c.text[c.pos] != ']' && c.text[c.pos] != '}'
}

func (c *cursor) space() {
	for isSpace(c.text[c.pos]) {
		c.pos++
	}
}

// one returns the text of the value at pos and steps over it.
func (c *cursor) one() []byte {
	from := c.pos
	switch c.text[c.pos] {
	case '"':
		c.skipString()
	case '{', '[':
		for depth := 0; ; {
			switch c.text[c.pos] {
			case '"':
				c.skipString()
				continue
			case '{', '[':
				depth++
			case '}', ']':
				depth--
			}
			c.pos++
			if depth == 0 {
				break
			}
		}
	default:
		for c.pos < len(c.text) && !endsWord(c.text[c.pos]) {
			c.pos++
		}
	}
	return c.text[from:c.pos]
}

func endsWord(b byte) bool { return b == ',' || b == ']' || b == '}' || isSpace(b) }

func (c *cursor) skipString() {
	for c.pos++; c.text[c.pos] != '"'; c.pos++ {
		if c.text[c.pos] == '\\' {
			c.pos++
		}
	}
	c.pos++
}

// unquote returns the string a JSON string stands for; ok is false when it holds half of a surrogate pair.
func unquote(text []byte) (s string, ok bool) {
	body := text[1 : len(text)-1]
	if !hasEscape(body) {
		return string(body), true
	}
	out := make([]byte, 0, len(body))
	for i := 0; i < len(body); i++ {
		if body[i] != '\\' {
			out = append(out, body[i])
			continue
		}
		i++
		switch body[i] {
		case 'b':
			out = append(out, '\b')
		case 'f':
			out = append(out, '\f')
		case 'n':
			out = append(out, '\n')
		case 'r':
			out = append(out, '\r')
		case 't':
			out = append(out, '\t')
		case 'u':
			r := hexRune(body[i+1:])
			i += 4
			if utf16.IsSurrogate(r) {
				if i+2 >= len(body) || body[i+1] != '\\' || body[i+2] != 'u' {
					return "", false
				}
				r = utf16.DecodeRune(r, hexRune(body[i+3:]))
				if r == utf8.RuneError {
					return "", false
				}
				i += 6
			}
			out = utf8.AppendRune(out, r)
		default:
			out = append(out, body[i])
		}
	}
	return string(out), true
}

func hasEscape(text []byte) bool {
	for _, b := range text {
		if b == '\\' {
			return true
		}
	}
	return false
}

func hexRune(text []byte) rune {
	var r rune
	for _, b := range text[:4] {
		d, _ := hexDigit(b)
		r = r<<4 | d
	}
	return r
}

// compact appends a value's text without white space between its parts.
func compact(out, text []byte) []byte {
	quoted := false
	for i := 0; i < len(text); i++ {
		b := text[i]
		if !quoted && isSpace(b) {
			continue
		}
		out = append(out, b)
		switch {
		case b == '"':
			quoted = !quoted
		case b == '\\':
			i++
			out = append(out, text[i])
		}
	}
	return out
}
