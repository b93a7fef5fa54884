#include "widgets/record_traces.h"

#include <algorithm>
#include <cmath>
#include <numeric>
#include <string>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/record/conditioning.h"

namespace strikeplate {
namespace {

constexpr double kFastestGround = 7000.0;  // m/s; before offset / this there is noise only

/// Recorder time in s until which a trace holds noise only.
double quietUntil(const Gather& gather, const Shot& shot, std::size_t t) {
  const auto& pick = shot.traces[t].pick;
  return pick ? pick->time - pick->sigma : gather.offset(t) / kFastestGround - shot.triggerCorrection;
}

/// Takes the mean of the first `quiet` samples away, which is where the trace rests before its first break; of all
/// when there are too few. The mean of all would move with every surface wave that the record's end cuts off.
void centre(std::vector<float>& samples, double quiet) {
  constexpr double kFewest = 8.0;
  const auto count = quiet < kFewest ? samples.size() : std::min(samples.size(), static_cast<std::size_t>(quiet));
  const double sum = std::accumulate(samples.begin(), samples.begin() + static_cast<std::ptrdiff_t>(count), 0.0);
  const auto mean = static_cast<float>(count > 0 ? sum / static_cast<double>(count) : 0.0);
  for (float& sample : samples) {
    sample -= mean;
  }
}

}  // namespace

ShownTraces::ShownTraces(const Gather& gather, const Shot& shot, const RecordDisplay& display)
    : start_(gather.start), interval_(gather.sampleInterval) {
  Conditioning settings;
  settings.removeDc = false;
  settings.humFrequency = display.hum;
  settings.band = {display.lowCut, display.highCut};
  settings.gainPower = display.gainPower;
  settings.agcWindow = display.agcWindow;
  for (std::size_t t = 0; t < gather.traces.size(); ++t) {
    std::vector<float> samples = gather.traces[t].values();
    std::replace_if(
        samples.begin(), samples.end(), [](float x) { return !std::isfinite(x); }, 0.0F);
    settings.noiseUntil = quietUntil(gather, shot, t);
    centre(samples, (settings.noiseUntil - start_) / interval_);
    settings.reversePolarity = shot.traces[t].state == TraceState::Reversed;
    // Gain in time counts from the blow.
    traces_.push_back(conditioned(samples, interval_, start_ + shot.triggerCorrection, settings));
  }
}

std::vector<float> ShownTraces::units(double from, double to, TraceScale scale) const {
  std::vector<float> largest;
  for (const auto& samples : traces_) {
    const auto index = [&](double time) {
      return static_cast<std::size_t>(
          std::clamp((time - start_) / interval_, 0.0, static_cast<double>(samples.size())));
    };
    float peak = 0.0F;
    for (std::size_t i = index(from); i < index(to); ++i) {
      peak = std::max(peak, std::abs(samples[i]));
    }
    largest.push_back(peak);
  }
  if (scale == TraceScale::Shot && !largest.empty()) {
    std::vector<float> sorted = largest;
    const auto middle = sorted.begin() + static_cast<std::ptrdiff_t>(sorted.size() / 2);
    std::nth_element(sorted.begin(), middle, sorted.end());
    std::fill(largest.begin(), largest.end(), *middle);
  }
  return largest;
}

bool sameConditioning(const RecordDisplay& a, const RecordDisplay& b) {
  return a.lowCut == b.lowCut && a.highCut == b.highCut && a.hum == b.hum && a.gainPower == b.gainPower &&
         a.agcWindow == b.agcWindow && a.scale == b.scale;
}

std::vector<std::string> conditioningWords(const RecordDisplay& display) {
  std::vector<std::string> words;
  if (display.lowCut > 0.0) {
    words.push_back("low cut " + fixed(display.lowCut, 0) + " Hz");
  }
  if (display.highCut > 0.0) {
    words.push_back("high cut " + fixed(display.highCut, 0) + " Hz");
  }
  if (display.hum > 0.0) {
    words.push_back(fixed(display.hum, 0) + " Hz hum removed");
  }
  if (display.gainPower > 0.0) {
    words.push_back("gain with time to the power " + fixed(display.gainPower, 1));
  }
  if (display.agcWindow > 0.0) {
    words.push_back("automatic gain over " + milliseconds(display.agcWindow, 0));
  }
  if (display.scale == TraceScale::Shot) {
    words.emplace_back("one scale for all traces");
  }
  return words;
}

}  // namespace strikeplate
