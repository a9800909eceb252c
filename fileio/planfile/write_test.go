package planfile_test

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"os"
	"reflect"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// full is a file with every member of the format once, as Write lays it out.
const full = `{"enfilade": 1, "title": "Upper \"gallery\"", "place": "Ossel Quay", "display_unit": "cm",
 "floor": [[0,0],[1000,0],[1000,1000.5]],
 "walls": [
  {"id":"W1","kind":"wall","line":[[0,0],[1000,0],[1000,-0.1]],"thickness":200,"justify":"left","locked":true,"tone":"dark"},
  {"id":"W2","kind":"low","line":[[0,0],[0,700.3]],"thickness":0,"height":950,"hidden":true},
  {"id":"W3","kind":"glazing","line":[[0,0],[0,9]],"thickness":12.5},
  {"id":"W4","kind":"screen","line":[[0,0],[0,9]],"thickness":0,"justify":"right"}
 ],
 "openings": [
  {"id":"D1","wall":"W1","segment":0,"at":50,"width":900,"leaf":"glazed","state":"shut","hinge":"end","side":"right"},
  {"id":"D2","wall":"W2","segment":0,"at":0,"width":0.1,"leaf":"none","state":"open"}
 ],
 "blocks": [
  {"id":"B1","ring":[[0,0],[1,0],[0,1]],"circle":{"at":[0,0],"radius":1,"steps":12},"height":950}
 ],
 "zones": [
  {"id":"Z1","name":"Rotunda","ring":[[0,0],[1,0],[0,1]],"kind":"room"},
  {"id":"Z2","ring":[[0,0],[1,0],[0,1]]}
 ],
 "observers": [
  {"id":"O1","name":"Attendant","at":[0,0],"eye":1600,"heading":202.5,"view":110,"range":25000,"colour":0}
 ],
 "targets": [
  {"id":"T1","name":"Astrolabe","at":[0,0],"face":[[0,0],[5,5]],"normal":90,"bottom":0,"top":2000,"max_angle":60,"near":0,"far":9000,"colour":3},
  {"id":"T2","at":[0,0]}
 ],
 "starts": [
  {"id":"S1","name":"East door","at":[0,0],"facing":180}
 ],
 "routes": [
  {"id":"R1","from":"S1","via":[[0,0],[7,7]],"to":"T1"}
 ],
 "walker": {"radius":250,"pace":1.1,"eye":1200,"seen":0.25,"mood":"brisk"},
 "brief": [
  {"id":"Q1","kind":"first sight","within":12.50},
  {"id":"Q2"}
 ],
 "underlay": {"image":"survey.png","at":[0,0],"mm_per_pixel":3.25,"opacity":0.4,"turn":-1.5,"locked":true},
 "paper": {"size":"A3", "x" : [ 1, 2.50 ]}}
`

func TestWrite(t *testing.T) {
	p, err := read(full)
	if err != nil {
		t.Fatal(err)
	}
	want := strings.Replace(full, `{"size":"A3", "x" : [ 1, 2.50 ]}`, `{"size":"A3","x":[1,2.50]}`, 1)
	if got := written(t, p); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
	if got, want := written(t, plan.New()), "{\"enfilade\": 1, \"display_unit\": \"m\"}\n"; got != want {
		t.Errorf("an empty plan is %q, want %q", got, want)
	}
}

