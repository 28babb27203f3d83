#!/usr/bin/env bash
# Plays each demo survey and compares what it prints with demo_projects/<name>/approved/.
# bash tests/cli/demo_approved_test.sh --approve takes what it prints now as approved.
set -euo pipefail
source_dir=$(cd "$(dirname "$0")/../.." && pwd)
nearpit=${NEARPIT:-$source_dir/build/dev/nearpit}
. "$source_dir/demo_projects/play.sh"

out=$(mktemp -d)
trap 'rm -rf "$out"' EXIT
different=0
demos=0
for plan in "$source_dir"/demo_projects/*/plan.json; do
  [ -e "$plan" ] || continue
  demo=$(dirname "$plan")
  name=$(basename "$demo")
  demos=$((demos + 1))
  play_demo "$nearpit" "$demo" "$out/$name" >"$out/$name.log" || {
    cat "$out/$name.log"
    echo "error: $name could not be played" >&2
    exit 1
  }
  for file in next.txt tally.txt tally.json; do
    if [ "${1:-}" = --approve ]; then
      mkdir -p "$demo/approved"
      cp "$out/$name/$file" "$demo/approved/$file"
    else
      diff -u --label "approved $name/$file" --label "printed $name/$file" "$demo/approved/$file" "$out/$name/$file" ||
        different=$((different + 1))
    fi
  done
done
[ "$demos" -gt 0 ] || {
  echo "error: demo_projects holds no demo" >&2
  exit 1
}
echo "$demos demos played, $different outputs differ"
[ "$different" -eq 0 ]
