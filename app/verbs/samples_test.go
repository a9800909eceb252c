package verbs_test

import (
	"bytes"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"enfilade/assets"
	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// sample returns a sample plan and its study.
func sample(t *testing.T, name string) (*plan.Plan, *study.Result) {
	t.Helper()
	p, err := planfile.Read(bytes.NewReader(assets.SamplePlan(name)), name)
	if err != nil {
		t.Fatal(err)
	}
	r, err := study.Solve(t.Context(), p)
	if err != nil {
		t.Fatal(err)
	}
	return p, r
}

// TestSamples holds that every sample plan is written as the program writes it, has something of everything a study needs, and
// is studied whole without a problem.
func TestSamples(t *testing.T) {
	files, err := filepath.Glob("../../testdata/plans/*.enfilade")
	if err != nil || len(files) != len(assets.Samples()) {
		t.Fatalf("%d files for %d samples, %v", len(files), len(assets.Samples()), err)
	}
	for _, s := range assets.Samples() {
		t.Run(s.Name, func(t *testing.T) {
			p, r := sample(t, s.Name)
			onDisk, err := os.ReadFile(filepath.Join("../../testdata/plans", s.File))
			if err != nil || !bytes.Equal(onDisk, assets.SamplePlan(s.Name)) {
				t.Errorf("what is embedded is not the file: %v", err)
			}
			var b bytes.Buffer
			if err := planfile.Write(&b, p); err != nil || !bytes.Equal(b.Bytes(), onDisk) {
				t.Errorf("written again the file differs: %v", err)
			}
			if p.Sheet().Title != s.Title || p.Sheet().Place == "" {
				t.Errorf("titled %q at %q, want %q", p.Sheet().Title, p.Sheet().Place, s.Title)
			}
			if p.NumObservers() == 0 || p.NumTargets() == 0 || p.NumStarts() == 0 || p.NumWalls()+p.NumBlocks() < 18 {
				t.Error("something is missing")
			}
			for _, q := range slices.Concat(r.Problems, r.Doubts) {
				t.Errorf("%v %s", q.Items, q.Text)
			}
			for _, v := range append(r.Sight, r.SeenFrom...) {
				if v.Problem != "" || v.Area < 1 {
					t.Errorf("%v sees %.2f m², problem %q", v.Item, v.Area, v.Problem)
				}
			}
			for _, a := range r.Approaches {
				if a.Problem != "" || a.Status == study.StatusNone || !a.HasFullWalk {
					t.Errorf("%s to %s: %+v", a.Start, a.Target, a)
				}
			}
		})
	}
	if assets.SamplePlan("nowhere") != nil {
		t.Error("a sample of no name has a text")
	}
}

// TestGallery compares the study of the gallery with figures worked out before this program was written, by brute force in
// floating point, and checked by marching rays and by sampling. They were rounded to a millimetre, found first sight by
// stepping up to some millimetres into the region, and measured sight lines to the wall 10 mm behind the target. Their floor
// ended at the inner faces of the two entrances, where the sample's has the doorways as well, so that a body finds room.
func TestGallery(t *testing.T) {
	p, _ := sample(t, "gallery")
	var floor []exact.Pt
	for _, q := range [][2]int32{{0, 0}, {7600, 0}, {7600, 400}, {9200, 400}, {9200, 0}, {24000, 0}, {24000, 7200}, {23600, 7200},
		{23600, 9000}, {24000, 9000}, {24000, 16000}, {0, 16000}} {
		floor = append(floor, exact.Pt{X: q[0] * exact.PerMM, Y: q[1] * exact.PerMM})
	}
	p, err := plan.SetFloor{Ring: plan.ChainOf(floor...)}.Apply(p)
	if err != nil {
		t.Fatal(err)
	}
	r, err := study.Solve(t.Context(), p)
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range []float64{104.206, 45.198, 133.913} {
		if got := r.Sight[i]; math.Abs(got.Area-want) > 0.003 {
			t.Errorf("%s sees %.4f m², want %.3f", got.Name, got.Area, want)
		}
	}
	if got := strings.Join(r.Sight[0].TargetsSeen, " "); got != "T1 T2 T6 T7" {
		t.Errorf("%s sees targets %s", r.Sight[0].Name, got)
	}
	want := []struct{ walk, full, sight float64 }{ // m, for each start and target in the plan's order
		{9.862, 21.383, 13.049}, {0, 23.208, 23.2}, {4.394, 7.835, 3.529}, {10.484, 19.382, 9.11}, {9.351, 16.158, 7.071},
		{10.058, 23.554, 15.169}, {0.395, 14.055, 13.772},
		{0, 3.5, 3.5}, {6.227, 12.496, 8.55}, {4.981, 20.73, 17.916}, {0.011, 19.09, 15.533}, {1.305, 14.476, 7.286},
		{0, 8.915, 8.9}, {5.624, 15.668, 10.368},
	}
	if len(r.Approaches) != len(want) {
		t.Fatalf("%d approaches, want %d", len(r.Approaches), len(want))
	}
	for i, w := range want {
		a := r.Approaches[i]
		if math.Abs(a.Length/1000-w.walk) > 0.004 || math.Abs(a.FullWalk/1000-w.full) > 0.001 || math.Abs(a.SightLine/1000-w.sight) > 0.0111 {
			t.Errorf("%s to %s: walk %.4f, full walk %.4f, sight line %.4f m; want %v", a.Start, a.Target, a.Length/1000, a.FullWalk/1000, a.SightLine/1000, w)
		}
		if seen := w.walk == 0; seen != (a.Status == study.StatusSeen) {
			t.Errorf("%s to %s: status %v", a.Start, a.Target, a.Status)
		}
	}
	first := r.Approaches[0].Points
	for i, w := range [][2]float64{{23.6, 8.1}, {19.3, 7.75}, {18.5, 7.75}, {15, 8.737}, {14.223, 9.531}} {
		if len(first) != 5 || math.Hypot(first[i][0]/1000-w[0], first[i][1]/1000-w[1]) > 0.001 {
			t.Fatalf("the walk to first sight of the astrolabe runs %v", first)
		}
	}
}

// TestSamplesHaveRoom: in every sample all starts have standing room for a body of 0.25 m, and all its walks find a way.
func TestSamplesHaveRoom(t *testing.T) {
	for _, s := range assets.Samples() {
		p, _ := sample(t, s.Name)
		w := p.Walker()
		w.Radius = 250 * exact.PerMM
		p, err := plan.SetWalker{Walker: w}.Apply(p)
		if err != nil {
			t.Fatal(err)
		}
		r, err := study.Solve(t.Context(), p)
		if err != nil {
			t.Fatal(err)
		}
		for _, q := range slices.Concat(r.Problems, r.Doubts) {
			t.Errorf("%s: %v %s", s.Name, q.Items, q.Text)
		}
		for _, a := range r.Approaches {
			if a.Problem != "" || a.Status == study.StatusNone || !a.HasFullWalk {
				t.Errorf("%s: %s to %s: %q %q", s.Name, a.Start, a.Target, a.Problem, a.Reason)
			}
		}
	}
}
