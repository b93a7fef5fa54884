#include "core/section/mode.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr int kMostStarts = 3;
constexpr int kMovedStartsBelow = 200;  // picks; larger surveys need no moved crossovers
constexpr int kSmallSurvey = 120;       // picks; few enough that a layer may own a handful, so more ways are tried
constexpr int kMostStartsSmall = 8;
constexpr std::size_t kMostModesSmall = 5;
constexpr int kMostFits = 40;
constexpr int kMostRounds = 6;
constexpr int kLeastRounds = 2;  // the doubt of labels settles in two
constexpr int kLeastPicks = 4;   // on a refractor
constexpr double kLeastContrast = 1.05;
constexpr double kLogModeWorth = -4.0;
constexpr double kLogModeHope = 6.0;   // an unfinished mode so far behind the best one is given up
constexpr double kLogHopeless = 10.0;  // a number of layers so far behind another one is not finished
constexpr std::size_t kMostModes = 2;
constexpr double kLogAskedFor = 3.0;   // a gradient cannot be negative, so where there is none it would only bias
constexpr double kSlowerOnTop = 0.15;  // of the logarithm of velocity
constexpr double kRoughly = 0.3;       // nats

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
  for (std::size_t shot = 0; shot < problem.delayStart.size(); ++shot) {
    const Eigen::Index column = prior.delayColumn(static_cast<int>(shot));
    s.xi[column] = scales[column] > 0.0 ? problem.delayStart[shot] / scales[column] : 0.0;
  }
  return s;
}

PriorCentre centreOf(const SectionProblem& problem, const LineStart& start) {
  PriorCentre c;
  c.depth = start.depths(0.5 * (problem.grid.lineStart + problem.grid.lineEnd), 0.25 * problem.grid.knotSpacing);
  c.logVelocity = start.logVelocities();
  c.delaySigma = problem.delaySigma;
  const auto direct = std::count(start.labels.begin(), start.labels.end(), 1);
  if (direct < 5) {
    c.logVelocity[0] = std::min(std::log(kFirstVelocity), c.logVelocity.back() - 0.3);
    c.firstSigma = 0.45;
  }
  return c;
}

