package pulse_test

import (
	"context"
	"errors"
	"runtime"
	"slices"
	"testing"

	"enfilade/solver/pulse"
)

// TestSplit: every step is done once, and the parts come back in order, however many there are.
func TestSplit(t *testing.T) {
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(0))
	for _, processors := range []int{1, 2, 3, 7} {
		runtime.GOMAXPROCS(processors)
		for _, n := range []int{0, 1, 1 << 13, 1<<13 + 1, 50_000, 100_003} {
			done := make([]int, n)
			parts, err := pulse.Split(context.Background(), n, func(_ context.Context, lo, hi int) ([2]int, error) {
				for i := lo; i < hi; i++ {
					done[i]++
				}
				return [2]int{lo, hi}, nil
			})
			if err != nil || len(parts) > processors {
				t.Fatalf("%d steps on %d processors: %v in %d parts", n, processors, err, len(parts))
			}
			at := 0
			for _, p := range parts {
				if p[0] != at {
					t.Errorf("%d steps on %d processors: parts %v", n, processors, parts)
				}
				at = p[1]
			}
			if at != n || slices.ContainsFunc(done, func(k int) bool { return k != 1 }) {
				t.Errorf("%d steps on %d processors: some not done once", n, processors)
			}
		}
	}
}

// TestSplitTells: the first part tells for all of them, a fault of any comes through, and cancelling reaches all.
func TestSplitTells(t *testing.T) {
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(0))
	runtime.GOMAXPROCS(4)
	far := 0.0
	ctx := pulse.With(context.Background(), func(done float64) { far = done })
	steps := func(ctx context.Context, lo, hi int) (int, error) {
		for i := lo; i < hi; i++ {
			if err := pulse.Step(ctx, i-lo, hi-lo); err != nil {
				return 0, err
			}
		}
		return 0, nil
	}
	if _, err := pulse.Split(ctx, 1<<17, steps); err != nil || far < 0.8 {
		t.Errorf("error %v, told up to %v", err, far)
	}
	fault := errors.New("the last part")
	_, err := pulse.Split(ctx, 1<<17, func(_ context.Context, _, hi int) (int, error) {
		if hi == 1<<17 {
			return 0, fault
		}
		return 0, nil
	})
	if !errors.Is(err, fault) {
		t.Errorf("error %v", err)
	}
	ended, cancel := context.WithCancel(ctx)
	cancel()
	if _, err := pulse.Split(ended, 1<<17, steps); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
}

// TestEach: every piece is done once, a fault of any comes through, and the first alone tells how far it is.
func TestEach(t *testing.T) {
	told := 0
	ctx := pulse.With(context.Background(), func(float64) { told++ })
	for _, n := range []int{1, 2, 9} {
		done := make([]int, n)
		told = 0
		err := pulse.Each(ctx, n, func(ctx context.Context, i int) error {
			done[i]++
			return pulse.Tell(ctx, 0.5)
		})
		if err != nil || told != 1 || slices.ContainsFunc(done, func(k int) bool { return k != 1 }) {
			t.Errorf("%d pieces: %v, done %v, told %d times", n, err, done, told)
		}
	}
	fault := errors.New("the last piece")
	err := pulse.Each(ctx, 3, func(_ context.Context, i int) error {
		if i == 2 {
			return fault
		}
		return nil
	})
	if !errors.Is(err, fault) {
		t.Errorf("error %v", err)
	}
}
