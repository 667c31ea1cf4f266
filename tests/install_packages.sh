#!/bin/sh
# Installs what is missing of the named sections of packages.txt.
# Usage: sh tests/install_packages.sh SECTION...        e.g. build tests
# Does nothing, quickly, when everything is there. Needs root or sudo otherwise.
set -eu
here=$(cd "$(dirname "$0")" && pwd)

if ! command -v dpkg-query >/dev/null 2>&1; then
  echo "raiser: this is no Debian system (no dpkg-query); install the counterparts of $here/packages.txt yourself" >&2
  exit 0
fi

wanted=
for section in "$@"; do
  names=$(sed -n "/^\[$section\]/,/^\[/{/^[a-z0-9]/p;}" "$here/packages.txt")
  if [ -z "$names" ]; then
    echo "raiser: $here/packages.txt has no section [$section]" >&2
    exit 2
  fi
  wanted="$wanted $names"
done

# shellcheck disable=SC2086  # package names are single words
present=$(dpkg-query -W -f '${db:Status-Status} ${Package}\n' $wanted 2>/dev/null | sed -n 's/^installed //p' || true)
missing=
for name in $wanted; do
  case "
$present
" in
  *"
$name
"*) ;;
  *) missing="$missing $name" ;;
  esac
done
[ -n "$missing" ] || exit 0

as_root=
if [ "$(id -u)" -ne 0 ]; then
  if ! command -v sudo >/dev/null 2>&1; then
    echo "raiser: missing packages:$missing" >&2
    echo "raiser: installing them needs root, and there is no sudo; as root run: apt-get install$missing" >&2
    exit 1
  fi
  as_root="sudo"
fi

# shellcheck disable=SC2086
install() {
  $as_root env DEBIAN_FRONTEND=noninteractive apt-get install -y -q --no-install-recommends $missing
}

echo "raiser: installing$missing" >&2
# The package lists may be absent or old: fetch them only when a first try fails.
if ! install; then
  $as_root apt-get update -q || true
  if ! install; then
    echo "raiser: could not install$missing" >&2
    echo "raiser: see apt's messages above; install these packages by hand, then run this again" >&2
    exit 1
  fi
fi
