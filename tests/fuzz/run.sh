#!/bin/sh
# Fuzzes the case reader, or with "dxf" the import of drawings, for the given
# number of seconds (default 60), starting from the stored corpus. New inputs
# stay in build/fuzz/corpus-*; a finding stops the run and its file is named:
# once mended, copy it to tests/fuzz/corpus or tests/fuzz/drawings, where the
# unit tests replay it for ever.
set -eu
top=$(cd "$(dirname "$0")/../.." && pwd)
build=${RAISER_FUZZ_BUILD:-$top/build/fuzz}
seconds=${1:-60}
path=${2:-case}
cmake -S "$top/tests/fuzz" -B "$build" -G Ninja -DCMAKE_BUILD_TYPE=None \
  -DCMAKE_CXX_COMPILER="${CXX:-clang++-14}" -DCMAKE_EXPORT_COMPILE_COMMANDS=OFF >/dev/null
cmake --build "$build" -t "${path}_fuzzer"
mkdir -p "$build/corpus-$path" "$build/findings"
case $path in
  case) seeds="$top/tests/fuzz/corpus $top/tests/io/cases/good $top/tests/io/cases/bad $top/examples" ;;
  dxf) seeds="$top/tests/fuzz/drawings $top/tests/io/cases/drawings" ;;
esac
# shellcheck disable=SC2086
exec nice "$build/${path}_fuzzer" -max_total_time="$seconds" -max_len=4096 -timeout=10 -rss_limit_mb=1500 \
  -dict="$top/tests/fuzz/$path.dict" -artifact_prefix="$build/findings/" -print_final_stats=1 \
  "$build/corpus-$path" $seeds
