package planfile_test

import (
	"errors"
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/iotest"
	"time"

	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func read(text string) (*plan.Plan, error) {
	return planfile.Read(strings.NewReader(text), "gallery.enfilade")
}

func TestReadFaults(t *testing.T) {
	item := func(list, item string) string { return fmt.Sprintf(`{"enfilade":1,%q:[%s]}`, list, item) }
	walls := func(rest string) string {
		return `{"enfilade":1,"walls":[{"id":"W1","line":[[0,0],[1000,0],[1000,1000],[1000,1000]]}],` + rest + `}`
	}
	deep := strings.Repeat("[", 2000) + strings.Repeat("]", 2000)
	tests := []struct{ name, text, want string }{
		// What is no JSON.
		{"empty", ``, `line 1, column 1: is not JSON: ends too early, needs a value`},
		{"blank", " \n ", `line 2, column 2: is not JSON: ends too early, needs a value`},
		{"byte order mark", "\xef\xbb\xbf{}", `line 1, column 1: begins with a byte order mark; save it as UTF-8 without one`},
		{"latin-1", "{\"enfilade\":1,\n \"title\":\"caf\xe9\"}", `line 2, column 14: is not UTF-8 text (byte 0xe9); save it as UTF-8`},
		{"more text", "{\"enfilade\":1} {}", `line 1, column 16: has more text after the plan's end; a plan file is one JSON object`},
		{"deep", `{"enfilade":1,"x":` + deep + `}`, `line 1, column 119: nests more than 100 levels deep`},
		{"cut off", `{"enfilade":1,"walls":[`, `line 1, column 24: is not JSON: ends too early, needs a value`},
		{"no colon", `{"enfilade" 1}`, `line 1, column 13: is not JSON: '1' where a colon is needed`},
		{"no comma", "{\"enfilade\":1\n\"x\":2}", `line 2, column 1: is not JSON: '"' where a comma or } is needed`},
		{"comma too many", `{"enfilade":1,}`, `line 1, column 15: is not JSON: '}' where a member's name in quotes or } is needed`},
		{"comma too many in a list", `[1,]`, `line 1, column 4: is not JSON: ']' where a value is needed`},
		{"leading zero", `{"enfilade":01}`, `line 1, column 14: is not JSON: a number with a leading 0`},
		{"bare point", `{"enfilade":1.}`, `line 1, column 15: is not JSON: '}' where a digit is needed`},
		{"no exponent", `{"enfilade":1e}`, `line 1, column 15: is not JSON: '}' where a digit is needed`},
		{"bad word", `{"enfilade":nul}`, `line 1, column 13: is not JSON: 'n' where a value is needed`},
		{"not a number", `{"enfilade":NaN}`, `line 1, column 13: is not JSON: 'N' where a value is needed`},
		{"open string", `{"enfilade":"1`, `line 1, column 15: is not JSON: ends too early, needs the closing quote of a string`},
		{"tab in a string", "{\"t\":\"\t\"}", `line 1, column 7: is not JSON: control character 0x09 in a string; write it as an escape`},
		{"bad escape", `{"t":"\x"}`, `line 1, column 8: is not JSON: 'x' where one of the escapes \" \\ \/ \b \f \n \r \t \uXXXX is needed`},
		{"short escape", `{"t":"\u12"}`, `line 1, column 11: is not JSON: '"' where one of the escapes \" \\ \/ \b \f \n \r \t \uXXXX is needed`},
		{"half a pair", `{"enfilade":1,"title":"\ud83d"}`, `title: holds half of a surrogate pair; write the whole character`},
		{"half a pair and more", `{"enfilade":1,"title":"\ud83d\u0041"}`, `title: holds half of a surrogate pair; write the whole character`},
		{"half a pair in a name", `{"enfilade":1,"\udead":1}`, `has a member whose name holds half of a surrogate pair`},
		{"name twice", `{"enfilade":1,"title":"a","ti\u0074le":"b"}`, `title: is there twice; a name may stand once in an object`},
		// What is no plan.
		{"a list", `[]`, `is a list, must be an object that begins {"enfilade": 1`},
		{"no version", `{"title":"x"}`, `enfilade: is missing; a plan begins {"enfilade": 1`},
		{"version zero", `{"enfilade":0}`, `enfilade: is 0, must be 1`},
		{"newer", `{"enfilade":2}`, `enfilade: is version 2, newer than version 1, which this program reads; open it with a newer Enfilade`},
		{"version and a half", `{"enfilade":1.5}`, `enfilade: is 1.5, must be a whole number from 0 to 1000000`},
		{"version in words", `{"enfilade":"one"}`, `enfilade: is a string, must be a whole number`},
		{"title", `{"enfilade":1,"title":7}`, `title: is a number, must be a string`},
		{"unit", `{"enfilade":1,"display_unit":"furlong"}`, `display_unit: is "furlong", must be m, cm, mm or ft`},
		{"brief", `{"enfilade":1,"brief":{}}`, `brief: is an object, must be a list`},
		{"floor of two points", `{"enfilade":1,"floor":[[0,0],[1,1]]}`, `floor: needs three points or more, has 2`},
		{"walls no list", `{"enfilade":1,"walls":{}}`, `walls: is an object, must be a list of objects`},
		{"wall no object", item("walls", `{"line":[[0,0],[1,1]]},7`), `wall number 2: is a number, must be an object`},
		// Items.
		{"one point", item("walls", `{"id":"W3","line":[[0,0]]}`), `wall W3, line: needs two points or more, has 1`},
		{"no line", item("walls", `{"id":"W3"}`), `wall W3, line: needs two points or more, has 0`},
		{"no id", item("walls", `{}`), `wall number 1, line: needs two points or more, has 0`},
		{"id no string", item("walls", `{"id":3}`), `wall number 1, id: is a number, must be a string`},
		{"ids twice", item("walls", `{"id":"W3","line":[[0,0],[1,1]]},{"id":"W3","line":[[0,0],[1,1]]}`),
			`wall W3, id: is there twice; each of the walls needs its own`},
		{"member twice", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"line":[]}`),
			`wall number 1, line: is there twice; a name may stand once in an object`},
		{"wall kind", item("walls", `{"id":"W3","kind":"brick","line":[[0,0],[1,1]]}`), `wall W3, kind: is "brick", must be wall, glazing, screen or low`},
		{"justify", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"justify":"middle"}`), `wall W3, justify: is "middle", must be centre, left or right`},
		{"point of three", item("walls", `{"id":"W3","line":[[0,0],[1,1,1]]}`), `wall W3, line: holds a point of 3 numbers; a point is [x, y]`},
		{"point of one", item("walls", `{"id":"W3","line":[[0,0],[1]]}`), `wall W3, line: holds a point of 1 numbers; a point is [x, y]`},
		{"no point", item("walls", `{"id":"W3","line":[[0,0],1]}`), `wall W3, line: holds a number where a point [x, y] must be`},
		{"no coordinate", item("walls", `{"id":"W3","line":[[0,0],[1,"1"]]}`), `wall W3, line: holds a string where a coordinate in mm must be`},
		{"off the grid", item("walls", `{"id":"W3","line":[[0,0],[1,12.345]]}`),
			`wall W3, line: is 12.345, which is off the grid of 0.1 mm; give mm with at most one decimal`},
		{"off the grid by exponent", item("walls", `{"id":"W3","line":[[0,0],[1,5e-2]]}`),
			`wall W3, line: is 5e-2, which is off the grid of 0.1 mm; give mm with at most one decimal`},
		{"far away", item("walls", `{"id":"W3","line":[[0,0],[1,50000000.1]]}`), `wall W3, line: is 50000000.1, must be from -50000000 to 50000000 mm`},
		{"huge", item("walls", `{"id":"W3","line":[[0,0],[1,-1e999999999999999999999]]}`),
			`wall W3, line: is -1e999999999999999999999, must be from -50000000 to 50000000 mm`},
		{"long", item("walls", `{"id":"W3","line":[[0,0],[1,1`+strings.Repeat("0", 5000)+`]]}`),
			`wall W3, line: is 100000000000000000000000000000000000 ..., must be from -50000000 to 50000000 mm`},
		{"thickness", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"thickness":-1}`), `wall W3, thickness: is -1, must be from 0 to 100000 mm`},
		{"thickness in words", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"thickness":"thin"}`), `wall W3, thickness: is a string, must be a number of mm`},
		{"height", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"height":0}`), `wall W3, height: is 0, must be from 0.1 to 50000000 mm`},
		{"locked", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"locked":1}`), `wall W3, locked: is a number, must be true or false`},
		{"hidden", item("walls", `{"id":"W3","line":[[0,0],[1,1]],"hidden":"no"}`), `wall W3, hidden: is a string, must be true or false`},
		{"block of two points", item("blocks", `{"id":"B1","ring":[[0,0],[1,1]]}`), `block B1, ring: needs three points or more, has 2`},
		{"block without a ring", item("blocks", `{"id":"B1"}`), `block B1, ring: needs three points or more, has 0`},
		{"circle without a radius", item("blocks", `{"id":"B1","circle":{"at":[0,0]}}`), `block B1, circle, radius: is missing; give the radius in mm`},
		{"circle far away", item("blocks", `{"id":"B1","circle":{"at":[50000000,0],"radius":1}}`),
			`block B1, circle: reaches outside the legal range of 50 km about the origin`},
		{"zone", item("zones", `{"id":"Z1","ring":[[0,0],[1,1]]}`), `zone Z1, ring: needs three points or more, has 2`},
		{"zone kind", item("zones", `{"id":"Z1","kind":"hall","ring":[[0,0],[1,1],[0,1]]}`), `zone Z1, kind: is "hall", must be area or room`},
		{"observer nowhere", item("observers", `{"id":"O1"}`), `observer O1, at: is missing; give its place as [x, y] in mm`},
		{"observer at a number", item("observers", `{"id":"O1","at":5}`), `observer O1, at: is a number, must be a place [x, y] in mm`},
		{"eye", item("observers", `{"id":"O1","at":[0,0],"eye":0}`), `observer O1, eye: is 0, must be from 0.1 to 50000000 mm`},
		{"heading", item("observers", `{"id":"O1","at":[0,0],"heading":361}`), `observer O1, heading: is 361, must be an angle from -360 to 360 degrees`},
		{"view", item("observers", `{"id":"O1","at":[0,0],"view":0}`), `observer O1, view: is 0, must be an angle above 0 and up to 360 degrees`},
		{"view beyond floats", item("observers", `{"id":"O1","at":[0,0],"view":1e400}`), `observer O1, view: is 1e400, must be an angle above 0 and up to 360 degrees`},
		{"range", item("observers", `{"id":"O1","at":[0,0],"range":0}`), `observer O1, range: is 0, must be from 0.1 to 214748364.7 mm`},
		{"colour", item("observers", `{"id":"O1","at":[0,0],"colour":-1}`), `observer O1, colour: is -1, must be a whole number from 0 to 255`},
		{"face of one point", item("targets", `{"id":"T1","at":[0,0],"face":[[0,0]]}`), `target T1, face: needs two points, has 1`},
		{"face without length", item("targets", `{"id":"T1","at":[0,0],"face":[[2,0],[2,0]]}`), `target T1, face: has two ends at one point; give two that differ`},
		{"max angle", item("targets", `{"id":"T1","at":[0,0],"max_angle":91}`), `target T1, max_angle: is 91, must be an angle from 0 to 90 degrees`},
		{"start nowhere", item("starts", `{"id":"S1"}`), `start S1, at: is missing; give its place as [x, y] in mm`},
		{"facing", item("starts", `{"id":"S1","at":[0,0],"facing":[1]}`), `start S1, facing: is a list, must be a number`},
		{"route", item("routes", `{"id":"R1","from":"S1","via":[[0]],"to":"T1"}`), `route R1, via: holds a point of 1 numbers; a point is [x, y]`},
		{"walker", `{"enfilade":1,"walker":{"pace":0}}`, `walker, pace: is 0, must be a pace above 0 and up to 100 metres per second`},
		{"radius", `{"enfilade":1,"walker":{"radius":2000.1}}`, `walker, radius: is 2000.1, must be from 0 to 2000 mm`},
		{"seen", `{"enfilade":1,"walker":{"seen":"some"}}`, `walker, seen: is "some", must be any or all`},
		{"seen share", `{"enfilade":1,"walker":{"seen":1.5}}`, `walker, seen: is 1.5, must be any, all, or a share above 0 and up to 1`},
		{"seen flag", `{"enfilade":1,"walker":{"seen":true}}`, `walker, seen: is true or false, must be a number`},
		{"underlay", `{"enfilade":1,"underlay":{"at":[0,0],"opacity":2}}`, `underlay, opacity: is 2, must be from 0 to 1`},
		// Openings and their walls.
		{"opening without a wall", walls(`"openings":[{"id":"D1","width":9}]`), `opening D1, wall: is missing; give the id of the wall it lies in`},
		{"opening without width", walls(`"openings":[{"id":"D1","wall":"W1"}]`), `opening D1, width: is missing; give the width in mm`},
		{"no such wall", walls(`"openings":[{"id":"D1","wall":"W2","width":9}]`), `opening D1, wall: names wall "W2", which is not in the file`},
		{"no such piece", walls(`"openings":[{"id":"D1","wall":"W1","segment":3,"width":9}]`),
			`opening D1, segment: names straight piece 3 of wall W1, which has pieces 0 to 2`},
		{"piece without length", walls(`"openings":[{"id":"D1","wall":"W1","segment":2,"width":9}]`),
			`opening D1, segment: names straight piece 2 of wall W1, which has no length`},
		{"beyond", walls(`"openings":[{"id":"D1","wall":"W1","at":991.1,"width":9}]`), `opening D1, at: reaches beyond the end of straight piece 0 of wall W1`},
		{"over another", walls(`"openings":[{"id":"D1","wall":"W1","at":10,"width":9},{"id":"D2","wall":"W1","at":18.9,"width":9}]`),
			`opening D2, at: lies over opening D1; openings in one wall must not overlap`},
		{"leaf", walls(`"openings":[{"id":"D1","wall":"W1","width":9,"leaf":"wood"}]`), `opening D1, leaf: is "wood", must be none, solid or glazed`},
		{"state", walls(`"openings":[{"id":"D1","wall":"W1","width":9,"state":"ajar"}]`), `opening D1, state: is "ajar", must be open or shut`},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			p, err := read(tt.text)
			if err == nil || p != nil {
				t.Fatalf("got %v, %v", p, err)
			}
			var fault *planfile.Fault
			if !errors.As(err, &fault) || fault.File != "gallery.enfilade" {
				t.Errorf("%#v is no fault of the file", err)
			}
			if want := "gallery.enfilade: " + tt.want; err.Error() != want {
				t.Errorf("got  %s\nwant %s", err, want)
			}
		})
	}
}

