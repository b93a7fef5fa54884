#include "core/record/butterworth.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

namespace strikeplate {
namespace {

constexpr int kOrder = 4;
constexpr double kNearlyNyquist = 0.49;

// A second-order section: y = b0 x + b1 x' + b2 x'' - a1 y' - a2 y''.
struct Section {
  double b0, b1, b2, a1, a2;
};

enum class Kind { LowCut, HighCut };

// The sections of an order-4 Butterworth filter. Its corner is set so that two runs are 3 dB down at `frequency`:
// 1 / (1 + r^8)^2 = 1/2 at r = (sqrt 2 - 1)^(1/8) of the corner of a single run.
std::array<Section, kOrder / 2> design(Kind kind, double frequency, double sampleInterval) {
  const double ratio = std::pow(std::numbers::sqrt2 - 1.0, 1.0 / (2.0 * kOrder));
  const double warped = std::tan(std::numbers::pi * frequency * sampleInterval);
  const double corner = kind == Kind::HighCut ? warped / ratio : warped * ratio;
  std::array<Section, kOrder / 2> sections{};
  for (std::size_t k = 0; k < sections.size(); ++k) {
    // Pole pair k of the analogue prototype: s^2 + 2 sin(angle) s + 1.
    const double damping = 2.0 * std::sin(std::numbers::pi * (2.0 * static_cast<double>(k) + 1.0) / (2.0 * kOrder));
    const double norm = 1.0 / (1.0 + damping * corner + corner * corner);
    Section& s = sections[k];
    s.a1 = 2.0 * (corner * corner - 1.0) * norm;
    s.a2 = (1.0 - damping * corner + corner * corner) * norm;
    s.b0 = kind == Kind::HighCut ? corner * corner * norm : norm;
    s.b1 = kind == Kind::HighCut ? 2.0 * s.b0 : -2.0 * s.b0;
    s.b2 = s.b0;
  }
  return sections;
}

// Runs a section over the values as if the first one had been there for ever.
void run(const Section& s, std::vector<double>& values) {
  const double steady = values[0];
  const double gain = (s.b0 + s.b1 + s.b2) / (1.0 + s.a1 + s.a2);
  double x1 = steady, x2 = steady;
  double y1 = gain * steady, y2 = gain * steady;
  for (double& value : values) {
    const double y = s.b0 * value + s.b1 * x1 + s.b2 * x2 - s.a1 * y1 - s.a2 * y2;
    x2 = x1;
    x1 = value;
    y2 = y1;
    y1 = y;
    value = y;
  }
}

void runBothWays(Kind kind, double frequency, double sampleInterval, std::vector<double>& values) {
  const auto sections = design(kind, frequency, sampleInterval);
  for (int way = 0; way < 2; ++way) {
    for (const Section& section : sections) {
      run(section, values);
    }
    std::reverse(values.begin(), values.end());
  }
}

}  // namespace

std::vector<float> zeroPhase(std::span<const float> samples, double sampleInterval, const PassBand& band) {
  const bool low = band.low > 0.0 && band.low * sampleInterval < kNearlyNyquist;
  const bool high = band.high > 0.0 && band.high * sampleInterval < kNearlyNyquist;
  if (samples.size() < 2 || (!low && !high)) {
    return {samples.begin(), samples.end()};
  }
  // Mirrored ends, long enough for the slowest corner to die away.
  constexpr double kPeriods = 2.0;
  const double slowest = low ? band.low : band.high;
  const auto pad = std::min(samples.size() - 1, static_cast<std::size_t>(kPeriods / (slowest * sampleInterval)) + 1);
  std::vector<double> values;
  values.reserve(samples.size() + 2 * pad);
  const auto first = static_cast<double>(samples.front());
  const auto last = static_cast<double>(samples.back());
  for (std::size_t i = pad; i > 0; --i) {
    values.push_back(2.0 * first - static_cast<double>(samples[i]));
  }
  values.insert(values.end(), samples.begin(), samples.end());
  for (std::size_t i = 1; i <= pad; ++i) {
    values.push_back(2.0 * last - static_cast<double>(samples[samples.size() - 1 - i]));
  }
  if (low) {
    runBothWays(Kind::LowCut, band.low, sampleInterval, values);
  }
  if (high) {
    runBothWays(Kind::HighCut, band.high, sampleInterval, values);
  }
  std::vector<float> out(samples.size());
  std::transform(values.begin() + static_cast<std::ptrdiff_t>(pad),
                 values.begin() + static_cast<std::ptrdiff_t>(pad + samples.size()), out.begin(),
                 [](double value) { return static_cast<float>(value); });
  return out;
}

}  // namespace strikeplate
