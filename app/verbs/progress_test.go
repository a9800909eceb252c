package verbs

import (
	"io"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"enfilade/fileio/planfile"
	"enfilade/fileio/store"
	"enfilade/solver/plantest"
)

// TestProgress studies a plan large enough to take its time on a terminal, by script(1), and in a pipe.
func TestProgress(t *testing.T) {
	if testing.Short() {
		t.Skip("studies a large plan")
	}
	script, err := exec.LookPath("script")
	if err != nil {
		t.Skip("no script(1) to stand for a terminal")
	}
	dir := t.TempDir()
	program, file := filepath.Join(dir, "enfilade"), filepath.Join(dir, "office.enfilade")
	build := exec.Command("go", "build", "-o", program, "../enfilade")
	build.Env = append(build.Environ(), "CGO_ENABLED=0")
	if out, err := build.CombinedOutput(); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	// The bar waits out patience, so the study must last well beyond it, on a fast machine too.
	for walls := 4000; ; walls *= 2 {
		if err := store.Save(file, func(w io.Writer) error { return planfile.Write(w, plantest.Office(1, walls)) }); err != nil {
			t.Fatal(err)
		}
		began := time.Now()
		out, err := exec.Command("sh", "-c", program+" study "+file+" >/dev/null").CombinedOutput()
		if err != nil || len(out) > 0 {
			t.Fatalf("in a pipe: %v: %q", err, out)
		}
		if time.Since(began) > 4*patience {
			break
		}
	}
	out, err := exec.Command(script, "-qec", program+" study "+file+" >/dev/null", "/dev/null").CombinedOutput()
	if err != nil || !strings.Contains(string(out), "studying") {
		t.Errorf("on a terminal: %v: %q", err, out)
	}
}
