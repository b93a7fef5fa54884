#!/bin/sh
# Sets up, builds, and opens the workstation on the demo line; files named after it are opened instead.
# Without a display the demo line is interpreted and its sheet printed to PDF.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
sh "$here/packaging/setup.sh"
build="$here/build/release"
(cd "$here" && cmake --preset release && cmake --build --preset release --target strikeplate strikeplate-batch)

if [ -n "${DISPLAY:-}" ] || [ -n "${WAYLAND_DISPLAY:-}" ]; then
  exec "$build/app/strikeplate" "$@"
fi
echo "There is no display, so the sheet is printed to PDF."

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
