#!/bin/sh
# Best times in turn, ours beside scipy's: the real transform at four lengths, and every harmonic quantity of a long record.
# Usage: tools/spectrum-speed.sh [SAMPLES]; python3-scipy from the distribution must be installed.
set -eu
here=$(dirname "$0")
samples=${1:-10000000}
python=${PYTHON:-/usr/bin/python3}
dotnet build "$here/SpectrumSpeed" -c Release -v q -nologo > /dev/null
ours="dotnet $here/../.artifacts/bin/SpectrumSpeed/release/SpectrumSpeed.dll"
file=$(mktemp)
trap 'rm -f "$file"' EXIT
$ours make "$samples" "$file"
# name, work, argument, times
compare() {
    mine="" theirs=""
    for round in 1 2 3; do
        mine="$mine $($ours "$2" "$3" "$4" 2> /dev/null)"
        theirs="$theirs $($python "$here/spectrum_speed.py" "$2" "$3" "$4" 2> /dev/null)"
    done
    echo "$mine /$theirs" | awk -v name="$1" '{ for (i = 1; i <= 3; i++) { if (i == 1 || $i < a) a = $i; if (i == 1 || $(i + 4) < b) b = $(i + 4) } printf "%s: ours %.2f ms, scipy %.2f ms, ours over scipy %.2f\n", name, a, b, a / b }'
}
compare "transform 2^16" transform 65536 60
compare "transform 2^20" transform 1048576 12
compare "transform 1000000" transform 1000000 12
compare "transform 999983" transform 999983 6
compare "$samples samples, harmonic quantities" harmonics "$file" 3
