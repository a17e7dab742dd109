#!/bin/bash
# SPDX-License-Identifier: GPL-3.0-or-later
# file_type.sh RESOURCES: the MIME file compiles and gives *.filial its type, which the desktop file opens.
set -euo pipefail
folder=$(mktemp -d)
trap 'rm -rf "$folder"' EXIT
mkdir "$folder/packages"
cp "$1/filial-mime.xml" "$folder/packages/filial.xml"
update-mime-database "$folder" 2>"$folder/said" || { cat "$folder/said" >&2; exit 1; }
grep -qx '50:application/x-filial+json:\*.filial' "$folder/globs2"
grep -qx 'application/x-filial+json application/json' "$folder/subclasses"
grep -q '^MimeType=.*application/x-filial+json;' "$1/filial.desktop"
