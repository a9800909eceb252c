//go:build unix

package store_test

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"sync"
	"syscall"
	"testing"

	"enfilade/fileio/store"
)

func text(s string) func(io.Writer) error {
	return func(w io.Writer) error { _, err := io.WriteString(w, s); return err }
}

func save(t *testing.T, path, s string) {
	t.Helper()
	if err := store.Save(path, text(s)); err != nil {
		t.Fatal(err)
	}
}

// holds checks what a file holds and that nothing else lies in its folder.
func holds(t *testing.T, path, want string, beside ...string) {
	t.Helper()
	got, err := os.ReadFile(path)
	if err != nil || string(got) != want {
		t.Errorf("%s holds %q, %v; want %q", path, got, err, want)
	}
	entries, err := os.ReadDir(filepath.Dir(path))
	if err != nil {
		t.Fatal(err)
	}
	if len(entries) != 1+len(beside) {
		t.Errorf("the folder holds %v, want the file and %v", entries, beside)
	}
}

func mode(t *testing.T, path string) fs.FileMode {
	t.Helper()
	info, err := os.Stat(path)
	if err != nil {
		t.Fatal(err)
	}
	return info.Mode()
}

func TestSave(t *testing.T) {
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	save(t, path, "one")
	holds(t, path, "one")
	save(t, path, "2")
	holds(t, path, "2")
	t.Chdir(filepath.Dir(path))
	save(t, "gallery.enfilade", "three") // a path without a folder
	holds(t, path, "three")
}

func TestSaveMode(t *testing.T) {
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	old := syscall.Umask(0o027)
	defer syscall.Umask(old)
	save(t, path, "one")
	if got := mode(t, path); got != 0o640 {
		t.Errorf("a new file has %v under umask 027, want 0640", got)
	}
	for _, want := range []fs.FileMode{0o600, 0o664, 0o777} {
		if err := os.Chmod(path, want); err != nil {
			t.Fatal(err)
		}
		save(t, path, "two")
		if got := mode(t, path); got != want {
			t.Errorf("the file has %v after saving, want %v", got, want)
		}
	}
}

func TestSaveKeepsOwner(t *testing.T) {
	if os.Geteuid() != 0 {
		t.Skip("only the superuser may give files away")
	}
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	save(t, path, "one")
	if err := os.Chown(path, 1234, 4321); err != nil {
		t.Skip(err)
	}
	save(t, path, "two")
	info, err := os.Stat(path)
	if err != nil {
		t.Fatal(err)
	}
	if stat := info.Sys().(*syscall.Stat_t); stat.Uid != 1234 || stat.Gid != 4321 {
		t.Errorf("the file belongs to %d:%d, want 1234:4321", stat.Uid, stat.Gid)
	}
}

func TestSaveLinks(t *testing.T) {
	folder := t.TempDir()
	at := func(name string) string { return filepath.Join(folder, name) }
	link := func(to, name string) {
		if err := os.Symlink(to, at(name)); err != nil {
			t.Skip(err)
		}
	}
	if err := os.Mkdir(at("plans"), 0o755); err != nil {
		t.Fatal(err)
	}
	link("plans/gallery.enfilade", "near")
	link(at("near"), "far")
	for _, s := range []string{"one", "two"} { // first to a file that is not there, then to one that is
		save(t, at("far"), s)
		holds(t, at("plans/gallery.enfilade"), s)
		for _, name := range []string{"near", "far"} {
			if info, err := os.Lstat(at(name)); err != nil || info.Mode()&fs.ModeSymlink == 0 {
				t.Errorf("%s is no link any more: %v", name, err)
			}
		}
	}
	link("round", "about")
	link("about", "round")
	if err := store.Save(at("round"), text("x")); err == nil || !strings.Contains(err.Error(), "lead round in a circle") {
		t.Errorf("links in a circle: %v", err)
	}
}

// TestSaveFails holds that whatever fails, the old file stays and nothing is left beside it.
func TestSaveFails(t *testing.T) {
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	save(t, path, "old")
	broken := errors.New("wall W3: broke half way")
	half := func(w io.Writer) error {
		if _, err := io.WriteString(w, strings.Repeat("half ", 100_000)); err != nil {
			return err
		}
		return broken
	}
	err := store.Save(path, half)
	if !errors.Is(err, broken) || err.Error() != path+": cannot be saved: wall W3: broke half way" {
		t.Errorf("got %v", err)
	}
	holds(t, path, "old")
	func() {
		defer func() {
			if recover() == nil {
				t.Error("the panic got lost")
			}
		}()
		_ = store.Save(path, func(io.Writer) error { panic("half way") })
	}()
	holds(t, path, "old")
}

func TestSaveErrors(t *testing.T) {
	folder := t.TempDir()
	at := func(name string) string { return filepath.Join(folder, name) }
	save(t, at("file"), "old")
	tests := []struct{ name, path, want string }{
		{"no folder", at("none/plan"), "no new file can be made in its folder: no such file or directory"},
		{"folder is a file", at("file/plan"), "not a directory"},
		{"is a folder", folder, "it is a folder"},
		{"a device", "/dev/null", "it is no ordinary file"},
		{"name too long", at(strings.Repeat("x", 300)), "file name too long"},
		{"folder that takes no files", "/proc/plan", "no new file can be made in its folder: "},
	}
	if runtime.GOOS != "linux" {
		t.Skip("these paths are those of Linux")
	}
	for _, tt := range tests {
		t.Run(tt.name, func(t *testing.T) {
			err := store.Save(tt.path, text("new"))
			if err == nil || !strings.HasPrefix(err.Error(), tt.path+": cannot be saved: "+tt.want) {
				t.Errorf("got %v, want %s", err, tt.want)
			}
		})
	}
	holds(t, at("file"), "old")
}

