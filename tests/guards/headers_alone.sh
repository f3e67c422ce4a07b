#!/usr/bin/env bash
# Each header compiles alone, so that including it needs nothing before it.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."

compiles_alone() { echo "#include \"$1\"" | g++ -std=c++20 -fsyntax-only -I . -x c++ - || { echo "not alone: $1"; exit 1; }; }
export -f compiles_alone

git ls-files 'reference/*.hpp' 'fast/*.hpp' 'reports/*.hpp' 'compare/*.hpp' |
  xargs -P "$(nproc)" -I {} bash -c 'compiles_alone {}'
