#pragma once

#include <cstddef>
#include <memory>
#include <span>
#include <utility>
#include <vector>

#include "core/record/record.h"

namespace strikeplate {

/// The samples of a trace: its own, or those of a record, which are shared and not copied. A line of single blows
/// then takes the memory of its records once.
class SharedSamples {
 public:
  SharedSamples() : samples_(std::make_shared<std::vector<float>>()) {}
  // Samples are samples, wherever they are kept.
  SharedSamples(std::vector<float> own)  // NOLINT(google-explicit-constructor)
      : samples_(std::make_shared<const std::vector<float>>(std::move(own))) {}

  /// Those of trace `trace` of a record, which stays in memory as long as they are in use. Needs a trace of the
  /// record.
  static SharedSamples of(const RecordPtr& record, std::size_t trace) {
    SharedSamples shared;
    shared.samples_ = std::shared_ptr<const std::vector<float>>(record, &record->traces[trace].samples);
    return shared;
  }

  [[nodiscard]] std::size_t size() const { return samples_->size(); }
  [[nodiscard]] bool empty() const { return samples_->empty(); }
  float operator[](std::size_t i) const { return (*samples_)[i]; }
  [[nodiscard]] auto begin() const { return samples_->begin(); }
  [[nodiscard]] auto end() const { return samples_->end(); }
  [[nodiscard]] const std::vector<float>& values() const { return *samples_; }
  operator std::span<const float>() const { return *samples_; }  // NOLINT(google-explicit-constructor)

  /// True when both are the same in memory.
  [[nodiscard]] bool sharedWith(const std::vector<float>& samples) const { return samples_.get() == &samples; }

 private:
  std::shared_ptr<const std::vector<float>> samples_;  // never null
};

}  // namespace strikeplate
