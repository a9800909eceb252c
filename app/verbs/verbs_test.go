package verbs_test

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"image/png"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"enfilade/app/verbs"
)

func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"enfilade": func() {
		p := verbs.Program{Out: os.Stdout, Err: os.Stderr, Open: func(path, theme string) error {
			if strings.Contains(path, "refused") {
				return errors.New("window: refused")
			}
			fmt.Printf("window on %q in %q\n", path, theme)
			return nil
		}}
		os.Exit(p.Run(context.Background(), os.Args[1:]))
	}})
}

// TestScripts runs the command line as it is typed. SAMPLES names the folder of the sample plans; the command json asks
// for a member of a JSON file: json FILE PATH WANT, where PATH is like approaches.0.status.
func TestScripts(t *testing.T) {
	samples, err := filepath.Abs("../../testdata/plans")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		RequireExplicitExec: true,
		Setup: func(env *testscript.Env) error {
			env.Setenv("SAMPLES", samples)
			return nil
		},
		Cmds: map[string]func(*testscript.TestScript, bool, []string){"json": jsonCommand, "png": pngCommand, "code": codeCommand},
	})
}

// jsonCommand compares the member at a path with a JSON value; a length of a list or an object is asked for as PATH.length,
// and WANT may be /a regular expression/ or ~a number, which is met to twelve digits.
func jsonCommand(ts *testscript.TestScript, neg bool, args []string) {
	if len(args) != 3 {
		ts.Fatalf("usage: json FILE PATH WANT")
	}
	var v any
	if err := json.Unmarshal([]byte(ts.ReadFile(args[0])), &v); err != nil {
		ts.Fatalf("%s: %v", args[0], err)
	}
	for _, step := range strings.Split(args[1], ".") {
		v = member(ts, v, step)
	}
	got, err := json.Marshal(v)
	ts.Check(err)
	same := string(got) == args[2]
	if pattern, ok := strings.CutPrefix(args[2], "/"); ok {
		same = regexp.MustCompile("^(" + strings.TrimSuffix(pattern, "/") + ")$").Match(got)
	}
	if number, ok := strings.CutPrefix(args[2], "~"); ok {
		want, err := strconv.ParseFloat(number, 64)
		ts.Check(err)
		is, ok := v.(float64)
		same = ok && math.Abs(is-want) <= 1e-12*math.Abs(want)
	}
	if same == neg {
		ts.Fatalf("%s is %s, and should%s be %s", args[1], got, map[bool]string{true: " not"}[neg], args[2])
	}
}

// member takes one step into a JSON value.
func member(ts *testscript.TestScript, v any, step string) any {
	switch v := v.(type) {
	case map[string]any:
		if step == "length" {
			return len(v)
		}
		m, ok := v[step]
		if !ok {
			ts.Fatalf("no member %s", step)
		}
		return m
	case []any:
		if step == "length" {
			return len(v)
		}
		i, err := strconv.Atoi(step)
		if err != nil || i >= len(v) {
			ts.Fatalf("no entry %s in a list of %d", step, len(v))
		}
		return v[i]
	}
	ts.Fatalf("no %s in %v", step, v)
	return nil
}

// pngCommand checks a picture: its size, and how many colours it has at least.
func pngCommand(ts *testscript.TestScript, _ bool, args []string) {
	if len(args) != 3 {
		ts.Fatalf("usage: png FILE WxH COLOURS")
	}
	picture, err := png.Decode(strings.NewReader(ts.ReadFile(args[0])))
	ts.Check(err)
	b := picture.Bounds()
	if got := fmt.Sprintf("%dx%d", b.Dx(), b.Dy()); got != args[1] {
		ts.Fatalf("size %s, want %s", got, args[1])
	}
	colours := map[any]bool{}
	for y := range b.Dy() {
		for x := range b.Dx() {
			colours[picture.At(x, y)] = true
		}
	}
	if want, err := strconv.Atoi(args[2]); err != nil || len(colours) < want {
		ts.Fatalf("%d colours, want %s at least", len(colours), args[2])
	}
}

// codeCommand runs a command and compares its exit code: code N enfilade ARGS...
func codeCommand(ts *testscript.TestScript, _ bool, args []string) {
	err := ts.Exec(args[1], args[2:]...)
	got := 0
	var exit *exec.ExitError
	if errors.As(err, &exit) {
		got = exit.ExitCode()
	} else if err != nil {
		ts.Fatalf("%v", err)
	}
	if strconv.Itoa(got) != args[0] {
		ts.Fatalf("exit code %d, want %s", got, args[0])
	}
}

// The help is written by hand; it must tell every flag that there is.
func TestHelpTellsAllFlags(t *testing.T) {
	for _, c := range []struct {
		args  []string
		flags []string
	}{
		{[]string{"--help"}, []string{"--help", "--version", "--theme"}},
		{[]string{"study", "--help"}, []string{"--help", "--json", "--picture", "--theme"}},
	} {
		var out, errs bytes.Buffer
		p := verbs.Program{Out: &out, Err: &errs}
		if code := p.Run(t.Context(), c.args); code != 0 || errs.Len() > 0 {
			t.Fatalf("%v: exit code %d, errors %q", c.args, code, errs.String())
		}
		for _, flag := range c.flags {
			if !strings.Contains(out.String(), flag) {
				t.Errorf("%v does not tell of %s", c.args, flag)
			}
		}
		if !strings.Contains(out.String(), "Examples\n  enfilade") {
			t.Errorf("%v has no examples", c.args)
		}
	}
}

// A study ends when its context does.
func TestStudyStops(t *testing.T) {
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	var out, errs bytes.Buffer
	p := verbs.Program{Out: &out, Err: &errs}
	code := p.Run(ctx, []string{"study", "../../testdata/plans/gallery.enfilade"})
	if code != 2 || errs.String() != "enfilade: stopped\n" || out.Len() > 0 {
		t.Errorf("exit code %d, errors %q, output %q", code, errs.String(), out.String())
	}
}

// What cannot be written is told, and the exit code says so.
func TestStudyFullDisk(t *testing.T) {
	full, err := os.OpenFile("/dev/full", os.O_WRONLY, 0)
	if err != nil {
		t.Skip("no /dev/full on this machine")
	}
	defer full.Close()
	var errs bytes.Buffer
	p := verbs.Program{Out: full, Err: &errs}
	code := p.Run(t.Context(), []string{"study", "../../testdata/plans/gallery.enfilade"})
	if code != 2 || !strings.HasPrefix(errs.String(), "enfilade: standard output: study: ") {
		t.Errorf("exit code %d, errors %q", code, errs.String())
	}
}
