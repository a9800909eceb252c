package gui

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"enfilade/canvas/pick"
	"enfilade/canvas/tool"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// firstFace is the width of a face that a point target is given, in grid units: 1 m.
const firstFace = 1000 * exact.PerMM

// describeTarget is the form of a thing to be seen, with who sees it.
func (w *window) describeTarget(c *card, p *plan.Plan, t plan.Target) {
	c.title, c.icon, c.where = "Target", "target", w.at(p, t.At)
	put := func(label string, change func(*plan.Target)) error {
		change(&t)
		return w.doEdit(tool.Named(label, set(t)))
	}
	c.fields = []field{textField("Name", t.Name, func(s string) error {
		return put("rename target", func(t *plan.Target) { t.Name = s })
	})}
	if t.Face == nil { // a face stands where its ends do
		c.fields = append(c.fields, w.placeField(t.At, func(q exact.Pt) error { return put("move target", func(t *plan.Target) { t.At = q }) }))
	}
	c.fields = append(c.fields, w.describeFace(t, put)...)
	c.fields = append(c.fields, w.describeLimits(t, put)...)
	c.actions = w.turnActions(p, t)
	c.fault = problemOf(w.results.result, plan.Ref{Kind: plan.KindTarget, ID: t.ID})
	if s, ok := w.results.seenFrom(t.ID); ok {
		if s.Problem != "" {
			c.fault = s.Problem
			return
		}
		area, square := areaText(w.unit(), s.Area, 1)
		c.facts = []fact{{area, square + " see " + askedShort(s.Asked)}, {w.seenBy(p, t.ID), "see it now"}}
	}
}

// turnActions offers to hang a target on the other face of its wall, or to turn a free one round; J does the same.
func (w *window) turnActions(p *plan.Plan, t plan.Target) []choice {
	heading, faces := facing(t)
	if !faces || t.Locked {
		return nil
	}
	text := "Turn round (J)"
	if _, hangs := pick.Hanging(p, pick.TargetAt(t), heading); hangs {
		text = "To the other face (J)"
	}
	ref := plan.Ref{Kind: plan.KindTarget, ID: t.ID}
	return []choice{{text, func() {
		if e := tool.TurnRound(w.session.Committed(), ref); e != nil {
			w.try(e)
		}
	}}}
}

// describeFace is what the form offers of where a target looks to: the side a point is seen from, or a face with its ends.
func (w *window) describeFace(t plan.Target, put func(string, func(*plan.Target)) error) []field {
	chosen := 0
	if t.Face != nil {
		chosen = 1
	}
	heading, faces := facing(t)
	shape := field{label: "Shape", choices: []string{"a point", "a face with a front"}, chosen: chosen, pick: func(i int) error {
		if i == chosen {
			return nil
		}
		return put("change shape of target", func(t *plan.Target) {
			if t.Normal = &heading; i == 0 {
				t.Face = nil
				return
			}
			if !faces {
				*t.Normal = 90
			}
			t.Face = faceAcross(t.At, *t.Normal, firstFace)
		})
	}}
	front := field{label: "Faces", unit: "°", empty: "all sides", set: func(text string) error {
		if strings.TrimSpace(text) == "" {
			if t.Face != nil {
				return errors.New("a face looks one way")
			}
			return put("turn target", func(t *plan.Target) { t.Normal = nil })
		}
		v, err := parseNumber(text)
		switch {
		case err != nil:
			return err
		case v < -360 || v > 360:
			return errors.New("from -360 to 360 degrees, please")
		}
		return put("turn target", func(t *plan.Target) {
			if t.Normal = &v; t.Face != nil {
				t.Face = faceAcross(t.At, v, exact.Dist(t.Face[0], t.Face[1]))
			}
		})
	}}
	if faces {
		front.text = trimDecimals(heading, 0, 3)
	}
	fields := []field{shape, front}
	if t.Face == nil {
		return fields
	}
	width := w.lengthField("Width", int32(math.Round(exact.Dist(t.Face[0], t.Face[1]))), func(v int32) error {
		return w.within(v, 1, plan.MaxThickness, func() error {
			return put("change width of target", func(t *plan.Target) { t.Face = faceAcross(t.At, heading, float64(v)) })
		})
	})
	return append(fields, width, w.faceEnd("Left end", 0, t, put), w.faceEnd("Right end", 1, t, put))
}

// faceEnd is the field of one end of a target's face; seen from its front the first end is at the right.
func (w *window) faceEnd(label string, seen int, t plan.Target, put func(string, func(*plan.Target)) error) field {
	end := 1 - seen
	return field{label: label, wide: true, text: w.placeText(t.Face[end]), set: func(text string) error {
		q, err := parsePlace(text, w.unit())
		switch {
		case err != nil:
			return err
		case q == t.Face[1-end]:
			return errors.New("the other end is there")
		}
		return put("move end of target", func(t *plan.Target) {
			face := *t.Face
			face[end] = q
			t.Face, t.Normal = &face, nil
			t.At = exact.Pt{X: int32((int64(face[0].X) + int64(face[1].X)) / 2), Y: int32((int64(face[0].Y) + int64(face[1].Y)) / 2)}
		})
	}}
}

