#include "core/section/mode.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>

namespace strikeplate {
namespace {

constexpr int kMostStarts = 3;
constexpr int kMovedStartsBelow = 200;  // picks; larger surveys need no moved crossovers
constexpr int kMostFits = 40;
constexpr int kMostRounds = 6;
constexpr int kLeastRounds = 2;  // the doubt of labels settles in two
constexpr int kLeastPicks = 4;   // on a refractor
constexpr double kLeastContrast = 1.05;
constexpr double kLogModeWorth = -4.0;
constexpr double kLogLayerPenalty = 1.0986122886681098;  // ln 3
constexpr double kFirstVelocity = 450.0;                 // m/s, where next to no direct arrival was picked

SectionState startState(const SectionProblem& problem, const SectionPrior& prior, const PriorCentre& centre,
                        const LineStart& start) {
  SectionState s;
  s.choice.roughness.fill(4);
  s.choice.length.fill(2);
  s.choice.soil = 1;
  s.choice.rock = 0;
  s.choice.noise = SectionPrior::noiseNearest(1.0);
  s.labels = start.labels;
  s.xi = Eigen::VectorXd::Zero(prior.columns());
  const Eigen::VectorXd scales = prior.scales(s.choice);
  const double least = 0.25 * problem.grid.knotSpacing;
  const double middle = problem.grid.knotX[prior.layout().knots / 2];
  const double quarter = 0.25 * problem.grid.length();
  const std::vector<double> depths = start.depths(middle, least);
  const std::vector<double> left = start.depths(middle - quarter, least);
  const std::vector<double> right = start.depths(middle + quarter, least);
  const std::vector<double> logVelocities = start.logVelocities();
  const SectionLayout& layout = prior.layout();
  for (int k = 1; k <= layout.interfaces(); ++k) {
    const int column = prior.firstColumn(k);
    // The guess is a plane that dips against the prior's, which follows the ground's trend.
    const double slope = (left[k - 1] - right[k - 1]) / (2.0 * quarter);
    const double atMiddle = prior.mean()[layout.elevation(k) + layout.knots / 2];
    const double trend = atMiddle + centre.depth[k - 1];
    const double offCentre = middle - 0.5 * (problem.grid.lineStart + problem.grid.lineEnd);
    s.xi[column] = (trend - depths[k - 1] - atMiddle - slope * offCentre) / scales[column];
    s.xi[column + 1] = slope / scales[column + 1];
  }
  for (int layer = 1; layer <= layout.layers; ++layer) {
    const int column = prior.velocityColumn(layer);
    s.xi[column] = (logVelocities[layer - 1] - prior.mean()[layout.logVelocity(layer)]) / scales[column];
  }
  return s;
}

PriorCentre centreOf(const SectionProblem& problem, const LineStart& start) {
  PriorCentre c;
  c.depth = start.depths(0.5 * (problem.grid.lineStart + problem.grid.lineEnd), 0.25 * problem.grid.knotSpacing);
  c.logVelocity = start.logVelocities();
  const auto direct = std::count(start.labels.begin(), start.labels.end(), 1);
  if (direct < 5) {
    c.logVelocity[0] = std::min(std::log(kFirstVelocity), c.logVelocity.back() - 0.3);
    c.firstSigma = 0.45;
  }
  return c;
}

std::vector<LineStart> startsFor(const TravelTimes& times, int layers) {
  std::vector<LineStart> starts = lineStarts(times, layers, kMostStarts);
  if (!starts.empty() && layers > 1 && static_cast<int>(times.arrivals.size()) < kMovedStartsBelow) {
    const LineStart best = starts.front();
    starts.push_back(withCrossoversMoved(times, best, 0.6));
    starts.push_back(withCrossoversMoved(times, best, 1.6));
  }
  if (std::optional<LineStart> assigned = assignedStart(times, layers)) {
    starts.push_back(*std::move(assigned));
  }
  return starts;
}

/// The least noise factor that the residuals as they stand allow. A step that is not there yet leaves a tail of
/// residuals; taken for gross mispicks they would never be fitted any more.
int leastNoise(const SectionInversion& inversion) {
  constexpr double kNormal80 = 1.2815515655446004;  // four in five of a normal's |values| lie below
  constexpr double kAllowance = 0.7;                // for the share of real mispicks
  std::vector<double> r;
  for (int i = 0; i < inversion.problem().picks.count(); ++i) {
    const SectionPick& p = inversion.problem().picks.picks[i];
    r.push_back(std::abs(p.time - inversion.predicted(i)) / p.sigma);
  }
  const auto at = r.begin() + static_cast<long>(0.8 * static_cast<double>(r.size()));
  std::nth_element(r.begin(), at, r.end());
  return SectionPrior::noiseNearest(kAllowance * *at / kNormal80);
}

/// Searches the hyperparameters where the inversion stands and moves it to the best ones' mean. True when they have
/// changed.
bool learn(SectionInversion& inversion, bool rock, int sweeps) {
  SectionState next = inversion.state();
  const HyperChoice before = next.choice;
  const LinearisedPosterior posterior = inversion.linearise();
  next.choice = searchHyper(posterior, next.choice, {leastNoise(inversion), rock}, sweeps);
  const bool changed = next.choice != before;
  if (changed) {
    next.xi = posterior.fit(next.choice).xi;
    inversion.restart(std::move(next));
  }
  return changed;
}

void freeLabels(SectionInversion& inversion) {
  SectionState next = inversion.state();
  next.noise = PickNoise::Shape::kMixture;
  next.labelsFree = true;
  inversion.restart(std::move(next));
}

void doubtLabels(SectionInversion& inversion) {
  SectionState next = inversion.state();
  next.doubt = inversion.measureDoubt();
  inversion.restart(std::move(next));
}

/// ln evidence where the inversion stands, hyperparameters held.
double evidenceNow(const SectionInversion& inversion) {
  const SectionFit fit = inversion.linearise().fit(inversion.state().choice);
  return inversion.logJoint() - fit.halfLogDet;
}

void finish(SectionMode& mode, int layers) {
  SectionInversion& inversion = *mode.inversion;
  mode.converged = inversion.iterate(8);
  for (int round = 0; round < kMostRounds; ++round) {
    const bool changed = learn(inversion, true, 2);
    if (!changed && round >= kLeastRounds) {
      break;
    }
    doubtLabels(inversion);
    mode.converged = inversion.iterate(8);
  }
  const LinearisedPosterior posterior = inversion.linearise();
  mode.fits = exploreHyper(posterior, inversion.state().choice, kMostFits);
  mode.logEvidence = inversion.logJoint() - posterior.fit(inversion.state().choice).halfLogDet +
                     logSpread(mode.fits) - layers * kLogLayerPenalty;
}

std::string whyNot(const SectionCandidate& c, const SectionProblem& problem) {
  const SectionInversion& inversion = *c.modes.front().inversion;
  const SectionLayout layout = problem.layout(c.layers);
  for (int layer = 2; layer <= c.layers; ++layer) {
    const std::vector<int>& labels = inversion.state().labels;
    if (std::count(labels.begin(), labels.end(), layer) < kLeastPicks) {
      return "fewer than four arrivals came through layer " + std::to_string(layer);
    }
    const double contrast =
        inversion.theta()[layout.logVelocity(layer)] - inversion.theta()[layout.logVelocity(layer - 1)];
    if (!(contrast > std::log(kLeastContrast))) {
      return "layer " + std::to_string(layer) + " came out no faster than the layer above it";
    }
  }
  return {};
}

void weighModes(std::vector<SectionMode>& modes) {
  std::stable_sort(modes.begin(), modes.end(),
                   [](const SectionMode& a, const SectionMode& b) { return a.logEvidence > b.logEvidence; });
  const double best = modes.front().logEvidence;
  std::erase_if(modes, [best](const SectionMode& m) { return !(m.logEvidence > best + kLogModeWorth); });
  double sum = 0.0;
  for (SectionMode& m : modes) {
    m.weight = std::exp(m.logEvidence - best);
    sum += m.weight;
  }
  for (SectionMode& m : modes) {
    m.weight /= sum;
  }
}

/// Two inversions that came to the same place.
bool sameMode(const SectionInversion& a, const SectionInversion& b) {
  return a.state().labels == b.state().labels && (a.theta() - b.theta()).cwiseAbs().maxCoeff() < 0.05;
}

}  // namespace

SectionCandidate solveLayers(const SectionProblem& problem, const TravelTimes& times, int layers,
                             const ProgressPart& progress) {
  SectionCandidate out;
  out.layers = layers;
  const std::vector<LineStart> starts = startsFor(times, layers);
  if (starts.empty()) {
    out.rejected =
        "the times do not bend into " + std::to_string(layers) + " branches with slopes falling with offset";
    return out;
  }
  out.centre = centreOf(problem, starts.front());
  const auto prior = std::make_shared<const SectionPrior>(problem.grid, problem.layout(layers), out.centre);
  std::vector<SectionMode> tried;
  for (std::size_t i = 0; i < starts.size(); ++i) {
    if (!progress.at(0.6 * static_cast<double>(i) / static_cast<double>(starts.size()))) {
      out.finished = false;
      break;
    }
    SectionMode mode;
    mode.prior = prior;
    mode.inversion =
        std::make_shared<SectionInversion>(problem, *prior, startState(problem, *prior, out.centre, starts[i]));
    mode.inversion->iterate(8);
    learn(*mode.inversion, false, 1);
    freeLabels(*mode.inversion);
    mode.inversion->iterate(4);
    learn(*mode.inversion, false, 1);
    mode.inversion->iterate(4);
    mode.logEvidence = evidenceNow(*mode.inversion);
    if (getenv("SPDEBUG"))
      fprintf(stderr, "start %zu lnE %.2f rock %d soil %d noise %d\n", i, mode.logEvidence,
              mode.inversion->state().choice.rock, mode.inversion->state().choice.soil,
              mode.inversion->state().choice.noise);
    const bool fresh = std::none_of(tried.begin(), tried.end(), [&mode](const SectionMode& m) {
      return sameMode(*m.inversion, *mode.inversion);
    });
    if (fresh && std::isfinite(mode.logEvidence)) {
      tried.push_back(std::move(mode));
    }
  }
  if (tried.empty()) {
    out.rejected = "the inversion found no section that explains the times";
    return out;
  }
  std::stable_sort(tried.begin(), tried.end(),
                   [](const SectionMode& a, const SectionMode& b) { return a.logEvidence > b.logEvidence; });
  const double best = tried.front().logEvidence;
  for (std::size_t i = 0; i < tried.size(); ++i) {
    if (tried[i].logEvidence < best - 8.0 || i >= 3) {
      break;
    }
    out.finished = progress.at(0.6 + 0.1 * static_cast<double>(i)) && out.finished;
    finish(tried[i], layers);
    if (getenv("SPDEBUG"))
      fprintf(stderr, "  mode %zu finished lnE %.2f rock %d soil %d\n", i, tried[i].logEvidence,
              tried[i].inversion->state().choice.rock, tried[i].inversion->state().choice.soil);
    out.modes.push_back(std::move(tried[i]));
  }
  weighModes(out.modes);
  out.rejected = whyNot(out, problem);
  return out;
}

}  // namespace strikeplate
