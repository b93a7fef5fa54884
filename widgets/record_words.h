#pragma once

#include <QString>

#include "widgets/record_picture.h"

namespace strikeplate {

/// What the pointer is on, for the status bar: shot, geophone, time after the blow, pick with sigma, predicted time
/// and residual, and the first doubt that hangs on the trace. `recorderTime` in s,
/// NaN for a trace that the keys led to.
QString hoverWords(const RecordPicture& picture, int trace, double recorderTime);

}  // namespace strikeplate
