// Any text as CSV; what was read is written and must read back the same.
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "core/base/csv.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const auto table = strikeplate::parseCsv(text, "fuzz");
  if (!table) {
    return 0;
  }
  const auto again = strikeplate::parseCsv(strikeplate::csvText(table->columns, table->rows), "fuzz");
  if (!again || again->columns != table->columns || again->rows != table->rows) {
    std::abort();
  }
  return 0;
}
