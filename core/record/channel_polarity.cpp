#include "core/record/channel_polarity.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <complex>
#include <numbers>

namespace strikeplate {
namespace {

using Complex = std::complex<double>;
using Spectrum = std::vector<Complex>;

constexpr double kStep = 1.5;            // Hz between frequencies, so that lags repeat after 0.67 s
constexpr int kFirst = 2;                // 3 Hz
constexpr int kLast = 54;                // 81 Hz
constexpr double kWorkInterval = 0.001;  // s
constexpr double kLongestLag = 0.060;    // s
constexpr double kTwoPi = 2.0 * std::numbers::pi;

double frequencyOf(int k) {
  return kStep * k;
}

// Weight of a frequency: a bell around 35 Hz with a notch at the mains.
double bandWeight(double frequency) {
  const auto bell = [frequency](double centre, double width) {
    const double u = (frequency - centre) / width;
    return std::exp(-0.5 * u * u);
  };
  return bell(35.0, 50.0 / 3.0) * (1.0 - bell(50.0, 4.0));
}

// The spectrum of the wave train of one trace, from 6000 m/s to 100 m/s and 80 ms, with soft ends; empty without
// data.
Spectrum spectrumOf(const Trace& trace, double offset) {
  const auto width = static_cast<std::size_t>(std::max(1L, std::lround(kWorkInterval / trace.sampleInterval)));
  const double step = static_cast<double>(width) * trace.sampleInterval;
  const std::size_t count = trace.samples.size() / width;
  if (count < 2) {
    return {};
  }
  double mean = 0.0;
  for (const float s : trace.samples) {
    mean += static_cast<double>(s) / static_cast<double>(trace.samples.size());
  }
  Spectrum spectrum(kLast - kFirst + 1);
  for (std::size_t i = 0; i < count; ++i) {
    const double time = trace.delay + static_cast<double>(i) * step;
    const double weight = std::clamp((time - offset / 6000.0) / 0.004, 0.0, 1.0) *
                          std::clamp((offset / 100.0 + 0.08 - time) / 0.02, 0.0, 1.0);
    if (weight <= 0.0) {
      continue;
    }
    double value = 0.0;
    for (std::size_t k = 0; k < width; ++k) {
      value += static_cast<double>(trace.samples[i * width + k]) - mean;
    }
    const Complex turn = std::polar(1.0, -kTwoPi * kStep * time);
    Complex phase = std::polar(weight * value, -kTwoPi * frequencyOf(kFirst) * time);
    for (Complex& bin : spectrum) {
      bin += phase;
      phase *= turn;
    }
  }
  return spectrum;
}

double energyOf(const Spectrum& spectrum) {
  double energy = 0.0;
  for (std::size_t k = 0; k < spectrum.size(); ++k) {
    energy += std::norm(spectrum[k]) * bandWeight(frequencyOf(kFirst + static_cast<int>(k)));
  }
  return energy;
}

// Cross-correlation where its envelope is highest: its real part over the root of both energies, -1 to 1.
double agreementOf(const Spectrum& a, const Spectrum& b) {
  const double scale = std::sqrt(energyOf(a) * energyOf(b));
  if (!(scale > 0.0)) {
    return 0.0;
  }
  Spectrum cross(a.size());
  for (std::size_t k = 0; k < a.size(); ++k) {
    cross[k] = std::conj(a[k]) * b[k] * bandWeight(frequencyOf(kFirst + static_cast<int>(k)));
  }
  Complex highest = 0.0;
  for (double lag = -kLongestLag; lag <= kLongestLag; lag += kWorkInterval) {
    const Complex turn = std::polar(1.0, kTwoPi * kStep * lag);
    Complex phase = std::polar(1.0, kTwoPi * frequencyOf(kFirst) * lag);
    Complex sum = 0.0;
    for (const Complex& c : cross) {
      sum += c * phase;
      phase *= turn;
    }
    if (std::norm(sum) > std::norm(highest)) {
      highest = sum;
    }
  }
  return highest.real() / scale;
}

// Mean agreement of every pair of channels over the records, 0 where there is none, and how many pairs a channel has.
struct Agreements {
  std::vector<std::vector<double>> sum;
  std::vector<std::vector<int>> count;

