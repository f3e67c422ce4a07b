#!/usr/bin/env bash
# Who may include whom. The reference and the fast evaluator share nothing but the model, or their agreement would prove
# nothing; reports compute nothing; heavy libraries stay out of headers; only the command line prints or exits.
set -uo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
found=0

# sources FOLDER...: the C++ files in them.
sources() { git ls-files -co --exclude-standard -- "$@" | grep -E '\.(cpp|hpp)$'; }

# includes_beyond ALLOWED FOLDER: the includes of project files whose path does not begin with ALLOWED.
includes_beyond() { sources "$2" | xargs grep -nE '^ *#include "' | grep -vE "#include \"$1/"; }

# forbid WHY LINES: reports the lines, if there are any.
forbid() {
  [ -z "$2" ] && return
  printf '%s:\n%s\n' "$1" "$2"
  found=1
}

forbid "reference/model includes more than itself" "$(includes_beyond reference/model reference/model)"
forbid "reference includes more than itself" "$(includes_beyond reference reference)"
forbid "fast includes more than itself and the model" "$(includes_beyond '(fast|reference/model)' fast)"
forbid "reports include more than themselves and the model" "$(includes_beyond '(reports|reference/model)' reports)"
forbid "compare includes what it may not" "$(includes_beyond '(compare|reference|fast|reports)' compare)"
forbid "reports have the means to compute" "$(sources reports |
  xargs grep -nE '#include (<(cmath|numeric|gmp\.h|gmpxx\.h|mpfr\.h|mpfi\.h)>|"reference/model/(real|rational|chain)\.hpp")')"
forbid "a header includes a heavy library" "$(sources reference fast reports compare | grep '\.hpp$' |
  xargs grep -nE '#include <(boost|Eigen|toml\+\+|nlohmann|CLI|tbb|fmt)/')"
forbid "CLI11 is included more than once" "$(sources compare | xargs grep -lE '#include <CLI/' | sed 1d)"
forbid "prints or exits outside compare/cli" "$(sources reference fast reports compare | grep -v '^compare/cli/' |
  xargs grep -nE 'std::(cout|cerr|clog)|\b(f?printf|puts|exit|abort)\(|fmt::print')"

exit "$found"
