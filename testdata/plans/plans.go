// Package plans embeds the sample plans that lie in this folder. It is here because a package can embed only what lies beside
// or below it; package assets hands them on.
package plans

import "embed"

// Files holds the sample plans, by file name.
//
//go:embed *.enfilade
var Files embed.FS
