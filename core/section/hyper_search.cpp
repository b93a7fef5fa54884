#include "core/section/hyper_search.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <set>
#include <utility>

#include <queue>

namespace strikeplate {
namespace {

// A choice with less than this share of the best one's evidence is not looked beyond.
constexpr double kLogWorthHaving = -4.6;

/// One hyperparameter as a coordinate of the grid.
struct Coordinate {
  int* value;
  int least;
  int count;
};

std::vector<Coordinate> coordinates(HyperChoice& choice, const SectionPrior& prior, const HyperLimits& limits) {
  std::vector<Coordinate> out;
  for (int k = 0; k < prior.layout().interfaces(); ++k) {
    out.push_back({&choice.roughness[k], 0, SectionPrior::kRoughnesses});
    if (limits.all) {
      out.push_back({&choice.length[k], 0, SectionPrior::kLengths});
    }
  }
  out.push_back({&choice.noise, limits.leastNoise, SectionPrior::kNoises});
  out.push_back({&choice.soil, 0, SectionPrior::kDeviations});
  if (prior.layout().interfaces() > 0 && limits.all) {
    out.push_back({&choice.rock, 0, SectionPrior::kDeviations});
  }
  return out;
}

std::vector<HyperChoice> neighbours(const HyperChoice& choice, const SectionPrior& prior) {
  std::vector<HyperChoice> out;
  HyperChoice moved = choice;
  for (const Coordinate& c : coordinates(moved, prior, {})) {
    const int at = *c.value;
    for (const int step : {-1, 1}) {
      if (at + step >= 0 && at + step < c.count) {
        *c.value = at + step;
        out.push_back(moved);
      }
    }
    *c.value = at;
  }
  return out;
}

}  // namespace

namespace {

/// Evidences already worked out.
class Evidences {
 public:
  explicit Evidences(const LinearisedPosterior& posterior) : posterior_(posterior) {}
  double operator()(const HyperChoice& choice) {
    const auto [at, fresh] = known_.try_emplace(choice, 0.0);
    if (fresh) {
      at->second = posterior_.fit(choice).logEvidence;
    }
    return at->second;
  }

 private:
  const LinearisedPosterior& posterior_;
  std::map<HyperChoice, double> known_;
};

}  // namespace

HyperChoice searchHyper(const LinearisedPosterior& posterior, HyperChoice start, const HyperLimits& limits,
                        int sweeps) {
  start.noise = std::max(start.noise, limits.leastNoise);
  HyperChoice best = start;
  Evidences evidences(posterior);
  double bestEvidence = evidences(best);
  for (int sweep = 0; sweep < sweeps; ++sweep) {
    const HyperChoice before = best;
    HyperChoice trial = best;
    for (const Coordinate& c : coordinates(trial, posterior.prior(), limits)) {
      // Walk while it gets better; look two steps far, as an amplitude of nothing can hide a better one behind it.
      int bestValue = *c.value;
      for (const int direction : {-1, 1}) {
        int worse = 0;
        for (int v = bestValue + direction; v >= c.least && v < c.count && worse < 2; v += direction) {
          *c.value = v;
          const double evidence = evidences(trial);
          if (evidence > bestEvidence) {
            bestEvidence = evidence;
            bestValue = v;
            best = trial;
            worse = 0;
          } else {
            ++worse;
          }
        }
      }
      *c.value = bestValue;
    }
    if (best == before) {
      break;
    }
  }
  return best;
}

std::vector<WeightedFit> exploreHyper(const LinearisedPosterior& posterior, const HyperChoice& mode, int most) {
  std::vector<WeightedFit> found{{posterior.fit(mode), 0.0}};
  double best = found.front().fit.logEvidence;
  using Entry = std::pair<double, std::size_t>;
  std::priority_queue<Entry> open;
  open.emplace(best, 0);
  std::set<HyperChoice> seen{mode};
  while (!open.empty() && static_cast<int>(found.size()) < most) {
    const auto [evidence, index] = open.top();
    open.pop();
    if (evidence < best + kLogWorthHaving) {
      break;
    }
    const HyperChoice at = found[index].fit.choice;
    for (const HyperChoice& next : neighbours(at, posterior.prior())) {
      if (static_cast<int>(found.size()) >= most || !seen.insert(next).second) {
        continue;
      }
      found.push_back({posterior.fit(next), 0.0});
      open.emplace(found.back().fit.logEvidence, found.size() - 1);
      best = std::max(best, found.back().fit.logEvidence);
    }
  }
  std::sort(found.begin(), found.end(),
            [](const WeightedFit& a, const WeightedFit& b) { return a.fit.logEvidence > b.fit.logEvidence; });
  double sum = 0.0;
  for (WeightedFit& w : found) {
    w.weight = std::exp(w.fit.logEvidence - best);
    sum += w.weight;
  }
  std::erase_if(found, [](const WeightedFit& w) { return w.weight < 1e-3; });
  for (WeightedFit& w : found) {
    w.weight /= sum;
  }
  return found;
}

double logSpread(const std::vector<WeightedFit>& fits) {
  return fits.empty() ? 0.0 : -std::log(fits.front().weight);
}

}  // namespace strikeplate
