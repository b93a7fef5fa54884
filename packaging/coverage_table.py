#!/usr/bin/env python3
"""Coverage of a folder by file, from gcov's JSON: coverage_table.py BUILD_FOLDER SOURCE_FOLDER LEAST_PERCENT."""
import collections
import gzip
import json
import pathlib
import subprocess
import sys
import tempfile


def covered_lines(build, folder):
    """For each source file, the lines that can be run and those that were."""
    lines = collections.defaultdict(dict)
    root = pathlib.Path.cwd()
    data = sorted(pathlib.Path(build, folder).rglob("*.gcda"))
    with tempfile.TemporaryDirectory() as place:
        for each in data:
            subprocess.run(["gcov", "--json-format", str(each.resolve())], cwd=place, check=True, capture_output=True)
            for found in pathlib.Path(place).glob("*.gcov.json.gz"):
                with gzip.open(found) as stream:
                    report = json.load(stream)
                found.unlink()
                for file in report["files"]:
                    path = pathlib.Path(report["current_working_directory"], file["file"]).resolve()
                    if path.is_relative_to(root / folder):
                        counts = lines[str(path.relative_to(root))]
                        for line in file["lines"]:
                            counts[line["line_number"]] = counts.get(line["line_number"], 0) + line["count"]
    return lines


def main():
    build, folder, least = sys.argv[1], sys.argv[2], float(sys.argv[3])
    lines = covered_lines(build, folder)
    if not lines:
        sys.exit(f"There is no coverage of {folder} in {build}; run the tests there first.")
    total = run = 0
    for path, counts in sorted(lines.items()):
        here = sum(1 for count in counts.values() if count > 0)
        total += len(counts)
        run += here
        print(f"{100 * here / len(counts):6.1f} %  {here:5d} of {len(counts):5d}  {path}")
    percent = 100 * run / total
    print(f"{percent:6.1f} %  {run:5d} of {total:5d}  {folder}")
    sys.exit(0 if percent >= least else 1)


main()
