#!/usr/bin/env bash
# Installs a build (its folder is the argument) into an empty place and uses it from a project of its own, library by library.
set -euo pipefail
here="$(cd "$(dirname "${BASH_SOURCE[0]}")" && pwd)"
place=$(mktemp -d)
trap 'rm -rf "$place"' EXIT
cmake --install "$1" --prefix "$place/installed" >/dev/null
cmake -S "$here/consumer" -B "$place/build" -G Ninja -DCMAKE_BUILD_TYPE=Release -DCMAKE_PREFIX_PATH="$place/installed" >/dev/null
cmake --build "$place/build"
for library in model reference fast reports compare; do
  "$place/build/uses_$library" || { echo "heraldgauge::$library does not work when installed"; exit 1; }
done
"$place/installed/bin/heraldgauge" --version
