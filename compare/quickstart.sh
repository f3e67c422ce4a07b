#!/usr/bin/env bash
# From a fresh clone to certified numbers: installs what is missing, builds the program, shows what it is for.
set -euo pipefail
source "$(dirname "${BASH_SOURCE[0]}")/setup.sh"

require_packages "${program_packages[@]}"
folder="$top/build-quickstart"
log="$folder/quickstart.log"
mkdir -p "$folder"
echo "Building (log: $log) ..."
build "$folder" -DHERALDGAUGE_TESTS=OFF >"$log" 2>&1 || { tail -n 30 "$log" >&2; exit 1; }

demo="$top/compare/demo"
report="$folder/fibre_line.json"
"$folder/heraldgauge_demo" "$demo/fibre_line.toml" "$demo/direct_link.toml"
"$folder/heraldgauge" enclose "$demo/fibre_line.toml" --format json --output "$report" \
  --certificate "$folder/fibre_line.certificate.json"
echo
echo "What shortcuts would have cost on this line (relative errors of the herald probability, certified):"
"$folder/heraldgauge" ledger "$demo/fibre_line.toml" --quantity herald_probability --shortcut pair-cutoff=2 \
  --shortcut single-pair --shortcut linear-loss --shortcut herald-product --shortcut linear-dark \
  --shortcut subset-sum-binary64
echo
echo "Report:      $report"
echo "Certificate: $folder/fibre_line.certificate.json"
echo "Try:         $folder/heraldgauge enclose $demo/fibre_line.toml --digits 50"
