#pragma once

#include <ostream>

#include "app/batch_options.h"

namespace strikeplate {

/// Exit statuses of strikeplate-batch.
enum class BatchStatus { Done = 0, PartUnusable = 1, WrongUsage = 2, NothingRead = 3 };

/// Does what the options ask for: read, pick, interpret, write. Sentences for the user go to `errors`; one line of
/// summary to `out`. A sheet needs a QGuiApplication.
BatchStatus runBatch(const BatchOptions& options, std::ostream& out, std::ostream& errors);

}  // namespace strikeplate
