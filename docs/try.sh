#!/bin/sh
# Builds slipcase and runs its main job on the demo batch: how many different orders come out when
# one, two or three elements are inserted into each.
#
#     sh docs/try.sh
#
# Installs the Debian packages of the build that are missing, and says which.
set -eu
cd "$(dirname "$0")/.."

. docs/packages.sh
need_packages gcc libc6-dev make cmake libgmp-dev uthash-dev

echo "Building in build/"
tests=
[ -e build/CMakeCache.txt ] || tests=-DSLIP_TESTS=OFF # a build that is there stays as it is
cmake -S . -B build -DCMAKE_BUILD_TYPE=Release $tests >/dev/null
cmake --build build --parallel "$(nproc)" --target slipcase >/dev/null

echo "build/slipcase count -r 1..3 --file fixtures/shelves.txt"
echo
exec build/slipcase count -r 1..3 --file fixtures/shelves.txt
