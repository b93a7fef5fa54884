#include <algorithm>
#include <cassert>
#include <cmath>
#include <optional>
#include <span>

#include "core/base/numbers.h"
#include "core/record/coarse_break.h"
#include "core/record/interpolate.h"
#include "core/record/stack.h"

namespace strikeplate {
namespace {

constexpr double kHalfWindow = 0.008;  // s either side of the coarse break
constexpr double kLargestLag = 0.006;  // s
constexpr double kEnough = 0.6;        // correlation
constexpr double kWorkInterval = 0.00025;
constexpr double kLateTrigger = 0.0015;  // s

double median(std::vector<double> values) {
  const std::size_t half = values.size() / 2;
  std::nth_element(values.begin(), values.begin() + static_cast<std::ptrdiff_t>(half), values.end());
  const double upper = values[half];
  if (values.size() % 2 == 1) {
    return upper;
  }
  return 0.5 * (upper + *std::max_element(values.begin(), values.begin() + static_cast<std::ptrdiff_t>(half)));
}

// The pieces around the coarse break of one trace of every blow, on one time axis; empty where a blow has none.
struct Pieces {
  std::vector<std::vector<float>> ofBlow;
  double interval = 0.0;
};

double offsetOf(const ShotRecord& record, const Trace& trace) {
  if (!record.source || !trace.receiver) {
    return 0.0;
  }
  return std::hypot(trace.receiver->x - record.source->x,
                    trace.receiver->y.value_or(0.0) - record.source->y.value_or(0.0));
}

// Median over the blows, so that one bad blow does not lead astray.
std::optional<double> coarseBreakOf(const std::vector<const ShotRecord*>& blows, std::size_t t) {
  std::vector<double> times;
  for (const ShotRecord* blow : blows) {
    if (t >= blow->traces.size() || blow->traces[t].state == TraceState::Dead || blow->traces[t].samples.size() < 2) {
      continue;
    }
    const Trace& trace = blow->traces[t];
    if (const auto time = coarseBreak(trace.samples, trace.sampleInterval, trace.delay, offsetOf(*blow, trace))) {
      times.push_back(*time);
    }
  }
  return times.empty() ? std::nullopt : std::optional(median(std::move(times)));
}

Pieces cutPieces(const std::vector<const ShotRecord*>& blows, std::size_t t, double around) {
  Pieces pieces;
  pieces.interval = kWorkInterval;
  for (const ShotRecord* blow : blows) {
    pieces.interval = std::min(pieces.interval, blow->traces[0].sampleInterval);
  }
  const double from = around - kHalfWindow - kLargestLag;
  const auto count = static_cast<std::size_t>(2.0 * (kHalfWindow + kLargestLag) / pieces.interval) + 1;
  for (const ShotRecord* blow : blows) {
    pieces.ofBlow.emplace_back();
    if (t >= blow->traces.size()) {
      continue;
    }
    const Trace& trace = blow->traces[t];
    const bool covered =
        trace.samples.size() > 1 && from >= trace.delay &&
        around + kHalfWindow + kLargestLag <= trace.timeOf(static_cast<double>(trace.samples.size() - 1));
    if (trace.state != TraceState::Dead && covered) {
      pieces.ofBlow.back() = interpolated(trace.samples, (from - trace.delay) / trace.sampleInterval,
                                          pieces.interval / trace.sampleInterval, count);
    }
  }
  return pieces;
}

// Correlation of two pieces of equal length without their means; 0 when one of them is flat.
double correlation(std::span<const float> a, std::span<const float> b) {
  double sa = 0.0, sb = 0.0, saa = 0.0, sbb = 0.0, sab = 0.0;
  for (std::size_t i = 0; i < a.size(); ++i) {
    const auto x = static_cast<double>(a[i]);
    const auto y = static_cast<double>(b[i]);
    sa += x;
    sb += y;
    saa += x * x;
    sbb += y * y;
    sab += x * y;
  }
  const auto n = static_cast<double>(a.size());
  const double va = saa - sa * sa / n;
  const double vb = sbb - sb * sb / n;
  return va > 0.0 && vb > 0.0 ? (sab - sa * sb / n) / std::sqrt(va * vb) : 0.0;
}

struct Peak {
  double lag = 0.0;
  double height = 0.0;
};

// Lag of `late` behind `early` at the highest peak of their correlation; nothing when that lies at the end of the
// range.
std::optional<Peak> correlationPeak(std::span<const float> early, std::span<const float> late, double interval) {
  const auto reach = static_cast<std::size_t>(kLargestLag / interval);
  const std::size_t width = early.size() - 2 * reach;
  std::vector<double> at(2 * reach + 1);
  for (std::size_t k = 0; k < at.size(); ++k) {
    at[k] = correlation(early.subspan(reach, width), late.subspan(k, width));
  }
  const auto best = static_cast<std::size_t>(std::max_element(at.begin(), at.end()) - at.begin());
  if (best == 0 || best + 1 == at.size()) {
    return std::nullopt;
  }
  const double bend = at[best - 1] - 2.0 * at[best] + at[best + 1];
  const double shift = bend < 0.0 ? 0.5 * (at[best - 1] - at[best + 1]) / bend : 0.0;
  return Peak{(static_cast<double>(best) - static_cast<double>(reach) + shift) * interval, at[best]};
}

// Lags of all pairs on all traces: [i][j] holds how much later blow j comes than blow i, one value for each good
// trace.
using PairLags = std::vector<std::vector<std::vector<double>>>;

PairLags pairLags(const std::vector<Pieces>& pieces, std::size_t blows) {
  PairLags lags(blows, std::vector<std::vector<double>>(blows));
  for (const Pieces& trace : pieces) {
    for (std::size_t i = 0; i < blows; ++i) {
      for (std::size_t j = 0; j < blows; ++j) {
        if (i == j || trace.ofBlow[i].empty() || trace.ofBlow[j].empty()) {
          continue;
        }
        const auto peak = correlationPeak(trace.ofBlow[i], trace.ofBlow[j], trace.interval);
        if (peak && peak->height > kEnough) {
          lags[i][j].push_back(peak->lag);
        }
      }
    }
  }
  return lags;
}

// Each blow's lag: median over the others of the pair's median, then all moved to median zero.
void settleLags(const PairLags& lags, std::size_t needed, std::vector<BlowLag>& blows) {
  std::vector<double> found;
  for (std::size_t j = 0; j < blows.size(); ++j) {
    std::vector<double> behind{0.0};  // behind itself
    for (std::size_t i = 0; i < blows.size(); ++i) {
      // Both directions, which differ a little, so that no blow is preferred.
      std::vector<double> both = lags[i][j];
      for (const double lag : lags[j][i]) {
        both.push_back(-lag);
      }
      if (both.size() >= 2 * needed) {
        behind.push_back(median(std::move(both)));
      }
    }
    blows[j].found = behind.size() > 1;
    if (blows[j].found) {
      // With two blows the median would halve the lag.
      blows[j].lag = behind.size() == 2 ? behind[1] : median(behind);
      found.push_back(blows[j].lag);
    }
  }
  if (found.empty()) {
    return;
  }
  const double middle = blows.size() == 2 ? 0.0 : median(found);
  for (BlowLag& blow : blows) {
    if (blow.found) {
      blow.lag = blows.size() == 2 ? 0.5 * blow.lag : blow.lag - middle;
    }
  }
}

// Correlation of each blow, moved by its lag, with the mean of the others: median over the traces.
void measureSimilarity(const std::vector<Pieces>& pieces, std::vector<BlowLag>& blows) {
  std::vector<std::vector<double>> all(blows.size());
  for (const Pieces& trace : pieces) {
    const auto reach = static_cast<std::size_t>(kLargestLag / trace.interval);
    std::vector<std::vector<float>> moved(blows.size());
    for (std::size_t b = 0; b < blows.size(); ++b) {
      if (!trace.ofBlow[b].empty()) {
        moved[b] = interpolated(trace.ofBlow[b], static_cast<double>(reach) + blows[b].lag / trace.interval, 1.0,
                                trace.ofBlow[b].size() - 2 * reach);
      }
    }
    for (std::size_t b = 0; b < blows.size(); ++b) {
      std::vector<float> others;
      for (std::size_t o = 0; o < blows.size(); ++o) {
        if (o == b || moved[o].empty()) {
          continue;
        }
        others.resize(moved[o].size(), 0.0F);
        std::transform(others.begin(), others.end(), moved[o].begin(), others.begin(), std::plus<>());
      }
      if (!moved[b].empty() && !others.empty()) {
        all[b].push_back(correlation(moved[b], others));
      }
    }
  }
  for (std::size_t b = 0; b < blows.size(); ++b) {
    blows[b].similarity = all[b].empty() ? 0.0 : median(all[b]);
  }
}

std::vector<std::string> remarksOn(const std::vector<const ShotRecord*>& records, const std::vector<BlowLag>& blows) {
  std::vector<std::string> remarks;
  for (std::size_t b = 0; b < blows.size(); ++b) {
    const std::string size = fixed(1e3 * std::abs(blows[b].lag), 1) + " ms";
    if (!blows[b].found) {
      remarks.push_back(records[b]->file +
                        ": this blow does not resemble the others at its shot point, so it is "
                        "stacked unmoved; look at it and leave it out if it is bad.");
    } else if (blows[b].lag < -kLateTrigger) {
      remarks.push_back(records[b]->file + ": its arrivals come " + size +
                        " earlier than those of the other blows at its shot point; its trigger was late. It is moved "
                        "before stacking.");
    } else if (blows[b].lag > kLateTrigger) {
      remarks.push_back(records[b]->file + ": its arrivals come " + size +
                        " later than those of the other blows at its shot point; its trigger was early or the others "
                        "late. It is moved before stacking.");
    }
  }
  return remarks;
}

}  // namespace

BlowAlignment alignBlows(const std::vector<const ShotRecord*>& blows) {
  assert(!blows.empty());
  BlowAlignment out;
  if (blows.size() == 1) {
    out.blows = {{0.0, 1.0, true}};
    return out;
  }
  out.blows.resize(blows.size());
  std::vector<Pieces> pieces;
  for (std::size_t t = 0; t < blows[0]->traces.size(); ++t) {
    if (const auto time = coarseBreakOf(blows, t)) {
      pieces.push_back(cutPieces(blows, t, *time));
    }
  }
  // A quarter of the traces have to agree, at least two; a short spread must do with what it has.
  const std::size_t needed = std::clamp<std::size_t>(pieces.size() / 4, 1, 6);
  settleLags(pairLags(pieces, blows.size()), needed, out.blows);
  measureSimilarity(pieces, out.blows);
  out.remarks = remarksOn(blows, out.blows);
  return out;
}

}  // namespace strikeplate
