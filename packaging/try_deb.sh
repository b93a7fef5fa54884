#!/bin/sh
# Tries the Debian package in a clean Debian 12 of its own (a folder under build/): installs it, starts both programs,
# has the demo line interpreted, and removes it again. Needs root, for a root folder can be entered by nobody else.
#   packaging/try_deb.sh [PACKAGE.deb]      without a package, one is made first
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
[ "$(id -u)" -eq 0 ] || { echo "try_deb.sh has to be run by root: it enters a root folder of its own." >&2; exit 2; }
if [ $# -gt 0 ]; then
  package=$1
else
  sh "$here/packaging/package.sh"
  package=$(ls "$here"/build/package/strikeplate_*.deb)
fi
command -v debootstrap >/dev/null || DEBIAN_FRONTEND=noninteractive apt-get install -y -q debootstrap

root="$here/build/try_deb/root"
mirror=${DEBIAN_MIRROR:-$(sed -n 's/^\(deb\|URIs:\) \(\[[^]]*\] \)\?\(http[^ ]*\).*/\3/p' \
  /etc/apt/sources.list /etc/apt/sources.list.d/* 2>/dev/null | head -n 1)}
rm -rf "$root"
mkdir -p "$root"
debootstrap --variant=minbase bookworm "$root" "${mirror:-http://deb.debian.org/debian}" >"$here/build/try_deb/debootstrap.log"
for file in /etc/apt/apt.conf.d/*proxy* /etc/resolv.conf; do
  [ ! -e "$file" ] || cp "$file" "$root$file"
done
cp "$package" "$root/tmp/strikeplate.deb"
mount -t proc proc "$root/proc"
trap 'umount "$root/proc"' EXIT

inside() { chroot "$root" env -i PATH=/usr/sbin:/usr/bin:/sbin:/bin HOME=/tmp LANG=C.UTF-8 DEBIAN_FRONTEND=noninteractive \
  QT_QPA_PLATFORM=offscreen "$@"; }

inside apt-get update -q >/dev/null
inside sh -c 'find / -xdev -path /proc -prune -o -path /tmp -prune -o -type f -print | sort' >"$here/build/try_deb/before"
inside apt-get install -y -q -o Dpkg::Use-Pty=0 --no-install-recommends /tmp/strikeplate.deb >"$here/build/try_deb/install.log"
echo "installed: $(inside dpkg-query -W -f='${Package} ${Version}' strikeplate)"

inside strikeplate --version | head -n 1
inside strikeplate-batch --version | head -n 1
inside sh -c 'strikeplate-batch /usr/share/strikeplate/demo_line/*.sg2 --sheet /tmp/sheet.pdf --depths /tmp/depths.csv'
inside sh -c 'head -c 5 /tmp/sheet.pdf | grep -q %PDF- && [ "$(wc -l </tmp/depths.csv)" -gt 10 ]'
echo "used: the demo line's sheet and depths were written"

# The window stays open until it is stopped; anything else than being stopped is a failure.
status=0
inside timeout 10 strikeplate || status=$?
[ "$status" -eq 124 ] || { echo "the workstation ended by itself with status $status" >&2; exit 1; }
inside sh -c 'ls /tmp/.local/share/strikeplate/strikeplate/surveys/*.splate' >/dev/null
echo "started: the workstation opened the demo line and kept its survey"

for file in applications/strikeplate.desktop mime/packages/strikeplate.xml metainfo/strikeplate.metainfo.xml \
  icons/hicolor/scalable/apps/strikeplate.svg man/man1/strikeplate.1 man/man1/strikeplate-batch.1; do
  ls "$root/usr/share/$file" "$root/usr/share/$file.gz" 2>/dev/null | grep -q . ||
    { echo "/usr/share/$file is not there" >&2; exit 1; }
done
echo "there: desktop entry, file type, description, icon, man pages"

inside apt-get purge -y -q -o Dpkg::Use-Pty=0 strikeplate >/dev/null
left=$(inside sh -c 'find /usr /etc -xdev -name "*strikeplate*"')
[ -z "$left" ] || { echo "left behind: $left" >&2; exit 1; }
echo "removed: nothing of it is left"
