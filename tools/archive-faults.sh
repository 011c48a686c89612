#!/usr/bin/env bash
# What the archive says where the place for it fails: a full disk, a read-only folder, a locked file, a damaged page, a newer
# version's archive. Each must be one line and status 3, and lose nothing. Needs the right to mount a small disk (root).
# Usage: tools/archive-faults.sh PROGRAM
set -uo pipefail
cd "$(dirname "$0")/.."
program=$1 failed=0
folder=$(mktemp -d); mkdir "$folder/small"
mount -t tmpfs -o size=600k none "$folder/small" || exit 1
trap 'umount "$folder/small"; rm -rf "$folder"' EXIT

# expect STATUS PATTERN ARGUMENTS: one line on standard error that matches.
expect() {
  local status=$1 pattern=$2; shift 2
  local said; said=$("$program" "$@" 2>&1 >/dev/null); local ended=$?
  echo "$ended: ${said//$folder\//}"
  [ "$ended" -eq "$status" ] && [ "$(printf '%s\n' "$said" | wc -l)" -eq 1 ] && [[ $said =~ $pattern ]] || { echo "  expected $status, one line: $pattern"; failed=1; }
}
add() { "$program" archive add "$@" --plan captures-demo/if-source.toml > "$folder/said"; }

archive=$folder/small/a.db
add captures-demo/if-source-7.csv --archive "$archive" || failed=1
head -c 8M /dev/zero > "$folder/small/filler" 2>/dev/null
expect 3 'the disk is full; nothing of this was written' archive add captures-demo/if-source-8.csv --plan captures-demo/if-source.toml --archive "$archive"
rm "$folder/small/filler"
"$program" archive verify --archive "$archive" | head -1
add captures-demo/if-source-8.csv --archive "$archive" && cat "$folder/said" | sed 's#.*/##' || failed=1

mount -o remount,ro "$folder/small"
expect 3 'read-only|cannot be opened' archive add captures-demo/if-source-9.csv --plan captures-demo/if-source.toml --archive "$archive"
"$program" archive find --archive "$archive" | tail -1
mount -o remount,rw "$folder/small"

cp "$archive" "$folder/newer.db"
printf '\x63' | dd of="$folder/newer.db" bs=1 seek=63 conv=notrunc status=none # the last byte of user_version
expect 3 'newer version' archive find --archive "$folder/newer.db"
expect 3 'newer version' archive add captures-demo/if-source-9.csv --archive "$folder/newer.db"

cp "$archive" "$folder/damaged.db"
for page in $(seq 2 12); do dd if=/dev/zero of="$folder/damaged.db" bs=4096 seek="$page" count=1 conv=notrunc status=none; done
expect 3 'damaged' archive show 1 --archive "$folder/damaged.db"
"$program" archive verify --archive "$folder/damaged.db" > "$folder/said"; [ $? -eq 1 ] || failed=1
[ "$failed" -eq 0 ] && echo "each fault is one line, and nothing was lost"
exit "$failed"
