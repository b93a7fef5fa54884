#pragma once

#include <string>

#include "core/base/result.h"
#include "core/survey/survey_file_database.h"

namespace strikeplate {

/// Whether the file is a survey file that this program knows, from its first 100 bytes and without touching it.
Outcome checkHead(const std::string& path);

/// Checks the structure of the whole database.
Outcome checkStructure(Database& database, const std::string& path);

/// Makes every transaction durable and keeps other programs from writing, until the database is closed.
Outcome lockForWriting(Database& database);

/// Whether a file of this name may be replaced: there is none, or no program has it open.
Outcome checkReplaceable(const std::string& path);

/// Gives a finished, closed file its name in one step, in the place of any other of that name.
Outcome giveName(const std::string& finished, const std::string& path);

}  // namespace strikeplate
