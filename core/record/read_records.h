#pragma once

#include <cstddef>
#include <span>
#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/record/record.h"

namespace strikeplate {

/// Reads every shot record in a SEG-2 or SEG-Y file; which of them it is tells the content, not the name.
/// Fails, in one sentence that names the file and says what to do, when it cannot be opened, is a folder, is empty,
/// is text, or is neither of the two; see also readSeg2 and readSegy.
Result<std::vector<ShotRecord>> readRecords(const std::string& path);

/// The same from a file's content; `name` stands for the file in messages and in the records.
Result<std::vector<ShotRecord>> readRecordsBytes(std::span<const std::byte> bytes, const std::string& name);

}  // namespace strikeplate
