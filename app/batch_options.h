#pragma once

#include <string>
#include <vector>

#include "core/base/result.h"

namespace strikeplate {

/// What the command line of strikeplate-batch asks for. Empty paths mean "not asked for".
struct BatchOptions {
  std::vector<std::string> records;  ///< SEG-2, SEG-Y or survey files; together one line
  std::string geometry;              ///< geometry table (CSV) over the headers
  std::string picksIn;               ///< picks (CSV) to use
  int layers = 0;                    ///< 0 = by evidence
  std::string survey, picks, depths, layersOut, opinions, doubts, sheet, sectionDxf;  ///< files to write
  std::string xlsx, geojson, svg;                                                     ///< further files to write
  bool letter = false;                                                                ///< the sheet's paper, else A4
  bool feet = false;           ///< lengths of the sheet and the plots
  bool blackAndWhite = false;  ///< layers without colours
  bool recordPages = false;    ///< the sheet's pages with each record
  bool tablePages = false;     ///< the sheet's pages with every table
  bool help = false;
  bool version = false;
};

/// Reads the arguments (without the program's name). Fails with one sentence on wrong usage.
Result<BatchOptions> parseBatchOptions(const std::vector<std::string>& arguments);

/// The text of --help.
std::string batchHelp();

}  // namespace strikeplate
