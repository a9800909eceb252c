package plantest

import (
	"flag"
	"os"
	"strconv"
	"testing"
)

// Seeds returns how many seeds a test tries: the given number, or as many as the environment variable PLANTEST_SEEDS says,
// for a long hunt.
func Seeds(usual int) uint64 {
	if n, err := strconv.Atoi(os.Getenv("PLANTEST_SEEDS")); err == nil && n > 0 {
		return uint64(n)
	}
	return uint64(usual)
}

// FullChecks has property tests draw as many plans under -short as without, where rapid would draw a fifth: the tests count
// how often they hit what they are for, and would miss it. To be called from TestMain. What -short leaves out are the tests
// that take minutes.
func FullChecks() {
	flag.Parse()
	checks := flag.Lookup("rapid.checks")
	if n, err := strconv.Atoi(checks.Value.String()); testing.Short() && err == nil {
		_ = checks.Value.Set(strconv.Itoa(5 * n)) // a number, as it was
	}
}
