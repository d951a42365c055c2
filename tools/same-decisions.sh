#!/usr/bin/env bash
# Holds the law of decisions between processes: the same recording gives the same decisions.tsv and events.tsv, byte for byte, at the
# recording's own pace and as fast as possible, in any block size, with narrower vectors, and under a locale with a decimal comma.
# usage: tools/same-decisions.sh [SECONDS]   (default 5; the run in real time takes as many)
set -euo pipefail
cd "$(dirname "$0")/.."
seconds=${1:-5}
out=$(mktemp -d)
trap 'rm -rf "$out"' EXIT

dotnet build src/LiveWave.App -c Release -v quiet --nologo
program=artifacts/bin/LiveWave.App/release/livewave

session() {   # NAME SETTING... -- OPTION...
    local name=$1 settings=()
    shift
    while [ "$1" != "--" ]; do settings+=("$1"); shift; done
    shift
    env "${settings[@]}" "$program" demo --seconds "$seconds" --json --out "$out/$name" "$@" > "$out/$name.json"
}

vector_bits() { sed -n 's/^ *"vectorBits": \([0-9]*\).*/\1/p' "$out/$1/session.json"; }

session fast -- --clock fast
lines=$(($(wc -l < "$out/fast/decisions.tsv") - 1))
if [ "$lines" -lt 1 ]; then
    echo "no decision within $seconds s: nothing was compared" >&2
    exit 1
fi

failed=0
compare() {
    for table in decisions.tsv events.tsv; do
        if ! cmp -s "$out/fast/$table" "$out/$1/$table"; then
            echo "$1: $table differs" >&2
            failed=1
        fi
    done
    if [ "$(sed -n 's/.*"numericsPrint": "\(.*\)".*/\1/p' "$out/$1/session.json")" != "$(sed -n 's/.*"numericsPrint": "\(.*\)".*/\1/p' "$out/fast/session.json")" ]; then
        echo "$1: another numerics print" >&2
        failed=1
    fi
}

session real -- --clock real
session one-row -- --clock fast --block-rows 1
session long-blocks -- --clock fast --block-rows 1000
session without-avx512 DOTNET_EnableAVX512=0 -- --clock fast
session without-avx2 DOTNET_EnableAVX2=0 -- --clock fast
session without-vectors DOTNET_EnableHWIntrinsic=0 -- --clock fast
session comma-locale LC_ALL=de_DE.UTF-8 LANG=de_DE.UTF-8 -- --clock fast
for name in real one-row long-blocks without-avx512 without-avx2 without-vectors comma-locale; do compare "$name"; done

# The settings must have taken effect, or the comparison above says nothing.
if [ "$(vector_bits fast)" -ge 512 ] && [ "$(vector_bits without-avx512)" -ge 512 ]; then
    echo "DOTNET_EnableAVX512=0 had no effect" >&2
    failed=1
fi
if [ "$(vector_bits fast)" -ge 256 ] && [ "$(vector_bits without-avx2)" -ge 256 ]; then
    echo "DOTNET_EnableAVX2=0 had no effect" >&2
    failed=1
fi
if [ "$(vector_bits without-vectors)" -gt 64 ]; then
    echo "DOTNET_EnableHWIntrinsic=0 had no effect" >&2
    failed=1
fi

[ "$failed" -eq 0 ] && echo "the same $lines decisions in 8 processes ($seconds s of the demo; $(vector_bits fast), $(vector_bits without-avx512), $(vector_bits without-avx2) and $(vector_bits without-vectors) bit vectors)"
exit "$failed"
