#!/bin/sh
# Sets up, builds and runs every test; ends with ctest's own summary.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
sh "$here/packaging/setup.sh"
cd "$here"
cmake --preset release
cmake --build --preset release
QT_QPA_PLATFORM=offscreen ctest --preset release -j "$(nproc)"
