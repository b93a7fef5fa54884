#pragma once

#include <QByteArray>
#include <QString>

#include "core/base/result.h"

namespace strikeplate {

/// Writes all of a file or nothing, in the place of any other of that name; a device, such as a printer's or the null
/// one, is written to and not replaced. Fails with one sentence.
Outcome writeWhole(const QString& path, const QByteArray& bytes);

}  // namespace strikeplate
