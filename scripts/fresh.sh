#!/usr/bin/env bash
# Shows both commands on a Debian 12 with nothing installed: a debootstrap chroot, with this machine's Node.js, package
# sources, certificates and npm configuration copied in at run time. As root: scripts/fresh.sh [folder]
# First for the administrator, who may install; then for a person who may not and is told the line that does it.
set -euo pipefail
root=${1:-$(mktemp -d)/debian}
here=$(cd "$(dirname "$0")/.." && pwd)
node=$(dirname "$(dirname "$(readlink -f "$(command -v node)")")")
path=/opt/node/bin:/usr/local/bin:/usr/sbin:/usr/bin:/sbin:/bin

mirror=$(apt-get indextargets --format '$(REPO_URI)' 'Created-By: Packages' 'Codename: bookworm' | awk 'NR == 1')
debootstrap --variant=minbase --include=ca-certificates,git,procps bookworm "$root" "$mirror"
rm -f "$root/etc/apt/sources.list"
cp -a /etc/apt/. "$root/etc/apt/"
cp -a /etc/ssl/certs/. "$root/etc/ssl/certs/" 2>/dev/null || true
cp /etc/resolv.conf /etc/hosts "$root/etc/" 2>/dev/null || true
mkdir -p "$root/opt/node/bin" "$root/opt/node/lib/node_modules" "$root/root"
cp -L "$(command -v node)" "$root/opt/node/bin/node"
cp -a "$node/lib/node_modules/npm" "$root/opt/node/lib/node_modules/"
ln -s ../lib/node_modules/npm/bin/npm-cli.js "$root/opt/node/bin/npm"
ln -s ../lib/node_modules/npm/bin/npx-cli.js "$root/opt/node/bin/npx"
for file in "$HOME/.npmrc" /etc/npmrc; do [ -f "$file" ] && cp "$file" "$root/root/.npmrc" && break; done
chroot "$root" useradd --create-home --shell /bin/bash bench
[ -f "$root/root/.npmrc" ] && install -m 644 "$root/root/.npmrc" "$root/home/bench/.npmrc"
for home in root home/bench; do git clone -q "$here" "$root/$home/thirdhand"; done
chroot "$root" chown -R bench: /home/bench
mount -t proc proc "$root/proc"
mount --bind /dev "$root/dev"
trap 'umount "$root/dev" "$root/proc"' EXIT

# inside USER COMMAND: in the copy of that user.
inside() {
  chroot "$root" /usr/bin/env -i PATH="$path" NODE_EXTRA_CA_CERTS=/etc/ssl/certs/ca-certificates.crt http_proxy="${http_proxy:-}" https_proxy="${https_proxy:-}" \
    setpriv --reuid "$1" --regid "$1" --init-groups --reset-env env PATH="$path" NODE_EXTRA_CA_CERTS=/etc/ssl/certs/ca-certificates.crt http_proxy="${http_proxy:-}" https_proxy="${https_proxy:-}" bash -c "cd ~/thirdhand && $2"
}

# begin USER: npm start until it answers, then Ctrl-C; ends with 0 where it answered and stopped by itself.
begin() {
  inside "$1" 'set -m; npm start > ~/start.log 2>&1 & pid=$!
    ready() { node -e "fetch(\"http://127.0.0.1:3000/api/ready\").then(a => process.exit(a.ok ? 0 : 1), () => process.exit(1))"; }
    for i in $(seq 600); do ready && break; kill -0 $pid 2>/dev/null || break; sleep 1; done
    ready; answer=$?; kill -INT -- -$pid 2>/dev/null; wait $pid; cat ~/start.log; exit $answer'
}

echo "== a person who may not install is told the line that does it"
told=0
inside bench 'npm start' > "$root/tmp/told.log" 2>&1 || true
cat "$root/tmp/told.log"
grep -q 'su -c "apt-get update && apt-get install -y --no-install-recommends mariadb-server-core"' "$root/tmp/told.log" || told=1
echo "== npm start, for the administrator"
start=0
begin root || start=$?
echo "== npm start, for a person, now that it is installed"
person=0
begin bench || person=$?
echo "== npm test"
test=0
inside root 'npm test' || test=$?
echo "told: $told, npm start: $start, as a person: $person, npm test: $test"
[ "$told$start$person$test" = 0000 ]
