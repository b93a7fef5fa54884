#!/bin/sh
# The tests of core under valgrind (memory errors and leaks), or those named: packaging/check_valgrind.sh record line
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
command -v valgrind >/dev/null || { echo "valgrind is missing: apt-get install valgrind" >&2; exit 2; }
sh "$here/packaging/setup.sh"
cd "$here"
# Valgrind knows no 512-bit instructions; the release build has none.
cmake --preset release
[ $# -gt 0 ] || set -- base record line picking traveltime methods section survey report
for folder in "$@"; do
  cmake --build --preset release --target "core_${folder}_test"
  echo "core/$folder"
  valgrind --quiet --error-exitcode=1 --leak-check=full --errors-for-leak-kinds=definite \
    "build/release/tests/core_${folder}_test" --gtest_brief=1 --gtest_filter="${VALGRIND_FILTER:-*}"
done
