package pulse_test

import (
	"context"
	"errors"
	"slices"
	"testing"

	"enfilade/solver/pulse"
)

func TestTell(t *testing.T) {
	var heard []float64
	ctx, cancel := context.WithCancel(pulse.With(context.Background(), func(d float64) { heard = append(heard, d) }))
	half := pulse.Part(ctx, 0.5, 1)
	for _, err := range []error{pulse.Tell(ctx, 0.25), pulse.Tell(half, 0.5), pulse.Tell(pulse.Part(half, 0.5, 1), 1),
		pulse.Step(half, 1, 10), pulse.Step(half, 0, 10)} {
		if err != nil {
			t.Fatal(err)
		}
	}
	if want := []float64{0.25, 0.75, 1, 0.5}; !slices.Equal(heard, want) {
		t.Errorf("heard %v, want %v", heard, want)
	}
	cancel()
	if err := pulse.Tell(half, 1); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled work was told %v", err)
	}
	if err := pulse.Tell(pulse.Part(context.Background(), 0, 1), 0); err != nil {
		t.Errorf("work that nobody listens to was told %v", err)
	}
}
