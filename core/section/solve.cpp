#include "core/section/solve.h"

#include <algorithm>
#include <cmath>
#include <optional>
#include <utility>

#include "core/section/assemble.h"
#include "core/section/check.h"
#include "core/section/memory.h"
#include "core/section/mode.h"

namespace strikeplate {
namespace {

constexpr int kMostLayersTried = 5;  // by evidence; more only when asked for
constexpr int kLiveSteps = 2;
constexpr int kLiveHalvings = 2;
constexpr double kLiveEnough = 0.02;  // nats

SectionProblem problemOf(const TravelTimes& times, const SectionOptions& options) {
  SectionProblem p;
  p.grid = makeSectionGrid(times);
  p.picks = makeSectionPicks(times);
  p.solveDelays = options.solveTriggerDelays;
  for (const Borehole& b : options.boreholes) {
    if (b.used && b.layer >= 2 && b.sigma > 0.0 && std::isfinite(b.depth) && b.x >= p.grid.lineStart &&
        b.x <= p.grid.lineEnd) {
      p.boreholes.push_back(b);
    }
  }
  return p;
}

bool anyHeldDeeper(const TravelTimes& times) {
  return std::any_of(times.arrivals.begin(), times.arrivals.end(),
                     [](const Arrival& a) { return a.layerByHand && a.layer > 1; });
}

int deepestHeld(const TravelTimes& times) {
  int deepest = 2;
  for (const Arrival& a : times.arrivals) {
    deepest = std::max(deepest, a.layerByHand ? a.layer : 0);
  }
  return std::min(deepest, kMostLayers);
}

std::string whyOneBranch(const SectionCandidate& two) {
  std::string why = "The times lie on one branch";
  if (!two.rejected.empty()) {
    why += " (" + two.rejected + ")";
  }
  return why +
         "; no refractor shows: a longer line or farther shots might reach one, a slower layer below stays unseen.";
}

/// Tries numbers of layers upwards until the evidence falls.
class LayerSearch {
 public:
  LayerSearch(const SectionProblem& problem, const TravelTimes& times, const Progress& progress)
      : problem_(problem), times_(times), progress_(progress) {}

  void run(int first, int last) {
    double best = -std::numeric_limits<double>::infinity();
    for (int layers = first; layers <= last; ++layers) {
      const double n = last - first + 1.0;
      SectionCandidate c =
          solveLayers(problem_, times_, layers, best, {&progress_, (layers - first) / n, (layers - first + 1) / n});
      const bool stands = c.stands();
      const double evidence = stands ? c.logEvidence() : -std::numeric_limits<double>::infinity();
      finished_ = finished_ && c.finished;
      tried_.push_back(std::move(c));
      if (!finished_ || (layers > 2 && evidence < best)) {
        break;
      }
      best = std::max(best, evidence);
    }
  }

  [[nodiscard]] SectionCandidate* best() {
    SectionCandidate* found = nullptr;
    for (SectionCandidate& c : tried_) {
      if (c.stands() && (found == nullptr || c.logEvidence() > found->logEvidence())) {
        found = &c;
      }
    }
    return found;
  }

  [[nodiscard]] const SectionCandidate& first() const { return tried_.front(); }
  [[nodiscard]] bool finished() const { return finished_; }

  [[nodiscard]] std::vector<LayerCountEvidence> evidences(const SectionCandidate& chosen) const {
    std::vector<LayerCountEvidence> out;
    for (const SectionCandidate& c : tried_) {
      out.push_back({c.layers, c.stands() ? c.logEvidence() - chosen.logEvidence() : Estimate::kNaN, c.stands()});
    }
    return out;
  }

 private:
  const SectionProblem& problem_;
  const TravelTimes& times_;
  const Progress& progress_;
  std::vector<SectionCandidate> tried_;
  bool finished_ = true;
};

}  // namespace

Section solveSection(const TravelTimes& times, const SectionOptions& options, const Progress& progress) {
  if (const std::string why = whyNoSection(times, options); !why.empty()) {
    return undeterminedSection(times, why);
  }
  const SectionProblem problem = problemOf(times, options);
  LayerSearch search(problem, times, progress);
  const bool byEvidence = options.layers == 0;
  search.run(byEvidence ? deepestHeld(times) : options.layers, byEvidence ? kMostLayersTried : options.layers);
  SectionCandidate* best = search.best();
  if (best == nullptr) {
    Section s = undeterminedSection(
        times, search.finished() ? whyOneBranch(search.first()) : "Stopped before a section was found.");
    s.finished = search.finished();
    return s;
  }
  if (!anyHeldDeeper(times)) {
    const SectionCandidate one = solveLayers(problem, times, 1, best->logEvidence(), {});
    if (one.stands() && one.logEvidence() > best->logEvidence()) {
      return undeterminedSection(times, whyOneBranch(search.first()));
    }
  }
  if (search.finished()) {
    addGradient(problem, *best);
  }
  Section s = assembleSection(problem, times, options, *best);
  s.layerCounts = search.evidences(*best);
  s.finished = search.finished();
  goOn(progress, 1.0);
  return s;
}

Section resolveSection(const TravelTimes& times, const SectionOptions& options, const SectionMemory& memory) {
  if (const std::string why = whyNoSection(times, options); !why.empty()) {
    return undeterminedSection(times, why);
  }
  const SectionProblem problem = problemOf(times, options);
  const std::optional<Recalled> recalled =
      options.layers == 0 || options.layers == memory.layers ? recall(problem, memory) : std::nullopt;
  if (!recalled) {
    return solveSection(times, options);
  }
  SectionCandidate candidate;
  candidate.layers = memory.layers;
  candidate.centre = recalled->centre;
  SectionMode mode;
  const auto prior = std::make_shared<const SectionPrior>(
      problem.grid, problem.layout(memory.layers, recalled->gradient), recalled->centre);
  if (recalled->xi.size() != prior->columns()) {
    return solveSection(times, options);
  }
  SectionState state;
  state.choice = recalled->choice;
  state.xi = recalled->xi;
  state.labels.assign(times.arrivals.size(), 1);
  state.labelsFree = true;
  state.noise = PickNoise::Shape::kMixture;
  mode.prior = prior;
  mode.inversion = std::make_shared<SectionInversion>(problem, *prior, std::move(state));
  mode.inversion->setDoubt(mode.inversion->measureDoubt());
  mode.converged = mode.inversion->iterate(kLiveSteps, kLiveEnough, kLiveHalvings);
  const LinearisedPosterior posterior = mode.inversion->linearise();
  for (const auto& [choice, weight] : recalled->choices) {
    mode.fits.push_back({posterior.fit(choice), weight});
  }
  candidate.modes.push_back(std::move(mode));
  return assembleSection(problem, times, options, candidate);
}

}  // namespace strikeplate
