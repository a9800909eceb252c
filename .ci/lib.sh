# Shared by the scripts in this folder; source it from bash. It goes to the top of the repository.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/.."

# The pinned version of the checker that `make check` runs.
STATICCHECK=honnef.co/go/tools/cmd/staticcheck@v0.8.2

# What the first picture and the first study are of.
SAMPLE=testdata/plans/gallery.enfilade

# No revision is stamped into the program, so that a build needs no git and no .git folder.
export GOFLAGS="-buildvcs=false ${GOFLAGS:-}"

say() { printf '%s\n' "enfilade: $*"; }
die() { say "$*" >&2; exit 1; }

# need_go makes sure of Go 1.25 or newer, the one thing that is not installed for you.
need_go() {
	if ! command -v go >/dev/null && [ -x /usr/local/go/bin/go ]; then
		PATH=$PATH:/usr/local/go/bin
	fi
	local how="get it from https://go.dev/dl/ (unpack it to /usr/local, then: export PATH=\$PATH:/usr/local/go/bin)"
	command -v go >/dev/null || die "Go 1.25 or newer is needed and there is no go on the PATH; $how"
	local have
	have=$(go env GOVERSION 2>&1) || die "Go 1.25 or newer is needed, but go says: $have; $how"
	case $have in
		go1.[0-9] | go1.[0-9].* | go1.[0-9][a-z]* | go1.1[0-9]* | go1.2[0-4]*)
			die "Go 1.25 or newer is needed and this is ${have#go}; $how" ;;
	esac
}

# seconds prints how long this script has run.
seconds() { printf '%d min %02d s' $((SECONDS / 60)) $((SECONDS % 60)); }
