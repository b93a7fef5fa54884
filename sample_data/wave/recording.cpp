#include "sample_data/wave/recording.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace strikeplate::wave {

namespace {

constexpr double kForce = 1e4;         // N, a sledge hammer on a plate
constexpr double kSensitivity = 28e3;  // mV s/m
constexpr double kNaturalHz = 10.0;
constexpr double kGeophoneDamping = 0.65;
constexpr int kWarmUp = 2000;  // samples for the noise filters to settle

std::vector<double> halfDerivativeWeights(std::size_t n) {
  std::vector<double> w(n, 1.0);
  for (std::size_t k = 1; k < n; ++k)
    w[k] = w[k - 1] * (1.0 - 1.5 / static_cast<double>(k));
  return w;
}

/// Second-order filter with numerator (b0, b1, b2) and denominator (1, a1, a2).
struct Biquad {
  double b0, b1, b2, a1, a2;
  void run(std::vector<double>& y) const {
    double x1 = 0.0, x2 = 0.0, y1 = 0.0, y2 = 0.0;
    for (double& v : y) {
      const double out = b0 * v + b1 * x1 + b2 * x2 - a1 * y1 - a2 * y2;
      x2 = x1, x1 = v, y2 = y1, y1 = out;
      v = out;
    }
  }
};

/// Bilinear second-order section at `hz`; high pass or low pass.
Biquad section(double hz, double damping, double interval, bool highPass) {
  const double w = std::tan(std::numbers::pi * hz * interval);
  const double norm = 1.0 + 2.0 * damping * w + w * w;
  const double gain = highPass ? 1.0 : w * w;
  return {gain / norm, (highPass ? -2.0 : 2.0) * gain / norm, gain / norm, 2.0 * (w * w - 1.0) / norm,
          (1.0 - 2.0 * damping * w + w * w) / norm};
}

}  // namespace

Traces geophoneTraces(const Scene& scene, const Place& shot, const Motion& motion) {
  const std::size_t n = motion.velocity.front().size();
  const std::vector<double> weights = halfDerivativeWeights(n);
  const Biquad geophone = section(kNaturalHz, kGeophoneDamping, motion.interval, true);
  Traces traces;
  for (std::size_t g = 0; g < motion.velocity.size(); ++g) {
    const Place& place = scene.geophones[g];
    const double distance = std::max(1.0, std::hypot(place.x - shot.x, place.elevation - shot.elevation));
    const std::vector<double>& v = motion.velocity[g];
    std::vector<double> out(n, 0.0);
    for (std::size_t i = 0; i < n; ++i) {
      double sum = 0.0;
      for (std::size_t k = 0; k <= i; ++k)
        sum += weights[k] * v[i - k];
      const double t = static_cast<double>(i) * motion.interval;
      out[i] = kForce * kSensitivity * sum / std::sqrt(motion.interval) * std::sqrt(t / (2.0 * std::numbers::pi)) /
               distance;
    }
    geophone.run(out);
    traces.push_back(std::move(out));
  }
  return traces;
}

double valueAt(const std::vector<double>& trace, double interval, double t) {
  const double u = t / interval;
  if (!(u > 0.0))
    return 0.0;
  const auto i = static_cast<std::size_t>(u);
  if (i + 1 >= trace.size())
    return trace.back();
  const double share = u - static_cast<double>(i);
  return (1.0 - share) * trace[i] + share * trace[i + 1];
}

double firstPeak(const std::vector<double>& trace, double interval, double onset) {
  const auto from = static_cast<std::size_t>(std::max(1.0, onset / interval));
  const std::size_t to = std::min(trace.size() - 1, static_cast<std::size_t>((onset + 0.015) / interval));
  double largest = 0.0;
  for (std::size_t i = from; i < to; ++i)
    largest = std::max(largest, std::abs(trace[i]));
  for (std::size_t i = from; i < to; ++i) {
    const double a = std::abs(trace[i]);
    if (a > 0.02 * largest && a >= std::abs(trace[i - 1]) && a > std::abs(trace[i + 1]))
      return a;
  }
  return largest;
}

double GroundNoise::uniform() {
  // splitmix64: Steele, Lea & Flood, OOPSLA (2014) 453-472; the same numbers on every machine.
  state_ += 0x9E3779B97F4A7C15ULL;
  std::uint64_t z = state_;
  z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9ULL;
  z = (z ^ (z >> 27)) * 0x94D049BB133111EBULL;
  z ^= z >> 31;
  return (static_cast<double>(z >> 11) + 0.5) * 0x1.0p-53;
}

double GroundNoise::normal() {
  const double radius = std::sqrt(-2.0 * std::log(uniform()));  // Box & Muller, Ann. Math. Stat. 29 (1958) 610-611
  return radius * std::cos(2.0 * std::numbers::pi * uniform());
}

std::vector<double> GroundNoise::band(int samples, double interval, double low, double high) {
  std::vector<double> y(static_cast<std::size_t>(samples + kWarmUp));
  for (double& v : y)
    v = normal();
  for (int pass = 0; pass < 2; ++pass) {
    section(low, 0.7, interval, true).run(y);
    section(high, 0.7, interval, false).run(y);
  }
  double power = 0.0;
  for (const double v : y)
    power += v * v;
  const double scale = std::sqrt(static_cast<double>(y.size()) / power);
  for (double& v : y)
    v *= scale;
  y.erase(y.begin(), y.begin() + kWarmUp);
  return y;
}

Traces GroundNoise::record(const std::vector<Place>& geophones, int samples, double interval) {
  const double velocity = (uniform() < 0.5 ? -1.0 : 1.0) * (180.0 + 200.0 * uniform());
  const double spread = geophones.back().x - geophones.front().x;
  const double longest = spread / std::abs(velocity);
  const std::vector<double> wave =
      band(samples + 2 + static_cast<int>(std::ceil(longest / interval)), interval, 8.0, 35.0);
  Traces rows;
  for (const Place& g : geophones) {
    std::vector<double> row = band(samples, interval, 8.0, 180.0);
    const double along = (g.x - geophones.front().x) / velocity;
    const double late = velocity > 0.0 ? longest - along : -along;
    for (int k = 0; k < samples; ++k) {
      auto& v = row[static_cast<std::size_t>(k)];
      v = std::sqrt(0.75) * v + 0.5 * valueAt(wave, interval, k * interval + late);
    }
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace strikeplate::wave