func written(t interface{ Fatal(...any) }, p *plan.Plan) string {
	var b bytes.Buffer
	if err := planfile.Write(&b, p); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// TestWriteRefuses holds that a plan that could not be read again is not written.
func TestWriteRefuses(t *testing.T) {
	line := plan.ChainOf(exact.Pt{}, exact.Pt{X: 9})
	wall := plan.Wall{ID: "W1", Line: line, Height: plan.Ceiling}
	with := func(change func(*plan.Wall)) plan.Parts {
		w := wall
		change(&w)
		return plan.Parts{Walker: plan.DefaultWalker(), Walls: []plan.Wall{wall, w}}
	}
	eye := plan.Observer{ID: "O1", Eye: 1, View: 360, Colour: -1}
	seeing := func(change func(*plan.Observer)) plan.Parts {
		o := eye
		change(&o)
		return plan.Parts{Walker: plan.DefaultWalker(), Observers: []plan.Observer{o}}
	}
	sheet := func(s plan.Sheet) plan.Parts { return plan.Parts{Walker: plan.DefaultWalker(), Sheet: s} }
	tests := []struct {
		name  string
		parts plan.Parts
		want  string
	}{
		{"ids twice", with(func(w *plan.Wall) {}), "wall W1, id: is there twice"},
		{"far away", with(func(w *plan.Wall) { w.ID, w.Line = "W2", plan.ChainOf(exact.Pt{X: plan.MaxCoord + 1}, exact.Pt{}) }), "wall W2, line: is 50000000.1"},
		{"wall kind", with(func(w *plan.Wall) { w.ID, w.Kind = "W2", 9 }), "wall W2, kind: is a number"},
		{"height", with(func(w *plan.Wall) { w.ID, w.Height = "W2", -1 }), "wall W2, height: is -0.1"},
		{"extra no object", with(func(w *plan.Wall) { w.ID, w.Extra = "W2", "[]" }), "line 4, column"},
		{"extra no JSON", with(func(w *plan.Wall) { w.ID, w.Extra = "W2", `{"a":1}}` }), "line 4, column"},
		{"extra of a known name", with(func(w *plan.Wall) { w.ID, w.Extra = "W2", `{"id":"W9"}` }), "wall number 2, id: is there twice"},
		{"name", seeing(func(o *plan.Observer) { o.Name = "\xff" }), "line 3, column"},
		{"heading", seeing(func(o *plan.Observer) { o.Heading = math.NaN() }), "line 3, column"},
		{"view", seeing(func(o *plan.Observer) { o.View = 0 }), "observer O1, view: is 0"},
		{"unit", sheet(plan.Sheet{Unit: "yd"}), `display_unit: is "yd"`},
		{"brief", sheet(plan.Sheet{Brief: "{}"}), "brief: is an object"},
		{"brief no JSON", sheet(plan.Sheet{Brief: "[1"}), "line 2, column"},
		{"no brief", sheet(plan.Sheet{Brief: " "}), "line 2, column"},
		{"extra", sheet(plan.Sheet{Extra: `{"enfilade":3}`}), "enfilade: is there twice"},
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			var b bytes.Buffer
			err := planfile.Write(&b, plan.From(tt.parts))
			var fault *planfile.Fault
			if !errors.As(err, &fault) || !strings.HasPrefix(err.Error(), tt.want) {
				t.Errorf("got %v, want %s ...", err, tt.want)
			}
			if b.Len() > 0 {
				t.Errorf("wrote %q", b.String())
			}
		})
	}
	full, err := os.OpenFile("/dev/full", os.O_WRONLY, 0)
	if err != nil {
		t.Skip("no /dev/full here")
	}
	defer full.Close()
	if err := planfile.Write(full, plan.New()); err == nil {
		t.Error("a full disk is no error")
	}
}

// sameParts reports whether two plans hold the same, with empty lists equal to missing ones.
func sameParts(a, b plan.Parts) bool {
	for _, p := range []*plan.Parts{&a, &b} {
		v := reflect.ValueOf(p).Elem()
		for i := range v.NumField() {
			if f := v.Field(i); f.Kind() == reflect.Slice && f.Len() == 0 {
				f.SetZero()
			}
		}
	}
	return reflect.DeepEqual(a, b)
}

func TestWriteLaws(t *testing.T) {
	openings := 0
	rapid.Check(t, func(t *rapid.T) {
		p := plan.From(genParts(t))
		openings += p.NumOpenings()
		first := written(t, p)
		q, err := planfile.Read(strings.NewReader(first), "law")
		if err != nil {
			t.Fatalf("%v\n%s", err, first)
		}
		if !sameParts(p.Parts(), q.Parts()) {
			t.Fatalf("read back differs:\n%+v\n%+v\n%s", p.Parts(), q.Parts(), first)
		}
		if second := written(t, q); second != first {
			t.Fatalf("written again differs:\n%s\n%s", first, second)
		}
	})
	if openings < 50 {
		t.Errorf("%d openings in all: the generator lost its aim", openings)
	}
}

