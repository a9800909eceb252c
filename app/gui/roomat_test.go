package gui

import (
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

func TestTheFormNamesTheRoom(t *testing.T) {
	r := newGallery(t)
	r.click(11.35, 8.75)
	if want := "at 11.35, 8.75 m in Rotunda"; r.form.where.text != want {
		t.Errorf("the observer stands %q, want %q", r.form.where.text, want)
	}
}

func TestRoomAt(t *testing.T) {
	box := func(name string, lo, hi float64, room bool) plan.Zone {
		return plan.Zone{Name: name, Room: room, Ring: plan.ChainOf(m(lo, lo), m(hi, lo), m(hi, hi), m(lo, hi))}
	}
	all, hall, nook := box("All", 0, 10, false), box("Hall", 2, 6, true), box("Nook", 2, 4, false)
	for name, c := range map[string]struct {
		zones []plan.Zone
		at    exact.Pt
		want  string
	}{
		"the smallest, drawn first":          {[]plan.Zone{nook, hall, all}, m(3, 3), "Nook"},
		"the smallest, drawn last":           {[]plan.Zone{all, hall, nook}, m(3, 3), "Nook"},
		"the smallest that holds the point":  {[]plan.Zone{all, hall, nook}, m(5, 5), "Hall"},
		"on the border is inside":            {[]plan.Zone{nook, hall, all}, m(4, 3), "Nook"},
		"on the right border is inside":      {[]plan.Zone{all, hall}, m(6, 3), "Hall"},
		"just beyond it is not":              {[]plan.Zone{all, hall}, m(6.0001, 3), "All"},
		"of one size the room":               {[]plan.Zone{box("Room", 0, 10, true), all}, m(1, 1), "Room"},
		"of one size and kind the later":     {[]plan.Zone{all, box("Later", 0, 10, false)}, m(1, 1), "Later"},
		"a zone without a name names no one": {[]plan.Zone{all, box("", 2, 4, true)}, m(3, 3), "All"},
		"outside of all":                     {[]plan.Zone{all}, m(11, 3), ""},
	} {
		p := plan.New()
		for _, z := range c.zones {
			var err error
			if p, err = (plan.AddZone{Zone: z}).Apply(p); err != nil {
				t.Fatal(err)
			}
		}
		if got := roomAt(p, c.at); got != c.want {
			t.Errorf("%s: %q, want %q", name, got, c.want)
		}
	}
}
