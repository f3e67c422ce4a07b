#!/usr/bin/env bash
# Every source file is as clang-format 14 would write it.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
git ls-files '*.cpp' '*.hpp' | xargs clang-format-14 --dry-run -Werror
