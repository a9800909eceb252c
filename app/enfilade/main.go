package main

import (
	"context"
	"os"
	"os/signal"

	"enfilade/app/verbs"
)

func main() {
	// Ctrl+C ends a study in good order; the window has its own way to close.
	ctx, release := signal.NotifyContext(context.Background(), os.Interrupt)
	program := verbs.Program{Out: os.Stdout, Err: os.Stderr, Open: func(path, theme string) error {
		release()
		return openWindow(path, theme)
	}}
	os.Exit(program.Run(ctx, os.Args[1:]))
}
