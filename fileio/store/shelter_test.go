//go:build unix

package store_test

import (
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"testing"
	"time"

	"enfilade/fileio/store"
)

// TestMain lets the test's own binary be the program that dies: it keeps two copies and waits to be killed.
func TestMain(m *testing.M) {
	folder := os.Getenv("STORE_TEST_SHELTER")
	if folder == "" {
		os.Exit(m.Run())
	}
	s, err := store.OpenShelter(folder)
	if err == nil {
		err = s.Keep(0, store.Note{Path: "/plans/a.enfilade", Title: "Gallery", At: time.Unix(1000, 0)}, text("half a wall"))
	}
	if err == nil {
		err = s.Keep(1, store.Note{Title: "New plan", At: time.Unix(2000, 0)}, text("a door"))
	}
	if err != nil {
		fmt.Println(err)
		os.Exit(1)
	}
	fmt.Println("kept")
	time.Sleep(time.Minute)
}

// program starts the test's binary as a program that keeps two copies, and returns once they are kept.
func program(t *testing.T, folder string) *exec.Cmd {
	t.Helper()
	cmd := exec.Command(os.Args[0])
	cmd.Env = append(os.Environ(), "STORE_TEST_SHELTER="+folder)
	out, err := cmd.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { kill(cmd) })
	said := make([]byte, 5)
	if _, err := io.ReadFull(out, said); err != nil || string(said) != "kept\n" {
		t.Fatalf("the program said %q, %v", said, err)
	}
	return cmd
}

func kill(cmd *exec.Cmd) {
	_ = cmd.Process.Kill() // it may have ended already
	_ = cmd.Wait()
}

func shelter(t *testing.T, folder string) *store.Shelter {
	t.Helper()
	s, err := store.OpenShelter(folder)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(s.Close)
	return s
}

// TestShelter: what a running program keeps is nobody else's; what a killed one kept is offered, to one program only.
func TestShelter(t *testing.T) {
	folder := filepath.Join(t.TempDir(), "kept")
	cmd := program(t, folder)
	s := shelter(t, folder)
	if left := s.Left(); len(left) != 0 {
		t.Fatalf("the copies of a running program are offered: %v", left)
	}
	kill(cmd)
	left := s.Left()
	if len(left) != 2 || left[0].Title != "New plan" || left[1].Path != "/plans/a.enfilade" || left[1].PID != cmd.Process.Pid ||
		!left[1].At.Equal(time.Unix(1000, 0)) {
		t.Fatalf("offered %+v, want both copies, the newer first", left)
	}
	if body, err := left[1].Read(); err != nil || string(body) != "half a wall" {
		t.Errorf("the copy holds %q, %v", body, err)
	}
	if again := shelter(t, folder).Left(); len(again) != 0 {
		t.Errorf("a second program is offered %v too", again)
	}
	if err := left[0].Discard(); err != nil {
		t.Error(err)
	}
	if left := s.Left(); len(left) != 1 || left[0].Title != "Gallery" {
		t.Errorf("after one was discarded %+v is offered", left)
	}
}

// TestShelterDrop: a copy that was dropped, and an end without copies, leave nothing behind.
func TestShelterDrop(t *testing.T) {
	folder := t.TempDir()
	s := shelter(t, folder)
	if err := s.Keep(3, store.Note{}, text("a")); err != nil {
		t.Fatal(err)
	}
	for range 2 { // the second time there is nothing to drop
		if err := s.Drop(3); err != nil {
			t.Fatal(err)
		}
	}
	s.Close()
	if entries, _ := os.ReadDir(folder); len(entries) != 0 {
		t.Errorf("left behind: %v", entries)
	}
}

// TestShelterIsPrivate: nobody else may read unsaved work.
func TestShelterIsPrivate(t *testing.T) {
	folder := filepath.Join(t.TempDir(), "a", "b")
	shelter(t, folder)
	if got := mode(t, folder).Perm(); got != 0o700 {
		t.Errorf("the folder has %v, want 0700", got)
	}
}

func TestPrint(t *testing.T) {
	path := filepath.Join(t.TempDir(), "gallery.enfilade")
	none, _, err := store.PrintOf(path)
	if err != nil || none.There() {
		t.Fatalf("of no file %v, %v", none, err)
	}
	save(t, path, "one")
	one, data, err := store.PrintOf(path)
	if err != nil || string(data) != "one" {
		t.Fatalf("%q, %v", data, err)
	}
	if changed, _, err := one.Changed(path, true); changed || err != nil {
		t.Errorf("as it was: changed %v, %v", changed, err)
	}
	later := one.Time.Add(time.Hour)
	if err := os.Chtimes(path, later, later); err != nil {
		t.Fatal(err)
	}
	if changed, now, _ := one.Changed(path, false); changed || !now.Time.Equal(later) {
		t.Errorf("the same bytes written later: changed %v, time %v", changed, now.Time)
	}
	save(t, path, "two") // as long as before
	if err := os.Chtimes(path, one.Time, one.Time); err != nil {
		t.Fatal(err)
	}
	if changed, _, _ := one.Changed(path, false); changed {
		t.Error("size and time are as they were, and the bytes were looked at")
	}
	if changed, now, _ := one.Changed(path, true); !changed || now.Same(one) {
		t.Error("other bytes of the same size and time are not noticed")
	}
	if err := os.Remove(path); err != nil {
		t.Fatal(err)
	}
	if changed, _, err := one.Changed(path, true); changed || err != nil {
		t.Errorf("a file that is gone: changed %v, %v", changed, err)
	}
}

func TestBeside(t *testing.T) {
	for _, c := range []struct{ owner, named, path string }{
		{"/plans/a.enfilade", "scan.png", "/plans/scan.png"},
		{"/plans/a.enfilade", "scans/1.png", "/plans/scans/1.png"},
		{"/plans/a.enfilade", "../1.png", "/1.png"},
		{"/plans/a.enfilade", "", ""},
	} {
		if got := store.Resolve(c.owner, c.named); got != c.path {
			t.Errorf("Resolve(%q, %q) = %q, want %q", c.owner, c.named, got, c.path)
		}
		if got := store.Relate(c.owner, c.path); got != c.named {
			t.Errorf("Relate(%q, %q) = %q, want %q", c.owner, c.path, got, c.named)
		}
	}
	for path, want := range map[string]bool{"/plans/1.png": true, "/plans/x/1.png": true, "/1.png": false, "/plans2/1.png": false, "/plans/..x/1.png": true} {
		if got := store.Within("/plans/a.enfilade", path); got != want {
			t.Errorf("Within(%q) = %v", path, got)
		}
	}
}

func TestCopyBeside(t *testing.T) {
	there, here := filepath.Join(t.TempDir(), "scan.png"), filepath.Join(t.TempDir(), "a.enfilade")
	save(t, there, "pixels")
	want := filepath.Join(filepath.Dir(here), "scan.png")
	for range 2 { // the second time the copy is there already
		if got, err := store.CopyBeside(here, there); err != nil || got != want {
			t.Fatalf("copied to %q, %v", got, err)
		}
	}
	holds(t, want, "pixels")
	save(t, there, "other pixels")
	got, err := store.CopyBeside(here, there)
	if err != nil || filepath.Base(got) != "scan-2.png" {
		t.Fatalf("another picture of the same name is copied to %q, %v", got, err)
	}
	holds(t, want, "pixels", "scan-2.png")
	if _, err := store.CopyBeside(here, there+"x"); err == nil {
		t.Error("a picture that is not there was copied")
	}
}
