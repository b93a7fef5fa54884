#pragma once

#include <functional>
#include <string>

#include "core/base/result.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// The JSON texts of the survey file, as FORMAT.md describes them. Reading passes over keys it does not know; a text
/// that is no JSON, or lacks what is needed, is a Failure that names no file.

/// The id a record has in the file; the other way round, the record with this id or null.
using RecordId = std::function<long long(const RecordPtr&)>;
using RecordOf = std::function<RecordPtr(long long)>;

std::string surveyToJson(const Survey& survey, const RecordId& idOf);
Result<Survey> surveyFromJson(const std::string& text, const RecordOf& recordOf);

std::string changesToJson(const std::vector<Change>& changes, const RecordId& idOf);
Result<std::vector<Change>> changesFromJson(const std::string& text, const RecordOf& recordOf);

/// All of a record but its samples.
std::string recordHeadToJson(const ShotRecord& record);
/// A record whose traces have their number of samples, all of them zero. Fails above `mostSamples` in all.
Result<ShotRecord> recordHeadFromJson(const std::string& text, std::size_t mostSamples);

}  // namespace strikeplate
