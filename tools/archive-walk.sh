#!/usr/bin/env bash
# Walks the demo captures through the archive: added, found, trended, amended, exported, rebuilt, verified; then one byte is
# changed by hand, and found. Prints every command and what it said; ends with 0 where all came out as it should.
# Usage: tools/archive-walk.sh [PROGRAM], the built or published scopereader.
set -uo pipefail
cd "$(dirname "$0")/.."
program=${1:-src/.artifacts/bin/ScopeReader/release/scopereader}
[ -x "$program" ] || program=.artifacts/bin/ScopeReader/release/scopereader
folder=$(mktemp -d); trap 'rm -rf "$folder"' EXIT
archive=$folder/archive.db; failed=0

# run STATUS ARGUMENTS: shows a command, runs it, and notes a status that is another.
run() {
  local expected=$1; shift
  printf '\n$ scopereader %s\n' "${*//$folder\//}"
  "$program" "$@" --archive "$archive" --no-colour 2>&1 | sed "s#$folder/##g"
  local status=${PIPESTATUS[0]}
  [ "$status" -eq "$expected" ] || { echo "ended with $status, expected $expected"; failed=1; }
}
head_of() { "$program" archive stats --json --archive "$1" | sed -n 's/.*"head": "\(.*\)".*/\1/p'; }

year=2024
for source in 7 8 9; do
  run 0 archive add captures-demo/if-source-$source.csv --plan captures-demo/if-source.toml --serial "$source" --set supply=5V --captured $year-03-01
  year=$((year + 1))
done
run 0 archive add captures-demo/node-breadboard.csv captures-demo/node-soldered.csv --plan captures-demo/node.toml --tag node
run 0 archive add captures-demo/if-source-8.csv --plan captures-demo/if-source.toml
run 0 archive find --where '|frequency-error| > 20 ppm'
run 0 archive find --tag node --verdict fail
run 0 archive trend frequency-error --subject "455 kHz*"
run 0 archive amend 2 --set supply=5.1V --reason 'the meter was read wrong' --by bench
run 0 archive remeasure 1 2
run 0 archive extract 2 --output "$folder/original.csv"
cmp "$folder/original.csv" captures-demo/if-source-8.csv && echo "the same bytes as captures-demo/if-source-8.csv" || failed=1

head=$(head_of "$archive")
run 0 archive verify --head "$head"
run 0 archive export "$folder/export"
printf '\n$ scopereader archive import export --archive rebuilt.db\n'
"$program" archive import "$folder/export" --archive "$folder/rebuilt.db" || failed=1
[ "$(head_of "$folder/rebuilt.db")" = "$head" ] && echo "the rebuilt archive has the same head" || failed=1

# One byte of the second capture's packed form, changed where it lies in the file: behind its hash and length. Pages that were
# split keep dead copies further to the front.
hash=$(sha256sum captures-demo/if-source-8.csv) length=$(stat -c %s captures-demo/if-source-8.csv)
place=$(printf '%s%06x' "${hash:56:8}" "$length" | sed 's/../\\x&/g')
offset=$(LC_ALL=C grep -obUaP "$place" "$archive" | tail -1 | cut -d: -f1)
[ -n "$offset" ] || { echo "the capture was not found in the file"; exit 1; }
offset=$((offset + 400))
byte=$(od -An -tu1 -j "$offset" -N 1 "$archive" | tr -d ' ')
printf "\\x$(printf %02x $((byte ^ 1)))" | dd of="$archive" bs=1 seek="$offset" conv=notrunc status=none
printf '\nOne bit of the byte at %s of archive.db was changed by hand.\n' "$offset"
run 1 archive verify --head "$head"
run 3 archive extract 2 --output "$folder/damaged.csv"
[ "$failed" -eq 0 ] && echo && echo "all as it should be"
exit "$failed"
