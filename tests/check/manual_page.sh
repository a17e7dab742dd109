#!/bin/bash
# SPDX-License-Identifier: GPL-3.0-or-later
# manual_page.sh PAGE: formats without a warning.
set -euo pipefail
warnings=$(groff -man -Tutf8 -ww -z -k "$1" 2>&1)
echo -n "$warnings"
[ -z "$warnings" ]
