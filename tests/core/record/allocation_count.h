#pragma once

#include <cstddef>

namespace strikeplate {

/// Memory taken with operator new by this program since the last restart, at its highest, in bytes.
class AllocationCount {
 public:
  static void restart();
  static std::size_t highest();
};

}  // namespace strikeplate
