#pragma once

#include <cstddef>
#include <cstdint>
#include <span>
#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/record/byte_order.h"
#include "core/record/byte_source.h"
#include "core/record/oddity_list.h"
#include "core/record/seg2_strings.h"

namespace strikeplate::seg2 {

/// What the beginning of a SEG-2 file says.
struct FileHead {
  ByteOrder order = ByteOrder::Little;
  Terminators terminators;
  std::vector<std::uint32_t> pointers;  ///< byte where each trace's descriptor block starts
  std::uint64_t stringsAt = 0;          ///< byte of the first string of the file
};

/// Reads the beginning of a SEG-2 file and sees through a wrong byte-order mark, a wrong size of the pointer table
/// and a wrong count of traces. Fails, in one sentence with `name`, when it is no SEG-2 file or is cut off in its
/// first 32 bytes. No pointer is checked.
Result<FileHead> readFileHead(const ByteSource& source, const std::string& name, OddityList& odd);

/// Whether a file that begins with these bytes is meant to be SEG-2 (at least two bytes are needed).
bool looksLikeSeg2(std::span<const std::byte> start);

}  // namespace strikeplate::seg2
