package plantest

import (
	"fmt"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// add puts the statement's item into parts.
func (s *words) add(parts *plan.Parts) error {
	switch s.head {
	case "wall", "glass", "screen", "low":
		s.addWall(parts)
	case "door":
		s.addDoor(parts)
	case "floor":
		if s.need(3) {
			parts.Floor = plan.ChainOf(s.points...)
		}
	case "block":
		if s.need(3) {
			parts.Blocks = append(parts.Blocks, plan.Block{ID: s.id("B", len(parts.Blocks)),
				Ring: plan.ChainOf(s.points...), Height: s.length("h", plan.Ceiling)})
		}
	case "zone":
		if s.need(3) {
			name, _ := s.take("name")
			parts.Zones = append(parts.Zones, plan.Zone{ID: s.id("Z", len(parts.Zones)), Name: name,
				Ring: plan.ChainOf(s.points...), Room: s.flag("room")})
		}
	case "walker":
		parts.Walker.Radius = s.length("radius", 0)
		parts.Walker.Pace = s.number("pace", parts.Walker.Pace)
		parts.Walker.Eye = s.length("eye", parts.Walker.Eye)
	case "observer", "target", "start":
		s.addMark(parts)
	case "route":
		s.addRoute(parts)
	default:
		return fmt.Errorf("unknown item %s", s.head)
	}
	return s.done()
}

func (s *words) addWall(parts *plan.Parts) {
	kinds := map[string]plan.WallKind{"wall": plan.Solid, "glass": plan.Glazing, "screen": plan.Screen, "low": plan.Low}
	w := plan.Wall{ID: s.id("W", len(parts.Walls)), Kind: kinds[s.head], Line: plan.ChainOf(s.points...)}
	w.Thickness = s.length("th", 0)
	w.Height = s.length("h", plan.Ceiling)
	w.Justify = plan.Justify(s.choice("just", "centre", "left", "right"))
	if s.need(2) {
		parts.Walls = append(parts.Walls, w)
	}
}

func (s *words) addDoor(parts *plan.Parts) {
	d := plan.Opening{ID: s.id("D", len(parts.Openings))}
	d.Segment = int(s.number("seg", 0))
	d.At = s.length("at", 0)
	d.Width = s.length("w", 9000)
	d.Leaf = plan.Leaf(s.choice("leaf", "none", "solid", "glazed"))
	d.Shut = s.flag("shut")
	d.HingeEnd = s.choice("hinge", "start", "end") == 1
	d.SideRight = s.choice("side", "left", "right") == 1
	if len(s.flags) == 1 {
		d.Wall, s.flags = s.flags[0], nil
	}
	parts.Openings = append(parts.Openings, d)
}

func (s *words) addRoute(parts *plan.Parts) {
	r := plan.Route{ID: s.id("R", len(parts.Routes)), Via: plan.ChainOf(s.points...)}
	r.From, _ = s.take("from")
	r.To, _ = s.take("to")
	parts.Routes = append(parts.Routes, r)
}

func (s *words) addMark(parts *plan.Parts) {
	if !s.need(1) {
		return
	}
	at := s.points[0]
	switch s.head {
	case "observer":
		parts.Observers = append(parts.Observers, plan.Observer{ID: s.id("O", len(parts.Observers)), At: at,
			Eye: s.length("eye", 1600*exact.PerMM), Heading: s.number("heading", 0), View: s.number("view", 360),
			Range: s.length("range", 0), Colour: -1})
	case "target":
		t := plan.Target{ID: s.id("T", len(parts.Targets)), At: at, Colour: -1}
		if len(s.points) > 1 {
			b := s.points[1]
			t.Face = &[2]exact.Pt{at, b}
			t.At = exact.Pt{X: (at.X + b.X) / 2, Y: (at.Y + b.Y) / 2}
		}
		parts.Targets = append(parts.Targets, t)
	case "start":
		parts.Starts = append(parts.Starts, plan.Start{ID: s.id("S", len(parts.Starts)), At: at})
	}
}
