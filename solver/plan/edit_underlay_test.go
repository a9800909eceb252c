package plan_test

import (
	"math"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func TestSetUnderlay(t *testing.T) {
	p := plan.New()
	u := plan.Underlay{Image: "scan.png", At: exact.Pt{X: 1, Y: 2}, MMPerPixel: 3, Opacity: 0.4, Turn: 5}
	next, err := plan.SetUnderlay{Underlay: u}.Apply(p)
	if err != nil {
		t.Fatal(err)
	}
	if got := next.Sheet().Underlay; got == nil || *got != u {
		t.Errorf("placed %+v", got)
	}
	if p.Sheet().Underlay != nil || next.Obstacles() != p.Obstacles() || next.Marks() != p.Marks() {
		t.Error("more than the sheet was touched")
	}
	for name, change := range map[string]func(*plan.Underlay){
		"no picture":  func(u *plan.Underlay) { u.Image = "" },
		"far away":    func(u *plan.Underlay) { u.At.X = math.MaxInt32 },
		"no width":    func(u *plan.Underlay) { u.MMPerPixel = 0 },
		"no number":   func(u *plan.Underlay) { u.MMPerPixel = math.NaN() },
		"too wide":    func(u *plan.Underlay) { u.MMPerPixel = 2e6 },
		"too strong":  func(u *plan.Underlay) { u.Opacity = 1.1 },
		"no angle":    func(u *plan.Underlay) { u.Turn = math.Inf(1) },
		"no strength": func(u *plan.Underlay) { u.Opacity = math.NaN() },
	} {
		bad := u
		change(&bad)
		if _, err := (plan.SetUnderlay{Underlay: bad}).Apply(p); err == nil {
			t.Errorf("%s is accepted", name)
		}
	}
}
