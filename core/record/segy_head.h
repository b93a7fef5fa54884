#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/record/byte_order.h"
#include "core/record/byte_source.h"
#include "core/record/oddity_list.h"

namespace strikeplate::segy {

/// What the text and binary headers of a SEG-Y file say, and where its traces are.
struct Head {
  ByteOrder order = ByteOrder::Big;
  int revision = 0;                 ///< 0, 1 or 2
  int code = 0;                     ///< sample format: 1, 2, 3, 5, 6 or 8
  std::uint64_t samples = 0;        ///< in each trace, 0 when not said
  double interval = 0.0;            ///< s, 0 when not said
  bool fixedLength = false;         ///< all traces have `samples` samples
  bool feet = false;                ///< lengths are in feet
  std::uint64_t firstTraceAt = 0;   ///< byte of the first trace header
  std::uint32_t headerBytes = 240;  ///< before the samples of each trace
  std::string text;                 ///< the text header, UTF-8, lines without blanks at their ends
};

/// Reads the head of a SEG-Y file of revision 0, 1 or 2 in either byte order. Fails, in one sentence with `name`,
/// when it is no SEG-Y file or its sample format is one that is not read, which is then called by its name. Sources:
/// Barry, Cavers and Kneale, Geophysics 40 (1975) 344-352; SEG Technical Standards Committee, SEG-Y rev 1 (2002) and
/// rev 2.0 (2017).
Result<Head> readHead(const ByteSource& source, const std::string& name, OddityList& odd);

/// Whether the bytes of a source can be SEG-Y at all: long enough, and with a sample format code in its place.
bool looksLikeSegy(const ByteSource& source);

/// Bytes of one sample of a format that is read.
int sampleBytes(int code);

/// "4-byte IBM floats" and so on, for all codes of revision 2; "unknown" otherwise.
std::string formatName(int code);

}  // namespace strikeplate::segy
