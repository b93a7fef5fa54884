#pragma once

#include <optional>
#include <vector>

#include <QString>
#include <QStringList>

namespace strikeplate {

/// A number as people type it, with decimal point or comma; nothing when it is none.
std::optional<double> typedNumber(const QString& text);

/// At most `decimals` digits behind the point, without zeros at the end.
QString shortNumber(double value, int decimals = 3);

/// A text from a spreadsheet as rows of cells: columns apart by tabs, else by semicolons, else, where points are the
/// decimal sign, by commas. Empty lines, and a first row without any number in it, are passed over.
std::vector<QStringList> pastedCells(const QString& text);

}  // namespace strikeplate
