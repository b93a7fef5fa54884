#pragma once

#include <string>

#include "core/base/estimate.h"

namespace strikeplate {

/// A depth by one published hand method.
struct Opinion {
  std::string route;    ///< the method's published name, such as "intercept time"
  int layer = 2;        ///< the depth is to the top of this layer
  int shot = -1;        ///< index of the shot it belongs to, or -1
  double x = 0.0;       ///< m along the line
  Estimate depth;       ///< m below the ground at x
  std::string assumes;  ///< what it assumed, in words
};

}  // namespace strikeplate
