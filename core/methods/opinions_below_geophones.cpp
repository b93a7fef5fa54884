// Depths below the geophones: plus-minus, the conventional reciprocal method, time terms.
#include <set>
#include <string>
#include <utility>

#include "core/methods/opinion_routes.h"
#include "core/methods/reversed_pair.h"
#include "core/methods/time_terms.h"

namespace strikeplate::opinion_routes {

void addStationDepths(const Evidence& evidence, const OverburdenModel& overburden, std::vector<Opinion>& opinions) {
  Surest byMinus, byMean;
  for (const Branch& a : evidence.branches) {
    for (const Branch& b : evidence.branches) {
      if (a.layer < 2 || a.layer != b.layer || a.side != 1 || b.side != -1) {
        continue;
      }
      const ReversedPair pair = reversedPair(evidence.times, a, b);
      if (!pair.determined) {
        continue;
      }
      const std::string shots = "shots " + std::to_string(pair.shotA + 1) + " and " + std::to_string(pair.shotB + 1);
      for (const ReversedStation& station : pair.stations) {
        const auto above = overburden.above(pair.layer, station.x);
        if (!above) {
          continue;
        }
        byMinus.offer(
            {"plus-minus", pair.layer, -1, station.x, stationDepth(pair, station, pair.minusSlowness, *above),
             shots + "; relief small against the depth, dip under about 10 degrees, refractor velocity from "
                     "the minus times"});
        byMean.offer({"reciprocal", pair.layer, -1, station.x, stationDepth(pair, station, pair.meanSlowness, *above),
                      shots + "; refractor velocity from the mean of both apparent slownesses, level ground between "
                              "the two points where the rays leave it"});
      }
    }
  }
  byMinus.moveInto(opinions);
  byMean.moveInto(opinions);
}

void addTimeTerms(const Evidence& evidence, const OverburdenModel& overburden, std::vector<Opinion>& opinions) {
  std::set<int> layers;
  for (const Branch& branch : evidence.branches) {
    if (branch.layer > 1) {
      layers.insert(branch.layer);
    }
  }
  for (const int layer : layers) {
    const TimeTerms terms = timeTerms(evidence.times, layer, TimeTerms::Sources::Tied);
    if (!terms.determined || !terms.isFixed(terms.unknowns - 1)) {
      continue;
    }
    for (std::size_t i = 0; i < terms.geophones.size(); ++i) {
      const double x = evidence.times.geophones[static_cast<std::size_t>(terms.geophones[i])].x;
      const auto above = overburden.above(layer, x);
      if (!above || !terms.isFixed(static_cast<Eigen::Index>(i))) {
        continue;
      }
      opinions.push_back({"time terms", layer, -1, x, depthFromDelay(terms.delay(i), *above),
                          "one refractor velocity for all shots, relief small against the depth; a shot between two "
                          "geophones takes their terms"});
    }
  }
}

}  // namespace strikeplate::opinion_routes
