// Package cgal asks the general-purpose geometry library CGAL (cgal.org) what the solver is asked, for tests that compare
// the answers and for benchmarks that stand beside each other.
//
// CGAL speaks through a program of its own in testdata/cgal, which [Start] compiles once and keeps in the user's cache
// folder. It gets the rounded graph and nothing else: which places are solid, where walls are slits and which edges lead
// into a region it works out for itself. Its licence is not ours (see its README); nothing of it is linked into Enfilade.
package cgal
