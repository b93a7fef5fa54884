#pragma once

#include <QString>

#include "core/record/butterworth.h"
#include "widgets/record_picture.h"

namespace strikeplate {

/// What the pointer is on, for the status bar: shot, geophone, time after the blow, pick with sigma, predicted time
/// and residual, and the first doubt that hangs on the trace. `recorderTime` in s,
/// NaN for a trace that the keys led to.
QString hoverWords(const RecordPicture& picture, int trace, double recorderTime);

/// What a filter does to a first break read off the filtered trace, such as "first breaks seem 0.24 ms early"; see
/// onset_shift.h for the pulse that it was measured on.
QString onsetWords(const PassBand& band);

}  // namespace strikeplate
