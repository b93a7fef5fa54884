#pragma once

#include <utility>

#include "widgets/record_picture.h"

class QPainter;

namespace strikeplate {

/// What lies over the traces and changes with every step of a gesture.
struct RecordMarks {
  int selected = -1;                  ///< trace; its sigma bracket can be taken hold of
  std::pair<int, int> range{-1, -1};  ///< traces marked, first and last; -1 when none
  int underPlumbLine = -1;            ///< trace at the plumb line
  double plumbLine = Estimate::kNaN;  ///< m, drawn when traces stand at their true position
};

/// Strips behind the marked, selected and pointed-at traces.
void paintRecordMarks(QPainter& painter, const RecordPicture& picture, const RecordMarks& marks);
/// The times that the section predicts, in the colours of the layers they come through.
void paintPredicted(QPainter& painter, const RecordPicture& picture);
/// At each other shot's place, the time that that shot reads at this one's, with the 95 % tolerance of the pair.
void paintReciprocal(QPainter& painter, const RecordPicture& picture);
/// Picks with layer, sigma and doubts: a filled symbol was set by hand, an open one by program or table.
void paintPicks(QPainter& painter, const RecordPicture& picture, int selected);

}  // namespace strikeplate
