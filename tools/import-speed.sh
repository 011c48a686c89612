#!/bin/sh
# Whole processes, in turn: the published program's inspect and pandas.read_csv on the same made file.
# Usage: tools/import-speed.sh PUBLISHED_PROGRAM [ROWS] [TIMES]; python3-pandas from the distribution must be installed.
set -eu
program=$1
rows=${2:-10000000}
times=${3:-7}
here=$(dirname "$0")
python=${PYTHON:-/usr/bin/python3}
file=$(mktemp --suffix=.csv)
figures=$(mktemp)
trap 'rm -f "$file" "$figures"' EXIT
dotnet run --project "$here/ImportSpeed" -c Release -- make plain "$rows" "$file"
cat "$file" > /dev/null
i=0
while [ "$i" -lt "$times" ]; do
    /usr/bin/time -a -o "$figures" -f "inspect %e %M" "$program" inspect "$file" > /dev/null
    /usr/bin/time -a -o "$figures" -f "pandas %e %M" "$python" -c "import pandas; pandas.read_csv('$file', header=None)"
    i=$((i + 1))
done
"$python" - "$figures" "$rows" <<'END'
import statistics
import sys

runs = {}
for line in open(sys.argv[1]):
    name, seconds, kilobytes = line.split()
    runs.setdefault(name, []).append((float(seconds), int(kilobytes) / 1024))
median = {name: statistics.median(s for s, _ in found) for name, found in runs.items()}
for name, found in runs.items():
    print(f"{name}: median {median[name]:.2f} s of {len(found)}, peak {max(m for _, m in found):.0f} MB")
kept = int(sys.argv[2]) * 8 / 2**20
print(f"{sys.argv[2]} rows: {median['pandas'] / median['inspect']:.1f} times faster; {max(m for _, m in runs['inspect']) - kept:.0f} MB beyond the {kept:.0f} MB of samples kept")
END
