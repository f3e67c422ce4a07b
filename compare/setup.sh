# What the scripts share: the packages that a Debian 12 needs, and how the project is configured and built.
# To be sourced by bash; sets `top`, the top of the repository.

top=$(cd "$(dirname "${BASH_SOURCE[0]}")/.." && pwd)
export CCACHE_BASEDIR="$top"

program_packages=(build-essential cmake ninja-build ccache libgmp-dev libmpfr-dev libmpfi-dev libboost-dev libeigen3-dev
  libtomlplusplus-dev libcli11-dev nlohmann-json3-dev libfmt-dev libtbb-dev)
test_packages=(libgtest-dev libflint-arb-dev libflint-dev python3 python3-mpmath python3-jsonschema)
bench_packages=(libbenchmark-dev)
style_packages=(clang-format-14)

# Those of the named packages that are not installed.
missing_packages() {
  local package
  for package in "$@"; do
    dpkg-query -W -f '${db:Status-Status}\n' "$package" 2>/dev/null | grep -qx installed || echo "$package"
  done
}

# How apt-get may be run: directly, or through sudo, which may ask for a password only at a terminal. Fails where neither
# is possible.
administrator() {
  if [ "$(id -u)" -eq 0 ]; then
    echo env
  elif command -v sudo >/dev/null && { [ -t 0 ] || sudo -n true 2>/dev/null; }; then
    echo sudo
  else
    return 1
  fi
}

# Installs what is missing of the named packages; touches nothing where all are there.
require_packages() {
  local missing run
  mapfile -t missing < <(missing_packages "$@")
  [ "${#missing[@]}" -eq 0 ] && return 0
  if ! command -v apt-get >/dev/null || ! run=$(administrator); then
    echo "These packages are needed and cannot be installed from here (no apt-get, or neither root nor sudo):" >&2
    printf '  %s\n' "${missing[@]}" >&2
    exit 1
  fi
  echo "Installing: ${missing[*]}"
  "$run" apt-get -q update
  "$run" env DEBIAN_FRONTEND=noninteractive apt-get -q install -y --no-install-recommends "${missing[@]}"
}

# build FOLDER OPTION...: configures with Ninja in release mode and builds.
build() {
  local folder=$1
  shift
  cmake -S "$top" -B "$folder" -G Ninja -DCMAKE_BUILD_TYPE=Release "$@"
  cmake --build "$folder" --parallel "$(nproc)"
}
