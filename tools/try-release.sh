#!/usr/bin/env bash
# Unpacks the linux-x64 archive and runs its demo where neither the SDK nor a network is: an empty environment, and a network namespace
# without a route where the machine lets us make one.
# usage: tools/try-release.sh
set -euo pipefail
cd "$(dirname "$0")/.."
bash tools/release.sh linux-x64
(cd artifacts/release && grep linux-x64 SHA256SUMS | sha256sum --check --quiet)

place=$(mktemp -d)
trap 'rm -rf "$place"' EXIT
tar -C "$place" -xzf artifacts/release/livewave-*-linux-x64.tar.gz
alone=(env -i PATH=/usr/bin:/bin HOME="$place")
if unshare --net true 2>/dev/null; then
    alone=(unshare --net "${alone[@]}")
else
    echo "no network namespace can be made here: tried with the network at hand"
fi

(cd "$place" && "${alone[@]}" "$place"/livewave-*-linux-x64/livewave demo --seconds 12 --out "$place/session" > "$place/summary.txt")
grep -q 'strong planar waves found' "$place/summary.txt"
[ -s "$place/session/decisions.tsv" ]
echo "the unpacked release ran its demo: $(($(wc -l < "$place/session/decisions.tsv") - 1)) decisions in 12 s of the recording"
