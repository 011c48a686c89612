#!/usr/bin/env bash
# Runs the README's measure command and puts what it prints into the README in place of what stood there.
set -euo pipefail
cd "$(dirname "$0")/.."
command=$(grep -m1 '^dotnet run .* measure' README.md)
printed=$(mktemp)
trap 'rm -f "$printed"' EXIT
NO_COLOR=1 COLUMNS=80 $command > "$printed"
awk -v command="$command" -v printed="$printed" '
  state == 2 && /^```$/ { state = 3 }
  state == 2 { next }
  { print }
  state == 1 && /^```$/ && ++fences == 2 { while ((getline line < printed) > 0) print line; state = 2 }
  $0 == command { state = 1 }
' README.md > "$printed.md"
cat "$printed.md" > README.md
rm -f "$printed.md"
