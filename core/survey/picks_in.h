#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// Picks read from a table, as an edit, and what of the table could not be used.
struct ImportedPicks {
  Edit edit;
  int used = 0;
  std::vector<std::string> problems;  ///< one sentence each
};

/// Reads first breaks from a CSV table with the columns file, trace (from 1 within its file) and time_s (recorder
/// time), and if there sigma_s (else 1 ms), layer, and origin. Where blows were stacked, each row's time less its
/// blow's lag is the stack's pick; several rows for one trace are averaged. Rows with an empty time say that there is
/// no pick. Fails, in one sentence, when the table cannot be read or lacks a needed column.
Result<ImportedPicks> importPicks(const Survey& survey, const std::string& path);

/// The same from the table's text; `name` stands for it in messages.
Result<ImportedPicks> importPicksText(const Survey& survey, std::string_view csv, const std::string& name);

}  // namespace strikeplate
