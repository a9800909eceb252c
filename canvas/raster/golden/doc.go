// Package golden compares pictures with kept ones, for tests. What differs is left in out/golden at the top of the
// repository: the picture as it is, as it was, and where they differ.
package golden