// TestRead holds what the reader makes of what the writer would not write.
func TestRead(t *testing.T) {
	p, err := read(" \n" + `{"openings":[{"wall":"W1","at":0,"width":1e2},{"id":"D2","wall":"W1","at":1.0e2,"width":0.5,"leaf":null}],
		"walls":[{"line":[[-0,0.0],[1E+3,-20e-1]],"id":null,"thickness":null},{"id":"W1","line":[[0,0],[100.50,0]],"height":null},{"line":[[0,0],[1,1]]}],
		"enfilade":1.0,"title":null,"blocks":[{"circle":{"at":[0,0],"radius":50}}],"walker":null,"floor":[],
		"observers":[{"at":[1,2],"heading":-0}],"zones":[],"title\u0021":"\u00e9\ud83d\ude00\/\"\\\b\f\n\r\t"}` + "\n\n")
	if err != nil {
		t.Fatal(err)
	}
	parts := p.Parts()
	want := plan.Wall{ID: "W2", Line: plan.ChainOf(exact.Pt{}, exact.Pt{X: 10_000, Y: -20}), Height: plan.Ceiling}
	if got := parts.Walls[0]; got.ID != want.ID || !got.Line.Equal(want.Line) || got.Height != want.Height || got.Thickness != 0 {
		t.Errorf("wall %+v, want %+v", got, want)
	}
	if parts.Walls[1].ID != "W1" || parts.Walls[2].ID != "W3" || parts.Openings[0].ID != "D3" {
		t.Errorf("ids given: %s %s, %s", parts.Walls[1].ID, parts.Walls[2].ID, parts.Openings[0].ID)
	}
	if d := parts.Openings[1]; d.At != 1000 || d.Width != 5 {
		t.Errorf("opening %+v", d)
	}
	if n := parts.Blocks[0].Ring.Len(); n != 20 || parts.Blocks[0].Ring.At(5) != (exact.Pt{X: 0, Y: 500}) {
		t.Errorf("the circle's ring has %d corners: %v", n, parts.Blocks[0].Ring)
	}
	if parts.Walker != plan.DefaultWalker() || parts.Sheet.Unit != "m" || parts.Floor.Len() != 0 {
		t.Errorf("defaults: %+v %+v %v", parts.Walker, parts.Sheet, parts.Floor)
	}
	if o := parts.Observers[0]; o.Eye != 16_000 || o.View != 360 || o.Range != 0 || o.Colour != -1 || 1/o.Heading < 0 {
		t.Errorf("observer %+v", o)
	}
	if got, want := parts.Sheet.Extra, `{"title\u0021":"\u00e9\ud83d\ude00\/\"\\\b\f\n\r\t"}`; got != want {
		t.Errorf("extra %s, want %s", got, want)
	}
	named, err := read(`{"enfilade":1,"title":"\u00e9\ud83d\ude00\/\"\\\b\f\n\r\t"}`)
	if err != nil || named.Sheet().Title != "é😀/\"\\\b\f\n\r\t" {
		t.Errorf("title %q, %v", named.Sheet().Title, err)
	}
}

