package gui

import (
	"os"
	"path/filepath"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"
)

// planSuffix ends the name of a plan's file.
const planSuffix = ".enfilade"

// chooser is the page that asks for a file: a path one can type, and what lies in its folder.
type chooser struct {
	path    *pathEntry
	list    *nameList
	empty   *inkText
	folder  string
	suffix  string
	names   []string // of the folder's folders, with a slash, then its files
	content fyne.CanvasObject
	done    func(path string)
}

// newChooser begins in a folder with a file name to start from; done is told the path when Enter is pressed in the field
// or a file is chosen twice.
func newChooser(folder, name, suffix string, done func(string)) *chooser {
	c := &chooser{suffix: suffix, done: done, empty: caption("nothing of this kind here")}
	c.path = newPathEntry(func() { c.typed(c.path.Text) })
	c.path.OnChanged = func(text string) {
		dir := filepath.Dir(text)
		if isFolder(text) {
			dir = filepath.Clean(text)
		}
		if dir != c.folder && isFolder(dir) {
			c.read(dir)
		}
	}
	c.list = newNameList(func() int { return len(c.names) }, func() fyne.CanvasObject { return newChoiceRow(c) },
		func(i widget.ListItemID, o fyne.CanvasObject) { o.(*choiceRow).put(c.names[i]) })
	c.list.HideSeparators = true
	c.list.OnSelected = func(i widget.ListItemID) { c.list.UnselectAll(); c.choose(c.names[i], false) }
	c.list.MinSize() // from here on it can be scrolled
	frame := container.NewStack(newPaper(roleField), c.list, container.NewCenter(c.empty))
	c.content = around(inset(0, 0, 0, 8, c.path), nil, nil, nil,
		container.New(minHeight(280), frame))
	c.read(folder)
	c.path.SetText(filepath.Join(folder, name))
	return c
}

type minHeight float32

func (h minHeight) MinSize(o []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(o[0].MinSize().Width, float32(h))
}
func (h minHeight) Layout(o []fyne.CanvasObject, s fyne.Size) { o[0].Resize(s) }

func isFolder(path string) bool {
	info, err := os.Stat(path)
	return err == nil && info.IsDir()
}

// read lists a folder.
func (c *chooser) read(folder string) {
	c.folder = folder
	entries, err := os.ReadDir(folder)
	if err != nil {
		entries = nil
	}
	c.names = folderNames(entries, folder, c.suffix)
	c.empty.Hidden = len(c.names) > 0
	c.empty.Refresh()
	c.list.UnselectAll()
	c.list.ScrollToTop()
	c.list.Refresh()
}

// folderNames lists the way up, then the folders, then the files that end as wanted; hidden ones are left out.
func folderNames(entries []os.DirEntry, folder, suffix string) []string {
	var folders, files []string
	for _, e := range entries {
		name := e.Name()
		switch {
		case strings.HasPrefix(name, "."):
		case e.IsDir() || e.Type()&os.ModeSymlink != 0 && isFolder(filepath.Join(folder, name)):
			folders = append(folders, name+"/")
		case hasSuffix(name, suffix):
			files = append(files, name)
		}
	}
	slices.Sort(folders)
	slices.Sort(files)
	if filepath.Dir(folder) != folder {
		folders = append([]string{"../"}, folders...)
	}
	return append(folders, files...)
}

// choose takes a name of the list: a folder is gone into, a file is put into the field, and taken on the second click.
func (c *chooser) choose(name string, twice bool) {
	if dir, ok := strings.CutSuffix(name, "/"); ok {
		to := filepath.Join(c.folder, dir)
		file := filepath.Base(c.path.Text)
		if isFolder(c.path.Text) {
			file = ""
		}
		c.read(to)
		c.path.SetText(filepath.Join(to, file))
		return
	}
	c.path.SetText(filepath.Join(c.folder, name))
	if twice {
		c.done(c.path.Text)
	}
}

// typed takes the field's path: a folder is gone into, anything else is the file.
func (c *chooser) typed(path string) {
	if isFolder(path) {
		c.read(filepath.Clean(path))
		return
	}
	c.done(path)
}

// nameList is the list of names; Space takes the one that arrows have come to.
type nameList struct{ widget.List }

func newNameList(length func() int, item func() fyne.CanvasObject, put func(widget.ListItemID, fyne.CanvasObject)) *nameList {
	l := &nameList{widget.List{Length: length, CreateItem: item, UpdateItem: put}}
	l.ExtendBaseWidget(l)
	return l
}

// TypedKey is for the toolkit; Enter and Escape are the dialog's.
func (l *nameList) TypedKey(e *fyne.KeyEvent) {
	switch e.Name {
	case fyne.KeyEscape, fyne.KeyReturn, fyne.KeyEnter:
		passOn(l, e)
	default:
		l.List.TypedKey(e)
	}
}

// pathEntry is the field for a file's path.
type pathEntry struct {
	textEntry
	enter, escape func()
}

func newPathEntry(enter func()) *pathEntry {
	e := &pathEntry{enter: enter, escape: func() {}}
	e.oneLine()
	e.ExtendBaseWidget(e)
	return e
}

// chooseName puts the cursor behind the file's name and chooses the name without what ends it, so that what is typed
// replaces just the name.
func (e *pathEntry) chooseName(suffix string) {
	name := filepath.Base(e.Text)
	stem := len([]rune(strings.TrimSuffix(name, suffix)))
	e.CursorColumn = len([]rune(e.Text)) - len([]rune(name)) + stem
	shift := &fyne.KeyEvent{Name: desktop.KeyShiftLeft}
	e.KeyDown(shift)
	for range stem {
		e.Entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyLeft})
	}
	e.KeyUp(shift)
}

// TypedKey is for the toolkit.
func (e *pathEntry) TypedKey(k *fyne.KeyEvent) {
	switch k.Name {
	case fyne.KeyReturn, fyne.KeyEnter:
		e.enter()
	case fyne.KeyEscape:
		e.escape()
	default:
		e.Entry.TypedKey(k)
	}
}

// choiceRow is one line of the chooser's list.
type choiceRow struct {
	widget.BaseWidget
	c    *chooser
	name string
	mark *icon
	text *inkText
}

func newChoiceRow(c *chooser) *choiceRow {
	r := &choiceRow{c: c, mark: newIcon("open", 16, roleInk2), text: body("").shrinking()}
	r.ExtendBaseWidget(r)
	return r
}

func (r *choiceRow) put(name string) {
	r.name = name
	r.text.set(name)
	if strings.HasSuffix(name, "/") {
		r.mark.set("open", roleInk2)
	} else {
		r.mark.set("new", roleInk)
	}
}

// Tapped chooses the name.
func (r *choiceRow) Tapped(*fyne.PointEvent) {
	twice := filepath.Join(r.c.folder, r.name) == r.c.path.Text
	r.c.choose(r.name, twice)
}

// CreateRenderer is for the toolkit.
func (r *choiceRow) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(inset(10, 3, 10, 3, around(nil, nil, r.mark, nil, inset(8, 0, 0, 0, r.text))))
}
