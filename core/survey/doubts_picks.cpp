// Doubts about single picks, geophones and their assignment.
#include <algorithm>
#include <cmath>
#include <map>

#include "core/base/units.h"
#include "core/survey/doubts.h"

namespace strikeplate::doubt_rules {
namespace {

/// Pick minus the section's time, s; NaN where there is no prediction.
double residual(const Interpretation& interpretation, std::size_t arrival) {
  const Section& section = interpretation.section;
  return section.determined && arrival < section.predicted.size()
             ? interpretation.times.arrivals[arrival].time - section.predicted[arrival]
             : Estimate::kNaN;
}

double geophoneX(const Interpretation& interpretation, const Arrival& arrival) {
  return interpretation.times.geophones[static_cast<std::size_t>(arrival.geophone)].x;
}

const char* stateName(TraceState state) {
  return state == TraceState::Dead ? "dead" : state == TraceState::Reversed ? "reversed" : "noisy";
}

/// One doubt for each geophone that is not taken as live, however many shots it concerns.
void traceStates(const Survey& survey, std::vector<Doubt>& doubts) {
  struct Found {
    int shots = 0, shot = 0, trace = 0;
    std::string reason;
  };
  std::map<std::pair<int, TraceState>, Found> found;
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t) {
      const ShotTrace& trace = survey.shots[s].traces[t];
      if (trace.state == TraceState::Live) {
        continue;
      }
      Found& f = found[{trace.geophone, trace.state}];
      if (f.shots++ == 0) {
        f = {1, static_cast<int>(s), static_cast<int>(t), trace.stateReason};
      }
    }
  }
  const Units units{survey.settings.feet};
  for (const auto& [key, f] : found) {
    Doubt doubt;
    doubt.kind = "trace state";
    doubt.x = survey.geophones[static_cast<std::size_t>(key.first)].x;
    doubt.where =
        "geophone at " + units.length(doubt.x) + ", " + std::to_string(f.shots) + (f.shots == 1 ? " shot" : " shots");
    doubt.says =
        "The trace of the geophone at " + units.length(doubt.x) + " is taken as " + stateName(key.second) + ".";
    doubt.restsOn = f.reason;
    doubt.wouldSettle = "Look at the trace; set its state by hand if you disagree.";
    doubt.shot = f.shot;
    doubt.trace = f.trace;
    doubts.push_back(std::move(doubt));
  }
}

}  // namespace

void picks(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Section& section = interpretation.section;
  constexpr double kOutlier = 0.5;
  for (std::size_t i = 0; i < section.inlierProbability.size() && section.determined; ++i) {
    const double r = residual(interpretation, i);
    if (!(section.inlierProbability[i] < kOutlier) || !std::isfinite(r)) {
      continue;
    }
    const Arrival& a = interpretation.times.arrivals[i];
    Doubt doubt;
    doubt.kind = "pick off the curve";
    doubt.where = shotName(survey, a.shot) + ", trace " + std::to_string(a.trace + 1);
    doubt.says = "The first break of " + doubt.where + " is " + milliseconds(std::abs(r)) +
                 (r > 0 ? " later" : " earlier") + " than the section can explain.";
    doubt.restsOn = "Residual " + milliseconds(r) + " against a stated sigma of " + milliseconds(a.sigma, 2) +
                    "; the section gives it little weight.";
    doubt.wouldSettle = "Look at the trace and its neighbours again; move the pick, widen its sigma or delete it.";
    doubt.shot = a.shot;
    doubt.trace = a.trace;
    doubt.x = geophoneX(interpretation, a);
    doubts.push_back(std::move(doubt));
  }
}

void lateGeophones(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Units units{survey.settings.feet};
  struct Sum {
    int count = 0, sameSign = 0;
    double sum = 0.0, weight = 0.0;
    const Arrival* first = nullptr;
  };
  std::map<int, Sum> sums;
  for (std::size_t i = 0; i < interpretation.times.arrivals.size(); ++i) {
    const double r = residual(interpretation, i);
    if (!std::isfinite(r)) {
      continue;
    }
    const Arrival& a = interpretation.times.arrivals[i];
    Sum& s = sums[a.geophone];
    ++s.count;
    s.sameSign += r > 0 ? 1 : -1;
    s.sum += r / (a.sigma * a.sigma);
    s.weight += 1.0 / (a.sigma * a.sigma);
    s.first = s.first == nullptr ? &a : s.first;
  }
  constexpr int kFewestShots = 3;
  constexpr double kSmallest = 0.8e-3;
  for (const auto& [geophone, s] : sums) {
    const double mean = s.sum / s.weight;
    const double sigma = interpretation.section.noiseScale / std::sqrt(s.weight);
    if (s.count < kFewestShots || std::abs(s.sameSign) < s.count - 1 || std::abs(mean) < kSmallest ||
        std::abs(mean) < 3.0 * sigma) {
      continue;
    }
    Doubt doubt;
    doubt.kind = "geophone off on every shot";
    doubt.x = interpretation.times.geophones[static_cast<std::size_t>(geophone)].x;
    doubt.where = "geophone at " + units.length(doubt.x);
    doubt.says = "The geophone at " + units.length(doubt.x) + " is " + milliseconds(std::abs(mean)) +
                 (mean > 0 ? " late" : " early") + " on nearly every shot.";
    doubt.restsOn = "Mean residual " + milliseconds(mean) + " over " + std::to_string(s.count) +
                    " shots; bad coupling, a wrong elevation or loose ground at that place would do it.";
    doubt.wouldSettle = "Check the geophone's planting and elevation in the field notes.";
    doubt.shot = s.first->shot;
    doubt.trace = s.first->trace;
    doubts.push_back(std::move(doubt));
  }
}

void assignment(const Survey&, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Section& section = interpretation.section;
  constexpr double kSure = 0.8;
  std::map<int, std::vector<int>> unsure;
  int count = 0;
  for (std::size_t i = 0; i < section.layerProbability.size() && section.determined; ++i) {
    const Arrival& a = interpretation.times.arrivals[i];
    if (section.layerProbability[i] < kSure && !a.layerByHand) {
      unsure[a.shot].push_back(a.trace);
      ++count;
    }
  }
  const int total = static_cast<int>(interpretation.times.arrivals.size());
  if (count * 10 < total || count < 3) {
    return;
  }
  Doubt doubt;
  doubt.kind = "assignment";
  doubt.where = std::to_string(count) + " of " + std::to_string(total) + " picks, near the crossovers";
  doubt.says = "Many picks could belong to either of two layers.";
  doubt.restsOn = std::to_string(count) + " picks belong to their layer with a probability below 80 %.";
  doubt.wouldSettle = "Closer geophones or more shots near the crossovers; assign what you know by hand.";
  doubt.shot = unsure.begin()->first;
  doubt.trace = unsure.begin()->second.front();
  doubts.push_back(std::move(doubt));
}

void files(const Survey& survey, const Interpretation&, std::vector<Doubt>& doubts) {
  for (const std::string& remark : survey.remarks) {
    Doubt doubt;
    doubt.kind = "file";
    const auto colon = remark.find(": ");
    doubt.where = colon == std::string::npos ? "records" : remark.substr(0, colon);
    doubt.says = remark;
    doubt.restsOn = "What the file holds, as it was read.";
    doubt.wouldSettle = "Compare with the field notes.";
    doubts.push_back(std::move(doubt));
  }
  traceStates(survey, doubts);
}

}  // namespace strikeplate::doubt_rules
