#include "core/methods/opinions_from_lines.h"

#include <cmath>
#include <optional>

#include "core/methods/dipping_layers.h"
#include "core/methods/flat_layers.h"
#include "core/methods/two_layers.h"
#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

constexpr int kMostLayers = 6;

Opinion opinionAt(const TravelTimes& times, int shot, int layer, std::string route, Estimate depth,
                  std::string assumes) {
  return {std::move(route),  layer, shot, times.shots[static_cast<std::size_t>(shot)].x, std::move(depth),
          std::move(assumes)};
}

/// The lines of a shot's side, the direct one first, as far as there is one for each layer.
std::vector<LineFit> linesOf(const std::vector<Branch>& branches, int shot, int side) {
  std::vector<LineFit> lines;
  for (int layer = 1; layer <= kMostLayers; ++layer) {
    const Branch* branch = findBranch(branches, shot, side, layer);
    if (branch == nullptr || !branch->fit.determined) {
      break;
    }
    lines.push_back(branch->fit);
  }
  return lines;
}

template <class Visit>
void forEverySide(const TravelTimes& times, Visit visit) {
  for (std::size_t shot = 0; shot < times.shots.size(); ++shot) {
    for (const int side : {-1, 1}) {
      visit(static_cast<int>(shot), side);
    }
  }
}

/// Slowness of the first layer between two shots, from the direct lines that point into the profile.
std::optional<Datum> directSlowness(const std::vector<Branch>& branches, int a, int b) {
  double sum = 0.0, weights = 0.0;
  for (const auto& [shot, side] : {std::pair{a, 1}, std::pair{b, -1}}) {
    const Branch* direct = findBranch(branches, shot, side, 1);
    if (direct != nullptr && direct->fit.determined && direct->fit.varSlope > 0.0) {
      sum += direct->fit.slope / direct->fit.varSlope;
      weights += 1.0 / direct->fit.varSlope;
    }
  }
  return weights > 0.0 ? std::optional(Datum{sum / weights, 1.0 / std::sqrt(weights)}) : std::nullopt;
}

std::vector<ReversedLines> reversedLines(const std::vector<Branch>& branches, int a, int b) {
  std::vector<ReversedLines> lines;
  for (int layer = 2; layer <= kMostLayers; ++layer) {
    const Branch* forward = findBranch(branches, a, 1, layer);
    const Branch* reverse = findBranch(branches, b, -1, layer);
    if (forward == nullptr || reverse == nullptr || !forward->fit.determined || !reverse->fit.determined) {
      break;
    }
    lines.push_back({forward->fit, reverse->fit});
  }
  return lines;
}

}  // namespace

void addInterceptOpinions(const TravelTimes& times, const std::vector<Branch>& branches,
                          std::vector<Opinion>& opinions) {
  forEverySide(times, [&](int shot, int side) {
    std::vector<LineFit> lines = linesOf(branches, shot, side);
    FlatLayers layers;
    // A deepest branch that makes no sense must not take the others away.
    for (; lines.size() >= 2 && !layers.determined; lines.pop_back()) {
      layers = layersFromIntercepts(lines);
    }
    for (std::size_t n = 0; n < layers.depths.size(); ++n) {
      opinions.push_back(opinionAt(times, shot, static_cast<int>(n) + 2, "intercept time", layers.depths[n],
                                   "level plane layers under the shot, velocity growing with depth"));
    }
  });
}

void addCrossoverOpinions(const TravelTimes& times, const std::vector<Branch>& branches,
                          std::vector<Opinion>& opinions) {
  forEverySide(times, [&](int shot, int side) {
    const std::vector<LineFit> lines = linesOf(branches, shot, side);
    if (lines.size() < 2) {
      return;
    }
    Estimate depth = depthWhereLinesCross(lines[0], lines[1]);
    if (depth.determined) {
      opinions.push_back(opinionAt(times, shot, 2, "crossover distance", std::move(depth),
                                   "level plane layers under the shot; the lines are those of the intercept time"));
    }
  });
}

void addDippingOpinions(const TravelTimes& times, const std::vector<Branch>& branches,
                        std::vector<Opinion>& opinions) {
  for (std::size_t first = 0; first < times.shots.size(); ++first) {
    const int a = static_cast<int>(first);
    int farthest = -1;
    for (std::size_t second = 0; second < times.shots.size(); ++second) {
      const double x = times.shots[second].x;
      const bool beyond = farthest < 0 || x > times.shots[static_cast<std::size_t>(farthest)].x;
      if (x > times.shots[first].x && beyond && !reversedLines(branches, a, static_cast<int>(second)).empty()) {
        farthest = static_cast<int>(second);
      }
    }
    const auto direct = farthest < 0 ? std::nullopt : directSlowness(branches, a, farthest);
    if (!direct) {
      continue;
    }
    std::vector<ReversedLines> lines = reversedLines(branches, a, farthest);
    DippingLayers layers;
    for (; !lines.empty() && !layers.determined; lines.pop_back()) {
      layers = layersFromReversed(*direct, lines);
    }
    for (std::size_t n = 0; n < layers.depthsA.size(); ++n) {
      const std::string assumes = "plane dipping layers between shots " + std::to_string(a + 1) + " and " +
                                  std::to_string(farthest + 1) + ", all of one strike";
      for (const auto& [shot, depths] : {std::pair{a, &layers.depthsA}, std::pair{farthest, &layers.depthsB}}) {
        opinions.push_back(opinionAt(times, shot, static_cast<int>(n) + 2, "dipping layers", (*depths)[n], assumes));
      }
    }
  }
}

}  // namespace strikeplate
