package verbs

import (
	"bufio"
	"context"
	"fmt"
	"runtime/debug"

	"enfilade/fileio/report"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// studyVerb works out everything in a plan and prints it.
type studyVerb struct {
	Plan    string `arg:""`
	JSON    bool   `name:"json"`
	Picture string
	Theme   string `enum:"light,dark" default:"light"`
}

// Run reads, solves, draws if asked to, and prints.
func (v *studyVerb) Run(ctx context.Context, p *Program) error {
	if err := picturePath(v.Picture); err != nil {
		return err
	}
	drawn, err := readPlan(v.Plan)
	if err != nil {
		return err
	}
	defer debug.SetGCPercent(debug.SetGCPercent(thrift(drawn)))
	work, done := showProgress(ctx, p.Err)
	result, err := study.Solve(work, drawn)
	done()
	if err != nil {
		return fmt.Errorf("%s: %w", v.Plan, err)
	}
	if v.Picture != "" {
		if err := p.drawPicture(v, drawn, result); err != nil {
			return err
		}
	}
	write := report.Text
	if v.JSON {
		write = report.JSON
	}
	out := bufio.NewWriter(p.Out)
	if err := write(out, drawn, result); err != nil {
		return fmt.Errorf("standard output: study: %w", err)
	}
	if err := out.Flush(); err != nil {
		return fmt.Errorf("standard output: study: %w", err)
	}
	return nil
}

// thrift returns by how many percent garbage may swell the memory of a study: it is one burst of work, most of what it
// allocates lasts, and large plans are studied on small machines. What a large plan takes is a few long lists without pointers,
// so that collecting often costs next to nothing (100,000 walls and a body: 831 MB at 20 %, 706 MB at 5 %, the time the same).
func thrift(p *plan.Plan) int {
	if p.NumWalls() > 20_000 {
		return 5
	}
	return 20
}
