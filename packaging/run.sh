#!/bin/sh
# Sets up, builds, interprets the demo line and prints its sheet to PDF; records named after it are taken instead.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
sh "$here/packaging/setup.sh"
build="$here/build/release"
(cd "$here" && cmake --preset release && cmake --build --preset release --target strikeplate-batch)

if [ $# -gt 0 ]; then
  set -- "$@" --sheet "$build/sheet.pdf"
  sheet="$build/sheet.pdf"
else
  demo="$here/sample_data/demo_line"
  sheet="$build/demo_sheet.pdf"
  [ ! -f "$demo/geometry.csv" ] || set -- --geometry "$demo/geometry.csv"
  set -- "$demo"/*.sg2 "$@" --sheet "$sheet"
fi
status=0
"$build/app/strikeplate-batch" "$@" || status=$?
[ "$status" -le 1 ] && echo "The sheet is in $sheet"
exit "$status"
