package verbs

import (
	"io"

	"github.com/alecthomas/kong"
)

// helpProgram is the help without a verb; a test holds it against the flags that there are.
const helpProgram = `enfilade: what is seen from where on a floor plan, and how far one walks until then

  enfilade [PLAN]          opens the window, on PLAN or on an empty plan
  enfilade study PLAN      works out everything in PLAN and prints it

  --theme light|dark|system   the window's colours; those chosen last if not said
  --version, -V               prints the version
  --help, -h                  prints this; after a verb, tells of that verb

Examples
  enfilade
  enfilade gallery.enfilade
  enfilade study gallery.enfilade
  enfilade study gallery.enfilade --json > gallery.json
  enfilade study gallery.enfilade --picture gallery.png

A plan is a text file, NAME.enfilade. Exit codes: 0 done, 2 it could not be done
and standard error tells why.
`

// helpStudy is the help of the verb study.
const helpStudy = `enfilade study PLAN: works out everything in a plan and prints it

Prints what each observer sees, where each target is seen from, how far one
walks from each start until each target first comes into sight, and what is
wrong with the plan. An item that cannot be solved is told with its reason
and the rest is solved.

  --json               prints one JSON object, in full precision, instead of tables
  --picture FILE.png   draws the plan as the window would, too
  --theme light|dark   the picture's colours; light if not said
  --help, -h           prints this

Examples
  enfilade study gallery.enfilade
  enfilade study gallery.enfilade --json | jq '.approaches[] | .length_mm'
  enfilade study gallery.enfilade --picture gallery.png --theme dark
`

// help prints the help of the verb that was named, or else of the program.
func help(_ kong.HelpOptions, ctx *kong.Context) error {
	text := helpProgram
	if verb := ctx.Selected(); verb != nil && verb.Name == "study" {
		text = helpStudy
	}
	_, err := io.WriteString(ctx.Stdout, text)
	return err
}