// genParts draws any legal plan.
func genParts(t *rapid.T) plan.Parts {
	g := gen{t}
	p := plan.Parts{Walker: plan.Walker{
		Radius: rapid.Int32Range(0, plan.MaxBodyRadius).Draw(t, "radius"), Pace: rapid.Float64Range(0.1, 100).Draw(t, "pace"),
		Eye: rapid.Int32Range(1, 30_000).Draw(t, "eye"), Seen: rapid.SampledFrom([]plan.SeenKind{0, 1, 2}).Draw(t, "seen"), Meta: g.meta()}}
	if p.Walker.Seen == plan.SeenShare {
		p.Walker.Share = rapid.Float64Range(0.001, 1).Draw(t, "share")
	}
	p.Sheet = plan.Sheet{Title: rapid.String().Draw(t, "title"), Place: rapid.String().Draw(t, "place"),
		Unit: rapid.SampledFrom([]string{"m", "cm", "mm", "ft"}).Draw(t, "unit"), Extra: g.extra(),
		Brief: rapid.SampledFrom([]string{"", "[]", `[{"id":"Q1","x":1.50},7,"a b"]`}).Draw(t, "brief")}
	if g.coin() {
		p.Floor = g.chain(3)
	}
	if g.coin() {
		p.Sheet.Underlay = &plan.Underlay{Image: "a/b.png", At: g.point(), MMPerPixel: rapid.Float64Range(1e-9, 1e6).Draw(t, "scale"),
			Opacity: rapid.Float64Range(0, 1).Draw(t, "opacity"), Turn: g.degrees(), Meta: g.meta()}
	}
	for i := range g.count() {
		w := plan.Wall{ID: g.id("W", i), Kind: rapid.SampledFrom([]plan.WallKind{0, 1, 2, 3}).Draw(t, "kind"), Line: g.chain(2),
			Thickness: rapid.Int32Range(0, plan.MaxThickness).Draw(t, "thickness"), Height: g.height(),
			Justify: rapid.SampledFrom([]plan.Justify{0, 1, 2}).Draw(t, "justify"), Meta: g.meta()}
		p.Walls = append(p.Walls, w)
		length := int32(exact.Dist(w.Line.At(0), w.Line.At(1)))
		for at := int32(0); at < length-1 && g.coin(); {
			o := plan.Opening{ID: g.id("D", len(p.Openings)), Wall: w.ID, At: rapid.Int32Range(at, length-1).Draw(t, "at"),
				Leaf: rapid.SampledFrom([]plan.Leaf{0, 1, 2}).Draw(t, "leaf"), Shut: g.coin(), HingeEnd: g.coin(), SideRight: g.coin(), Meta: g.meta()}
			o.Width = rapid.Int32Range(1, length-o.At).Draw(t, "width")
			p.Openings, at = append(p.Openings, o), o.At+o.Width
		}
	}
	g.bodies(&p)
	g.marks(&p)
	return p
}

func (g gen) bodies(p *plan.Parts) {
	for i := range g.count() {
		b := plan.Block{ID: g.id("B", i), Ring: g.chain(3), Height: g.height(), Meta: g.meta()}
		if g.coin() {
			b.Circle = &plan.Circle{At: g.point(), Radius: rapid.Int32Range(1, 1_000_000).Draw(g.t, "radius"), Extra: g.extra()}
		}
		p.Blocks = append(p.Blocks, b)
	}
	for i := range g.count() {
		p.Zones = append(p.Zones, plan.Zone{ID: g.id("Z", i), Name: g.name(), Ring: g.chain(3), Room: g.coin(), Meta: g.meta()})
	}
}

func (g gen) marks(p *plan.Parts) {
	for i := range g.count() {
		p.Observers = append(p.Observers, plan.Observer{ID: g.id("O", i), Name: g.name(), At: g.point(), Eye: rapid.Int32Range(1, 9999).Draw(g.t, "eye"),
			Heading: g.degrees(), View: rapid.Float64Range(1e-300, 360).Draw(g.t, "view"),
			Range: rapid.Int32Min(0).Draw(g.t, "range"), Colour: rapid.IntRange(-1, 255).Draw(g.t, "colour"), Meta: g.meta()})
	}
	for i := range g.count() {
		target := plan.Target{ID: g.id("T", i), Name: g.name(), At: g.point(), Colour: rapid.IntRange(-1, 255).Draw(g.t, "colour"), Meta: g.meta()}
		if a, b := g.point(), g.point(); a != b && g.coin() {
			target.Face = &[2]exact.Pt{a, b}
		}
		if g.coin() {
			normal, angle, near := g.degrees(), rapid.Float64Range(0, 90).Draw(g.t, "angle"), rapid.Int32Range(0, plan.MaxCoord).Draw(g.t, "near")
			far, top, bottom := near, near, int32(0)
			target.Normal, target.MaxAngle, target.Near, target.Far, target.Top, target.Bottom = &normal, &angle, &near, &far, &top, &bottom
		}
		p.Targets = append(p.Targets, target)
	}
	for i := range g.count() {
		s := plan.Start{ID: g.id("S", i), Name: g.name(), At: g.point(), Meta: g.meta()}
		if g.coin() {
			facing := g.degrees()
			s.Facing = &facing
		}
		p.Starts = append(p.Starts, s)
		p.Routes = append(p.Routes, plan.Route{ID: g.id("R", i), From: s.ID, Via: g.chain(0), To: g.name(), Meta: g.meta()})
	}
}

