#!/usr/bin/python3
# SPDX-License-Identifier: GPL-3.0-or-later
"""layout.py FOLDER: the rules of DEVELOPERS.md about what lies where and what may include what. Prints each breach as
file:line: what, and exits with 1 where there is one."""
import pathlib
import re
import sys

TOP_LEVEL = {"CMakeLists.txt", "README.md", "DEVELOPERS.md", "app", "core", "resources", "tests", "sample-crosses"}
# What a core folder may include, itself apart. The same arrows as in core/CMakeLists.txt.
ARROWS = {
    "numeric": set(),
    "ratio": {"numeric"},
    "inheritance": {"numeric", "ratio"},
    "fit": {"numeric", "ratio", "inheritance"},
    "linkage": {"numeric", "ratio", "inheritance", "fit"},
    "families": {"numeric", "ratio", "inheritance", "fit"},
    "planning": {"numeric", "ratio", "inheritance", "fit", "linkage"},
    "book": {"numeric", "ratio", "inheritance"},
    "report": {"numeric", "ratio", "inheritance", "fit", "linkage", "families", "planning", "book"},
}
SOURCES = {".cpp", ".h", ".inc", ".py", ".R", ".sh"}
MOST_LINES = 500
INCLUDE = re.compile(r'^\s*#\s*include\s*[<"]([^>"]+)[>"]')


def include_breaches(name, included):
    folder = name.split("/")[:-1]
    floor = folder[0] if folder else ""
    if floor == "core":
        if re.match(r"Q[A-Z]|Qt|app/|tests/", included):
            yield f"core includes {included}: it knows no Qt, no app and no test"
        if included.startswith("core/") and len(folder) > 1:
            used = included.split("/")[1]
            if used != folder[1] and used not in ARROWS.get(folder[1], set()):
                yield f"core/{folder[1]} may not use core/{used}"
    if floor == "app":
        if included.startswith("boost/"):
            yield f"app includes {included}: no formula stands in the app"
        if included.startswith("tests/"):
            yield f"app includes {included}"
    if floor in ("app", "core") and name.endswith(".h") and re.match(r"boost/|nlohmann/(?!json_fwd)|csv\.h|openssl/", included):
        yield f"{included} is heavy: include it in a .cpp file"


def line_breaches(name, line):
    match = INCLUDE.match(line)
    if match:
        yield from include_breaches(name, match.group(1))
    if name.startswith("tests/") and re.match(r"\s*(QVERIFY|QCOMPARE|QTRY_|GTEST_SKIP|QSKIP)\w*\(", line):
        yield "passes silently or skips inside GoogleTest"


def file_breaches(top, path):
    name = str(path.relative_to(top))
    lines = path.read_text(encoding="utf-8").split("\n")
    if path.suffix in SOURCES or path.name in ("CMakeLists.txt", "run", "check"):
        if not any("SPDX-License-Identifier: GPL-3.0-or-later" in line for line in lines[:3]):
            yield f"{name}:1: no licence line"
    if path.suffix in (".cpp", ".h", ".py") and len(lines) > MOST_LINES:
        yield f"{name}:{len(lines)}: more than {MOST_LINES} lines"
    for number, line in enumerate(lines, 1):
        for breach in line_breaches(name, line):
            yield f"{name}:{number}: {breach}"


def breaches(top):
    for entry in sorted(top.iterdir()):
        if not entry.name.startswith(".") and entry.name not in TOP_LEVEL:
            yield f"{entry.name}:1: not of the layout"
    for folder in sorted((top / "core").iterdir()):
        if folder.is_dir() and folder.name not in ARROWS:
            yield f"core/{folder.name}:1: not of the layout"
    for path in sorted(top.rglob("*")):
        hidden = any(part.startswith(".") for part in path.relative_to(top).parts[:-1])
        if path.is_file() and not hidden and (path.suffix in SOURCES or path.name in ("CMakeLists.txt", "run", "check")):
            yield from file_breaches(top, path)


if __name__ == "__main__":
    found = list(breaches(pathlib.Path(sys.argv[1])))
    print("\n".join(found) if found else "in order")
    sys.exit(1 if found else 0)
