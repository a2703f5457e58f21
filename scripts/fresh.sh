#!/usr/bin/env bash
# Shows both commands on a Debian 12 with nothing installed: a debootstrap chroot, with this machine's Node.js, package
# sources, certificates and npm configuration copied in at run time. As root: scripts/fresh.sh [folder]
set -euo pipefail
root=${1:-$(mktemp -d)/debian}
here=$(cd "$(dirname "$0")/.." && pwd)
node=$(dirname "$(dirname "$(readlink -f "$(command -v node)")")")

mirror=$(apt-get indextargets --format '$(REPO_URI)' 'Created-By: Packages' 'Codename: bookworm' | awk 'NR == 1')
debootstrap --variant=minbase --include=ca-certificates,git,procps bookworm "$root" "$mirror"
rm -f "$root/etc/apt/sources.list"
cp -a /etc/apt/. "$root/etc/apt/"
cp -a /etc/ssl/certs/. "$root/etc/ssl/certs/" 2>/dev/null || true
cp /etc/resolv.conf /etc/hosts "$root/etc/" 2>/dev/null || true
mkdir -p "$root/opt/node" "$root/root"
mkdir -p "$root/opt/node/bin" "$root/opt/node/lib/node_modules"
cp -L "$(command -v node)" "$root/opt/node/bin/node"
cp -a "$node/lib/node_modules/npm" "$root/opt/node/lib/node_modules/"
ln -s ../lib/node_modules/npm/bin/npm-cli.js "$root/opt/node/bin/npm"
ln -s ../lib/node_modules/npm/bin/npx-cli.js "$root/opt/node/bin/npx"
for file in "$HOME/.npmrc" /etc/npmrc; do [ -f "$file" ] && cp "$file" "$root/root/.npmrc" && break; done
git clone -q "$here" "$root/root/thirdhand"
mount -t proc proc "$root/proc"
mount --bind /dev "$root/dev"
trap 'umount "$root/dev" "$root/proc"' EXIT

inside() { chroot "$root" /usr/bin/env -i HOME=/root PATH=/opt/node/bin:/usr/local/bin:/usr/sbin:/usr/bin:/sbin:/bin NODE_EXTRA_CA_CERTS=/etc/ssl/certs/ca-certificates.crt http_proxy="${http_proxy:-}" https_proxy="${https_proxy:-}" bash -c "cd /root/thirdhand && $1"; }

echo "== npm start"
start=0
inside 'apt-get update -qq; set -m; npm start > /tmp/start.log 2>&1 & echo $! > /tmp/start.pid; for i in $(seq 600); do node -e "fetch(\"http://127.0.0.1:3000/api/ready\").then(a => process.exit(a.ok ? 0 : 1), () => process.exit(1))" && break; sleep 2; done; cat /tmp/start.log; node -e "fetch(\"http://127.0.0.1:3000/api/ready\").then(a => process.exit(a.ok ? 0 : 1), () => process.exit(1))"; answer=$?; kill -INT -- "-$(cat /tmp/start.pid)"; exit $answer' || start=$?
echo "== npm test"
test=0
inside 'npm test' || test=$?
echo "npm start: $start, npm test: $test"
[ "$start" = 0 ] && [ "$test" = 0 ]
