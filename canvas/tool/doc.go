// Package tool turns pointer and key events into previews and edits of the plan, one state machine for each tool.
//
// A tool works on a [Host], which the window implements and tests fake: it reads the committed plan and the camera, shows
// previews and does edits. Whatever a tool shows before it is done is an edit applied to the committed plan, so the study
// follows the pointer; a [Sketch] says what else is to be drawn over the picture.
package tool
