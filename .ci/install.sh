#!/usr/bin/env bash
# Installs the Debian packages of the groups given (see .ci/packages); does nothing, and needs no
# network, when they are there. Usage: .ci/install.sh build run test lint
set -euo pipefail
here=$(cd "$(dirname "$0")" && pwd)

missing=()
for group in "$@"; do
  while read -r of package; do
    [ "$of" = "$group" ] || continue
    status=$(dpkg-query -W -f='${db:Status-Status}' "$package" 2>/dev/null || true)
    [ "$status" = installed ] || missing+=("$package")
  done < <(grep -v '^#' "$here/packages")
done
[ "${#missing[@]}" -gt 0 ] || exit 0

echo "installing: ${missing[*]}"
as_root=()
if [ "$(id -u)" != 0 ]; then
  if ! command -v sudo >/dev/null; then
    echo "these packages are missing, and neither root nor sudo is at hand: ${missing[*]}" >&2
    exit 2
  fi
  as_root=(sudo)
fi
export DEBIAN_FRONTEND=noninteractive
"${as_root[@]}" env DEBIAN_FRONTEND=noninteractive apt-get update -qq
"${as_root[@]}" env DEBIAN_FRONTEND=noninteractive \
  apt-get install -y -qq --no-install-recommends "${missing[@]}"
