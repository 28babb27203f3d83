#!/usr/bin/env bash
# bash demo_projects/run.sh [--no-window] [NAME…]: installs what is missing, builds nearpit, plays the demo surveys' days
# through it, shows which pits to dig next and the day's figures, says which files it wrote, and opens the window on the
# first of them where there is a display. OUT=folder writes elsewhere than build/demo.
set -euo pipefail
here=$(cd "$(dirname "$0")" && pwd)
. "$here/../tests/support/setup.sh"
. "$here/play.sh"

names=()
window=yes
for option in "$@"; do
  case $option in
    --no-window) window=no ;;
    -*) fail "unknown option '$option'; usage: bash demo_projects/run.sh [--no-window] [NAME…]" ;;
    *) [ -e "$here/$option/plan.json" ] || fail "no demo '$option'; there are: $(cd "$here" && ls -d */ | tr -d '/\n' )"
       names+=("$option") ;;
  esac
done
if [ "${#names[@]}" -eq 0 ]; then
  mapfile -t names < <(cd "$here" && for plan in */plan.json; do dirname "$plan"; done)
fi

say "Nearpit's demo surveys (invented places and finds): packages, build, then each survey day by day"
install_missing run
cd "$source_dir"
say "building nearpit in build/dev"
# Without the tests' packages the tests can't be configured; a tree that has them keeps them.
[ -e build/dev/build.ninja ] || configure dev -DNEARPIT_TESTS=OFF -DNEARPIT_BENCH=OFF
build dev nearpit

out=${OUT:-$source_dir/build/demo}
for name in "${names[@]}"; do
  say "$name: playing its days"
  play_demo "$source_dir/build/dev/nearpit" "$here/$name" "$out/$name" || fail "the demo '$name' stopped there"
  say "$name: pits to dig next"
  cat "$out/$name/next.txt"
  say "$name: the day's figures"
  cat "$out/$name/tally.txt"
done
say "written"
for name in "${names[@]}"; do
  printf '%s\n' "$out/$name/$name.gpkg" "$out/$name/next.txt" "$out/$name/tally.txt" "$out/$name/tally.json"
done

if [ "$window" = no ]; then
  exit 0
elif [ -z "${DISPLAY:-}${WAYLAND_DISPLAY:-}" ]; then
  say "no display is found, so no window is opened; on a desktop: build/dev/nearpit $out/${names[0]}/${names[0]}.gpkg"
else
  say "opening the window on ${names[0]}; close it to end"
  exec "$source_dir/build/dev/nearpit" "$out/${names[0]}/${names[0]}.gpkg"
fi
