# SPDX-License-Identifier: GPL-3.0-or-later
# Sourced by app/run and tests/run: where things are, and the packages they need. Needs `top`, the project's folder.

# One build folder a user: files built as root would stop everyone else.
if [ -e "$top/.build" ] && [ ! -O "$top/.build" ]; then
    build_root="$top/.build-$(id -u)"
else
    build_root="$top/.build"
fi

# Objects are found again from any clone: paths are taken relative to the clone, the compiler by what it is.
export CCACHE_BASEDIR="${CCACHE_BASEDIR:-$top}" CCACHE_NOHASHDIR=1 CCACHE_COMPILERCHECK=content

# packages_for WHO...: the packages of the list that these need.
packages_for() {
    local who
    for who in "$@"; do
        awk -v who="$who" '$1 == who { print $2 }' "$top/resources/system-packages"
    done
}

# missing_packages PACKAGE...: those that are not installed.
missing_packages() {
    local installed
    installed=$(dpkg-query -W -f '${db:Status-Abbrev} ${Package}\n' "$@" 2>/dev/null | awk '$1 == "ii" { print $2 }' || true)
    printf '%s\n' "$@" | grep -vxF -e "$installed" || true
}

# install_packages WHO...: installs what is missing, or says the exact line and exits with status 3.
install_packages() {
    if ! command -v dpkg-query >/dev/null || ! command -v apt-get >/dev/null; then
        echo "This is not Debian: install what resources/system-packages lists by hand." >&2
        exit 3
    fi
    local wanted missing as_root=()
    mapfile -t wanted < <(packages_for "$@")
    mapfile -t missing < <(missing_packages "${wanted[@]}")
    [ "${#missing[@]}" -gt 0 ] || return 0

    local options=(-y --no-install-recommends -o DPkg::Lock::Timeout=300 -o Acquire::Retries=3)
    echo "Missing packages, to be installed with apt-get: ${missing[*]}"
    if [ "$(id -u)" -ne 0 ]; then
        if ! command -v sudo >/dev/null || ! sudo -v; then
            echo "They need an administrator. Run this, then start again:" >&2
            echo "  apt-get update && apt-get install --no-install-recommends ${missing[*]}" >&2
            exit 3
        fi
        as_root=(sudo)
    fi
    as_root+=(env DEBIAN_FRONTEND=noninteractive)
    if ! "${as_root[@]}" apt-get install "${options[@]}" "${missing[@]}"; then
        # Old package lists name files that are gone; a machine never updated has none at all.
        "${as_root[@]}" apt-get update -o DPkg::Lock::Timeout=300 -o Acquire::Retries=3
        "${as_root[@]}" apt-get install "${options[@]}" "${missing[@]}"
    fi
    mapfile -t missing < <(missing_packages "${wanted[@]}")
    if [ "${#missing[@]}" -gt 0 ]; then
        echo "Still missing after the installation: ${missing[*]}" >&2
        exit 3
    fi
}

# configure FOLDER OPTION...: configures a build once; a changed option list configures it again.
configure() {
    local folder="$1" stamp
    shift
    stamp="$folder/.options"
    if [ ! -f "$folder/build.ninja" ] || [ "$(cat "$stamp" 2>/dev/null)" != "$*" ]; then
        cmake -S "$top" -B "$folder" -G Ninja "$@"
        echo "$*" >"$stamp"
    fi
}
