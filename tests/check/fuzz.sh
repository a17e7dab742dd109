#!/bin/bash
# SPDX-License-Identifier: GPL-3.0-or-later
# fuzz.sh PROGRAM NAME SECONDS FOLDER: every committed input first, then new ones for a while. Inputs that break
# something stay in FOLDER; keep them in tests/fuzz/corpus/NAME and add a test that asserts the error they should give.
set -euo pipefail
program="$1" name="$2" seconds="$3" folder="$4/$2"
seeds="$(dirname "${BASH_SOURCE[0]}")/../fuzz/corpus/$name"
if [ -z "$(ls "$seeds" 2>/dev/null)" ]; then
    echo "no inputs in tests/fuzz/corpus/$name" >&2
    exit 1
fi
mkdir -p "$folder/found" "$folder/new"
options=(-timeout=10 -rss_limit_mb=2048 -artifact_prefix="$folder/found/")
if ! "$program" "${options[@]}" -runs=0 "$seeds" >"$folder/log" 2>&1 ||
    ! "$program" "${options[@]}" -max_total_time="$seconds" -seed=1 -jobs=0 "$folder/new" "$seeds" >>"$folder/log" 2>&1; then
    tail -60 "$folder/log"
    exit 1
fi
echo "$name: $(grep -E '^#[0-9]+.*(DONE|REDUCE|pulse|NEW)|^Done' "$folder/log" | tail -1)"
