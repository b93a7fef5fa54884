#include "core/section/section.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

double between(double a, double b, double f) {
  return a + f * (b - a);
}

Estimate between(const Estimate& a, const Estimate& b, double f) {
  if (!a.determined || !b.determined) {
    return f < 0.5 ? a : b;
  }
  Estimate e;
  e.value = between(a.value, b.value, f);
  e.sigma = between(a.sigma, b.sigma, f);
  e.low68 = between(a.low68, b.low68, f);
  e.high68 = between(a.high68, b.high68, f);
  e.low95 = between(a.low95, b.low95, f);
  e.high95 = between(a.high95, b.high95, f);
  e.determined = true;
  return e;
}

}  // namespace

Estimate Section::depthAt(int layer, double position) const {
  const auto found = std::find_if(interfaces.begin(), interfaces.end(),
                                  [layer](const SectionInterface& i) { return i.layer == layer; });
  if (!determined || found == interfaces.end() || x.empty() || !std::isfinite(position)) {
    return Estimate::none("no such interface in the section");
  }
  if (position < x.front() || position > x.back()) {
    return Estimate::none("outside the section");
  }
  const auto right = std::lower_bound(x.begin(), x.end(), position);
  const auto j = static_cast<std::size_t>(right - x.begin());
  if (j == 0 || *right == position) {
    return found->depth[j];
  }
  return between(found->depth[j - 1], found->depth[j], (position - x[j - 1]) / (x[j] - x[j - 1]));
}

}  // namespace strikeplate
