#pragma once

#include <algorithm>
#include <cmath>
#include <memory>
#include <random>
#include <utility>

#include "core/survey/interpretation.h"

// An invented line with its interpretation written down, not solved for: the sheet's tests need numbers that are
// known, not numbers that are right.
namespace strikeplate::testing {

struct SheetSample {
  Survey survey;
  Interpretation interpretation;
};

struct SheetSampleSize {
  int geophones = 48;
  int shots = 7;
  int layers = 3;
  int boreholes = 2;
};

inline Estimate estimate(double value, double sigma) {
  return Estimate::normal(value, sigma);
}

inline double sampleVelocity(int layer) {
  return 420.0 * std::pow(2.1, layer - 1);
}

inline double sampleGround(double x) {
  return 101.0 + 0.8 * std::sin(x / 30.0);
}

// Depth to the top of a layer under x.
inline double sampleDepth(int layer, double x) {
  return 2.4 * (layer - 1) * (layer - 1) + 0.35 * (layer - 1) * std::sin(x / 14.0 + layer) + 0.01 * x;
}

// First arrival by delay times: direct, or refracted at each interface.
inline std::pair<double, int> sampleTime(double from, double to, int layers) {
  std::pair<double, int> first{std::abs(to - from) / sampleVelocity(1), 1};
  for (int layer = 2; layer <= layers; ++layer) {
    double delay = 0.0;
    for (int above = 1; above < layer; ++above) {
      const double slowness = std::sqrt(std::pow(sampleVelocity(above), -2) - std::pow(sampleVelocity(layer), -2));
      const auto thickness = [above](double x) {
        return sampleDepth(above + 1, x) - (above > 1 ? sampleDepth(above, x) : 0.0);
      };
      delay += slowness * (thickness(from) + thickness(to));
    }
    first = std::min(first, {std::abs(to - from) / sampleVelocity(layer) + delay, layer});
  }
  return first;
}

inline RecordPtr sampleRecord(int number, int traces) {
  auto record = std::make_shared<ShotRecord>();
  record->file = "line7_" + std::to_string(number) + ".dat";
  record->format = "SEG-2";
  for (int i = 0; i < traces; ++i) {
    Trace trace;
    trace.sampleInterval = 1.25e-4;
    trace.delay = -0.01;
    trace.samples.assign(2000, 0.0F);
    trace.stack = 2;
    record->traces.push_back(trace);
  }
  return record;
}

inline void addSampleShots(SheetSample& sample, const SheetSampleSize& size, std::mt19937& random) {
  std::normal_distribution<double> noise(0.0, 5e-4);
  const double length = 2.0 * (size.geophones - 1);
  for (int s = 0; s < size.shots; ++s) {
    Shot shot;
    const double x = -4.0 + (length + 8.0) * s / std::max(1, size.shots - 1);
    shot.point = {x, sampleGround(x), 0.0};
    shot.triggerCorrection = s == 2 ? -0.0015 : 0.0;
    for (int blow = 0; blow < 2; ++blow) {
      sample.survey.records.push_back(sampleRecord(2 * s + blow + 1, size.geophones));
      shot.blows.push_back({2 * s + blow, 2.5e-4 * blow, 0.98, true});
    }
    for (int g = 0; g < size.geophones; ++g) {
      ShotTrace trace{g, TraceState::Live, "", std::nullopt};
      if (s == 1 && g == 5) {
        trace.state = TraceState::Dead;
      } else if (g % 17 != 3) {
        const double time = sampleTime(x, sample.survey.geophones[static_cast<std::size_t>(g)].x, size.layers).first;
        trace.pick = Pick{time + noise(random) - shot.triggerCorrection, 6e-4, g % 9 == 0 ? 2 : 0,
                          g % 6 == 0 ? PickOrigin::Hand : PickOrigin::Automatic};
      }
      shot.traces.push_back(trace);
    }
    sample.survey.shots.push_back(shot);
  }
}

inline void addSampleTimes(SheetSample& sample, const SheetSampleSize& size) {
  TravelTimes& times = sample.interpretation.times;
  times.geophones = sample.survey.geophones;
  for (const Shot& shot : sample.survey.shots) {
    times.shots.push_back(shot.point);
  }
  times.ground = Ground(times.geophones, times.shots);
  for (int s = 0; s < size.shots; ++s) {
    const Shot& shot = sample.survey.shots[static_cast<std::size_t>(s)];
    for (int g = 0; g < size.geophones; ++g) {
      if (const auto& pick = shot.traces[static_cast<std::size_t>(g)].pick) {
        const auto [time, layer] =
            sampleTime(shot.point.x, times.geophones[static_cast<std::size_t>(g)].x, size.layers);
        times.arrivals.push_back({s, g, g, pick->time + shot.triggerCorrection, pick->sigma, layer, false});
        sample.interpretation.section.predicted.push_back(time);
      }
    }
  }
}

inline void addSampleBranches(SheetSample& sample, const SheetSampleSize& size) {
  const TravelTimes& times = sample.interpretation.times;
  for (int s = 0; s < size.shots; ++s) {
    for (const int side : {-1, 1}) {
      for (int layer = 1; layer <= size.layers; ++layer) {
        Branch branch;
        branch.shot = s;
        branch.side = side;
        branch.layer = layer;
        double n = 0, sx = 0, st = 0, sxx = 0, sxt = 0;
        for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
          const Arrival& a = times.arrivals[i];
          if (a.shot == s && a.layer == layer && times.signedOffset(a) * side > 0) {
            branch.arrivals.push_back(static_cast<int>(i));
            const double x = times.offset(a);
            n += 1, sx += x, st += a.time, sxx += x * x, sxt += x * a.time;
          }
        }
        if (branch.arrivals.size() > 2) {
          branch.fit.determined = true;
          branch.fit.count = static_cast<int>(branch.arrivals.size());
          branch.fit.slope = (n * sxt - sx * st) / (n * sxx - sx * sx);
          branch.fit.intercept = (st - branch.fit.slope * sx) / n;
          branch.velocity = Estimate::fromSlowness(branch.fit.slope, branch.fit.slope * 0.02);
          sample.interpretation.branches.push_back(branch);
        }
      }
    }
  }
}

