#!/usr/bin/env python3
"""Checks that includes run one way only: app -> widgets -> core, and within core a folder only includes those above it.

usage: layers.py PROJECT_FOLDER
"""
import pathlib
import re
import sys

ORDER = ["base", "record", "line", "picking", "traveltime", "methods", "section", "survey", "report"]
INCLUDE = re.compile(r'^\s*#include\s+"((core|widgets|app)/[^"]+)"', re.M)


def rank(path):
    parts = path.split("/")
    if parts[0] == "core":
        return ORDER.index(parts[1])
    return len(ORDER) + (0 if parts[0] == "widgets" else 1)


def main():
    root = pathlib.Path(sys.argv[1])
    wrong, seen = [], 0
    for top in ("core", "widgets", "app"):
        for file in sorted((root / top).rglob("*")):
            if file.suffix not in (".h", ".cpp"):
                continue
            here = file.relative_to(root).as_posix()
            for match in INCLUDE.finditer(file.read_text(encoding="utf-8")):
                seen += 1
                if rank(match.group(1)) > rank(here):
                    wrong.append(f"{here} includes {match.group(1)}, which stands below it")
                if not (root / match.group(1)).exists():
                    wrong.append(f"{here} includes {match.group(1)}, which does not exist")
    print("\n".join(wrong))
    if seen < 20:
        print(f"only {seen} includes were found: the check does not see the sources")
        return 1
    print(f"{seen} includes, {len(wrong)} against the order")
    return 1 if wrong else 0


if __name__ == "__main__":
    sys.exit(main())