// TestSaveReadOnly runs as an ordinary user: nothing is read-only to the superuser.
func TestSaveReadOnly(t *testing.T) {
	asNobody(t, "TestSaveReadOnly", func(folder string) {
		file, locked := filepath.Join(folder, "file"), filepath.Join(folder, "locked")
		save(t, file, "old")
		if err := errors.Join(os.Chmod(file, 0o444), os.Mkdir(locked, 0o755)); err != nil {
			t.Fatal(err)
		}
		save(t, filepath.Join(locked, "plan"), "old")
		if err := os.Chmod(locked, 0o555); err != nil {
			t.Fatal(err)
		}
		err := store.Save(file, text("new"))
		if !errors.Is(err, fs.ErrPermission) || err.Error() != file+": cannot be saved: permission denied" {
			t.Errorf("a read-only file: %v", err)
		}
		holds(t, file, "old", "locked")
		path := filepath.Join(locked, "plan")
		err = store.Save(path, text("new"))
		if !errors.Is(err, fs.ErrPermission) || err.Error() != path+": cannot be saved: no new file can be made in its folder: permission denied" {
			t.Errorf("a read-only folder: %v", err)
		}
		holds(t, path, "old")
		if err := os.Chmod(locked, 0o755); err != nil {
			t.Fatal(err)
		}
	})
}

// asNobody runs a test's body in a folder of its own; the superuser runs the test again, in another process, as user 65534.
func asNobody(t *testing.T, name string, body func(folder string)) {
	if os.Geteuid() != 0 {
		folder := os.Getenv("STORE_TEST_FOLDER")
		if folder == "" {
			folder = t.TempDir()
		}
		body(folder)
		return
	}
	folder, err := os.MkdirTemp("", "store")
	if err != nil {
		t.Fatal(err)
	}
	defer os.RemoveAll(folder)
	binary := filepath.Join(folder, "test")
	work := filepath.Join(folder, "work")
	self, err := os.ReadFile("/proc/self/exe")
	if err != nil {
		t.Skip(err)
	}
	if err := errors.Join(os.WriteFile(binary, self, 0o755), os.Mkdir(work, 0o755), os.Chmod(folder, 0o755), os.Chown(work, 65534, 65534)); err != nil {
		t.Skip(err)
	}
	cmd := exec.Command(binary, "-test.run=^"+name+"$")
	cmd.Dir, cmd.Env = work, []string{"STORE_TEST_FOLDER=" + work}
	cmd.SysProcAttr = &syscall.SysProcAttr{Credential: &syscall.Credential{Uid: 65534, Gid: 65534}}
	if out, err := cmd.CombinedOutput(); err != nil {
		t.Errorf("as an ordinary user: %v\n%s", err, out)
	}
}

// TestSaveKilled kills a process half way through saving.
func TestSaveKilled(t *testing.T) {
	if path := os.Getenv("STORE_TEST_KILLED"); path != "" {
		_ = store.Save(path, func(w io.Writer) error {
			if err := text("half of the new")(w); err != nil {
				return err
			}
			fmt.Println("half way")
			select {}
		})
		return
	}
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	save(t, path, "old")
	cmd := exec.Command(os.Args[0], "-test.run=^TestSaveKilled$")
	cmd.Env = append(os.Environ(), "STORE_TEST_KILLED="+path)
	out, err := cmd.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	line := make([]byte, len("half way"))
	if _, err := io.ReadFull(out, line); err != nil {
		t.Fatal(err)
	}
	if err := cmd.Process.Kill(); err != nil {
		t.Fatal(err)
	}
	_ = cmd.Wait()
	holds(t, path, "old", "what was being written")
	save(t, path, "new")
	holds(t, path, "new", "what was being written")
}

// TestSaveRace saves from several goroutines at once: one of them wins, whole.
func TestSaveRace(t *testing.T) {
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	var group sync.WaitGroup
	for i := range 8 {
		group.Go(func() {
			if err := store.Save(path, text(strings.Repeat(string(rune('a'+i)), 5000))); err != nil {
				t.Error(err)
			}
		})
	}
	group.Wait()
	got, err := os.ReadFile(path)
	if err != nil || len(got) != 5000 || strings.Trim(string(got), string(got[:1])) != "" {
		t.Errorf("the file holds %d bytes of several, %v", len(got), err)
	}
	holds(t, path, string(got))
}

func ExampleSave() {
	folder, err := os.MkdirTemp("", "example")
	if err != nil {
		fmt.Println(err)
		return
	}
	defer os.RemoveAll(folder)
	path := filepath.Join(folder, "plan.enfilade")
	err = store.Save(path, func(w io.Writer) error {
		_, err := fmt.Fprintln(w, `{"enfilade": 1}`)
		return err
	})
	got, _ := os.ReadFile(path)
	fmt.Print(string(got), err)
	// Output:
	// {"enfilade": 1}
	// <nil>
}
