#!/usr/bin/env bash
# Publishes the native program and holds its JSON for every demo capture against the JIT's: every text equal, every
# number within 1e-12 of its size. Needs clang, zlib1g-dev and python3. Usage: tools/compare-published.sh [FOLDER]
set -euo pipefail
cd "$(dirname "$0")/.."
out=${1:-.artifacts/published}
dotnet publish src/ScopeReader -c Release -r linux-x64 -o "$out" --nologo -v quiet
dotnet build src/ScopeReader -c Release --nologo -v quiet
python3 - "$out/scopereader" .artifacts/bin/ScopeReader/release/scopereader.dll <<'PY'
import glob, json, os, subprocess, sys

native, jit = sys.argv[1:3]
captures = sorted(glob.glob("captures-demo/*.csv"))
worst, numbers, differences = 0.0, 0, []


def compare(place, a, b):
    global worst, numbers
    if isinstance(a, dict) and isinstance(b, dict) and list(a) == list(b):
        for key in a:
            compare(f"{place}.{key}", a[key], b[key])
    elif isinstance(a, list) and isinstance(b, list) and len(a) == len(b):
        for i, (x, y) in enumerate(zip(a, b)):
            compare(f"{place}[{i}]", x, y)
    elif type(a) in (int, float) and type(b) in (int, float):
        numbers += 1
        error = abs(a - b) / max(abs(a), abs(b)) if a != b else 0.0
        worst = max(worst, error)
        if error > 1e-12:
            differences.append(f"{place}: {a!r} and {b!r}")
    elif a != b:
        differences.append(f"{place}: {a!r} and {b!r}")


for capture in captures:
    plan = os.path.splitext(capture)[0] + ".toml"
    arguments = ["measure", capture, "--json", "--explain"] + (["--plan", plan] if os.path.exists(plan) else [])
    results = [subprocess.run(c + arguments, capture_output=True, text=True) for c in ([native], ["dotnet", jit])]
    if results[0].returncode != results[1].returncode:
        differences.append(f"{capture}: status {results[0].returncode} and {results[1].returncode}")
    compare(capture, json.loads(results[0].stdout), json.loads(results[1].stdout))

print(f"{len(captures)} captures, {numbers} numbers, largest relative difference {worst:.1e}")
for line in differences[:20]:
    print(line)
sys.exit(1 if differences or not captures else 0)
PY
