#include "core/section/start_lines.h"

#include <algorithm>
#include <cmath>
#include <limits>

#include <Eigen/Cholesky>
#include <Eigen/Core>

namespace strikeplate {
namespace {

constexpr int kRefits = 6;
constexpr double kLeastFall = 0.97;  // a slope is at most this share of the one before
constexpr int kLeastOnBranch = 3;

// The tilt is held near nothing as if by one pick of 1 ms per 0.3 ms/m, a dip of about 8 degrees under 500 m/s.
constexpr double kTiltHold = (1e-3 / 3e-4) * (1e-3 / 3e-4);

class LineFitter {
 public:
  LineFitter(const TravelTimes& times, int layers) : times_(times), layers_(layers) {
    double low = std::numeric_limits<double>::infinity();
    double high = -low;
    for (const Arrival& a : times.arrivals) {
      const double shot = times.shots[a.shot].x;
      const double geophone = times.geophones[a.geophone].x;
      offsets_.push_back(times.offset(a));
      middles_.push_back(shot + geophone);
      low = std::min({low, shot, geophone});
      high = std::max({high, shot, geophone});
    }
    centre_ = 0.5 * (low + high);
    for (double& m : middles_) {
      m -= 2.0 * centre_;
    }
  }

  [[nodiscard]] const std::vector<double>& offsets() const { return offsets_; }

  [[nodiscard]] std::vector<int> labelsFor(const std::vector<double>& breaks) const {
    std::vector<int> labels;
    for (std::size_t i = 0; i < offsets_.size(); ++i) {
      int layer = 1;
      for (const double b : breaks) {
        layer += offsets_[i] > b ? 1 : 0;
      }
      labels.push_back(held(i) > 0 ? held(i) : layer);
    }
    return labels;
  }

  /// Refits lines with the labels held; false when the branches do not hold.
  [[nodiscard]] bool fitOnce(LineStart& s) const { return fit(s, std::vector<double>(offsets_.size(), 1.0)); }

  /// Refits lines and labels in turn; false when the branches do not hold.
  [[nodiscard]] bool refine(LineStart& s) const {
    std::vector<double> weights(offsets_.size(), 1.0);
    for (int round = 0; round < kRefits; ++round) {
      if (!fit(s, weights)) {
        return false;
      }
      if (round > 0) {
        relabel(s);
      }
      reweigh(s, weights);
    }
    return fit(s, weights);
  }

 private:
  [[nodiscard]] int held(std::size_t i) const {
    const Arrival& a = times_.arrivals[i];
    return a.layerByHand ? std::min(a.layer, layers_) : 0;
  }

  [[nodiscard]] bool fit(LineStart& s, const std::vector<double>& weights) const {
    std::vector<Eigen::Matrix3d> normal(layers_, Eigen::Vector3d(0.0, 0.0, kTiltHold).asDiagonal());
    std::vector<Eigen::Vector3d> right(layers_, Eigen::Vector3d::Zero());
    std::vector<int> count(layers_, 0);
    for (std::size_t i = 0; i < offsets_.size(); ++i) {
      const int n = s.labels[i] - 1;
      const Eigen::Vector3d row(1.0, offsets_[i], middles_[i]);
      normal[n] += weights[i] * row * row.transpose();
      right[n] += weights[i] * times_.arrivals[i].time * row;
      ++count[n];
    }
    s.centre = centre_;
    s.intercept.assign(layers_, 0.0);
    s.slope.assign(layers_, 0.0);
    s.tilt.assign(layers_, 0.0);
    for (int n = layers_ - 1; n >= 1; --n) {
      const Eigen::Matrix3d& a = normal[n];
      const double spread = a(0, 0) * a(1, 1) - a(0, 1) * a(0, 1);
      if (count[n] < kLeastOnBranch || !(spread > 1e-9 * a(0, 0) * a(1, 1))) {
        return false;
      }
      const Eigen::Vector3d line = a.ldlt().solve(right[n]);
      s.intercept[n] = line[0];
      s.slope[n] = line[1];
      s.tilt[n] = line[2];
    }
    if (count[0] > 0 && normal[0](1, 1) > 0.0) {
      s.slope[0] = right[0][1] / normal[0](1, 1);
    } else if (layers_ > 1) {
      s.slope[0] = std::max(1.0 / 450.0, 1.3 * s.slope[1]);
    }
    return falls(s);
  }

  [[nodiscard]] double predicted(const LineStart& s, int n, std::size_t i) const {
    return s.intercept[n] + s.slope[n] * offsets_[i] + s.tilt[n] * middles_[i];
  }

  [[nodiscard]] static bool falls(const LineStart& s) {
    for (std::size_t n = 0; n < s.slope.size(); ++n) {
      if (!(s.slope[n] > 1e-5) || (n > 0 && !(s.slope[n] < kLeastFall * s.slope[n - 1])) ||
          (n > 0 && !(s.intercept[n] > s.intercept[n - 1]))) {
        return false;
      }
    }
    return true;
  }

  void relabel(LineStart& s) const {
    for (std::size_t i = 0; i < offsets_.size(); ++i) {
      if (held(i) > 0) {
        continue;
      }
      int best = 0;
      for (int n = 1; n < layers_; ++n) {
        if (predicted(s, n, i) < predicted(s, best, i)) {
          best = n;
        }
      }
      s.labels[i] = best + 1;
    }
  }