  explicit Agreements(std::size_t n) : sum(n, std::vector<double>(n, 0.0)), count(n, std::vector<int>(n, 0)) {}

  void add(const ShotRecord& record, const std::vector<bool>& dead) {
    std::vector<Spectrum> spectra(dead.size());
    std::vector<double> away(dead.size(), 0.0);
    for (std::size_t i = 0; i < dead.size(); ++i) {
      const Trace& trace = record.traces[i];
      if (!dead[i] && trace.state != TraceState::Dead && trace.receiver && record.source) {
        away[i] = trace.receiver->x - record.source->x;
        spectra[i] = spectrumOf(trace, std::abs(away[i]));
      }
    }
    for (std::size_t i = 0; i < dead.size(); ++i) {
      for (std::size_t j = i + 1; j < std::min(i + 3, dead.size()); ++j) {
        if (spectra[i].empty() || spectra[j].empty() || !(away[i] * away[j] > 0.0)) {
          continue;
        }
        const double value = agreementOf(spectra[i], spectra[j]);
        sum[i][j] += value;
        sum[j][i] += value;
        ++count[i][j];
        ++count[j][i];
      }
    }
  }

  // Agreement of a channel with the others, each turned by its sign.
  [[nodiscard]] double of(std::size_t i, const std::vector<double>& signs) const {
    double total = 0.0;
    int pairs = 0;
    for (std::size_t j = 0; j < signs.size(); ++j) {
      if (count[i][j] > 0) {
        total += signs[i] * signs[j] * sum[i][j] / count[i][j];
        ++pairs;
      }
    }
    return pairs > 0 ? total / pairs : 0.0;
  }
};

// How many different places were shot from.
std::size_t shotPoints(const std::vector<const ShotRecord*>& records) {
  constexpr double kSamePlace = 0.01;  // m
  std::vector<double> places;
  for (const ShotRecord* record : records) {
    if (record->source) {
      places.push_back(record->source->x);
    }
  }
  std::sort(places.begin(), places.end());
  const auto end =
      std::unique(places.begin(), places.end(), [](double a, double b) { return std::abs(a - b) <= kSamePlace; });
  return static_cast<std::size_t>(end - places.begin());
}

}  // namespace

std::vector<ReversedChannel> reversedChannels(const std::vector<const ShotRecord*>& records,
                                              const std::vector<bool>& dead) {
  constexpr std::size_t kFewestShotPoints = 5;
  constexpr double kOpposite = -0.25;
  constexpr double kLeastMedian = 0.1;
  const std::size_t n = dead.size();
  std::vector<ReversedChannel> found;
  if (shotPoints(records) < kFewestShotPoints || n < 3) {
    return found;
  }
  Agreements agreements(n);
  for (const ShotRecord* record : records) {
    assert(record->traces.size() == n);
    agreements.add(*record, dead);
  }
  std::vector<double> signs(n, 1.0);
  std::vector<double> own(n);
  const auto refresh = [&] {
    for (std::size_t i = 0; i < n; ++i) {
      own[i] = agreements.of(i, signs);
    }
  };
  refresh();
  std::vector<double> sorted = own;
  std::nth_element(sorted.begin(), sorted.begin() + static_cast<std::ptrdiff_t>(n / 2), sorted.end());
  if (!(sorted[n / 2] > kLeastMedian)) {
    return found;
  }
  for (std::size_t round = 0; round < n / 4 + 1; ++round) {
    const auto least = static_cast<std::size_t>(std::min_element(own.begin(), own.end()) - own.begin());
    if (!(own[least] < kOpposite)) {
      break;
    }
    signs[least] = -signs[least];
    found.push_back({least, own[least]});
    refresh();
  }
  return found;
}

}  // namespace strikeplate
