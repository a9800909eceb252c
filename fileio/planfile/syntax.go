package planfile

import (
	"bytes"
	"fmt"
	"unicode/utf8"
)

// maxDepth bounds how deeply arrays and objects may nest; plans need six.
const maxDepth = 100

// checkSyntax says why text is not one JSON value in UTF-8; nil when it is. After it has passed, the cursor may walk the
// text without looking for errors.
func checkSyntax(text []byte) *Fault {
	if bytes.HasPrefix(text, []byte("\xef\xbb\xbf")) {
		return faultf("line 1, column 1", "begins with a byte order mark; save it as UTF-8 without one")
	}
	if !utf8.Valid(text) {
		at := 0
		for at < len(text) {
			r, n := utf8.DecodeRune(text[at:])
			if r == utf8.RuneError && n <= 1 {
				break
			}
			at += n
		}
		return faultf(lineAt(text, at), "is not UTF-8 text (byte 0x%02x); save it as UTF-8", text[at])
	}
	s := syntax{text: text}
	s.value(0)
	s.space()
	if s.fault == nil && s.pos < len(text) {
		s.fail("has more text after the plan's end; a plan file is one JSON object")
	}
	return s.fault
}

// lineAt names a place in the text by line and column, both from 1; columns count characters.
func lineAt(text []byte, pos int) string {
	before := text[:min(pos, len(text))]
	line := 1 + bytes.Count(before, []byte("\n"))
	column := 1 + utf8.RuneCount(before[bytes.LastIndexByte(before, '\n')+1:])
	return fmt.Sprintf("line %d, column %d", line, column)
}

// syntax checks JSON (RFC 8259) from pos on and stops at the first fault.
type syntax struct {
	text  []byte
	pos   int
	fault *Fault
}

func (s *syntax) fail(format string, args ...any) {
	if s.fault == nil {
		s.fault = faultf(lineAt(s.text, s.pos), format, args...)
	}
}

// unexpected fails at what stands at pos.
func (s *syntax) unexpected(want string) {
	if s.pos >= len(s.text) {
		s.fail("is not JSON: ends too early, needs %s", want)
		return
	}
	r, _ := utf8.DecodeRune(s.text[s.pos:])
	s.fail("is not JSON: %q where %s is needed", r, want)
}

// peek returns the byte at pos, 0 at the end.
func (s *syntax) peek() byte {
	if s.pos < len(s.text) {
		return s.text[s.pos]
	}
	return 0
}

func (s *syntax) space() {
	for s.pos < len(s.text) && isSpace(s.text[s.pos]) {
		s.pos++
	}
}

func isSpace(b byte) bool { return b == ' ' || b == '\n' || b == '\t' || b == '\r' }

func (s *syntax) value(depth int) {
	s.space()
	if depth > maxDepth {
		s.fail("nests more than %d levels deep", maxDepth)
		return
	}
	switch b := s.peek(); {
	case b == '{':
		s.list('}', "a member's name in quotes or }", depth, true)
	case b == '[':
		s.list(']', "a value or ]", depth, false)
	case b == '"':
		s.str()
	case b == '-' || isDigit(b):
		s.number()
	case b == 't':
		s.word("true")
	case b == 'f':
		s.word("false")
	case b == 'n':
		s.word("null")
	default:
		s.unexpected("a value")
	}
}

// list checks an array, or an object when members have names.
func (s *syntax) list(end byte, first string, depth int, named bool) {
	s.pos++
	s.space()
	if s.peek() == end {
		s.pos++
		return
	}
	for s.fault == nil {
		s.space()
		if named {
			if s.peek() != '"' {
				s.unexpected(first)
				return
			}
			s.str()
			s.space()
			if s.fault == nil && s.peek() != ':' {
				s.unexpected("a colon")
				return
			}
			s.pos++
		}
		if s.fault != nil {
			return
		}
		s.value(depth + 1)
		s.space()
		switch {
		case s.fault != nil:
			return
		case s.peek() == end:
			s.pos++
			return
		case s.peek() != ',':
			s.unexpected("a comma or " + string(end))
			return
		}
		s.pos++
	}
}

func (s *syntax) str() {
	for s.pos++; s.pos < len(s.text); s.pos++ {
		switch b := s.text[s.pos]; {
		case b == '"':
			s.pos++
			return
		case b < ' ':
			s.fail("is not JSON: control character 0x%02x in a string; write it as an escape", b)
			return
		case b == '\\':
			s.pos++
			if !s.escape() {
				s.unexpected("one of the escapes \\\" \\\\ \\/ \\b \\f \\n \\r \\t \\uXXXX")
				return
			}
		}
	}
	s.unexpected("the closing quote of a string")
}

// escape checks what follows a backslash and stops on its last byte.
func (s *syntax) escape() bool {
	switch s.peek() {
	case '"', '\\', '/', 'b', 'f', 'n', 'r', 't':
		return true
	case 'u':
		for range 4 {
			s.pos++
			if _, ok := hexDigit(s.peek()); !ok {
				return false
			}
		}
		return true
	}
	return false
}

func hexDigit(b byte) (rune, bool) {
	switch {
	case isDigit(b):
		return rune(b - '0'), true
	case b >= 'a' && b <= 'f':
		return rune(b-'a') + 10, true
	case b >= 'A' && b <= 'F':
		return rune(b-'A') + 10, true
	}
	return 0, false
}

func isDigit(b byte) bool { return b >= '0' && b <= '9' }

func (s *syntax) number() {
	if s.peek() == '-' {
		s.pos++
	}
	if s.peek() == '0' {
		s.pos++
		if isDigit(s.peek()) {
			s.fail("is not JSON: a number with a leading 0")
			return
		}
	} else if !s.digits() {
		return
	}
	if s.peek() == '.' {
		s.pos++
		if !s.digits() {
			return
		}
	}
	if b := s.peek(); b == 'e' || b == 'E' {
		s.pos++
		if b := s.peek(); b == '+' || b == '-' {
			s.pos++
		}
		s.digits()
	}
}

func (s *syntax) digits() bool {
	if !isDigit(s.peek()) {
		s.unexpected("a digit")
		return false
	}
	for isDigit(s.peek()) {
		s.pos++
	}
	return true
}

func (s *syntax) word(word string) {
	if !bytes.HasPrefix(s.text[s.pos:], []byte(word)) {
		s.unexpected("a value")
		return
	}
	s.pos += len(word)
}
