#pragma once

#include <qcustomplot.h>

#include "widgets/look.h"

namespace strikeplate {

/// What the plots over position have in common.
void applyLook(QCustomPlot& plot, const Look& look);
void fixSideMargins(QCustomPlot& plot, int left, int right);
QCPScatterStyle layerScatter(const Look& look, int layer, double size);
/// A vertical line at x in the plot's unit; nothing when x is NaN.
void addPlumbLine(QCustomPlot& plot, const Look& look, double x);

}  // namespace strikeplate
