#include "core/report/sheet_words.h"

#include <cmath>

#include "core/base/numbers.h"
#include "core/report/sheet.h"

namespace strikeplate {
namespace {

constexpr double kShallow = 3.0;  // m

// An upper bound that the data do not give is said, not left out.
std::string range(const std::string& low, const std::string& high, bool bounded) {
  return bounded ? low + " to " + high : "above " + low;
}

}  // namespace

SheetWords SheetWords::of(const Survey& survey, double shallowestDepth) {
  SheetWords words;
  words.units.feet = survey.settings.feet;
  words.depthDecimals = !words.units.feet && shallowestDepth < kShallow ? 2 : 1;
  return words;
}

std::string SheetWords::depth(double metres) const {
  return std::isfinite(metres) ? units.length(metres, depthDecimals) : kNotDetermined;
}

std::string SheetWords::depthInterval(const Estimate& depth) const {
  if (!depth.determined) {
    return kNotDetermined;
  }
  return std::isfinite(depth.high95) ? units.lengthRange(depth.low95, depth.high95, depthDecimals)
                                     : range(units.length(depth.low95, depthDecimals), "", false);
}

std::string SheetWords::depth(const Estimate& estimate) const {
  return estimate.determined ? depth(estimate.value) + " (" + depthInterval(estimate) + ")" : kNotDetermined;
}

std::string SheetWords::velocityInterval(const Estimate& velocity) const {
  if (!velocity.determined) {
    return kNotDetermined;
  }
  const bool bounded = std::isfinite(velocity.high95);
  std::string low = units.velocity(velocity.low95);
  if (bounded) {
    low.erase(low.find(' '));
  }
  return range(low, units.velocity(velocity.high95), bounded);
}

std::string SheetWords::velocity(const Estimate& velocity) const {
  return velocity.determined ? units.velocity(velocity.value) + " (" + velocityInterval(velocity) + ")"
                             : kNotDetermined;
}

std::string SheetWords::angle(const Estimate& degrees) const {
  if (!degrees.determined) {
    return kNotDetermined;
  }
  return fixed(degrees.value, 1) + "° (" + fixed(degrees.low95, 1) + " to " + fixed(degrees.high95, 1) + "°)";
}

std::string SheetWords::place(double metres) const {
  return units.length(metres, 1);
}

std::string counted(int count, const std::string& one, const std::string& many) {
  return std::to_string(count) + " " + (count == 1 ? one : many);
}

std::string sentence(std::string text) {
  if (!text.empty() && text.back() != '.' && text.back() != '!' && text.back() != '?') {
    text += '.';
  }
  return text;
}

}  // namespace strikeplate
