#include "core/record/segy_head.h"

#include <algorithm>
#include <array>
#include <cmath>

#include <segyio/segy.h>

#include "core/record/segy_text.h"

namespace strikeplate::segy {
namespace {

constexpr std::uint64_t kTextBytes = SEGY_TEXT_HEADER_SIZE;
constexpr std::uint64_t kBinaryBytes = SEGY_BINARY_HEADER_SIZE;
constexpr std::uint32_t kTraceHeaderBytes = SEGY_TRACE_HEADER_SIZE;
constexpr std::uint64_t kTapeLabelBytes = 128;
constexpr int kHighestCode = 16;

// Positions of revision 2 within the file, counted from 1 as the standard counts.
constexpr int kExtendedSamples = 3269;
constexpr int kExtendedInterval = 3273;
constexpr int kByteOrderMark = 3297;
constexpr int kRevisionMinor = 3502;
constexpr int kMoreTraceHeaders = 3507;
constexpr int kFirstTraceOffset = 3521;

class BinaryHeader {
 public:
  // The optional tape label of revision 1 stands before the text header.
  explicit BinaryHeader(const ByteSource& source) {
    std::array<std::byte, 8> start{};
    const bool labelled = source.read(0, start) == start.size() && static_cast<char>(start[4]) == 'S' &&
                          static_cast<char>(start[5]) == 'Y' && static_cast<char>(start[6]) >= '0' &&
                          static_cast<char>(start[6]) <= '9' && static_cast<char>(start[7]) == '.';
    base_ = labelled ? kTapeLabelBytes : 0;
    whole_ = source.read(base_ + kTextBytes, bytes_) == bytes_.size() &&
             source.size() > base_ + kTextBytes + kBinaryBytes + kTraceHeaderBytes;
    findOrder();
  }

  template <class Number>
  [[nodiscard]] Number at(int position) const {
    return load<Number>(bytes_.data() + position - 1 - kTextBytes, order);
  }
  [[nodiscard]] bool whole() const { return whole_; }
  [[nodiscard]] std::uint64_t base() const { return base_; }
  [[nodiscard]] int code() const { return at<std::uint16_t>(SEGY_BIN_FORMAT); }
  [[nodiscard]] bool codeIsKnown() const { return code() >= 1 && code() <= kHighestCode; }

  // The revision stands in one byte, in practice also in the other one of its word.
  [[nodiscard]] int revision() const {
    const int major = at<std::uint8_t>(SEGY_BIN_SEGY_REVISION);
    const int minor = at<std::uint8_t>(kRevisionMinor);
    return major == 0 && minor <= 2 ? minor : std::min(major, 2);
  }

  ByteOrder order = ByteOrder::Big;

 private:
  void findOrder() {
    constexpr std::uint32_t kMark = 0x01020304;
    order = ByteOrder::Little;
    if (at<std::uint32_t>(kByteOrderMark) == kMark) {
      return;
    }
    if (codeIsKnown()) {
      return;  // a code from 1 to 16 is above 255 when its bytes are swapped
    }
    order = ByteOrder::Big;
  }

