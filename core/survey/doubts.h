#pragma once

#include <vector>

#include "core/survey/interpretation.h"

namespace strikeplate {

/// Every reason not to trust the interpretation, the gravest first. `interpretation` holds everything but its doubts.
std::vector<Doubt> findDoubts(const Survey& survey, const Interpretation& interpretation);

/// The rules by what they look at; each appends what it finds.
namespace doubt_rules {
void reciprocalTimes(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void triggers(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void picks(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void lateGeophones(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void assignment(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void velocities(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void depths(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void coverage(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void layerCount(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void boreholes(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void opinions(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void hiddenLayers(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
void files(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts);
}  // namespace doubt_rules

/// What the user said to a doubt; empty when nothing.
std::string answerTo(const Survey& survey, const Doubt& doubt);

/// "shot 3 at 12 m".
std::string shotName(const Survey& survey, int shot);

}  // namespace strikeplate
