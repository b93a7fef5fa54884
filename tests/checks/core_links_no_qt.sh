#!/bin/sh
# Proves that the core library needs nothing of Qt: no undefined Qt symbol in the archive, no Qt header in the sources.
# usage: core_links_no_qt.sh ARCHIVE CORE_FOLDER
set -eu
archive=$1
core=$2
# Qt's own symbols are mangled with a class or namespace that begins with Q and a capital letter.
if nm -C --undefined-only "$archive" | grep -E ' (Q[A-Z][A-Za-z]*::|qt_|qVersion|QCP)'; then
  echo "core uses Qt symbols (above)"
  exit 1
fi
# The search itself must be able to find something: the archive has undefined symbols of the standard library.
nm -C --undefined-only "$archive" | grep -q 'std::' || { echo "no symbols could be read from $archive"; exit 1; }
if grep -rnE '#include *[<"](Q[A-Za-z]|q[a-z]*plot|widgets/|app/)' "$core"; then
  echo "core includes Qt, widgets or app (above)"
  exit 1
fi
echo "core is free of Qt"
