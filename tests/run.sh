#!/bin/sh
# Installs what is missing, builds everything and runs every test.
# Usage: sh tests/run.sh [ctest arguments]     e.g. sh tests/run.sh -R structure
# Exit code 0 only when at least one test ran and none failed.
set -eu
top=$(cd "$(dirname "$0")/.." && pwd)

sh "$top/tests/install_packages.sh" build tests
cd "$top"
cmake --preset release --log-level=WARNING -D RAISER_TESTS=ON
cmake --build --preset release -j "$(nproc)"
ctest --preset release "$@"
