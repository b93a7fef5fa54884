#!/bin/sh
# cppcheck over the sources. Ends with 1 on a finding.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
cd "$here"
command -v cppcheck >/dev/null || { echo "cppcheck is missing: apt-get install cppcheck" >&2; exit 2; }
cppcheck --std=c++20 --language=c++ --enable=warning,performance,portability --inline-suppr --quiet \
  --suppress=missingIncludeSystem --suppress=unknownMacro --library=qt --library=googletest \
  --error-exitcode=1 -j "$(nproc)" -I . core widgets app
