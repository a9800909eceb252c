// Package planfile reads and writes the plan file, version 1: one JSON object in UTF-8 whose lengths are millimetres with
// at most one decimal, angles degrees counter-clockwise from +x, y up.
//
// Reading is strict: [Read] returns a plan or the first [Fault] it finds, named by file, item and field. What it does not
// know it keeps: unknown members of any item, and the brief, are written back as they came, white space aside. Writing is
// stable: one item a line, lists and members in one order, defaults left out, so that equal plans give equal bytes and a
// small change gives a small difference. [Write] reads back what it made before it hands it over, so a plan that could not
// be opened again is refused instead of saved.
//
// A fault here is what keeps a file from being read as a plan: text that is no JSON, a member of the wrong type, a number off
// the grid or out of range, ids that appear twice, an opening that does not fit its wall. What is merely drawn badly, such as a
// ring that encloses nothing, is read, and told by the solver.
package planfile