// describeLimits is what the form offers of from where a target may be seen. An angle needs a side to be off.
func (w *window) describeLimits(t plan.Target, put func(string, func(*plan.Target)) error) []field {
	var fields []field
	if _, faces := facing(t); faces || t.MaxAngle != nil {
		angle := field{label: "At most", unit: "°", empty: "90", note: "off its front", set: func(text string) error {
			if strings.TrimSpace(text) == "" {
				return put("change viewing angle", func(t *plan.Target) { t.MaxAngle = nil })
			}
			v, err := parseNumber(text)
			switch {
			case err != nil:
				return err
			case v <= 0 || v > 90:
				return errors.New("above 0, up to 90")
			}
			return put("change viewing angle", func(t *plan.Target) { t.MaxAngle = &v })
		}}
		if t.MaxAngle != nil {
			angle.text = trimDecimals(*t.MaxAngle, 0, 3)
		}
		fields = append(fields, angle)
	}
	return append(fields,
		w.limitField("Not nearer", t.Near, func(v *int32) error {
			if v != nil && t.Far != nil && *v >= *t.Far {
				return errors.New("below the farthest")
			}
			return put("change nearest distance", func(t *plan.Target) { t.Near = v })
		}),
		w.limitField("Not farther", t.Far, func(v *int32) error {
			if v != nil && t.Near != nil && *v <= *t.Near {
				return errors.New("above the nearest")
			}
			return put("change farthest distance", func(t *plan.Target) { t.Far = v })
		}))
}

// limitField is a field for a distance, empty for no limit.
func (w *window) limitField(label string, v *int32, set func(*int32) error) field {
	f := field{label: label, unit: unitMark(w.unit()), empty: "no limit", set: func(text string) error {
		if strings.TrimSpace(text) == "" {
			return set(nil)
		}
		v, err := parseLength(text, w.unit())
		switch {
		case err != nil:
			return err
		case v <= 0:
			return errPositive
		}
		return set(&v)
	}}
	if v != nil {
		f.text = formatLength(*v, w.unit())
	}
	return f
}

// facing returns the direction a target looks to, in degrees; ok is false when it is seen from all sides.
func facing(t plan.Target) (degrees float64, ok bool) {
	switch {
	case t.Face != nil:
		n := t.Face[1].Sub(t.Face[0]).Left()
		return math.Atan2(float64(n.Y), float64(n.X)) * 180 / math.Pi, true
	case t.Normal != nil:
		return *t.Normal, true
	}
	return 0, false
}

// faceAcross returns the face of a width in grid units whose middle is at a point and which looks to a direction in degrees: its
// front lies to the left of the way from its first end to its second.
func faceAcross(at exact.Pt, heading, width float64) *[2]exact.Pt {
	sin, cos := math.Sincos(heading * math.Pi / 180)
	half := exact.Vec{X: int32(math.Round(sin * width / 2)), Y: int32(math.Round(-cos * width / 2))}
	if half == (exact.Vec{}) {
		half = exact.Vec{X: 1}
	}
	return &[2]exact.Pt{at.Add(exact.Vec{X: -half.X, Y: -half.Y}), at.Add(half)}
}

// placeText writes a place of the plan in the display unit.
func (w *window) placeText(q exact.Pt) string {
	return strings.TrimSpace(fmt.Sprintf("%s; %s", formatLength(q.X, w.unit()), formatLength(q.Y, w.unit())))
}

// placeField is the field of where a mark stands.
func (w *window) placeField(at exact.Pt, set func(exact.Pt) error) field {
	return field{label: "At", wide: true, text: w.placeText(at), set: func(text string) error {
		q, err := parsePlace(text, w.unit())
		if err != nil {
			return err
		}
		return set(q)
	}}
}

// errPlace is what a form says of a text that is no place.
var errPlace = errors.New("x and y, please: 3.20; 1.50")

// parsePlace reads a place: x and y parted by a semicolon, or by a space or a comma where that can mean nothing else.
func parsePlace(text, unit string) (exact.Pt, error) {
	x, y, ok := strings.Cut(text, ";")
	if !ok {
		x, y, ok = strings.Cut(text, ", ")
	}
	if f := strings.Fields(text); !ok && len(f) == 2 {
		x, y, ok = f[0], f[1], true
	}
	if !ok {
		return exact.Pt{}, errPlace
	}
	px, err := parseLength(x, unit)
	if err != nil {
		return exact.Pt{}, errPlace
	}
	py, err := parseLength(y, unit)
	if err != nil {
		return exact.Pt{}, errPlace
	}
	if q := (exact.Pt{X: px, Y: py}); plan.InRange(q) {
		return q, nil
	}
	return exact.Pt{}, errRange
}

// askedWords says how much of a target had to be in view, empty for a point: "the whole face".
func askedWords(a study.Asked) string {
	switch {
	case !a.Face:
		return ""
	case a.Seen == plan.SeenAll:
		return "the whole face"
	case a.Seen == plan.SeenShare:
		return trimDecimals(100*a.Share, 0, 1) + " % of the face"
	}
	return "some of the face"
}

// askedShort is the same of a target that is named: "all of it".
func askedShort(a study.Asked) string {
	switch {
	case a.Face && a.Seen == plan.SeenAll:
		return "all of it"
	case a.Face && a.Seen == plan.SeenShare:
		return trimDecimals(100*a.Share, 0, 1) + " % of it"
	}
	return "it"
}
