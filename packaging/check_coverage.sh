#!/bin/sh
# Lines of core that the tests run through, by gcov; ends with 1 below 90 %.
set -eu
here=$(cd "$(dirname "$0")/.." && pwd)
sh "$here/packaging/setup.sh"
cd "$here"
cmake --preset coverage
cmake --build --preset coverage
find build/coverage -name '*.gcda' -delete
QT_QPA_PLATFORM=offscreen ctest --preset coverage -j "$(nproc)"
python3 packaging/coverage_table.py build/coverage core 90