// gen draws the parts of a plan.
type gen struct{ t *rapid.T }

func (g gen) coin() bool   { return rapid.Bool().Draw(g.t, "coin") }
func (g gen) count() int   { return rapid.IntRange(0, 3).Draw(g.t, "count") }
func (g gen) name() string { return rapid.String().Draw(g.t, "name") }

func (g gen) id(letter string, i int) string {
	if g.coin() {
		return fmt.Sprint(letter, i+1)
	}
	return fmt.Sprint(i, rapid.String().Draw(g.t, "id"))
}

func (g gen) degrees() float64 {
	return rapid.OneOf(rapid.Float64Range(-360, 360), rapid.Map(rapid.IntRange(0, 8), func(i int) float64 { return float64(i) * -45 })).Draw(g.t, "degrees")
}

func (g gen) height() int32 {
	return rapid.OneOf(rapid.Just(plan.Ceiling), rapid.Int32Range(1, plan.MaxCoord)).Draw(g.t, "height")
}

func (g gen) point() exact.Pt {
	c := rapid.OneOf(rapid.Int32Range(-300, 300), rapid.Int32Range(-plan.MaxCoord, plan.MaxCoord))
	return exact.Pt{X: c.Draw(g.t, "x"), Y: c.Draw(g.t, "y")}
}

func (g gen) chain(least int) plan.Chain {
	pts := make([]exact.Pt, rapid.IntRange(least, least+3).Draw(g.t, "points"))
	for i := range pts {
		pts[i] = g.point()
	}
	return plan.ChainOf(pts...)
}

func (g gen) meta() plan.Meta {
	return plan.Meta{Locked: g.coin(), Hidden: g.coin(), Extra: g.extra()}
}

func (g gen) extra() string {
	return rapid.SampledFrom([]string{"", "", `{"new":1e3}`, `{"a b":{"c":[1,2.50," {]"]},"\u0065":null,"q\"":"\\"}`}).Draw(g.t, "extra")
}

func BenchmarkRoundTrip(b *testing.B) {
	for _, n := range []int{1000, 10_000, 100_000} {
		var parts plan.Parts
		parts.Walker = plan.DefaultWalker()
		for i := range int32(n) {
			x, y := i%100*20_003, i/100*20_007
			w := plan.Wall{ID: fmt.Sprint("W", i+1), Line: plan.ChainOf(exact.Pt{X: x, Y: y}, exact.Pt{X: x + 15_000, Y: y}),
				Thickness: 2000, Height: plan.Ceiling}
			parts.Walls = append(parts.Walls, w)
			if i%10 == 0 {
				parts.Openings = append(parts.Openings, plan.Opening{ID: fmt.Sprint("D", i/10+1), Wall: w.ID, At: 1000, Width: 9000, Leaf: plan.SolidLeaf})
			}
		}
		p := plan.From(parts)
		b.Run(fmt.Sprintf("walls=%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				var text bytes.Buffer
				if err := planfile.Write(&text, p); err != nil {
					b.Fatal(err)
				}
				b.SetBytes(int64(text.Len()))
				if _, err := planfile.Read(&text, "bench"); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func ExampleWrite() {
	p, err := planfile.Read(strings.NewReader(`{"enfilade":1, "walls":[{"line":[[0,0],[2500,0]],"kind":"glazing","maker":"Ossel"}]}`), "example")
	if err != nil {
		fmt.Println(err)
		return
	}
	if err := planfile.Write(os.Stdout, p); err != nil {
		fmt.Println(err)
	}
	// Output:
	// {"enfilade": 1, "display_unit": "m",
	//  "walls": [
	//   {"id":"W1","kind":"glazing","line":[[0,0],[2500,0]],"thickness":0,"maker":"Ossel"}
	//  ]}
}

func ExampleRead() {
	_, err := planfile.Read(strings.NewReader(`{"enfilade":1, "walls":[{"id":"W3","line":[[0,0]]}]}`), "gallery.enfilade")
	fmt.Println(err)
	// Output: gallery.enfilade: wall W3, line: needs two points or more, has 1
}
