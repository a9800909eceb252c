package plantest_test

import (
	"strings"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

func TestParse(t *testing.T) {
	p := plantest.Parse(t, `
		floor -1,-1 9,-1 9,6 -1,6   # a ring
		wall 0,0 8,0 8,5 th=0.2 just=left; glass 8,5 0,5; low 0,5 0,0.0001 h=1.1
		door W1 seg=1 at=1.2 w=0.95 leaf=solid shut hinge=end side=right
		block 1,1 2,1 2,2 h=0.9; block 3,3 4,3 4,4 id=case
		observer 2,-0.5 eye=1.2 heading=30 view=60 range=5; target 1,1; target 4,0.1 6,0.1; start .5,-.25
		walker radius=0.3 pace=0.8 eye=1.5`)
	if got := p.Floor().Points(); len(got) != 4 || got[2] != (exact.Pt{X: 90000, Y: 60000}) {
		t.Errorf("floor %v", got)
	}
	w, _ := p.Wall("W1")
	if w.Kind != plan.Solid || w.Thickness != 2000 || w.Justify != plan.Left || w.Line.Len() != 3 || w.Height != plan.Ceiling {
		t.Errorf("wall %+v", w)
	}
	if low, _ := p.Wall("W3"); low.Kind != plan.Low || low.Height != 11000 || low.Line.At(1) != (exact.Pt{Y: 1}) {
		t.Errorf("low wall %+v", low)
	}
	want := plan.Opening{ID: "D1", Wall: "W1", Segment: 1, At: 12000, Width: 9500, Leaf: plan.SolidLeaf, Shut: true, HingeEnd: true, SideRight: true}
	for _, d := range p.Openings() {
		if d != want {
			t.Errorf("door %+v, want %+v", d, want)
		}
	}
	o, _ := p.Observer("O1")
	if o.At != (exact.Pt{X: 20000, Y: -5000}) || o.Eye != 12000 || o.Heading != 30 || o.View != 60 || o.Range != 50000 {
		t.Errorf("observer %+v", o)
	}
	if f, _ := p.Target("T2"); f.Face == nil || f.At != (exact.Pt{X: 50000, Y: 1000}) {
		t.Errorf("target %+v", f)
	}
	if s, _ := p.Start("S1"); s.At != (exact.Pt{X: 5000, Y: -2500}) {
		t.Errorf("start %+v", s)
	}
	if b := p.Parts().Blocks; len(b) != 2 || b[0].Height != 9000 || b[1].ID != "case" || b[1].Height != plan.Ceiling {
		t.Errorf("blocks %+v", b)
	}
	if k := p.Walker(); k.Radius != 3000 || k.Pace != 0.8 || k.Eye != 15000 {
		t.Errorf("walker %+v", k)
	}
}

func TestParseNamesTheFault(t *testing.T) {
	for text, want := range map[string]string{
		"wal 0,0 1,0":             "unknown item wal",
		"wall 0,0":                "has 1 points, needs 2",
		"wall 0,0 1,0.00001":      "finer than the grid",
		"wall 0,0 1,x":            "not a length",
		"wall 0,0 1,0 thick=1":    "unknown setting thick",
		"wall 0,0 1,0 just=top":   "not one of centre, left, right",
		"start 0,0 shut":          "unknown word shut",
		"observer 0,0 view=round": "not a number",
	} {
		if _, err := plantest.Read(text); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
}

func TestTextReadsBack(t *testing.T) {
	for _, g := range generators {
		text := plantest.Text(g.make(3, 60))
		if again := plantest.Text(plantest.Parse(t, text)); again != text {
			t.Errorf("%s: read back as\n%s\nfrom\n%s", g.name, again, text)
		}
	}
}
