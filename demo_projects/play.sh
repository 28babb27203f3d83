# Sourced by demo_projects/run.sh and tests/cli/demo_approved_test.sh: plays one demo survey through the real program.
# shellcheck shell=bash

# play_demo NEARPIT DEMO OUT: makes OUT/<name>.gpkg from DEMO/plan.json, logs DEMO/day-1.csv, day-2.csv, …, takes
# day-k-act.json after its day, and writes next.txt, tally.txt and tally.json into OUT. Line 1 of clock.txt is the time at which the survey is made, line k+1 the evening of day k. Stops at the first
# command that fails.
play_demo() {
  local nearpit=$1 demo=$2 out=$3 name file day=1
  name=$(basename "$demo")
  file="$out/$name.gpkg"
  mkdir -p "$out"
  rm -f "$file" "$out"/next.txt "$out"/tally.txt "$out"/tally.json
  # The demo's writers are remembered beside its files, not among the user's own.
  local -x XDG_CONFIG_HOME="$out/config" NEARPIT_CLOCK
  rm -rf "$XDG_CONFIG_HOME"

  NEARPIT_CLOCK=$(demo_clock "$demo" 1) || return
  "$nearpit" new "$demo/plan.json" "$file" || return
  while [ -e "$demo/day-$day.csv" ]; do
    NEARPIT_CLOCK=$(demo_clock "$demo" $((day + 1))) || return
    "$nearpit" log "$file" "$demo/day-$day.csv" || return
    if [ -e "$demo/day-$day-act.json" ]; then
      "$nearpit" act "$file" "$demo/day-$day-act.json" || return
    fi
    day=$((day + 1))
  done
  "$nearpit" next "$file" >"$out/next.txt" || return
  "$nearpit" tally "$file" >"$out/tally.txt" || return
  "$nearpit" tally "$file" --json >"$out/tally.json" || return
  "$nearpit" check "$file"
}

# demo_clock DEMO LINE: that line of DEMO/clock.txt.
demo_clock() {
  local time
  time=$(sed -n "$2p" "$1/clock.txt")
  [ -n "$time" ] || {
    echo "error: $1/clock.txt has no line $2 (line 1 for 'new', line k+1 for day k)" >&2
    return 1
  }
  echo "$time"
}
