package pulse

import "context"

type key struct{}

// listener maps what a part tells to the whole.
type listener struct {
	from, to float64
	hear     func(done float64)
}

// With returns a context whose work tells hear how much of it is done, from 0 to 1. hear is called on the worker's
// goroutine and must return soon.
func With(ctx context.Context, hear func(done float64)) context.Context {
	return context.WithValue(ctx, key{}, &listener{0, 1, hear})
}

// Part returns the context for a part of the work that takes it from one share to another.
func Part(ctx context.Context, from, to float64) context.Context {
	l, ok := ctx.Value(key{}).(*listener)
	if !ok {
		return ctx
	}
	return context.WithValue(ctx, key{}, &listener{l.from + from*(l.to-l.from), l.from + to*(l.to-l.from), l.hear})
}

// Tell says that done of the present part is done, from 0 to 1.
//
//   - Errors: the context's when the work is cancelled.
func Tell(ctx context.Context, done float64) error {
	if l, ok := ctx.Value(key{}).(*listener); ok {
		l.hear(l.from + done*(l.to-l.from))
	}
	return ctx.Err()
}

// Every is how many steps of a tight loop may pass between two calls of Tell: a mask for its counter.
const Every = 1<<12 - 1

// Step is Tell for step i of n, which does nothing but every few thousand steps.
func Step(ctx context.Context, i, n int) error {
	if i&Every != 0 {
		return nil
	}
	return Tell(ctx, float64(i)/float64(max(n, 1)))
}
