# packages.sh - Debian packages by name: what is missing, and installing it.
#
# Source it, then: need PACKAGE... || exit 3

# What it takes to build the library and the program.
build_packages='gcc libc6-dev meson ninja-build pkgconf libgsl-dev
libudunits2-dev libyaml-dev libjansson-dev libnetcdf-dev'

missing_packages() {
    for package in "$@"; do
        dpkg-query -W -f '${db:Status-Status}\n' "$package" 2>/dev/null |
            grep -qx installed || printf ' %s' "$package"
    done
}

# Installs what is missing. Without root, or without Debian's tools, says what
# to install and fails. Asks the network for nothing when nothing is missing.
need() {
    missing=$(missing_packages "$@")
    [ -n "$missing" ] || return 0
    if [ "$(id -u)" -ne 0 ] || ! command -v apt-get >/dev/null; then
        echo "Packages are missing. As root, on Debian 12, run:" >&2
        echo "    apt-get install$missing" >&2
        return 1
    fi
    echo "Installing:$missing" >&2
    export DEBIAN_FRONTEND=noninteractive
    { apt-get -qq update && apt-get -qq -y --no-install-recommends install \
        $missing; } >&2 </dev/null
}
