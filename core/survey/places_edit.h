#pragma once

#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// Where everything on the line stands; indices are those of the survey it was taken from, so places may be in any
/// order while they are being typed.
struct LinePlaces {
  std::vector<Geophone> geophones;
  std::vector<ShotPoint> shots;
  std::vector<Borehole> boreholes;
  bool operator==(const LinePlaces&) const = default;
};

LinePlaces placesOf(const Survey& survey);

/// The line counted from its other end: x becomes (first + last geophone) - x for geophones, shots and boreholes.
LinePlaces reversed(LinePlaces places);

/// The one edit that puts geophones, shots and boreholes at `places`; picks, trace states, blows and trigger
/// corrections stay with their traces. Where geophones or shots change their order, the numbering of the whole line
/// changes with them. Without changes when everything stands there already.
///
/// Needs as many geophones and shots as the survey has, all numbers finite. Fails, in one sentence, when two
/// geophones stand at one place (closer than 1 cm), for traces could then not be told apart.
Result<Edit> placesEdit(const Survey& survey, const LinePlaces& places, std::string text);

}  // namespace strikeplate
