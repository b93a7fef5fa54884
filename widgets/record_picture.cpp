#include "widgets/record_picture.h"

namespace strikeplate {

double RecordPicture::predictedOf(int trace) const {
  const int a = arrivalOf(trace);
  const auto i = static_cast<std::size_t>(a);
  return a >= 0 && i < scene.interpretation->section.predicted.size()
             ? scene.interpretation->section.predicted[i] - shot.triggerCorrection
             : Estimate::kNaN;
}

int RecordPicture::layerOf(int trace) const {
  const auto& pick = shot.traces[static_cast<std::size_t>(trace)].pick;
  if (pick && pick->layer > 0) {
    return pick->layer;
  }
  const int a = arrivalOf(trace);
  return a >= 0 ? scene.interpretation->times.arrivals[static_cast<std::size_t>(a)].layer : 0;
}

}  // namespace strikeplate