inline void addSampleSection(SheetSample& sample, const SheetSampleSize& size) {
  Section& section = sample.interpretation.section;
  section.determined = section.converged = true;
  section.layers = size.layers;
  section.rms = 5.2e-4;
  section.noiseScale = 0.92;
  section.layerCounts = {{size.layers, 0.0, true}, {size.layers - 1, -41.3, true}};
  for (double x = -4.0; x <= 2.0 * (size.geophones - 1) + 4.0; x += 1.0) {
    section.x.push_back(x);
    section.ground.push_back(sampleGround(x));
  }
  for (int layer = 1; layer <= size.layers; ++layer) {
    section.velocities.push_back(estimate(sampleVelocity(layer), 0.02 * sampleVelocity(layer)));
    section.velocityAlong.emplace_back(section.x.size(), sampleVelocity(layer));
  }
  for (int layer = 2; layer <= size.layers; ++layer) {
    SectionInterface interface;
    interface.layer = layer;
    interface.meanDip = estimate(0.6, 0.2);
    for (std::size_t i = 0; i < section.x.size(); ++i) {
      const double depth = sampleDepth(layer, section.x[i]);
      const double outside = std::max(0.0, std::abs(section.x[i] - (size.geophones - 1)) - 0.7 * size.geophones);
      const double sigma = 0.04 * depth + 0.03 * outside;
      interface.depth.push_back(estimate(depth, sigma));
      interface.elevation.push_back(estimate(section.ground[i] - depth, sigma));
    }
    section.interfaces.push_back(interface);
  }
}

inline void addSampleChecks(SheetSample& sample, const SheetSampleSize& size) {
  Interpretation& i = sample.interpretation;
  for (int a = 0; a < size.shots; ++a) {
    for (int b = a + 1; b < size.shots; ++b) {
      const double time = sampleTime(sample.survey.shots[static_cast<std::size_t>(a)].point.x,
                                     sample.survey.shots[static_cast<std::size_t>(b)].point.x, size.layers)
                              .first;
      i.reciprocals.push_back({a, b, time + 2e-4 * a, time - (a == 2 ? 3e-3 : 1e-4), 1.7e-3});
    }
  }
  for (const char* route : {"intercept time", "crossover distance", "plus-minus", "generalized reciprocal method"}) {
    for (int layer = 2; layer <= size.layers; ++layer) {
      for (int s = 0; s < size.shots; ++s) {
        const double x = 3.0 + 11.0 * s;
        i.opinions.push_back(
            {route, layer, s, x, estimate(sampleDepth(layer, x) * (1.0 + 0.02 * s), 0.4), "flat layers"});
      }
    }
  }
  i.opinions.push_back({"time terms", 2, -1, 0.0, Estimate::none("fewer than two shots share a refractor"), ""});
  i.doubts.push_back({"reciprocal time", "shots 3 and 6",
                      "Times of shots 3 and 6 read at each other's place differ by 3.4 ms",
                      "57.1 against 60.5 ms; tolerance 1.7 ms", "a look at the trigger of shot 3, or a repeated blow",
                      2, -1, 0, 30.0});
  i.doubts.push_back({"few picks", "layer 3, shot 1", "The far branch of shot 1 rests on four picks",
                      "4 picks, 0.6 ms each", "a shot farther from the spread", 0, -1, 3, 80.0});
}

