package verbs

import (
	"context"
	"io"
	"os"
	"time"

	"github.com/schollz/progressbar/v3"
	"golang.org/x/term"

	"enfilade/solver/pulse"
)

// patience is how long work goes on before its progress is shown: less than this reads as at once.
const patience = 400 * time.Millisecond

// showProgress returns a context whose work shows its progress on out when that is a terminal, and a function that takes the
// bar away again.
func showProgress(ctx context.Context, out io.Writer) (context.Context, func()) {
	file, ok := out.(*os.File)
	if !ok || !term.IsTerminal(int(file.Fd())) {
		return ctx, func() {}
	}
	began := time.Now()
	var bar *progressbar.ProgressBar
	hear := func(done float64) {
		if bar == nil && time.Since(began) < patience {
			return
		}
		if bar == nil {
			bar = progressbar.NewOptions(1000, progressbar.OptionSetWriter(out), progressbar.OptionSetWidth(40),
				progressbar.OptionSetDescription("studying"), progressbar.OptionSetPredictTime(false),
				progressbar.OptionThrottle(100*time.Millisecond), progressbar.OptionClearOnFinish())
		}
		_ = bar.Set(int(1000 * done)) // a bar that cannot be drawn is no reason to stop
	}
	return pulse.With(ctx, hear), func() {
		if bar != nil {
			_ = bar.Clear()
		}
	}
}
