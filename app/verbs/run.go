package verbs

import (
	"context"
	"errors"
	"fmt"
	"io"
	"strings"

	"github.com/alecthomas/kong"
)

// Version is the version of the program.
const Version = "0.1.0"

// The exit codes.
const (
	exitDone  = 0
	exitError = 2
)

// Program is what the command line works with.
type Program struct {
	Out, Err io.Writer
	// Open opens the window on the plan of that path, or on an empty plan when the path is empty, in the theme "light", "dark"
	// or "system", or in the one chosen last when it is empty; it returns when the window is closed.
	Open func(path, theme string) error
}

// line is the command line; its tags are what kong reads.
type line struct {
	Window  windowVerb       `cmd:"" default:"withargs" hidden:""`
	Study   studyVerb        `cmd:""`
	Version kong.VersionFlag `short:"V"`
}

// windowVerb is what happens when no verb is named.
type windowVerb struct {
	Plan  string `arg:"" optional:""`
	Theme string `enum:"light,dark,system," default:""`
}

// Run opens the window on the plan.
func (v *windowVerb) Run(p *Program) error {
	if v.Plan != "" {
		if err := readable(v.Plan); err != nil {
			return err
		}
	}
	return p.Open(v.Plan, v.Theme)
}

// stop is thrown where kong would end the process.
type stop int

// Run does what args say and returns the exit code. When ctx ends, so does a study that is under way.
func (p *Program) Run(ctx context.Context, args []string) (code int) {
	defer func() {
		if r := recover(); r != nil {
			s, ok := r.(stop)
			if !ok {
				panic(r)
			}
			code = int(s)
		}
	}()
	parser, err := p.parser()
	if err != nil {
		return p.fail(err)
	}
	said, err := parser.Parse(args)
	if err != nil {
		return p.fail(fmt.Errorf("command line: %s; enfilade --help tells what can be said", usage(err)))
	}
	said.BindTo(ctx, (*context.Context)(nil))
	if err := said.Run(p); err != nil {
		return p.fail(err)
	}
	return exitDone
}

func (p *Program) parser() (*kong.Kong, error) {
	return kong.New(&line{}, kong.Name("enfilade"), kong.Writers(p.Out, p.Err), kong.Help(help),
		kong.Vars{"version": "enfilade " + Version}, kong.Exit(func(code int) { panic(stop(code)) }))
}

// usage words an error of the parser as the rest of our errors are.
func usage(err error) string {
	text := err.Error()
	var parse *kong.ParseError
	if errors.As(err, &parse) && text == `expected "<plan>"` {
		return "no plan is named"
	}
	return strings.ReplaceAll(text, "<plan>", "PLAN")
}

// fail tells of an error and returns the exit code for it.
func (p *Program) fail(err error) int {
	if errors.Is(err, context.Canceled) {
		fmt.Fprintln(p.Err, "enfilade: stopped")
		return exitError
	}
	fmt.Fprintf(p.Err, "enfilade: %v\n", err)
	return exitError
}
