#!/usr/bin/python3
# SPDX-License-Identifier: GPL-3.0-or-later
"""tidy.py BUILD JOBS [--all]: clang-tidy-14 of changed files. Changed are the files that differ from where this branch
left origin/main (or FILIAL_TIDY_BASE), uncommitted ones included. Where no source differs, as on main itself, the files of the
latest commits count, newest first, up to MOST. A header is checked through the source file beside it."""
import concurrent.futures
import json
import os
import pathlib
import subprocess
import sys

MOST = 8  # a file takes 14 to 70 s, and the whole run has 40 minutes on two cores


def git(*arguments):
    done = subprocess.run(["git", *arguments], capture_output=True, text=True)
    return done.stdout.split("\n") if done.returncode == 0 else []


def sources(names, known):
    picked = []
    for name in names:
        path = pathlib.Path(name)
        source = str(path.with_suffix(".cpp")) if path.suffix == ".h" else name
        if source in known and source not in picked:
            picked.append(source)
    return picked


def changed_names(known):
    base = os.environ.get("FILIAL_TIDY_BASE") or next(iter(git("merge-base", "HEAD", "origin/main")), "")
    names = git("diff", "--name-only", base) + git("ls-files", "--others", "--exclude-standard") if base else []
    if sources(names, known):
        return names, f"changed since {base[:9]}"
    return git("log", "--format=", "--name-only", "-n", "200"), "of the latest commits"


def tidy(build, source):
    done = subprocess.run(["clang-tidy-14", "-p", build, "--quiet", "--extra-arg=-Wno-unknown-warning-option", source],
                          capture_output=True, text=True)
    return source, done.returncode, done.stdout


def main():
    build, jobs, everything = sys.argv[1], int(sys.argv[2]), "--all" in sys.argv
    top = os.getcwd()
    with open(os.path.join(build, "compile_commands.json"), encoding="utf-8") as text:
        known = {os.path.relpath(entry["file"], top) for entry in json.load(text)}
    known = {name for name in known if not name.startswith(".")}
    names, what = (sorted(known), "in all") if everything else changed_names(known)
    picked = sources(names, known)
    if not everything:
        picked = picked[:MOST]
    print(f"{len(picked)} files {what}")
    failed = 0
    with concurrent.futures.ThreadPoolExecutor(jobs) as pool:
        for source, status, said in pool.map(lambda source: tidy(build, source), picked):
            if status != 0:
                failed = 1
                print(f"{source}:\n{said}")
    return failed if picked else 1


if __name__ == "__main__":
    sys.exit(main())
