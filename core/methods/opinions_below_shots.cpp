// Depths below the shots: level layers by intercepts and by crossovers, dipping layers by reversed shots.
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <string>
#include <utility>

#include "core/methods/dipping_layers.h"
#include "core/methods/flat_layers.h"
#include "core/methods/opinion_routes.h"
#include "core/traveltime/branches.h"
#include "core/traveltime/line_fit.h"

namespace strikeplate::opinion_routes {
namespace {

// Beyond this many sigmas, and this part of the time, two reciprocal times are not of one refractor.
constexpr double kBrokenSigmas = 3.29;
constexpr double kBrokenPart = 0.05;

Opinion belowShot(const Evidence& evidence, int shot, int layer, const char* route, Estimate depth,
                  std::string assumes) {
  return {route,
          layer,
          shot,
          evidence.times.shots[static_cast<std::size_t>(shot)].x,
          std::move(depth),
          std::move(assumes)};
}

Estimate deepestOf(const FlatLayers& layers) {
  return layers.determined ? layers.depths.back() : Estimate::none(layers.reason);
}

/// The direct line not held to zero time at the shot.
LineFit freeDirectLine(const Evidence& evidence, const Branch& direct) {
  std::vector<FitPoint> points;
  for (const int index : direct.arrivals) {
    const Arrival& a = evidence.times.arrivals[static_cast<std::size_t>(index)];
    points.push_back({evidence.times.offset(a), a.time, a.sigma});
  }
  return fitLine(points);
}

std::string brokenReciprocity(const ReversedLines& lines, double distance, int layer) {
  const Estimate gap = reciprocityGap(lines, distance);
  if (!gap.determined || std::abs(gap.value) <= kBrokenSigmas * gap.sigma ||
      std::abs(gap.value) <= kBrokenPart * std::abs(lines.fromA.at(distance))) {
    return {};
  }
  char text[128];
  std::snprintf(text, sizeof text,
                "layer %d: its times from shot to shot differ by %.1f ms both ways; check assignment and trigger",
                layer, 1e3 * std::abs(gap.value));
  return text;
}

void offerPair(const Evidence& evidence, int shotA, int shotB, Surest& surest) {
  const auto fromA = linesDownTo(evidence, shotA, 1, 99), fromB = linesDownTo(evidence, shotB, -1, 99);
  const double distance = evidence.times.shots[static_cast<std::size_t>(shotB)].x -
                          evidence.times.shots[static_cast<std::size_t>(shotA)].x;
  std::vector<ReversedLines> refractors;
  std::string broken;
  for (std::size_t i = 1; i < std::min(fromA.size(), fromB.size()); ++i) {
    const int layer = static_cast<int>(i) + 1;
    refractors.push_back({fromA[i], fromB[i]});
    broken = broken.empty() ? brokenReciprocity(refractors.back(), distance, layer) : broken;
    DippingLayers layers;
    if (broken.empty()) {
      layers = dippingLayers({fromA[0], fromB[0]}, refractors);
    } else {
      layers.reason = broken;
    }
    const std::string assumes = "plane layers between shots " + std::to_string(shotA + 1) + " and " +
                                std::to_string(shotB + 1) + ", one strike, velocity growing with depth";
    for (const bool atA : {true, false}) {
      Estimate depth =
          layers.determined ? (atA ? layers.depthsA : layers.depthsB).back() : Estimate::none(layers.reason);
      surest.offer(belowShot(evidence, atA ? shotA : shotB, layer, "dipping layers", std::move(depth), assumes));
    }
  }
}

}  // namespace

void addLevelLayers(const Evidence& evidence, std::vector<Opinion>& opinions) {
  constexpr const char* kLevel = "level plane layers under the shot, velocity growing with depth";
  for (const Branch& branch : evidence.branches) {
    if (branch.layer < 2) {
      continue;
    }
    auto lines = linesDownTo(evidence, branch.shot, branch.side, branch.layer);
    if (static_cast<int>(lines.size()) < branch.layer) {
      continue;
    }
    opinions.push_back(belowShot(evidence, branch.shot, branch.layer, "intercept time",
                                 deepestOf(flatLayersFromIntercepts(lines)), kLevel));
    lines[0] = freeDirectLine(evidence, *findBranch(evidence.branches, branch.shot, branch.side, 1));
    if (lines[0].determined) {
      opinions.push_back(belowShot(evidence, branch.shot, branch.layer, "crossover distance",
                                   deepestOf(flatLayersFromCrossovers(lines)),
                                   std::string(kLevel) + "; needs no trigger time"));
    }
  }
}

void addDippingLayers(const Evidence& evidence, std::vector<Opinion>& opinions) {
  const auto& shots = evidence.times.shots;
  Surest surest;
  for (std::size_t a = 0; a < shots.size(); ++a) {
    for (std::size_t b = 0; b < shots.size(); ++b) {
      if (shots[a].x < shots[b].x) {
        offerPair(evidence, static_cast<int>(a), static_cast<int>(b), surest);
      }
    }
  }
  surest.moveInto(opinions);
}

}  // namespace strikeplate::opinion_routes
