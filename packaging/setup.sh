#!/bin/sh
# Installs what Strikeplate needs to be built, run and tested, as Debian packages by name; nothing else.
# Asks for root only when a package is missing.
set -eu
packages="g++ cmake ninja-build pkg-config ccache
  qt6-base-dev qt6-svg-dev libqcustomplot-dev libqcustomplot2.1-qt6 qt6-qpa-plugins
  libeigen3-dev libboost-dev libsegyio-dev libsqlite3-dev nlohmann-json3-dev
  libdxflib-dev python3-ezdxf libxlsxwriter-dev
  libgtest-dev libbenchmark-dev libgsl-dev
  xvfb xauth poppler-utils python3 binutils fonts-dejavu-core"

missing=""
for package in $packages; do
  status=$(dpkg-query -W -f='${Status}' "$package" 2>/dev/null || true)
  [ "$status" = "install ok installed" ] || missing="$missing $package"
done
[ -n "$missing" ] || exit 0

if [ "$(id -u)" -eq 0 ]; then as_root=""; else as_root="sudo"; fi
echo "Installing:$missing"
$as_root apt-get update -q
# shellcheck disable=SC2086  # a list of words is meant
DEBIAN_FRONTEND=noninteractive $as_root apt-get install -y -q --no-install-recommends $missing
