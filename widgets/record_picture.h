#pragma once

#include <QFont>

#include "widgets/look.h"
#include "widgets/record_axes.h"
#include "widgets/scene.h"

namespace strikeplate {

/// All that the painting of one shot looks at. Refers to what its maker keeps alive.
struct RecordPicture {
  const Scene& scene;
  const Gather& gather;
  const Shot& shot;
  const RecordAxes& axes;
  const RecordDisplay& display;
  const Look& look;
  QFont font;

  [[nodiscard]] int shotIndex() const { return scene.selection.shot; }
  /// Index into the interpretation's arrivals of a trace of this shot; -1 where there is none.
  [[nodiscard]] int arrivalOf(int trace) const {
    return scene.interpretation ? scene.interpretation->arrivalOf(scene.selection.shot, trace) : -1;
  }
  /// Recorder time in s that the section predicts for a trace; NaN where none.
  [[nodiscard]] double predictedOf(int trace) const;
  /// The layer a trace's pick is taken to have travelled through; 0 when nobody said so yet.
  [[nodiscard]] int layerOf(int trace) const;
};

}  // namespace strikeplate
