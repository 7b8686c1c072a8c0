#!/bin/sh
# Runs every command that README.md, DEVELOPERS.md and docs/*.md show in a block
#     ```console
#     $ COMMAND
#     what it prints
#     ```
# and compares what it prints (standard output, then standard error; times left out).
#   console.sh PROGRAM_DIR SOURCE_DIR            compares
#   console.sh PROGRAM_DIR SOURCE_DIR --update   rewrites the pages (then read the difference)
set -u
PATH=$1:$PATH
export PATH
cd "$2" || exit 2
work=$(mktemp -d) || exit 2
trap 'rm -rf "$work"' EXIT
times='s/ in [0-9.]* s, .*results a second$/ in (time)/; s/ in [0-9.]* s$/ in (time)/'
failed=0
for page in README.md DEVELOPERS.md docs/*.md; do
    [ -f "$page" ] || continue
    block=no
    while IFS= read -r line; do
        case $block$line in
        no'```console') block=yes && printf '%s\n' "$line" ;;
        yes'```') block=no && printf '%s\n' "$line" ;;
        yes'$ '*)
            printf '%s\n' "$line"
            sh -c "${line#??}" >"$work/out" 2>"$work/err" </dev/null
            cat "$work/out" "$work/err"
            printf x >>"$work/count"
            ;;
        yes*) ;;
        *) printf '%s\n' "$line" ;;
        esac
    done <"$page" >"$work/actual"
    if [ "${3-}" = --update ]; then
        cp "$work/actual" "$page"
        continue
    fi
    sed "$times" "$page" >"$work/wanted"
    sed "$times" "$work/actual" >"$work/got"
    diff -u --label "$page" --label "what it prints" "$work/wanted" "$work/got" ||
        failed=$((failed + 1))
done
echo "$(wc -c <"$work/count") commands, $failed pages differ"
[ "$failed" -eq 0 ]
