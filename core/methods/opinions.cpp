#include "core/methods/opinions.h"

#include "core/methods/opinions_from_lines.h"

namespace strikeplate {

std::vector<Opinion> secondOpinions(const TravelTimes& times, const std::vector<Branch>& branches) {
  std::vector<Opinion> opinions;
  addInterceptOpinions(times, branches, opinions);
  addCrossoverOpinions(times, branches, opinions);
  addDippingOpinions(times, branches, opinions);
  return opinions;
}

}  // namespace strikeplate
