package planfile_test

import (
	"errors"
	"strings"
	"testing"

	"enfilade/fileio/planfile"
)

// FuzzPlanfile holds that any text gives a plan or a fault that says something, and that a plan that was read writes, reads
// back the same, and writes the same again.
func FuzzPlanfile(f *testing.F) {
	f.Add([]byte(full))
	f.Fuzz(func(t *testing.T, text []byte) {
		p, err := planfile.Read(strings.NewReader(string(text)), "fuzz")
		if err != nil {
			var fault *planfile.Fault
			if !errors.As(err, &fault) || fault.Text == "" || p != nil {
				t.Fatalf("%#v is no fault", err)
			}
			return
		}
		first := written(t, p)
		q, err := planfile.Read(strings.NewReader(first), "fuzz")
		if err != nil {
			t.Fatalf("%v\n%s", err, first)
		}
		if !sameParts(p.Parts(), q.Parts()) {
			t.Fatalf("read back differs:\n%s", first)
		}
		if second := written(t, q); second != first {
			t.Fatalf("written again differs:\n%s\n%s", first, second)
		}
	})
}