  std::array<std::byte, kBinaryBytes> bytes_{};
  std::uint64_t base_ = 0;
  bool whole_ = false;
};

// Extended text headers are counted, or end with a stanza of their own.
std::uint64_t extendedTextBytes(const ByteSource& source, const BinaryHeader& binary, std::uint64_t at,
                                OddityList& odd) {
  const int count = binary.at<std::int16_t>(SEGY_BIN_EXT_HEADERS);
  if (count >= 0) {
    const std::uint64_t bytes = static_cast<std::uint64_t>(count) * kTextBytes;
    if (at + bytes + kTraceHeaderBytes < source.size()) {
      return bytes;
    }
    odd.add("The file says " + std::to_string(count) + " more text headers than there is room for; none is assumed.");
    return 0;
  }
  std::vector<std::byte> block(kTextBytes);
  for (std::uint64_t bytes = 0; source.read(at + bytes, block) == block.size();) {
    bytes += kTextBytes;
    if (textOf(block).find("((SEG: EndText))") != std::string::npos) {
      return bytes;
    }
  }
  odd.add("The file says that it has more text headers but their end is not found; none is assumed.");
  return 0;
}

void readExtended(const BinaryHeader& binary, Head& head) {
  const auto samples = binary.at<std::uint32_t>(kExtendedSamples);
  if (samples > 0) {
    head.samples = samples;
  }
  const auto interval = binary.at<double>(kExtendedInterval);
  if (interval > 0.0 && std::isfinite(interval)) {
    head.interval = interval * 1e-6;
  }
  const int more = binary.at<std::int16_t>(kMoreTraceHeaders);
  if (more > 0 && more < 100) {
    head.headerBytes = kTraceHeaderBytes * static_cast<std::uint32_t>(1 + more);
  }
}

}  // namespace

std::string formatName(int code) {
  static const std::array<const char*, kHighestCode + 1> kNames = {
      "unknown",
      "4-byte IBM floats",
      "4-byte integers",
      "2-byte integers",
      "4-byte fixed point with gain",
      "4-byte IEEE floats",
      "8-byte IEEE floats",
      "3-byte integers",
      "1-byte integers",
      "8-byte integers",
      "4-byte unsigned integers",
      "2-byte unsigned integers",
      "8-byte unsigned integers",
      "unknown",
      "unknown",
      "3-byte unsigned integers",
      "1-byte unsigned integers",
  };
  return code >= 1 && code <= kHighestCode ? kNames[static_cast<std::size_t>(code)] : "unknown";
}

int sampleBytes(int code) {
  constexpr int kIeeeDouble = 6;  // not known to the library, which ends at revision 1
  return code == kIeeeDouble ? 8 : segy_trsize(code, 1);
}

bool looksLikeSegy(const ByteSource& source) {
  const BinaryHeader binary(source);
  return binary.whole() && binary.codeIsKnown();
}

Result<Head> readHead(const ByteSource& source, const std::string& name, OddityList& odd) {
  const BinaryHeader binary(source);
  if (!binary.whole()) {
    return Failure{name + " is too short for a SEG-Y file with a trace in it; copy it again from the recorder."};
  }
  if (!binary.codeIsKnown()) {
    return Failure{name + " is not a SEG-Y file (no sample format where one should be); give a shot record."};
  }
  Head head;
  head.order = binary.order;
  head.code = binary.code();
  constexpr std::array kRead = {1, 2, 3, 5, 6, 8};
  if (std::find(kRead.begin(), kRead.end(), head.code) == kRead.end()) {
    return Failure{name + " holds samples as " + formatName(head.code) + " (SEG-Y format " +
                   std::to_string(head.code) +
                   "), which are not read; export it with 4-byte IEEE floats (format 5)."};
  }
  head.revision = binary.revision();
  head.samples = binary.at<std::uint16_t>(SEGY_BIN_SAMPLES);
  const int interval = binary.at<std::int16_t>(SEGY_BIN_INTERVAL);
  head.interval = interval > 0 ? interval * 1e-6 : 0.0;
  head.fixedLength = binary.at<std::int16_t>(SEGY_BIN_TRACE_FLAG) != 0;
  constexpr int kFeet = 2;
  head.feet = binary.at<std::int16_t>(SEGY_BIN_MEASUREMENT_SYSTEM) == kFeet;
  const std::uint64_t afterBinary = binary.base() + kTextBytes + kBinaryBytes;
  head.firstTraceAt = afterBinary + extendedTextBytes(source, binary, afterBinary, odd);
  if (head.revision >= 2) {
    readExtended(binary, head);
    const auto first = binary.at<std::uint64_t>(kFirstTraceOffset);
    if (first >= afterBinary && first < source.size() - kTraceHeaderBytes) {
      head.firstTraceAt = first;
    }
  }
  std::vector<std::byte> text(kTextBytes);
  text.resize(source.read(binary.base(), text));
  head.text = textOf(text);
  return head;
}

}  // namespace strikeplate::segy
