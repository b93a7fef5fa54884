// Doubts about the velocities, the depths and the number of layers of the section.
#include <algorithm>
#include <cmath>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/survey/doubts.h"

namespace strikeplate::doubt_rules {
namespace {

std::string layerName(int layer) {
  return "layer " + std::to_string(layer);
}

Doubt aboutLayer(std::string kind, int layer) {
  Doubt doubt;
  doubt.kind = std::move(kind);
  doubt.where = layerName(layer);
  doubt.layer = layer;
  return doubt;
}

void nearAir(const Units& units, const Estimate& v, std::vector<Doubt>& doubts) {
  constexpr double kSoundLow = 325.0, kSoundHigh = 350.0;
  if (!(v.value > kSoundLow && v.value < kSoundHigh)) {
    return;
  }
  Doubt doubt = aboutLayer("sound wave in air", 1);
  doubt.says = "The first layer's velocity, " + units.velocity(v.value) + ", is that of sound in air.";
  doubt.restsOn = "Sound travels at 331 to 349 m/s between 0 and 30 degrees Celsius.";
  doubt.wouldSettle =
      "Look at the near traces: the sound wave is sharp and high-pitched; pick the ground wave instead.";
  doubts.push_back(std::move(doubt));
}

void nearWater(const Units& units, int layer, const Estimate& v, std::vector<Doubt>& doubts) {
  constexpr double kWaterLow = 1400.0, kWaterHigh = 1700.0;
  if (!(v.low95 < kWaterHigh && v.high95 > kWaterLow && v.value > 1300.0 && v.value < 1900.0)) {
    return;
  }
  Doubt doubt = aboutLayer("water table", layer);
  doubt.says = "The top of " + layerName(layer) + " may be the water table rather than a change of ground.";
  doubt.restsOn = "Its velocity, " + units.velocity(v.value) + ", is what water-filled loose ground has too.";
  doubt.wouldSettle = "A water level in a borehole or a trial pit; shear waves, which water does not quicken.";
  doubts.push_back(std::move(doubt));
}

}  // namespace

void velocities(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Units units{survey.settings.feet};
  const Section& section = interpretation.section;
  if (!section.determined) {
    Doubt doubt;
    doubt.kind = "not determined";
    doubt.where = "the section";
    doubt.says = "No depth can be given.";
    doubt.restsOn = section.reason;
    doubt.wouldSettle = "See what it rests on: more picks, reversed shots, or another assignment.";
    doubts.push_back(std::move(doubt));
    return;
  }
  for (std::size_t i = 0; i < section.velocities.size(); ++i) {
    const Estimate& v = section.velocities[i];
    const int layer = static_cast<int>(i) + 1;
    if (layer == 1) {
      nearAir(units, v, doubts);
    } else {
      nearWater(units, layer, v, doubts);
    }
    if (i + 1 < section.velocities.size() && section.velocities[i + 1].value < 1.3 * v.value) {
      Doubt doubt = aboutLayer("low contrast", layer + 1);
      doubt.says = "Layers " + std::to_string(layer) + " and " + std::to_string(layer + 1) +
                   " differ little in velocity, so the depth between them depends strongly on both.";
      doubt.restsOn = units.velocity(v.value) + " over " + units.velocity(section.velocities[i + 1].value) + ".";
      doubt.wouldSettle = "A borehole, or trying one layer fewer and comparing.";
      doubts.push_back(std::move(doubt));
    }
  }
}

void depths(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Units units{survey.settings.feet};
  const Section& section = interpretation.section;
  constexpr double kWide = 0.5;  // half width of the band as a share of the depth
  for (const SectionInterface& interface : section.interfaces) {
    std::size_t wide = 0, count = 0, worst = 0;
    double worstShare = 0.0;
    for (std::size_t i = 0; i < section.x.size() && section.determined; ++i) {
      if (survey.geophones.empty() || section.x[i] < survey.geophones.front().x ||
          section.x[i] > survey.geophones.back().x) {
        continue;
      }
      const Estimate& d = interface.depth[i];
      const double share = d.determined ? 0.5 * (d.high95 - d.low95) / std::max(d.value, 1.0) : 1.0;
      ++count;
      wide += share > kWide ? 1U : 0U;
      if (share > worstShare) {
        worstShare = share;
        worst = i;
      }
    }
    if (count == 0 || wide * 10 < count) {
      continue;
    }
    Doubt doubt = aboutLayer("wide band", interface.layer);
    doubt.x = section.x[worst];
    doubt.says = "The depth to " + layerName(interface.layer) + " is poorly known along " +
                 fixed(100.0 * static_cast<double>(wide) / static_cast<double>(count), 0) + " % of the line.";
    doubt.restsOn = "Its 95 % band is wider than the depth itself there; at " + units.length(doubt.x) +
                    " it runs from " +
                    units.lengthRange(interface.depth[worst].low95, interface.depth[worst].high95) + ".";
    doubt.wouldSettle = "More picks through that layer from both sides, or a borehole.";
    doubts.push_back(std::move(doubt));
  }
  if (section.determined && section.noiseScale > 1.5) {
    Doubt doubt;
    doubt.kind = "misfit";
    doubt.where = "all picks";
    doubt.says = "The picks scatter " + fixed(section.noiseScale, 1) + " times more than their sigmas say.";
    doubt.restsOn = "Root mean square residual " + milliseconds(section.rms, 2) + "; the bands are widened for it.";
    doubt.wouldSettle = "Look for late triggers and wrong positions, then for a model that is too simple.";
    doubts.push_back(std::move(doubt));
  }
  if (section.determined && !section.converged) {
    Doubt doubt;
    doubt.kind = "not converged";
    doubt.where = "the section";
    doubt.says = "The inversion had not settled when it stopped.";
    doubt.restsOn = "The last step still changed the answer.";
    doubt.wouldSettle = "Check the assignment of the branches, then fix the number of layers.";
    doubts.push_back(std::move(doubt));
  }
}

void layerCount(const Survey&, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Section& section = interpretation.section;
  constexpr double kClose = -3.0;  // a factor of 20 in probability
  for (const LayerCountEvidence& other : section.layerCounts) {
    if (!section.determined || !other.determined || other.layers == section.layers || other.logEvidence < kClose) {
      continue;
    }
    Doubt doubt;
    doubt.kind = "number of layers";
    doubt.where = "the section";
    doubt.says = "The picks allow " + std::to_string(other.layers) + " layers nearly as well as " +
                 std::to_string(section.layers) + ".";
    doubt.restsOn = "Log evidence " + fixed(other.logEvidence, 1) + " against 0 for the count chosen.";
    doubt.wouldSettle = "Set the number of layers to " + std::to_string(other.layers) +
                        " and compare; closer geophones where the extra branch would be; a borehole.";
    doubts.push_back(std::move(doubt));
  }
}

void coverage(const Survey&, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Section& section = interpretation.section;
  const int layers = section.determined ? section.layers : 0;
  for (int layer = 1; layer <= layers; ++layer) {
    int picks = 0, forward = 0, reverse = 0;
    for (const Arrival& a : interpretation.times.arrivals) {
      if (a.layer == layer) {
        ++picks;
        ++(interpretation.times.signedOffset(a) > 0 ? forward : reverse);
      }
    }
    if (layer == 1 && picks < 3) {
      Doubt doubt = aboutLayer("direct arrivals", 1);
      doubt.says = "The first layer's velocity rests on " + std::to_string(picks) + " direct arrivals.";
      doubt.restsOn = "Every depth is proportional to a velocity that was hardly measured.";
      doubt.wouldSettle = "Shots close to geophones, at half the spacing from the end ones.";
      doubts.push_back(std::move(doubt));
    } else if (layer > 1 && (forward == 0 || reverse == 0)) {
      Doubt doubt = aboutLayer("one direction", layer);
      doubt.says = "Layer " + std::to_string(layer) +
                   " was shot from one side only, so its dip and its velocity cannot be "
                   "told apart.";
      doubt.restsOn = std::to_string(forward) + " arrivals towards larger and " + std::to_string(reverse) +
                      " towards smaller positions.";
      doubt.wouldSettle = "A shot beyond the other end of the line.";
      doubts.push_back(std::move(doubt));
    }
  }
}

void boreholes(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Units units{survey.settings.feet};
  for (const Borehole& borehole : survey.boreholes) {
    const Estimate depth = interpretation.section.depthAt(borehole.layer, borehole.x);
    if (!depth.determined) {
      continue;
    }
    const double misfit = depth.value - borehole.depth;
    const double allowed = std::hypot(0.5 * (depth.high95 - depth.low95), kNormal95 * borehole.sigma);
    if (std::abs(misfit) <= allowed) {
      continue;
    }
    Doubt doubt = aboutLayer("borehole", borehole.layer);
    doubt.x = borehole.x;
    doubt.where = (borehole.name.empty() ? "borehole" : borehole.name) + " at " + units.length(borehole.x);
    doubt.says = "The section puts " + layerName(borehole.layer) + " " + units.length(std::abs(misfit)) +
                 (misfit > 0 ? " deeper" : " shallower") + " than the borehole met it.";
    doubt.restsOn = "Section " + units.length(depth.value) + " (" + units.lengthRange(depth.low95, depth.high95) +
                    "), borehole " + units.length(borehole.depth) + (borehole.used ? ", used." : ", only compared.");
    doubt.wouldSettle =
        "Find out whether the driller and the seismic wave mean the same boundary; look for a hidden or "
        "slow layer.";
    doubts.push_back(std::move(doubt));
  }
}

}  // namespace strikeplate::doubt_rules
