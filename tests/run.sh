#!/bin/sh
# Builds slipcase and runs its tests.
#
#     sh tests/run.sh          the tests that need nothing but the packages of the build
#     sh tests/run.sh --all    also those that compare with other programs and libraries
#
# Installs the Debian packages that are missing, and says which. A second run needs no network.
# SLIP_LONG=1 in the environment makes the exhaustive tests go further (many minutes).
set -eu
cd "$(dirname "$0")/.."

build_packages="gcc libc6-dev make cmake libgmp-dev uthash-dev libcmocka-dev"
extra_packages="python3 python3-networkx python3-jsonschema libflint-dev"

case "$#:${1-}" in
0:) all=no ;;
1:--all) all=yes ;;
*)
    echo "usage: sh tests/run.sh [--all]" >&2
    exit 2
    ;;
esac

. docs/packages.sh
need_packages $build_packages
if [ $all = yes ]; then
    need_packages $extra_packages
fi

echo "Building in build/"
cmake -S . -B build -DCMAKE_BUILD_TYPE=Release -DSLIP_TESTS=ON >/dev/null
cmake --build build --parallel "$(nproc)"

echo "Testing"
status=0
if [ $all = yes ]; then
    ctest --test-dir build --output-on-failure --parallel "$(nproc)" || status=$?
else
    ctest --test-dir build --output-on-failure --parallel "$(nproc)" --label-exclude extra ||
        status=$?
fi

# ctest has named the skipped tests of its own run; here are those that it was not asked for.
echo
if [ $all = no ]; then
    echo "Not run without --all (needs $extra_packages):"
    ctest --test-dir build --show-only --label-regex extra | sed -n 's/^ *Test *#[0-9]*: /    /p'
fi
[ -n "${SLIP_LONG-}" ] || echo "Not run without SLIP_LONG=1: the long parts of the exhaustive tests."
exit $status
