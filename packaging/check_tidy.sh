#!/bin/sh
# clang-tidy over core, widgets and app (or the files named), with the settings of .clang-tidy. Ends with 1 on a finding.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
cd "$here"
command -v clang-tidy >/dev/null || { echo "clang-tidy is missing: apt-get install clang-tidy" >&2; exit 2; }
[ -e build/release/compile_commands.json ] || cmake --preset release >/dev/null
[ $# -gt 0 ] || set -- $(git ls-files 'core/*.cpp' 'widgets/*.cpp' 'app/*.cpp')
printf '%s\n' "$@" | xargs -P "$(nproc)" -n 4 clang-tidy -p build/release --quiet --warnings-as-errors='*' 2>/dev/null
