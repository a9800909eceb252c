package pulse

import (
	"context"
	"runtime"
	"sync"
)

// least is how many steps a part of split work has at least: some fifty microseconds. Fewer are done sooner than a goroutine has
// started and ended.
const least = 1 << 11

// Split does work on the steps from 0 to n in as many parts at a time as there are processors, and returns what they return,
// in order. All have ended when it returns. The first part, on the caller's goroutine, speaks for the others where they tell
// how far they are.
//
//   - work does the steps from lo up to hi. What it writes must be its own part's, so that the outcome does not depend on the
//     number of parts, or be joined again so that it does not.
//   - Errors: the first part's that fails, in order.
func Split[T any](ctx context.Context, n int, work func(ctx context.Context, lo, hi int) (T, error)) ([]T, error) {
	parts := max(min(runtime.GOMAXPROCS(0), n/least), 1)
	out, errs := make([]T, parts), make([]error, parts)
	silent := context.WithValue(ctx, key{}, nil)
	var others sync.WaitGroup
	for i := 1; i < parts; i++ {
		others.Go(func() { out[i], errs[i] = work(silent, i*n/parts, (i+1)*n/parts) })
	}
	out[0], errs[0] = work(ctx, 0, n/parts)
	others.Wait()
	for _, err := range errs {
		if err != nil {
			return nil, err
		}
	}
	return out, nil
}

// Each does n pieces of work side by side. All have ended when it returns. The first, on the
// caller's goroutine, speaks for the others where they tell how far they are.
//
//   - Errors: the first piece's that fails, in order.
func Each(ctx context.Context, n int, work func(ctx context.Context, i int) error) error {
	errs := make([]error, n)
	silent := context.WithValue(ctx, key{}, nil)
	var others sync.WaitGroup
	for i := 1; i < n; i++ {
		others.Go(func() { errs[i] = work(silent, i) })
	}
	errs[0] = work(ctx, 0)
	others.Wait()
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}