  void reweigh(LineStart& s, std::vector<double>& weights) const {
    std::vector<double> r(offsets_.size());
    for (std::size_t i = 0; i < r.size(); ++i) {
      r[i] = times_.arrivals[i].time - predicted(s, s.labels[i] - 1, i);
    }
    std::vector<double> sorted = r;
    for (double& v : sorted) {
      v = std::abs(v);
    }
    std::nth_element(sorted.begin(), sorted.begin() + static_cast<long>(sorted.size() / 2), sorted.end());
    const double scale = std::max(1.4826 * sorted[sorted.size() / 2], 1e-6);
    s.cost = static_cast<double>(r.size()) * std::log(scale);
    for (std::size_t i = 0; i < r.size(); ++i) {
      const double q = r[i] / (2.385 * scale);
      weights[i] = 1.0 / (1.0 + q * q);
      s.cost += 0.5 * 2.385 * 2.385 * std::log1p(q * q);
    }
  }

  const TravelTimes& times_;
  int layers_;
  double centre_ = 0.0;
  std::vector<double> offsets_;
  std::vector<double> middles_;  // x of shot + x of geophone - 2 * centre, m
};

/// Offsets between which branches may change, so many quantiles of those present.
std::vector<double> candidates(const std::vector<double>& offsets, int count) {
  std::vector<double> sorted = offsets;
  std::sort(sorted.begin(), sorted.end());
  std::vector<double> out;
  for (int i = 1; i <= count; ++i) {
    const double at = static_cast<double>(sorted.size()) * i / (count + 1);
    const double x = sorted[static_cast<std::size_t>(at)];
    if (out.empty() || x > out.back()) {
      out.push_back(x);
    }
  }
  return out;
}

void choose(const std::vector<double>& from, std::size_t first, int count, std::vector<double>& chosen,
            std::vector<std::vector<double>>& out) {
  if (count == 0) {
    out.push_back(chosen);
    return;
  }
  for (std::size_t i = first; i < from.size(); ++i) {
    chosen.push_back(from[i]);
    choose(from, i + 1, count - 1, chosen, out);
    chosen.pop_back();
  }
}

bool differs(const LineStart& a, const LineStart& b) {
  std::size_t other = 0;
  for (std::size_t i = 0; i < a.labels.size(); ++i) {
    other += a.labels[i] != b.labels[i] ? 1 : 0;
  }
  return other * 33 > a.labels.size();
}

}  // namespace

std::vector<double> LineStart::logVelocities() const {
  std::vector<double> out;
  for (const double s : slope) {
    out.push_back(-std::log(s));
  }
  return out;
}

std::vector<double> LineStart::depths(double x, double least) const {
  std::vector<double> thickness;
  std::vector<double> out;
  double depth = 0.0;
  for (std::size_t n = 1; n < slope.size(); ++n) {
    const auto c = [&](std::size_t k) { return std::sqrt(slope[k] * slope[k] - slope[n] * slope[n]); };
    double rest = intercept[n] + 2.0 * tilt[n] * (x - centre);
    for (std::size_t k = 0; k + 1 < n; ++k) {
      rest -= 2.0 * thickness[k] * c(k);
    }
    thickness.push_back(std::max(least, rest / (2.0 * c(n - 1))));
    depth += thickness.back();
    out.push_back(depth);
  }
  return out;
}

std::vector<LineStart> lineStarts(const TravelTimes& times, int layers, int most) {
  constexpr int kCandidates[] = {0, 0, 20, 13, 10, 9, 9};
  const LineFitter fitter(times, layers);
  std::vector<std::vector<double>> partitions;
  std::vector<double> chosen;
  choose(candidates(fitter.offsets(), kCandidates[layers]), 0, layers - 1, chosen, partitions);
  std::vector<LineStart> all;
  for (const std::vector<double>& breaks : partitions) {
    LineStart s;
    s.labels = fitter.labelsFor(breaks);
    if (fitter.refine(s)) {
      all.push_back(std::move(s));
    }
  }
  std::stable_sort(all.begin(), all.end(), [](const LineStart& a, const LineStart& b) { return a.cost < b.cost; });
  std::vector<LineStart> out;
  for (LineStart& s : all) {
    const bool fresh = std::all_of(out.begin(), out.end(), [&s](const LineStart& o) { return differs(s, o); });
    if (fresh && static_cast<int>(out.size()) < most) {
      out.push_back(std::move(s));
    }
  }
  return out;
}

std::optional<LineStart> assignedStart(const TravelTimes& times, int layers) {
  LineStart s;
  int deepest = 0;
  for (const Arrival& a : times.arrivals) {
    if (a.layer < 1 || a.layer > layers) {
      return std::nullopt;
    }
    deepest = std::max(deepest, a.layer);
    s.labels.push_back(a.layer);
  }
  if (deepest != layers || !LineFitter(times, layers).fitOnce(s)) {
    return std::nullopt;
  }
  return s;
}

LineStart withCrossoversMoved(const TravelTimes& times, const LineStart& start, double factor) {
  std::vector<double> breaks;
  for (std::size_t n = 1; n < start.slope.size(); ++n) {
    const double crossover = (start.intercept[n] - start.intercept[n - 1]) / (start.slope[n - 1] - start.slope[n]);
    breaks.push_back(factor * crossover);
  }
  LineStart out = start;
  out.labels = LineFitter(times, static_cast<int>(start.slope.size())).labelsFor(breaks);
  return out;
}

}  // namespace strikeplate
