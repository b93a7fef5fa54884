#!/bin/sh
# All tests under the address and undefined-behaviour sanitizers; arguments go to ctest, such as -R SurveyFile.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
sh "$here/packaging/setup.sh"
cd "$here"
cmake --preset sanitize
cmake --build --preset sanitize
QT_QPA_PLATFORM=offscreen UBSAN_OPTIONS=print_stacktrace=1:halt_on_error=1 ctest --preset sanitize -j "$(nproc)" "$@"
