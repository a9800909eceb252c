package gui

import (
	"fmt"
	"strings"

	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// maxEye bounds the height of an eye: 1 km, above every ceiling people draw.
const maxEye = 1_000_000 * 10

// describeObserver is the form of an eye, with what it sees.
func (w *window) describeObserver(c *card, p *plan.Plan, o plan.Observer) {
	n := observerIndex(p, o.ID)
	c.title, c.icon, c.letter, c.where = "Observer", "observer", observerLetter(n), w.at(p, o.At)
	c.colour = o.Colour
	if o.Colour < 0 {
		c.colour = n % swatchCount
	}
	put := func(label string, change func(*plan.Observer)) error {
		change(&o)
		return w.doEdit(tool.Named(label, set(o)))
	}
	rangeText := ""
	if o.Range > 0 {
		rangeText = formatLength(o.Range, w.unit())
	}
	c.fields = []field{
		textField("Name", o.Name, func(t string) error { return put("rename observer", func(o *plan.Observer) { o.Name = t }) }),
		w.placeField(o.At, func(q exact.Pt) error { return put("move observer", func(o *plan.Observer) { o.At = q }) }),
		w.lengthField("Eye height", o.Eye, func(v int32) error {
			if v <= 0 || v > maxEye {
				return errPositive
			}
			return put("change eye height", func(o *plan.Observer) { o.Eye = v })
		}),
		angleField("Heading", o.Heading, -360, 360, func(v float64) error {
			return put("turn observer", func(o *plan.Observer) { o.Heading = v })
		}),
		angleField("View angle", o.View, 0.1, 360, func(v float64) error {
			return put("change view angle", func(o *plan.Observer) { o.View = v })
		}),
		{label: "Range", unit: unitMark(w.unit()), text: rangeText, empty: "no limit", set: func(t string) error {
			v := int32(0)
			if strings.TrimSpace(t) != "" {
				var err error
				if v, err = parseLength(t, w.unit()); err != nil {
					return err
				}
				if v <= 0 {
					return errPositive
				}
			}
			return put("change range", func(o *plan.Observer) { o.Range = v })
		}},
		{label: "Colour", colour: true, chosen: c.colour, pick: func(i int) error {
			return put("change colour", func(o *plan.Observer) { o.Colour = i })
		}},
	}
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindObserver, ID: o.ID})
	if s, ok := w.results.sightOf(o.ID); ok {
		if s.Problem != "" {
			c.fault = s.Problem
			return
		}
		area, square := areaText(w.unit(), s.Area, 1)
		c.facts = []fact{{area, square + " seen"},
			{fmt.Sprintf("%d of %d", len(s.TargetsSeen), p.NumTargets()), "targets seen"},
			{farText(w.unit(), s.Occluding*1000), "open border"}}
	}
}

func observerIndex(p *plan.Plan, id string) int {
	for i, o := range p.Observers() {
		if o.ID == id {
			return i
		}
	}
	return 0
}

// observerLetter is A for the first observer, B for the second, and after Z numbers.
func observerLetter(i int) string {
	if i < 26 {
		return string(rune('A' + i))
	}
	return fmt.Sprint(i + 1)
}

// seenBy lists the letters of the observers that see a target.
func (w *window) seenBy(p *plan.Plan, target string) string {
	var letters []string
	for i, o := range p.Observers() {
		s, _ := w.results.sightOf(o.ID)
		for _, id := range s.TargetsSeen {
			if id == target {
				letters = append(letters, observerLetter(i))
			}
		}
	}
	if len(letters) == 0 {
		return "nobody"
	}
	return strings.Join(letters, " ")
}

// describeStart is the form of a place where a walk begins.
func (w *window) describeStart(c *card, p *plan.Plan, s plan.Start) {
	c.title, c.icon, c.where = "Start", "start", w.at(p, s.At)
	facing := field{label: "Facing", unit: "°", empty: "none", set: func(t string) error {
		if strings.TrimSpace(t) == "" {
			s.Facing = nil
			return w.doEdit(tool.Named("turn start", set(s)))
		}
		v, err := parseNumber(t)
		if err != nil {
			return err
		}
		s.Facing = &v
		return w.doEdit(tool.Named("turn start", set(s)))
	}}
	if s.Facing != nil {
		facing.text = trimDecimals(*s.Facing, 0, 3)
	}
	c.fields = []field{textField("Name", s.Name, func(t string) error {
		s.Name = t
		return w.doEdit(tool.Named("rename start", set(s)))
	}), w.placeField(s.At, func(q exact.Pt) error {
		s.At = q
		return w.doEdit(tool.Named("move start", set(s)))
	}), facing}
	if w.walking.shown {
		c.fields = append(c.fields, w.stepField())
	}
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindStart, ID: s.ID})
	seen, walks := 0, 0
	if w.results.result != nil {
		for _, a := range w.results.result.Approaches {
			if a.Start == s.ID {
				walks++
				if a.Status == study.StatusSeen {
					seen++
				}
				if c.fault == "" && a.Problem != "" && walks == p.NumTargets() {
					c.fault = a.Problem
				}
			}
		}
		if walks > 0 && c.fault == "" {
			c.facts = []fact{{fmt.Sprintf("%d of %d", seen, walks), "targets in sight from here"}}
		}
	}
}
