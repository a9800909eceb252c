package plantest

import (
	"os"
	"strconv"
)

// Seeds returns how many seeds a test tries: the given number, or as many as the environment variable PLANTEST_SEEDS says,
// for a long hunt.
func Seeds(usual int) uint64 {
	if n, err := strconv.Atoi(os.Getenv("PLANTEST_SEEDS")); err == nil && n > 0 {
		return uint64(n)
	}
	return uint64(usual)
}
