#!/usr/bin/env bash
# bash tests/run.sh [--asan]: installs what the tests need, builds, checks format and clang-tidy's short list, runs every
# test. With --asan all of it is built and run with the address and undefined behaviour sanitizers instead (build/asan);
# the benchmarks are then left out. Exit 0 when all pass.
set -euo pipefail
. "$(dirname "$0")/support/setup.sh"
cd "$source_dir"

with_asan=no
for option in "$@"; do
  case $option in
    --asan) with_asan=yes ;;
    *) fail "unknown option '$option'; usage: bash tests/run.sh [--asan]" ;;
  esac
done

failures=()
passed=0
failed=0

check_format() {
  say "format: clang-format over every .h and .cc"
  cpp_files | xargs -r -P "$(nproc)" -n 20 clang-format --dry-run -Werror ||
    failures+=("format (mend with: git ls-files '*.h' '*.cc' | xargs clang-format -i)")
}

check_tidy() {
  say "clang-tidy: the short list of .clang-tidy over src"
  /usr/bin/python3 tests/support/tidy.py "build/$1" || failures+=("clang-tidy")
}

# run_tests PRESET: all tests of that build, in parallel; shows what failed and adds to passed and failed.
run_tests() {
  local preset=$1 log="build/$1/tests.log" not_passed=0 all=0
  say "tests of build/$preset"
  if ! ctest --preset "$preset" -j "$(nproc)" >"$log" 2>&1 </dev/null; then
    failures+=("tests of build/$preset")
    grep -Ev '^ *Start +[0-9]+:|^ *[0-9]+/[0-9]+ Test.* Passed ' "$log" | tail -n 500
  fi
  read -r not_passed all < <(sed -n 's/.*tests passed, \([0-9]*\) tests failed out of \([0-9]*\).*/\1 \2/p' "$log") || true
  [ "${all:-0}" -gt 0 ] || failures+=("build/$preset ran no test")
  failed=$((failed + ${not_passed:-0}))
  passed=$((passed + ${all:-0} - ${not_passed:-0}))
}

started=$SECONDS
say "Nearpit's tests: packages, build, format, clang-tidy, tests"
install_missing run test
check_format
preset=dev
bench=ON
if [ "$with_asan" = yes ]; then
  preset=asan
  bench=OFF
fi
say "building build/$preset"
configure "$preset" -DNEARPIT_TESTS=ON -DNEARPIT_BENCH=$bench
build "$preset"
run_tests "$preset"
check_tidy "$preset"

say "took $((SECONDS - started)) s"
for failure in ${failures[@]+"${failures[@]}"}; do
  printf 'FAILED: %s\n' "$failure" >&2
done
echo "$passed passed, $failed failed"
[ "${#failures[@]}" -eq 0 ]
