#!/bin/sh
# Whole processes: the published program's inspect on the same samples in every shape, by decoded byte, against the plain one.
# Usage: tools/import-shapes.sh PUBLISHED_PROGRAM [ROWS] [TIMES]
set -eu
program=$1
rows=${2:-3000000}
times=${3:-5}
here=$(dirname "$0")
folder=$(mktemp -d)
trap 'rm -rf "$folder"' EXIT
dotnet build "$here/ImportSpeed" -c Release -v q -nologo > /dev/null
maker="dotnet run --no-build --project $here/ImportSpeed -c Release --"
shapes=$($maker shapes)
for shape in $shapes; do $maker make "$shape" "$rows" "$folder/$shape"; done
i=0
while [ "$i" -lt "$times" ]; do
    for shape in $shapes; do
        /usr/bin/time -a -o "$folder/figures" -f "$shape %e %U %S" "$program" inspect "$folder/$shape" > /dev/null
    done
    i=$((i + 1))
done
"${PYTHON:-/usr/bin/python3}" - "$folder" <<'END'
import gzip
import os
import statistics
import sys

folder = sys.argv[1]
runs = {}
for line in open(f"{folder}/figures"):
    shape, wall, user, system = line.split()
    runs.setdefault(shape, []).append((float(wall), float(user) + float(system)))

def decoded(shape):
    if shape == "gzip":
        with gzip.open(f"{folder}/{shape}") as text:
            return sum(len(block) for block in iter(lambda: text.read(1 << 20), b""))
    size = os.path.getsize(f"{folder}/{shape}")
    return size // 2 if shape == "utf16" else size

cost = {shape: [statistics.median(column) / decoded(shape) * 1e9 for column in zip(*found)] for shape, found in runs.items()}
print("| shape | ns a decoded byte | x plain | processor, ns | x plain |\n|---|---|---|---|---|")
for shape, (wall, used) in cost.items():
    print(f"| {shape} | {wall:.2f} | {wall / cost['plain'][0]:.1f} | {used:.2f} | {used / cost['plain'][1]:.1f} |")
END
