#pragma once

#include <random>

#include "core/survey/edit.h"

namespace strikeplate::testing {

/// An invented survey with records, picks, blows and texts drawn at random.
Survey randomSurvey(std::mt19937& random);

/// An edit of any kind, drawn at random, that fits the survey.
Edit randomEdit(const Survey& survey, std::mt19937& random);

/// Whether two surveys hold the same numbers and words, records compared by content.
bool sameContent(const Survey& a, const Survey& b);

}  // namespace strikeplate::testing
