# Read by the scripts that set things up:  . docs/packages.sh; need_packages NAME...
# Installs those of the named Debian packages that are missing, after saying so. Needs root or
# sudo, and the network, only if one is missing.

need_packages() {
    if ! command -v dpkg-query >/dev/null; then
        echo "This is not a Debian system. Make sure that you have what Debian calls: $*"
        return 0
    fi
    missing=
    for package in "$@"; do
        state=$(dpkg-query -W -f='${db:Status-Status}' "$package" 2>/dev/null) || state=
        [ "$state" = installed ] || missing="$missing $package"
    done
    [ -n "$missing" ] || return 0
    echo "Installing these Debian packages:$missing"
    as_root=
    if [ "$(id -u)" -ne 0 ]; then
        as_root=sudo
        command -v sudo >/dev/null || {
            echo "That takes root or sudo. As root: apt-get install$missing" >&2
            return 1
        }
    fi
    $as_root apt-get update -q || return 1
    # Unquoted on purpose: one word a package.
    $as_root env DEBIAN_FRONTEND=noninteractive \
        apt-get install -q -y --no-install-recommends $missing
}
