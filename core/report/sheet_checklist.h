#pragma once

#include <string>
#include <vector>

#include "core/report/sheet.h"

namespace strikeplate {

/// One thing that a refraction report is asked to hold.
struct SheetCheck {
  std::string item;     ///< what, in a few words
  std::string missing;  ///< one sentence: what is missing and what to do; empty when it is there
};

/// What published guidance asks a refraction report to hold, in its order, with what this survey still lacks. Nothing
/// here keeps anybody from printing.
///
/// Source: subjects of the report section of ASTM D5777-18 and of USACE EM 1110-1-1802 (1995), in own words from
/// memory; the sheet claims no conformity.
std::vector<SheetCheck> sheetChecklist(const Survey& survey, const Interpretation& interpretation,
                                       const SheetOptions& options);

}  // namespace strikeplate
