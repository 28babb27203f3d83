# Sourced by tests/run.sh and demo_projects/run.sh: installs what is missing, configures, builds.
# shellcheck shell=bash

source_dir=$(cd "$(dirname "${BASH_SOURCE[0]}")/../.." && pwd)

say() { printf '== %s\n' "$*"; }
fail() {
  printf 'error: %s\n' "$*" >&2
  exit 1
}

# The packages of the named sections of .dependencies ([run], [test]), one a line.
packages_of() {
  awk -v wanted=" $* " '
    { sub(/#.*/, ""); gsub(/[ \t]/, "") }
    /^\[.*\]$/ { section = substr($0, 2, length($0) - 2); next }
    $0 != "" && index(wanted, " " section " ") { print }' "$source_dir/.dependencies"
}

# Those of the named packages that are not installed.
missing_of() {
  local installed
  installed=$(dpkg-query -W -f='${db:Status-Status} ${Package}\n' "$@" 2>/dev/null | sed -n 's/^installed //p' || true)
  comm -23 <(printf '%s\n' "$@" | sort -u) <(printf '%s\n' "$installed" | sort -u)
}

# Installs the packages of the named sections that are missing; asks the network for nothing when none is.
install_missing() {
  local packages missing as_root=()
  command -v dpkg-query >/dev/null && command -v apt-get >/dev/null ||
    fail "this needs Debian 12 with apt; install by hand: $(packages_of "$@" | tr '\n' ' ')"
  mapfile -t packages < <(packages_of "$@")
  mapfile -t missing < <(missing_of "${packages[@]}")
  if [ "${#missing[@]}" -eq 0 ]; then
    say "all ${#packages[@]} packages are installed"
    return
  fi
  say "installing ${#missing[@]} packages: ${missing[*]}"
  if [ "$(id -u)" -ne 0 ]; then
    command -v sudo >/dev/null ||
      fail "not root and no sudo; as root run: apt-get install ${missing[*]}"
    as_root=(sudo)
    [ -t 0 ] || as_root=(sudo -n)
  fi
  local log
  log=$(mktemp)
  if ! { "${as_root[@]}" apt-get update &&
    "${as_root[@]}" env DEBIAN_FRONTEND=noninteractive apt-get install -y --no-install-recommends "${missing[@]}"; } \
    >"$log" 2>&1 </dev/null; then
    tail -n 15 "$log" >&2
    rm -f "$log"
    fail "could not install: ${missing[*]} (network? package sources?)"
  fi
  rm -f "$log"
}

# configure PRESET [options]; quiet unless it fails.
configure() {
  local preset=$1 log
  shift
  log=$(mktemp)
  if ! cmake --preset "$preset" -S "$source_dir" "$@" >"$log" 2>&1; then
    cat "$log" >&2
    rm -f "$log"
    fail "could not configure build/$preset"
  fi
  rm -f "$log"
}

# build PRESET [targets]
build() {
  local preset=$1
  shift
  cmake --build "$source_dir/build/$preset" -j "$(nproc)" ${1:+--target "$@"} || fail "build/$preset does not compile"
}

# The project's C++ files, one a line.
cpp_files() {
  if [ -e "$source_dir/.git" ]; then
    git -c safe.directory='*' -C "$source_dir" ls-files --cached --others --exclude-standard -- '*.h' '*.cc'
  else
    (cd "$source_dir" && find src ui tests -name '*.h' -o -name '*.cc' 2>/dev/null)
  fi
}
