// Any text as a geometry table, put over a small record.
#include <cstdint>
#include <string_view>

#include "core/line/geometry_table.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const auto table = strikeplate::parseGeometryTable(text, "fuzz");
  if (table) {
    strikeplate::ShotRecord record;
    record.file = "a";
    record.traces.resize(3);
    strikeplate::applyGeometry(*table, record);
    strikeplate::unusedRows(*table, {&record});
  }
  return 0;
}
