package verbs_test

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"enfilade/app/verbs"
	"enfilade/fileio/report"
)

// The plan in README is a plan, and the study in README is the study of it.
func TestReadme(t *testing.T) {
	text, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	_, after, _ := strings.Cut(string(text), "```json\n")
	drawn, _, found := strings.Cut(after, "```")
	if !found {
		t.Fatal("README has no ```json block")
	}
	path := filepath.Join(t.TempDir(), "lamp.enfilade")
	if err := os.WriteFile(path, []byte(drawn), 0o600); err != nil {
		t.Fatal(err)
	}
	var out, errs bytes.Buffer
	p := verbs.Program{Out: &out, Err: &errs}
	if code := p.Run(t.Context(), []string{"study", path}); code != 0 {
		t.Fatalf("exit code %d: %s", code, errs.String())
	}
	study, ok := strings.CutSuffix(out.String(), "\n"+report.Caution+"\n")
	if !ok {
		t.Error("the study does not end with the caution")
	}
	if !strings.Contains(string(text), "```\n"+study+"```\n") {
		t.Errorf("README does not show the study of its plan, which is:\n%s", study)
	}
}
