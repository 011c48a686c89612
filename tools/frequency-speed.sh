#!/usr/bin/env bash
# Times every frequency quantity of 10 million samples at 20 per period, sine and square, beside numpy and scipy doing the same.
# Needs /usr/bin/python3 with numpy and scipy, and 160 MB in a temporary folder. Build tools/FrequencySpeed first.
set -euo pipefail
cd "$(dirname "$0")/.."
folder=$(mktemp -d)
trap 'rm -rf "$folder"' EXIT
dotnet run --no-build -c Release --project tools/FrequencySpeed -- "$folder" > "$folder/own"
for wave in sine square; do /usr/bin/python3 tools/reference/frequency.py "$folder/$wave.f64" $wave; done > "$folder/numpy"
join "$folder/own" "$folder/numpy" | awk '{ printf "%s: %.2f s; numpy and scipy %.2f s, %.1f times as long (frequencies %s by %s, and %s)\n", $1, $2, $5, $5 / $2, $3, $4, $6 }'
