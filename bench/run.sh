#!/usr/bin/env bash
# Builds and runs the speed comparison; every ratio comes from this one run. Options go to Google Benchmark.
set -euo pipefail
top=$(cd "$(dirname "$0")/.." && pwd)
build=${HERALDGAUGE_BENCH_BUILD:-$top/build-bench}
cmake -S "$top" -B "$build" -G Ninja -DCMAKE_BUILD_TYPE=Release -DHERALDGAUGE_BENCH=ON -DHERALDGAUGE_TESTS=OFF > /dev/null
cmake --build "$build" --target heraldgauge_bench > /dev/null
bench=$(find "$build" -name heraldgauge_bench -type f -perm -u+x | head -n 1)
"$bench" --benchmark_min_time=0.2 "$@"
