#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/record/oddity_list.h"
#include "core/record/record.h"
#include "core/record/segy_head.h"

namespace strikeplate::segy {

/// What the header of one trace says, with its scalars applied.
struct TraceHeader {
  std::int32_t fieldRecord = 0;
  std::int32_t channel = 0;
  std::int32_t sourcePoint = 0;
  int id = 0;                 ///< 1 live, 2 dead, ...
  int stack = 1;              ///< vertically summed blows
  double offset = 0.0;        ///< m, signed
  HeaderPosition source;      ///< m; z is the ground's elevation at the shot
  HeaderPosition receiver;    ///< m
  double sourceDepth = 0.0;   ///< m below the ground
  bool lengths = true;        ///< positions are lengths, not angles
  double delay = 0.0;         ///< s
  std::uint32_t samples = 0;  ///< 0 when not said
  double interval = 0.0;      ///< s, 0 when not said
};

/// Reads a trace header; `bytes` holds head.headerBytes bytes.
TraceHeader readTraceHeader(std::span<const std::byte> bytes, const Head& head);

/// What a trace id makes of a trace, and what there is to say about it.
TraceState stateOf(int id, int trace, OddityList& odd);

/// The keywords to show for a trace.
std::vector<HeaderEntry> shownWords(const TraceHeader& header);

/// Which traces belong to one shot: the first trace of each, from 0.
struct Split {
  std::vector<std::size_t> starts;
  std::string by;  ///< "field record", "source point", "source position", or empty when there is one shot only
};

/// Splits traces into shots where the field record changes; where that never changes, by the source point; where that
/// never changes either, by the source's position, unless that is another one for every trace, as in a stacked
/// section.
Split splitIntoShots(const std::vector<TraceHeader>& headers);

}  // namespace strikeplate::segy
