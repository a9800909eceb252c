# Everything is done by the scripts in .ci; this file names them. `make help` lists what there is.
.PHONY: help run build test check bench feel shots walkthrough clean
.DEFAULT_GOAL := help

help: ## list these targets
	@awk -F ':.*## ' '/^[a-z]+:.*## /{printf "  make %-11s %s\n", $$1, $$2}' Makefile

run: ## install what is missing, build, and open the sample gallery
	@bash .ci/start

build: ## build the program with its window: bin/enfilade
	@bash .ci/build

test: ## install what is missing and run every test
	@bash .ci/test

check: test ## every test, then staticcheck and ten seconds of each fuzz target
	@bash .ci/check

bench: ## measure mesh, region and approach, beside CGAL
	@bash .ci/bench

feel: ## measure how quickly the window answers, and the real one beside an empty one
	@bash .ci/feel

shots: ## take screenshots of the real window on each sample, light and dark, into out/
	@bash .ci/shots

walkthrough: ## draw a six-room gallery from nothing in the real window; screenshots into out/, clicks and keys counted
	@bash .ci/walkthrough

clean: ## remove bin/ and out/
	@rm -rf bin out
