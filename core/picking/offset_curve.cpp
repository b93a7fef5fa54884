#include "core/picking/offset_curve.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "core/picking/offset_path.h"

namespace strikeplate {
namespace {

constexpr double kTraceCap = 1.0;
constexpr double kStep = 0.001;        // s
constexpr double kBlur = 0.0012;       // s
constexpr double kLeastScale = 0.003;  // s
constexpr double kSure = 0.001;        // s; a belief narrower than this tells how far traces lie from the curve
constexpr std::size_t kLeastPools = 4;
constexpr double kMostPools = 64.0;

struct Axis {
  double start = 0.0;  ///< s
  std::size_t count = 0;
};

struct Curve {
  std::vector<double> offsets, times, widths;
};

bool heard(const LineTrace& t) {
  return t.usable && t.evidence.size() > 1;
}

Axis axisOf(const LineWork& work) {
  double from = 0.0, until = 0.0;
  bool any = false;
  for (const LineTrace& t : work.traces) {
    if (!heard(t))
      continue;
    const double end = t.evidenceStart + static_cast<double>(t.evidence.size()) * t.evidenceStep;
    from = any ? std::min(from, t.evidenceStart) : t.evidenceStart;
    until = any ? std::max(until, end) : end;
    any = true;
  }
  return {from, static_cast<std::size_t>(std::max(0.0, (until - from) / kStep))};
}

/// Width of a pool: the distance between neighbouring geophones, or more on a very long line.
double poolWidth(const LineWork& work) {
  std::map<std::size_t, double> last;
  std::vector<double> gaps;
  double most = 0.0;
  for (const LineTrace& t : work.traces) {
    const auto found = last.find(t.gather);
    if (found != last.end() && std::abs(t.x - found->second) > 0.01)
      gaps.push_back(std::abs(t.x - found->second));
    last[t.gather] = t.x;
    most = std::max(most, t.offset());
  }
  if (gaps.empty())
    return 1.0;
  const auto middle = gaps.begin() + static_cast<std::ptrdiff_t>(gaps.size() / 2);
  std::nth_element(gaps.begin(), middle, gaps.end());
  return std::max(*middle, most / kMostPools);
}

/// Probability-like weights of a trace on the common axis, blurred by a two-sided exponential.
std::vector<double> blurredWeights(const LineTrace& t, const Axis& axis) {
  const double most = *std::max_element(t.evidence.begin(), t.evidence.end());
  const double least = *std::min_element(t.evidence.begin(), t.evidence.end());
  std::vector<double> weights(axis.count, std::exp(least - most));
  for (std::size_t p = 0; p < t.evidence.size(); ++p) {
    const double at = (t.evidenceStart + static_cast<double>(p) * t.evidenceStep - axis.start) / kStep;
    const auto k = static_cast<std::size_t>(std::clamp(at, 0.0, static_cast<double>(axis.count - 1)));
    weights[k] = std::max(weights[k], std::exp(t.evidence[p] - most));
  }
  const double keep = std::exp(-kStep / kBlur);
  for (std::size_t k = 1; k < axis.count; ++k)
    weights[k] = std::max(weights[k], keep * weights[k - 1]);
  for (std::size_t k = axis.count - 1; k-- > 0;)
    weights[k] = std::max(weights[k], keep * weights[k + 1]);
  return weights;
}

PathEvidence pooledEvidence(const LineWork& work, const Axis& axis) {
  const double width = poolWidth(work);
  std::map<long, std::vector<const LineTrace*>> pools;
  for (const LineTrace& t : work.traces) {
    if (heard(t))
      pools[std::lround(t.offset() / width)].push_back(&t);
  }
  PathEvidence evidence;
  evidence.step = kStep;
  evidence.rigid = true;
  for (const auto& [number, traces] : pools) {
    std::vector<double> sum(axis.count, 0.0);
    double offset = 0.0;
    for (const LineTrace* t : traces) {
      const std::vector<double> weights = blurredWeights(*t, axis);
      for (std::size_t k = 0; k < axis.count; ++k)
        sum[k] += logAdd(std::log(weights[k]), -kTraceCap);
      offset += t->offset() / static_cast<double>(traces.size());
    }
    evidence.origins.push_back(axis.start);
    evidence.offsets.push_back(offset);
    evidence.logEvidence.push_back(std::move(sum));
  }
  return evidence;
}

double quantileOf(const std::vector<double>& posterior, double level) {
  double sum = 0.0;
  for (std::size_t k = 0; k < posterior.size(); ++k) {
    if (sum + posterior[k] >= level)
      return static_cast<double>(k) + (level - sum) / posterior[k] - 0.5;
    sum += posterior[k];
  }
  return static_cast<double>(posterior.size()) - 1.0;
}

Curve curveOf(const PathEvidence& evidence, const Axis& axis) {
  Curve curve;
  curve.offsets = evidence.offsets;
  for (const auto& posterior : pathPosterior(evidence)) {
    curve.times.push_back(axis.start + kStep * quantileOf(posterior, 0.5));
    curve.widths.push_back(0.5 * kStep * (quantileOf(posterior, 0.8413) - quantileOf(posterior, 0.1587)));
  }
  return curve;
}

double between(const std::vector<double>& x, const std::vector<double>& y, double at) {
  const auto right = std::upper_bound(x.begin(), x.end(), at);
  if (right == x.begin())
    return y.front();
  if (right == x.end())
    return y.back();
  const auto k = static_cast<std::size_t>(right - x.begin());
  const double part = (at - x[k - 1]) / (x[k] - x[k - 1]);
  return (1.0 - part) * y[k - 1] + part * y[k];
}

}  // namespace

void findOffsetCurve(LineWork& work) {
  const Axis axis = axisOf(work);
  if (axis.count < 2)
    return;
  const PathEvidence evidence = pooledEvidence(work, axis);
  if (evidence.offsets.size() < kLeastPools)
    return;
  const Curve curve = curveOf(evidence, axis);
  std::vector<double> misfits;
  for (const LineTrace& t : work.traces) {
    if (heard(t) && t.beliefSigma < kSure)
      misfits.push_back(std::abs(t.belief - between(curve.offsets, curve.times, t.offset())));
  }
  double scale = kLeastScale;
  if (!misfits.empty()) {
    const auto middle = misfits.begin() + static_cast<std::ptrdiff_t>(misfits.size() / 2);
    std::nth_element(misfits.begin(), middle, misfits.end());
    scale = std::max(scale, 2.0 * *middle);
  }
  for (LineTrace& t : work.traces) {
    if (!heard(t))
      continue;
    t.curveMean = between(curve.offsets, curve.times, t.offset());
    t.curveScale = std::hypot(scale, between(curve.offsets, curve.widths, t.offset()));
  }
}

}  // namespace strikeplate
