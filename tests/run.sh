#!/usr/bin/env bash
# Builds everything with its tests and runs them. Ends with the line "N passed, N failed".
# HERALDGAUGE_TEST_EFFORT multiplies the volume of the randomised tests (default 1).
set -euo pipefail
source "$(dirname "${BASH_SOURCE[0]}")/../compare/setup.sh"

require_packages "${program_packages[@]}" "${test_packages[@]}" "${bench_packages[@]}"
folder="$top/build-tests"
build "$folder" -DHERALDGAUGE_TESTS=ON -DHERALDGAUGE_BENCH=ON

log="$folder/tests.log"
status=0
ctest --test-dir "$folder" --output-on-failure --parallel "$(nproc)" 2>&1 | tee "$log" || status=$?

# The summary reads "97% tests passed, 3 tests failed out of 120".
summary=$(grep -E '^[0-9]+% tests passed' "$log" || true)
failed=$(sed -E 's/.*, ([0-9]+) tests? failed.*/\1/' <<<"$summary")
total=$(sed -E 's/.*out of ([0-9]+).*/\1/' <<<"$summary")
if [ -z "$summary" ] || [ "$total" -eq 0 ]; then
  echo "No test was run." >&2
  exit 1
fi
echo "$((total - failed)) passed, $failed failed"
exit "$status"
