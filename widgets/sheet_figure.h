#pragma once

#include <QSizeF>
#include <QString>

#include "core/base/result.h"
#include "core/report/sheet.h"

namespace strikeplate {

/// A plot of the sheet on its own, for a report or a slide.
struct SheetFigure {
  enum class Kind { Section, TravelTimes, Residuals, Record };
  Kind kind = Kind::Section;
  int shot = 0;                  ///< of a record, index into the survey
  QSizeF size = {180.0, 110.0};  ///< mm
};

/// Writes a plot as the sheet has it, by what the path ends in: .svg (vector, text as text) or .png (300 dots per
/// inch). A file of that name is replaced when the new one is complete. Needs a QGuiApplication. Fails with one
/// sentence, also on any other ending and on a shot that the survey does not have.
Outcome writeSheetFigure(const QString& path, const SheetFigure& figure, const Survey& survey,
                         const Interpretation& interpretation, const SheetOptions& options);

}  // namespace strikeplate