inline void addSampleBoreholes(SheetSample& sample, const SheetSampleSize& size) {
  for (int b = 0; b < size.boreholes; ++b) {
    const double x = 13.0 + 73.0 * b / std::max(1, size.boreholes - 1);
    sample.survey.boreholes.push_back({x, 2 + b % (size.layers - 1), sampleDepth(2 + b % (size.layers - 1), x) + 0.2,
                                       0.1, b % 2 == 1, "BH-" + std::to_string(b + 1)});
  }
}

/// 94 m of line along the meridian at 46 degrees north, where a degree has 111 152 m.
inline LineOnMap sampleMap() {
  return {{0.0, 8.5, 46.0}, {94.0, 8.5, 46.0 + 94.0 / 111152.0}};
}

inline SheetSample sheetSample(const SheetSampleSize& size = {}) {
  SheetSample sample;
  std::mt19937 random(7);
  sample.survey.info = {"Depth to rock along the mill road",
                        "Harrow & Pell Drainage",
                        "Mill road, chainage 400 to 500",
                        "7",
                        "2026-05-04",
                        "I. Vance, R. Okafor",
                        "I. Vance",
                        "7 kg hammer on a steel plate",
                        "vertical, 10 Hz",
                        "24-bit, 48 channels",
                        "dry, grass",
                        "site datum",
                        ""};
  for (int g = 0; g < size.geophones; ++g) {
    sample.survey.geophones.push_back({2.0 * g, sampleGround(2.0 * g)});
  }
  addSampleShots(sample, size, random);
  addSampleTimes(sample, size);
  addSampleBranches(sample, size);
  addSampleSection(sample, size);
  addSampleChecks(sample, size);
  addSampleBoreholes(sample, size);
  return sample;
}

/// The same with everything that makes a sheet full: 120 geophones, 31 shots, 6 layers, 10 boreholes with long names,
/// 40 doubts of 5 kinds, solved trigger delays, an inversion that has not settled, accented and right-to-left names.
inline SheetSample fullSheetSample() {
  SheetSample sample = sheetSample({120, 31, 6, 10});
  sample.survey.info.client = "Société d’aménagement hydraulique de l’Œuvre-Haute";
  sample.survey.info.site = "محطة المياه الجديدة";
  sample.survey.info.crew = "Þóra Ægisdóttir, Zbigniew Żółć, Ingeborg Straßenburger, Nuño Ibáñez, Łucja Wróbel";
  sample.survey.info.title = "Entwässerungsgraben Hauptstraße: Tiefe des Felses zwischen Brücke und Pumpwerk";
  for (Borehole& hole : sample.survey.boreholes) {
    hole.name = "Observation well " + hole.name + " by the mill";
  }
  Interpretation& i = sample.interpretation;
  i.section.converged = false;
  i.section.triggerDelays.assign(31, Estimate::none("not solved for"));
  for (const std::size_t shot : {3U, 17U, 28U}) {
    i.section.triggerDelays[shot] = Estimate::normal(-0.0031, 0.0002);
  }
  for (int d = 0; d < 40; ++d) {
    const std::string number = std::to_string(d);
    i.doubts.push_back(
        {"kind " + std::to_string(d % 5), "trace " + number,
         "The first break of shot 4 at 12.0 m, trace " + number + " is later than the section can explain",
         "Residual 2.5 ms against a stated sigma of 0.28 ms", "Look at the trace and its neighbours again", -1, -1, 0,
         0.0});
  }
  return sample;
}

/// A survey of which nobody told anything, and in which nothing could be determined.
inline SheetSample emptySheetSample() {
  SheetSample sample;
  sample.interpretation.section.reason = "there are no picks; pick first breaks";
  return sample;
}

}  // namespace strikeplate::testing
