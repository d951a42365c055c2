#!/usr/bin/env bash
# Ends a rehearsal by each signal while it runs, and looks whether it ended in order: exit code 0, the summary says so, every decision has
# its outcome, and nothing was sent.
# usage: tools/ends.sh      (about 15 s)
set -euo pipefail
cd "$(dirname "$0")/.."
out=$(mktemp -d)
trap 'rm -rf "$out"' EXIT

dotnet build src/LiveWave.App -c Release -v quiet --nologo
program=artifacts/bin/LiveWave.App/release/livewave

failed=0
for signal in INT TERM HUP; do
    # A shell starts background jobs deaf to INT; a terminal does not.
    env "--default-signal=$signal" "$program" demo --clock real --out "$out/$signal" > "$out/$signal.txt" 2> "$out/$signal.err" &
    process=$!
    for _ in $(seq 100); do                       # until the first decision stands in its table, 20 s at most
        [ -f "$out/$signal/decisions.tsv" ] && [ "$(wc -l < "$out/$signal/decisions.tsv")" -gt 1 ] && break
        sleep 0.2
    done
    kill "-$signal" "$process"
    code=0
    wait "$process" || code=$?
    decisions=$(($(wc -l < "$out/$signal/decisions.tsv") - 1))
    outcomes=$(($(wc -l < "$out/$signal/outcomes.tsv") - 1))
    if [ "$code" -ne 0 ] || ! grep -q 'stopped early' "$out/$signal.txt" || [ -f "$out/$signal/crash.txt" ] \
        || [ "$decisions" -lt 1 ] || [ "$outcomes" -ne "$decisions" ] || cut -f 3 "$out/$signal/outcomes.tsv" | grep -qx sent; then
        echo "SIG$signal: exit code $code, $decisions decisions, $outcomes outcomes" >&2
        cat "$out/$signal.txt" "$out/$signal.err" >&2
        failed=1
    fi
done

[ "$failed" -eq 0 ] && echo "ended in order by INT, TERM and HUP"
exit "$failed"
