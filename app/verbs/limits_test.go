package verbs_test

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"enfilade/app/verbs"
	"enfilade/fileio/planfile"
	"enfilade/solver/plantest"
)

// TestStudyOfTooLargeAPlan: a plan of 3,000 walls that cross two million times is above the limit of edges. The study says which
// file, how many there are, what the limit is and what to do, and prints nothing else.
func TestStudyOfTooLargeAPlan(t *testing.T) {
	var file, out, said bytes.Buffer
	if err := planfile.Write(&file, plantest.Grid(3000)); err != nil {
		t.Fatal(err)
	}
	path := filepath.Join(t.TempDir(), "crossed.enfilade")
	if err := os.WriteFile(path, file.Bytes(), 0o600); err != nil {
		t.Fatal(err)
	}
	p := verbs.Program{Out: &out, Err: &said}
	if code := p.Run(context.Background(), []string{"study", path}); code == 0 || out.Len() > 0 {
		t.Errorf("code %d, %d bytes printed", code, out.Len())
	}
	for _, want := range []string{path, " edges and ", "the limit is 2000000", "leave some of it out"} {
		if !strings.Contains(said.String(), want) {
			t.Errorf("said %q, want %q in it", said.String(), want)
		}
	}
}