func TestReadBadReader(t *testing.T) {
	_, err := planfile.Read(iotest.ErrReader(io.ErrUnexpectedEOF), "gallery.enfilade")
	if !errors.Is(err, io.ErrUnexpectedEOF) || !strings.HasPrefix(err.Error(), "gallery.enfilade: ") {
		t.Errorf("got %v", err)
	}
}

// TestManyMembers: a plan may hold members that are not known, however many; one that is there twice is told among them too.
func TestManyMembers(t *testing.T) {
	const n = 150_000
	var b strings.Builder
	b.WriteString(`{"enfilade": 1`)
	for i := range n {
		fmt.Fprintf(&b, `,"k%d":%d`, i, i)
	}
	began := time.Now()
	if _, err := planfile.Read(strings.NewReader(b.String()+"}"), "x"); err != nil {
		t.Fatal(err)
	}
	if took := time.Since(began); took > 20*time.Second {
		t.Errorf("reading %d members took %v", n, took)
	}
	for _, again := range []int{0, manyBefore, manyBefore + 1, n - 1} {
		_, err := planfile.Read(strings.NewReader(fmt.Sprintf(`%s,"k%d":0}`, b.String(), again)), "x")
		if err == nil || !strings.Contains(err.Error(), fmt.Sprintf("k%d: is there twice", again)) {
			t.Errorf("k%d twice: %v", again, err)
		}
	}
}

// manyBefore is a member near where the reader goes over to another way of looking names up.
const manyBefore = 62
