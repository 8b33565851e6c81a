# Sourced by scripts/run and scripts/test: installs what is needed, configures, builds.

set -euo pipefail
root=$(cd "$(dirname "${BASH_SOURCE[0]}")/.." && pwd)
install=yes

say() { printf '%s\n' "$*" >&2; }
die() { say "$0: $1"; exit "${2:-1}"; }

# packages TIER...: the packages of those tiers.
packages() {
  awk -v tiers=" $* " '
    /^# tier:/ { wanted = index(tiers, " " $3 " ") > 0; next }
    /^[^#]/ && wanted { print $1 }' "$root/scripts/packages.txt"
}

# Of the packages named, those that are not installed.
missing() {
  local name
  for name in "$@"; do
    [ "$(dpkg-query -W -f '${db:Status-Abbrev}' "$name" 2>/dev/null)" = "ii " ] || printf '%s ' "$name"
  done
}

# need TIER...: installs what is missing of the tiers, or says what to install.
need() {
  command -v dpkg-query >/dev/null || {
    say "This is no Debian: packages are not looked after here. scripts/packages.txt lists what is needed."
    return
  }
  local names become=()
  read -ra names <<<"$(missing $(packages "$@"))"
  [ ${#names[@]} -gt 0 ] || return 0
  if [ "$(id -u)" != 0 ]; then
    if [ "$install" = yes ] && command -v sudo >/dev/null && sudo -n true 2>/dev/null; then become=(sudo); else install=no; fi
  fi
  [ "$install" = yes ] || die "packages are missing, and this run may not install them. Have them installed with:
  apt-get install ${names[*]}" 4
  say "Installing ${names[*]}"
  "${become[@]}" apt-get update -qq || die "the list of packages cannot be fetched; is there a network?" 4
  "${become[@]}" env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "${names[@]}" >/dev/null ||
    die "the packages cannot be installed" 4
}

# build FOLDER CMAKE-OPTION...: configures and builds.
build() {
  local folder=$1
  shift
  cmake -S "$root" -B "$folder" -G Ninja "$@" >"$folder.log" 2>&1 || { cat "$folder.log" >&2; die "the build cannot be configured"; }
  cmake --build "$folder" || die "the build failed"
}
