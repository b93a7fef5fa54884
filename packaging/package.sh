#!/bin/sh
# Sets up, builds, and makes the Debian package in build/package; prints where it is.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
sh "$here/packaging/setup.sh"
build="$here/build/package"
cmake -S "$here" -B "$build" -G Ninja -DCMAKE_BUILD_TYPE=Release -DCMAKE_INSTALL_PREFIX=/usr -DSTRIKEPLATE_TESTS=OFF
cmake --build "$build"
(cd "$build" && cpack -G DEB)
ls "$build"/strikeplate_*.deb
