#!/bin/sh
# Runs a check that is written in Python:  run.sh CHECK.py PROGRAM
# Debian's own interpreter first, since that is the one that finds Debian's packages.
for python in /usr/bin/python3 python3; do
    command -v "$python" >/dev/null && exec "$python" "$@"
done
echo "skipped: python3 is not installed"
exit 77
