//go:build !cgo

package main

import (
	"bytes"
	"strings"
	"testing"

	"enfilade/app/verbs"
)

// Without its window the program says so, names what it can do, and does it.
func TestNoWindow(t *testing.T) {
	var out, errs bytes.Buffer
	p := verbs.Program{Out: &out, Err: &errs, Open: openWindow}
	if code := p.Run(t.Context(), nil); code != 2 || out.Len() > 0 {
		t.Errorf("no verb: exit code %d, output %q", code, out.String())
	}
	for _, word := range []string{"enfilade: window: ", "without its window", "enfilade study PLAN", "--help"} {
		if !strings.Contains(errs.String(), word) {
			t.Errorf("no verb: %q is missing from %q", word, errs.String())
		}
	}
	errs.Reset()
	if code := p.Run(t.Context(), []string{"study", "../../testdata/plans/gallery.enfilade"}); code != 0 || errs.Len() > 0 {
		t.Errorf("study: exit code %d, errors %q", code, errs.String())
	}
	if !strings.HasPrefix(out.String(), "Upper gallery") {
		t.Errorf("study printed %q", out.String())
	}
}
