#pragma once

#include <vector>

#include <QFontMetricsF>
#include <QMarginsF>
#include <QString>

#include "widgets/record_picture.h"

class QPainter;

namespace strikeplate {

/// Room in px that axes and title need around the traces.
QMarginsF recordMargins(const QFontMetricsF& metrics);

/// Labels below the traces: the traces that get their number written, in rising order, such that no two labels of
/// `widest` px come nearer than a gap to each other.
std::vector<int> labelledTraces(const RecordAxes& axes, double widest);

/// Title, grid, time axis, numbers and positions of the traces, places of the shots.
void paintRecordFrame(QPainter& painter, const RecordPicture& picture);

/// What is wrong with a trace, in words and hatching over it.
void paintTraceStates(QPainter& painter, const RecordPicture& picture);

}  // namespace strikeplate
