package arrange_test

import (
	"flag"
	"testing"

	"enfilade/solver/plantest"
)

// Property tests draw the same plans every time, so that a failure is the code's and can be seen again; another seed is
// given with -rapid.seed.
func init() {
	if err := flag.Set("rapid.seed", "1"); err != nil {
		panic(err)
	}
}

func TestMain(m *testing.M) {
	plantest.FullChecks()
	m.Run()
}
