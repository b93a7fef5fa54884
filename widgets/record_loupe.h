#pragma once

#include <QPointF>

#include "widgets/record_picture.h"
#include "widgets/record_traces.h"

class QPainter;

namespace strikeplate {

/// The magnifier: the trace under the pointer around the pointer's time, several times larger, each sample a dot,
/// with the pick and its sigma and, broken, the onset at which a click would set it. Stands in the corner away from
/// the pointer. Nothing when the plot is too small for it or the trace holds no samples.
void paintLoupe(QPainter& painter, const RecordPicture& picture, const ShownTraces& traces, const QPointF& pointer);

}  // namespace strikeplate
