// Package exact decides every side, crossing and order question on grid points without rounding.
//
// The grid unit is a tenth of a millimetre; x points right and y points up. Coordinates are integers below [Limit] in
// absolute value, so differences fit 31 bits with sign, cross and dot products fit int64, and products of those fit
// [Int128]. Nothing here uses a tolerance; floating point appears only as a filter whose error bound is proved, or to
// measure a result that has already been decided.
package exact
