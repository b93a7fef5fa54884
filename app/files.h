#pragma once

#include <string>
#include <vector>

#include <QString>
#include <QStringList>

namespace strikeplate {

/// Files as they are, and the record files of folders (*.sg2, *.seg2, *.dat, *.sgy, *.segy in any case), in natural
/// order.
std::vector<std::string> recordFiles(const QStringList& paths);

/// The demo line's folder: installed, or beside the sources; empty when there is none.
QString demoFolder();

/// The demo's geometry table, or empty when it has none.
QString demoGeometry(const QString& folder);

}  // namespace strikeplate
