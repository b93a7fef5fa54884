#pragma once

#include <string>
#include <vector>

#include "core/line/line.h"
#include "core/record/record.h"

namespace strikeplate {

/// What looks wrong about the positions of a line, one sentence each that names the place and what to look at;
/// nothing for a line that looks right. Positions in m, geophones and shots in any order.
///
/// Said are: two geophones at one place (closer than 1 cm); a shot beside a geophone but not at it (closer than a
/// tenth of the usual spacing, farther than 1 cm); a spacing less than 0.6 or more than 1.7 times the usual one (the
/// median; only on lines where at least two thirds of the spacings are within 10 % of it); a geophone more than 0.5 m
/// and more than half a spacing above or below the line between its neighbours; a shot more than 1 m above or below
/// the ground between the geophones. Common practice, no source.
std::vector<std::string> checkGeometry(const std::vector<Geophone>& geophones, const std::vector<ShotPoint>& shots);

/// What is contradictory about a record's positions, as its headers or a table give them: geophones that run back and
/// forth, several traces at one place, a shot more than ten spread lengths away.
std::vector<std::string> checkHeaders(const ShotRecord& record);

}  // namespace strikeplate
