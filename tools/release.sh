#!/usr/bin/env bash
# Makes self-contained archives (no SDK or runtime needed where they run) with checksums, in artifacts/release.
# usage: tools/release.sh [PLATFORM ...]     (default: linux-x64 linux-arm64 win-x64 osx-arm64)
# Tried on every run of CI: linux-x64, by tools/try-release.sh. The others are built, not run.
set -euo pipefail
cd "$(dirname "$0")/.."
export DOTNET_CLI_UI_LANGUAGE=en

version=$(sed -n 's:.*<VersionPrefix>\(.*\)</VersionPrefix>.*:\1:p' Directory.Build.props)
platforms=("$@")
[ "${#platforms[@]}" -gt 0 ] || platforms=(linux-x64 linux-arm64 win-x64 osx-arm64)
release=$PWD/artifacts/release
mkdir -p "$release"

for platform in "${platforms[@]}"; do
    name=livewave-$version-$platform
    rm -rf "${release:?}/$name"
    dotnet publish src/LiveWave.App -c Release -r "$platform" --self-contained -p:PublishSingleFile=true -p:DebugType=none \
        -v quiet --nologo -o "$release/$name"
    cp README.md "$release/$name/"
    if [[ $platform == win-* ]]; then
        archive=$name.zip
        rm -f "$release/$archive"
        (cd "$release" && python3 -m zipfile -c "$archive" "$name")
    else
        archive=$name.tar.gz
        tar -C "$release" -czf "$release/$archive" "$name"
    fi
    echo "$archive  $(du -h "$release/$archive" | cut -f 1)"
done

(cd "$release" && sha256sum livewave-"$version"-*.tar.gz livewave-"$version"-*.zip 2>/dev/null > SHA256SUMS || true)
echo "checksums: artifacts/release/SHA256SUMS"
