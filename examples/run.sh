#!/bin/sh
# Installs what is missing, builds the program and solves the first example.
# Usage: sh examples/run.sh
# The results, the picture among them, go to examples/out/.
set -eu
top=$(cd "$(dirname "$0")/.." && pwd)

sh "$top/tests/install_packages.sh" build
cd "$top"
cmake --preset release --log-level=WARNING -D RAISER_TESTS=OFF  # the packages of the tests may be missing
cmake --build --preset release -j "$(nproc)" --target raiser
"$top/build/release/raiser" solve "$top/examples/hanger.toml" --out "$top/examples/out"
for picture in "$top"/examples/out/*.png; do
  if [ -f "$picture" ]; then echo "Picture: $picture"; fi
done