std::vector<LineStart> startsFor(const TravelTimes& times, int layers) {
  const int picks = static_cast<int>(times.arrivals.size());
  std::vector<LineStart> starts = lineStarts(times, layers, picks < kSmallSurvey ? kMostStartsSmall : kMostStarts);
  if (!starts.empty() && layers > 1 && picks < kMovedStartsBelow) {
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
bool learn(SectionInversion& inversion, bool all, int sweeps) {
  SectionState next = inversion.state();
  const HyperChoice before = next.choice;
  const LinearisedPosterior posterior = inversion.linearise();
  next.choice = searchHyper(posterior, next.choice, {leastNoise(inversion), all}, sweeps);
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
    inversion.setDoubt(inversion.measureDoubt());
    mode.converged = inversion.iterate(8);
  }
  const LinearisedPosterior posterior = inversion.linearise();
  mode.fits = exploreHyper(posterior, inversion.state().choice, kMostFits);
  mode.logEvidence = inversion.logJoint() - posterior.fit(inversion.state().choice).halfLogDet +
                     logSpread(mode.fits) - layers * kLogLayerPenalty;
}

/// Why a mode cannot stand; empty when it can.
// m/s; P waves are no faster anywhere in the crust (Sheriff and Geldart, Exploration Seismology, 1995; from memory).
constexpr double kFastestGround = 8000.0;

std::string whyNot(const SectionInversion& inversion) {
  const SectionLayout& layout = inversion.prior().layout();
  const std::vector<int>& labels = inversion.state().labels;
  for (int layer = 2; layer <= layout.layers; ++layer) {
    if (std::count(labels.begin(), labels.end(), layer) < kLeastPicks) {
      return "fewer than four arrivals came through layer " + std::to_string(layer);
    }
    const double contrast =
        inversion.theta()[layout.logVelocity(layer)] - inversion.theta()[layout.logVelocity(layer - 1)];
    if (!(contrast > std::log(kLeastContrast))) {
      return "layer " + std::to_string(layer) + " came out no faster than the layer above it";
    }
    if (!(inversion.theta()[layout.logVelocity(layer)] < std::log(kFastestGround))) {
      return "layer " + std::to_string(layer) + " came out faster than any ground";
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

/// Two inversions on their way to the same place.
bool sameMode(const SectionMode& a, const SectionMode& b) {
  const SectionInversion& p = *a.inversion;
  const SectionInversion& q = *b.inversion;
  const SectionLayout& layout = a.prior->layout();
  std::size_t other = 0;
  for (std::size_t i = 0; i < p.state().labels.size(); ++i) {
    other += p.state().labels[i] != q.state().labels[i] ? 1 : 0;
  }
  const int first = layout.logVelocity(1);
  return other * 100 <= p.state().labels.size() && std::abs(a.logEvidence - b.logEvidence) < 1.0 &&
         (p.theta() - q.theta()).segment(first, layout.layers).cwiseAbs().maxCoeff() < 0.02;
}

/// From a start to the neighbourhood of a maximum: labels held and heavy tails first, then labels by earliest time.
SectionMode approach(const SectionProblem& problem, const std::shared_ptr<const SectionPrior>& prior,
                     SectionState start) {
  SectionMode mode;
  mode.prior = prior;
  mode.inversion = std::make_shared<SectionInversion>(problem, *prior, std::move(start));
  SectionInversion& inversion = *mode.inversion;
  inversion.iterate(8, kRoughly);
  learn(inversion, false, 1);
  freeLabels(inversion);
  inversion.iterate(4, kRoughly);
  learn(inversion, false, 1);
  inversion.iterate(4, kRoughly);
  mode.logEvidence = evidenceNow(inversion) - prior->layout().layers * kLogLayerPenalty;
  return mode;
}

/// Modes worth finishing, best first; when there is none, `candidate.rejected` says why.
void approachAll(SectionCandidate& candidate, const SectionProblem& problem,
                 const std::shared_ptr<const SectionPrior>& prior, const std::vector<LineStart>& starts,
                 const ProgressPart& progress) {
  std::vector<SectionMode>& out = candidate.modes;
  std::string why;
  for (std::size_t i = 0; i < starts.size(); ++i) {
    if (!progress.at(0.6 * static_cast<double>(i) / static_cast<double>(starts.size()))) {
      candidate.finished = false;
      why = "it was stopped early";
      break;
    }
    SectionMode mode = approach(problem, prior, startState(problem, *prior, candidate.centre, starts[i]));
    const std::string whyThis = whyNot(*mode.inversion);
    if (!whyThis.empty() || !std::isfinite(mode.logEvidence)) {
      why = whyThis.empty() ? "the inversion found no section that explains the times" : whyThis;
      continue;
    }
    const bool fresh =
        std::none_of(out.begin(), out.end(), [&mode](const SectionMode& m) { return sameMode(m, mode); });
    if (fresh) {
      out.push_back(std::move(mode));
    }
  }
  candidate.rejected = out.empty() ? why : "";
  std::stable_sort(out.begin(), out.end(),
                   [](const SectionMode& a, const SectionMode& b) { return a.logEvidence > b.logEvidence; });
}

}  // namespace

SectionCandidate solveLayers(const SectionProblem& problem, const TravelTimes& times, int layers, double toBeat,
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
  approachAll(out, problem, prior, starts, progress);
  if (out.modes.empty()) {
    return out;
  }
  const double best = out.modes.front().logEvidence;
  if (best < toBeat - kLogHopeless) {
    out.modes.resize(1);
    return out;
  }
  std::erase_if(out.modes, [best](const SectionMode& m) { return m.logEvidence < best - kLogModeHope; });
  out.modes.resize(std::min(out.modes.size(), problem.picks.count() < kSmallSurvey ? kMostModesSmall : kMostModes));
  for (std::size_t i = 0; i < out.modes.size(); ++i) {
    out.finished =
        out.finished && progress.at(0.6 + 0.4 * static_cast<double>(i) / static_cast<double>(out.modes.size()));
    finish(out.modes[i], layers);
    if (!out.finished) {
      out.modes.resize(i + 1);
    }
  }
  weighModes(out.modes);
  out.rejected = whyNot(*out.modes.front().inversion);
  return out;
}

void addGradient(const SectionProblem& problem, SectionCandidate& candidate) {
  const SectionInversion& plain = *candidate.modes.front().inversion;
  const auto prior =
      std::make_shared<const SectionPrior>(problem.grid, problem.layout(candidate.layers, true), candidate.centre);
  SectionState start = plain.state();
  start.xi.conservativeResize(prior->columns());
  start.xi.tail(1).setZero();
  start.xi[prior->velocityColumn(1)] -= kSlowerOnTop / prior->scales(start.choice)[prior->velocityColumn(1)];
  start.doubt.clear();
  SectionMode mode;
  mode.prior = prior;
  mode.inversion = std::make_shared<SectionInversion>(problem, *prior, std::move(start));
  mode.inversion->iterate(8, kRoughly);
  const double soFar = evidenceNow(*mode.inversion) - (candidate.layers + 1) * kLogLayerPenalty;
  if (!(soFar > candidate.logEvidence() - kLogModeHope) || !whyNot(*mode.inversion).empty()) {
    return;
  }
  finish(mode, candidate.layers + 1);
  if (!(mode.logEvidence > candidate.logEvidence() + kLogAskedFor) || !whyNot(*mode.inversion).empty()) {
    return;
  }
  candidate.modes.push_back(std::move(mode));
  weighModes(candidate.modes);
}

}  // namespace strikeplate
