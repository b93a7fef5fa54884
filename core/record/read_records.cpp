#include "core/record/read_records.h"

#include <algorithm>
#include <array>
#include <utility>

#include "core/base/checksum.h"
#include "core/record/byte_source.h"
#include "core/record/seg2_head.h"
#include "core/record/seg2_reader.h"
#include "core/record/segy_head.h"
#include "core/record/segy_reader.h"

namespace strikeplate {
namespace {

enum class Kind { Seg2, Segy, Text, Other };

bool isText(std::span<const std::byte> bytes) {
  return std::all_of(bytes.begin(), bytes.end(), [](std::byte b) {
    const auto code = std::to_integer<int>(b);
    return code >= 0x20 || code == '\t' || code == '\n' || code == '\r' || code == '\f';
  });
}

Kind kindOf(const ByteSource& source) {
  std::array<std::byte, 512> start{};
  const std::span<const std::byte> got(start.data(), source.read(0, start));
  if (seg2::looksLikeSeg2(got)) {
    return Kind::Seg2;
  }
  if (segy::looksLikeSegy(source)) {
    return Kind::Segy;
  }
  return isText(got) ? Kind::Text : Kind::Other;
}

template <class ReadSeg2, class ReadSegy>
Result<std::vector<ShotRecord>> readAs(Kind kind, const std::string& name, ReadSeg2 seg2, ReadSegy segy) {
  switch (kind) {
    case Kind::Seg2: {
      auto record = seg2();
      if (!record) {
        return record.failure();
      }
      std::vector<ShotRecord> records;
      records.push_back(std::move(*record));
      return records;
    }
    case Kind::Segy:
      return segy();
    case Kind::Text:
      return Failure{name + " is a text file, not a shot record; give the SEG-2 or SEG-Y file of the recorder."};
    default:
      return Failure{name +
                     " is neither a SEG-2 nor a SEG-Y file, or its beginning is damaged; copy it again from the "
                     "recorder or export it as SEG-2."};
  }
}

}  // namespace

Result<std::vector<ShotRecord>> readRecords(const std::string& path) {
  const auto source = openBytes(path);
  if (!source) {
    return source.failure();
  }
  auto records = readAs(
      kindOf(**source), path, [&] { return readSeg2(path); }, [&] { return readSegy(path); });
  if (records) {
    const std::string checksum = fileChecksum(path).value_or("");
    for (ShotRecord& record : *records) {
      record.checksum = checksum;
    }
  }
  return records;
}

Result<std::vector<ShotRecord>> readRecordsBytes(std::span<const std::byte> bytes, const std::string& name) {
  if (bytes.empty()) {
    return Failure{name + " is empty; copy it again from the recorder."};
  }
  return readAs(
      kindOf(*bytesInMemory(bytes)), name, [&] { return readSeg2Bytes(bytes, name); },
      [&] { return readSegyBytes(bytes, name); });
}

}  // namespace strikeplate
