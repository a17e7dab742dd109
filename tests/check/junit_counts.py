#!/usr/bin/python3
# SPDX-License-Identifier: GPL-3.0-or-later
"""Prints 'PASSED FAILED' of a ctest JUnit report. Skipped and disabled tests count as failed: a check that did not
run has shown nothing."""
import sys
import xml.etree.ElementTree as tree

suite = tree.parse(sys.argv[1]).getroot()
total = int(suite.get("tests"))
failed = sum(int(suite.get(kind, 0)) for kind in ("failures", "skipped", "disabled"))
for case in suite.iter("testcase"):
    if case.get("status") in ("notrun", "disabled"):
        print("did not run:", case.get("name"), file=sys.stderr)
print(total - failed, failed)
