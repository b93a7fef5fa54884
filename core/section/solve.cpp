#include "core/section/solve.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <memory>
#include <optional>
#include <utility>

#include "core/section/assemble.h"
#include "core/section/check.h"
#include "core/section/late_shots.h"
#include "core/section/memory.h"
#include "core/section/mode.h"
#include "core/section/predict.h"

namespace strikeplate {
namespace {

constexpr int kMostLayersTried = 5;  // by evidence; more only when asked for
constexpr int kLiveSteps = 2;
constexpr int kLiveHalvings = 2;
constexpr double kLiveEnough = 0.02;    // nats
constexpr double kLogDelayWorth = 3.0;  // what trigger delays must gain

SectionProblem problemOf(const TravelTimes& times, const SectionOptions& options) {
  SectionProblem p;
  p.grid = makeSectionGrid(times);
  p.picks = makeSectionPicks(times);
  p.delaySigma.assign(p.picks.shots.size(), options.solveTriggerDelays ? kTriggerSigma : 0.0);
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

/// Tries numbers of layers upwards until the evidence falls. Shots that stand off the section get a trigger delay
/// of their own where the evidence asks for it, so that a late trigger does not pass for a layer.
class LayerSearch {
 public:
  struct Found {
    std::shared_ptr<const SectionProblem> problem;  // the candidate's inversions refer to it
    SectionCandidate candidate;

    [[nodiscard]] double logEvidence() const {
      return candidate.stands() ? candidate.logEvidence() : -std::numeric_limits<double>::infinity();
    }
  };

  LayerSearch(std::shared_ptr<const SectionProblem> problem, const TravelTimes& times, const Progress& progress)
      : problem_(std::move(problem)), times_(times), progress_(progress) {}

  void run(int first, int last) {
    double best = -std::numeric_limits<double>::infinity();
    for (int layers = first; layers <= last; ++layers) {
      const double n = last - first + 1.0;
      Found found = solve(layers, best, {&progress_, (layers - first) / n, (layers - first + 1) / n});
      const double evidence = found.logEvidence();
      finished_ = finished_ && found.candidate.finished;
      tried_.push_back(std::move(found));
      if (!finished_ || (layers > 2 && evidence < best)) {
        break;
      }
      best = std::max(best, evidence);
    }
  }

  [[nodiscard]] Found* best() {
    Found* found = nullptr;
    for (Found& f : tried_) {
      if (f.candidate.stands() && (found == nullptr || f.logEvidence() > found->logEvidence())) {
        found = &f;
      }
    }
    return found;
  }

  [[nodiscard]] const SectionCandidate& first() const { return tried_.front().candidate; }
  [[nodiscard]] bool finished() const { return finished_; }

  [[nodiscard]] std::vector<LayerCountEvidence> evidences(const Found& chosen) const {
    std::vector<LayerCountEvidence> out;
    for (const Found& f : tried_) {
      const bool stands = f.candidate.stands();
      out.push_back({f.candidate.layers, stands ? f.logEvidence() - chosen.logEvidence() : Estimate::kNaN, stands});
    }
    return out;
  }

 private:
  Found solve(int layers, double toBeat, const ProgressPart& progress) {
    const bool asked = problem_->solvesDelays() && delays_.empty();
    Found found{problem_, solveLayers(*problem_, delays_.empty() ? times_ : withoutDelays(times_, delays_), layers,
                                      toBeat, progress)};
    charge(found, delays_);
    constexpr int kMostDelayRounds = 2;
    for (int round = 0; !asked && round < kMostDelayRounds && found.candidate.stands() && found.candidate.finished;
         ++round) {
      std::vector<double> delays = delaysAskedFor(*found.candidate.modes.front().inversion);
      if (!more(delays, delays_)) {
        break;
      }
      auto problem = std::make_shared<const SectionProblem>(withDelays(*problem_, delays));
      Found other{problem, solveLayers(*problem, withoutDelays(times_, delays), layers, toBeat, progress)};
      charge(other, delays);
      if (!(other.logEvidence() > found.logEvidence() + kLogDelayWorth)) {
        break;
      }
      problem_ = std::move(problem);
      delays_ = std::move(delays);
      found = std::move(other);
    }
    return found;
  }

  /// A delay may be any shot's: each costs the logarithm of the number of shots.
  void charge(Found& found, const std::vector<double>& delays) const {
    const auto count = delays.size() - static_cast<std::size_t>(std::count(delays.begin(), delays.end(), 0.0));
    for (SectionMode& mode : found.candidate.modes) {
      mode.logEvidence -= static_cast<double>(count) * std::log(static_cast<double>(times_.shots.size()));
    }
  }

  /// True when there is a delay that did not stand before.
  static bool more(const std::vector<double>& delays, const std::vector<double>& before) {
    for (std::size_t s = 0; s < delays.size(); ++s) {
      if (delays[s] != 0.0 && (before.empty() || before[s] == 0.0)) {
        return true;
      }
    }
    return false;
  }

  std::shared_ptr<const SectionProblem> problem_;
  const TravelTimes& times_;
  const Progress& progress_;
  std::vector<double> delays_;  // s, for each shot that has one by the evidence
  std::vector<Found> tried_;
  bool finished_ = true;
};

}  // namespace

Section solveSection(const TravelTimes& times, const SectionOptions& options, const Progress& progress) {
  if (const std::string why = whyNoSection(times, options); !why.empty()) {
    return undeterminedSection(times, why);
  }
  const auto problem = std::make_shared<const SectionProblem>(problemOf(times, options));
  LayerSearch search(problem, times, progress);
  const bool byEvidence = options.layers == 0;
  search.run(byEvidence ? deepestHeld(times) : options.layers, byEvidence ? kMostLayersTried : options.layers);
  LayerSearch::Found* best = search.best();
  if (best == nullptr) {
    Section s = undeterminedSection(
        times, search.finished() ? whyOneBranch(search.first()) : "Stopped before a section was found.");
    s.finished = search.finished();
    return s;
  }
  if (!anyHeldDeeper(times)) {
    const SectionCandidate one = solveLayers(*problem, times, 1, best->logEvidence(), {});
    if (one.stands() && one.logEvidence() > best->logEvidence()) {
      return undeterminedSection(times, whyOneBranch(search.first()));
    }
  }
  if (search.finished()) {
    addGradient(*best->problem, best->candidate);
  }
  Section s = assembleSection(*best->problem, times, options, best->candidate);
  s.layerCounts = search.evidences(*best);
  s.finished = search.finished();
  goOn(progress, 1.0);
  return s;
}

Section resolveSection(const TravelTimes& times, const SectionOptions& options, const SectionMemory& memory) {
  if (const std::string why = whyNoSection(times, options); !why.empty()) {
    return undeterminedSection(times, why);
  }
  SectionProblem problem = problemOf(times, options);
  const std::optional<Recalled> recalled =
      options.layers == 0 || options.layers == memory.layers ? recall(problem, memory) : std::nullopt;
  if (!recalled) {
    return solveSection(times, options);
  }
  problem.delaySigma = recalled->centre.delaySigma;
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

std::vector<double> predictedTimes(const TravelTimes& wanted, const Section& section, const SectionOptions& options) {
  std::vector<double> out;
  if (!section.determined) {
    return out;
  }
  SectionProblem problem = problemOf(wanted, options);
  const std::optional<Recalled> recalled = recall(problem, section.memory);
  if (!recalled) {
    return out;
  }
  problem.delaySigma = recalled->centre.delaySigma;
  const SectionLayout layout = problem.layout(section.memory.layers, recalled->gradient);
  const SectionPrior prior(problem.grid, layout, recalled->centre);
  if (recalled->xi.size() != prior.columns()) {
    return out;
  }
  const Eigen::VectorXd theta = prior.apply(recalled->choice, recalled->xi);
  const SectionForward forward(makeSectionModel(problem.grid, layout, theta), problem.picks);
  for (int i = 0; i < problem.picks.count(); ++i) {
    out.push_back(forward.time(i, forward.earliest(i)) + theta[layout.delay(problem.picks.picks[i].shot)]);
  }
  return out;
}

}  // namespace strikeplate
