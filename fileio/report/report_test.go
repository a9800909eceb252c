package report_test

import (
	"bytes"
	"encoding/json"
	"errors"
	"flag"
	"io"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/paulmach/orb"

	"enfilade/fileio/report"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

var update = flag.Bool("update", false, "write the golden files anew")

// sample is a plan and a result with every kind of entry, its numbers chosen to show rounding, not to fit each other.
func sample(unit string) (*plan.Plan, *study.Result) {
	p := plan.From(plan.Parts{
		Sheet:     plan.Sheet{Title: "Lamp room <north>", Place: "Quarry museum", Unit: unit},
		Walker:    plan.DefaultWalker(),
		Observers: []plan.Observer{{ID: "A", Name: "Keeper"}, {ID: "B", Name: "Über seat"}},
		Targets:   []plan.Target{{ID: "T1", Name: "Lamp"}, {ID: "T2", Name: "Drill"}, {ID: "T3"}, {ID: "T4", Name: "Cage"}},
		Starts:    []plan.Start{{ID: "S1", Name: "Shaft"}},
		Zones:     []plan.Zone{{ID: "Z1", Name: "Hall"}, {ID: "Z2"}, {ID: "Z3", Name: "Vault"}},
	})
	square := orb.Ring{{0, math.Copysign(0, -1)}, {1e4 / 3, 0}, {1e4 / 3, 1000}, {0, 1000}}
	r := &study.Result{
		WalkerEye: 1600, WalkerRadius: 300, RadiusExcess: 5.84,
		Sight: []study.Sight{
			{Item: plan.Ref{Kind: plan.KindObserver, ID: "A"}, Name: "Keeper", Eye: 1600, Area: 10.0 / 3, Perimeter: 26.0 / 3,
				Wall: 20.0 / 3, Occluding: 2, Boundary: square, TargetsSeen: []string{"T1", "T3"}},
			{Item: plan.Ref{Kind: plan.KindObserver, ID: "B"}, Name: "Über seat", Eye: 1200, Problem: "stands inside a body"},
		},
		SeenFrom: []study.Sight{{Item: plan.Ref{Kind: plan.KindTarget, ID: "T1"}, Name: "Lamp", Eye: 1600, Area: 104.2,
			Perimeter: 50, Wall: 40.25, Occluding: 9.125, Clip: 0.625, Boundary: square},
			{Item: plan.Ref{Kind: plan.KindTarget, ID: "T2"}, Name: "Drill", Eye: 1600, Area: 60, Perimeter: 30, Wall: 26, Occluding: 4,
				Asked: study.Asked{Face: true, Seen: plan.SeenShare, Share: 0.25, ShareError: 0.0254}, Boundary: square,
				More: []study.Border{{Ring: orb.Ring{{1000, 500}, {1100, 600}, {1200, math.Copysign(0, -1)}}}}}},
		Approaches: []study.Approach{
			{Start: "S1", Target: "T1", Status: study.StatusApproach, Length: 9862.0481, FirstSight: orb.Point{14223, 9531.25},
				Points: []orb.Point{{23600, 8100}, {14223, 9531.25}}, SightLine: 13049, SightTo: orb.Point{4900, 410}, HasFullWalk: true, FullWalk: 21383,
				FullPoints: []orb.Point{{23600, 8100}, {4900, 410}}, Seconds: 8.2184, Ties: true, ClearWidth: 2500.0 / 3,
				HasClearWidth: true, FullClearWidth: 800, HasFullClearWidth: true, Tightest: [2]orb.Point{{5000, 4000}, {5000, 4800}}},
			{Start: "S1", Target: "T2", Status: study.StatusSeen, FirstSight: orb.Point{23600, 8100},
				Points: []orb.Point{{23600, 8100}}, SightLine: 23200, SightTo: orb.Point{400, 8100},
				Asked: study.Asked{Face: true, Seen: plan.SeenShare, Share: 0.25, ShareError: 0.0254}, Reason: "it lies in the low block B2"},
			{Start: "S1", Target: "T3", Asked: study.Asked{Face: true, Seen: plan.SeenAll}, Status: study.StatusNone, Reason: "glazing G1 closes the way", ClearWidth: 640.5,
				HasClearWidth: true, Tightest: [2]orb.Point{{math.Copysign(0, -1), 4000}, {640.5, 4000}}},
			{Start: "S1", Target: "T4", Problem: "the target lies outside the floor"},
		},
		Reach: []study.Reach{
			{Start: "S1", Zone: "Z1", Found: true, Nearest: 1234.5, NearestAt: orb.Point{math.Copysign(0, -1), 100}, Farthest: 20000.0 / 3,
				FarthestAt: orb.Point{4500, 9000}, Cut: true},
			{Start: "S1", Zone: "Z2"},
			{Start: "S1", Zone: "Z3", Problem: "start S1 lies outside the floor; move it inside"},
		},
		Routes: []study.Route{
			{ID: "R1", From: "S1", To: "T1", Length: 9000, Seconds: 7.5, Points: []orb.Point{{math.Copysign(0, -1), 0}, {3000, 0}, {3000, 6000}},
				Legs: []study.Leg{{To: "waypoint 1", Length: 3000, Seconds: 2.5, Last: 1}, {To: "target T1", Length: 6000, Seconds: 5, First: 1, Last: 2}}},
			{ID: "R2", From: "S1", Length: 3000, Seconds: 2.5, Points: []orb.Point{{0, 0}, {3000, 0}},
				Legs: []study.Leg{{To: "waypoint 1", Length: 3000, Seconds: 2.5, Last: 1}}},
			{ID: "R3", From: "S1", To: "T3", Length: 3000, Seconds: 2.5, Points: []orb.Point{{0, 0}, {3000, 0}},
				Legs: []study.Leg{{To: "waypoint 1", Length: 3000, Seconds: 2.5, Last: 1}}, Closed: 2, ClosedTo: "waypoint 2", Reason: "glazing G1 closes the way"},
			{ID: "R4", From: "S1", To: "T4", Points: []orb.Point{{0, 0}}, Closed: 1, ClosedTo: "target T4", Reason: "door D1 closes the way"},
			{ID: "R5", From: "S1", To: "T4", Problem: "waypoint 1 is inside block B1; move it out, or lower what it stands in", Points: []orb.Point{{0, 0}},
				Closed: 1, ClosedTo: "waypoint 1"},
			{ID: "R6", From: "S1", To: "T4", Problem: "waypoint 2 is inside block B1; move it out, or lower what it stands in",
				Length: 3000, Seconds: 2.5, Points: []orb.Point{{0, 0}, {3000, 0}},
				Legs: []study.Leg{{To: "waypoint 1", Length: 3000, Seconds: 2.5, Last: 1}}, Closed: 2, ClosedTo: "waypoint 2"},
			{ID: "R7", From: "S9", To: "T4", Problem: "has the start S9, which is not in the plan; choose another"},
		},
		Problems: []plan.Problem{{Kind: plan.ProblemInside, Items: []plan.Ref{{Kind: plan.KindObserver, ID: "B"},
			{Kind: plan.KindWall, ID: "W3"}}, At: exact.Pt{X: 12345, Y: -20}, Text: "stands inside a body; move it onto the floor"}},
		Doubts: []plan.Problem{
			{Kind: plan.ProblemUnreached, Items: []plan.Ref{{Kind: plan.KindTarget, ID: "T2"}}, At: exact.Pt{X: 20000}, Text: "no walk leads in sight of it"},
			{Kind: plan.ProblemClosed, Items: []plan.Ref{{Kind: plan.KindRoute, ID: "R3"}}, Text: "no walk leads to waypoint 2: glazing G1 closes the way"},
			{Kind: plan.ProblemGap, Items: []plan.Ref{{Kind: plan.KindWall, ID: "W1"}, {Kind: plan.KindWall, ID: "W2"}}, At: exact.Pt{Y: 5}, Text: "ends 15.0 mm before wall W2"},
			{Kind: plan.ProblemDouble, Items: []plan.Ref{{Kind: plan.KindWall, ID: "W4"}, {Kind: plan.KindWall, ID: "W5"}}, Text: "lies on wall W5 for 3.000 m"},
		},
	}
	return p, r
}

// golden compares got with the file of that name, or writes the file with -update.
func golden(t *testing.T, name, got string) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		if err := os.WriteFile(path, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if got != string(want) {
		t.Errorf("%s differs; got:\n%s\nwant:\n%s", name, got, want)
	}
}

func TestTextGolden(t *testing.T) {
	for _, unit := range []string{"m", "ft"} {
		var b bytes.Buffer
		p, r := sample(unit)
		if err := report.Text(&b, p, r); err != nil {
			t.Fatal(err)
		}
		golden(t, "every-entry-"+unit+".txt", b.String())
	}
}

func TestTextOfNothing(t *testing.T) {
	var b bytes.Buffer
	if err := report.Text(&b, plan.New(), &study.Result{WalkerEye: 1600}); err != nil {
		t.Fatal(err)
	}
	want := "Untitled plan\n\nNo observers.\n\nNo targets.\n\nNo approaches: the plan needs a start and a target.\n\n" +
		"No problems in the plan.\n\n" + report.Caution + "\n"
	if b.String() != want {
		t.Errorf("got %q, want %q", b.String(), want)
	}
}

func TestJSONGolden(t *testing.T) {
	var b bytes.Buffer
	p, r := sample("m")
	if err := report.JSON(&b, p, r); err != nil {
		t.Fatal(err)
	}
	golden(t, "every-entry.json", b.String())
}

// Full precision: every number reads back as the float64 that it was.
func TestJSONLaws(t *testing.T) {
	p, r := sample("m")
	values := []float64{math.Pi, 1.0 / 3, 5e-324, math.MaxFloat64, 1e21, 123456789.12345679}
	for _, v := range values {
		r.Sight[0].Area, r.Approaches[0].Length = v, v
		var b bytes.Buffer
		if err := report.JSON(&b, p, r); err != nil {
			t.Fatal(err)
		}
		var got struct {
			Sight []struct {
				Area float64 `json:"area_m2"`
			}
			Approaches []struct {
				Length float64 `json:"length_mm"`
			}
		}
		if err := json.Unmarshal(b.Bytes(), &got); err != nil {
			t.Fatal(err)
		}
		if got.Sight[0].Area != v || got.Approaches[0].Length != v {
			t.Errorf("%v came back as %v and %v", v, got.Sight[0].Area, got.Approaches[0].Length)
		}
	}
	for _, v := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		r.Sight[0].Area = v
		var b bytes.Buffer
		if err := report.JSON(&b, p, r); err != nil || !strings.Contains(b.String(), `"area_m2":null`) {
			t.Errorf("%v: error %v, not null in %s", v, err, b.String())
		}
	}
}

type broken struct{}

var errFull = errors.New("disk full")

func (broken) Write([]byte) (int, error) { return 0, errFull }

func TestWriteErrors(t *testing.T) {
	p, r := sample("m")
	for name, write := range map[string]func(io.Writer, *plan.Plan, *study.Result) error{"Text": report.Text, "JSON": report.JSON} {
		if err := write(broken{}, p, r); !errors.Is(err, errFull) {
			t.Errorf("%s: got error %v, want %v", name, err, errFull)
		}
	}
}

// TestUnknownWidths: a clear width that was given up reads as not known, never as one that nothing narrows.
func TestUnknownWidths(t *testing.T) {
	p, r := sample("m")
	for i := range r.Approaches {
		a := &r.Approaches[i]
		a.HasClearWidth, a.HasFullClearWidth, a.WidthsUnknown = false, false, a.Problem == ""
	}
	var text, data bytes.Buffer
	if err := errors.Join(report.Text(&text, p, r), report.JSON(&data, p, r)); err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(text.String(), "not known") || strings.Contains(text.String(), "  any") {
		t.Errorf("the text reads\n%s", text.String())
	}
	if !strings.Contains(data.String(), `"widths_unknown":true`) {
		t.Errorf("the data read\n%s", data.String())
	}
}
