#pragma once

#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/base/units.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// How the sheet writes numbers: once, so that all its parts agree.
struct SheetWords {
  Units units;
  int depthDecimals = 1;

  /// Two decimals of a metre where the shallowest interface lies less than 3 m deep, otherwise one.
  static SheetWords of(const Survey& survey, double shallowestDepth);

  [[nodiscard]] std::string depth(double metres) const;
  /// "5.8 m (5.5 to 6.2 m)", or "not determined".
  [[nodiscard]] std::string depth(const Estimate& depth) const;
  /// "1480 m/s (1430 to 1530 m/s)", or "not determined".
  [[nodiscard]] std::string velocity(const Estimate& velocity) const;
  /// "5.5 to 6.2 m", or "not determined".
  [[nodiscard]] std::string depthInterval(const Estimate& depth) const;
  [[nodiscard]] std::string velocityInterval(const Estimate& velocity) const;
  /// "1.2° (0.8 to 1.6°)", or "not determined".
  [[nodiscard]] std::string angle(const Estimate& degrees) const;
  /// A place along the line.
  [[nodiscard]] std::string place(double metres) const;
};

/// "3 picks", "1 pick".
std::string counted(int count, const std::string& one, const std::string& many);

/// With a full stop at the end, unless it ends in one or is empty.
std::string sentence(std::string text);

}  // namespace strikeplate
