#pragma once

#include <qcustomplot.h>

#include "widgets/look.h"

namespace strikeplate {

/// What the plots over position have in common.
void applyLook(QCustomPlot& plot, const Look& look);
QCPScatterStyle layerScatter(const Look& look, int layer, double size);

}  // namespace strikeplate
