#!/bin/sh
# Golden files: tests/cli/golden/*.golden. A line "$ COMMAND" is a command; what stands below it is
# what it must print: standard output after two blanks, standard error after "! ", the exit code
# after "= " when it is not 0. Lines "# ..." and blank lines are comments.
#   golden.sh PROGRAM_DIR SOURCE_DIR            compares
#   golden.sh PROGRAM_DIR SOURCE_DIR --update   rewrites the files (then read the difference)
set -u
PATH=$1:$PATH
export PATH
unset NO_COLOR
cd "$2" || exit 2
work=$(mktemp -d) || exit 2
trap 'rm -rf "$work"' EXIT
failed=0
count=0
for golden in tests/cli/golden/*.golden; do
    while IFS= read -r line; do
        case $line in
        '$ '*)
            printf '%s\n' "$line"
            W=$work/scratch sh -c "rm -rf \"\$W\"; mkdir \"\$W\"; ${line#??}" >"$work/out" 2>"$work/err" </dev/null
            code=$?
            sed 's/^/  /' "$work/out"
            # times differ from run to run
            sed -e 's/ in [0-9.]* s, .*/ in (time)/' -e 's/ in [0-9.]* s$/ in (time)/' \
                -e "s|$work/scratch|(scratch)|g" -e 's/^/! /' "$work/err"
            [ "$code" -eq 0 ] || printf '= %s\n' "$code"
            printf x >>"$work/count"
            ;;
        '#'* | '') printf '%s\n' "$line" ;;
        esac
    done <"$golden" >"$work/actual"
    if [ "${3-}" = --update ]; then
        cp "$work/actual" "$golden"
    elif ! diff -u "$golden" "$work/actual"; then
        failed=$((failed + 1))
    fi
done
count=$(wc -c <"$work/count")
echo "$count commands, $failed files differ"
[ "$failed" -eq 0 ] && [ "$count" -gt 0 ]
