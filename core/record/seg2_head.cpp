#include "core/record/seg2_head.h"

#include <algorithm>
#include <cstddef>
#include <span>
#include <utility>

#include "core/record/seg2_layout.h"

namespace strikeplate::seg2 {
namespace {

std::string terminatorText(std::span<const std::byte> head, std::size_t at) {
  const auto size = std::to_integer<std::size_t>(head[at]);
  std::string text;
  for (std::size_t i = 0; i < std::min<std::size_t>(size, 2); ++i) {
    text += static_cast<char>(head[at + 1 + i]);
  }
  return text;
}

bool traceMarkAt(const ByteSource& source, std::uint64_t offset, ByteOrder order) {
  std::byte mark[2];
  return source.read(offset, mark) == 2 && load<std::uint16_t>(mark, order) == kTraceMark;
}

void readPointers(const ByteSource& source, std::uint16_t tableBytes, std::uint16_t traces, FileHead& out,
                  OddityList& odd) {
  const std::uint64_t wanted = std::max<std::uint64_t>(tableBytes, 4ULL * traces);
  std::vector<std::byte> bytes(std::min(wanted, source.size() - kBlockHead));
  bytes.resize(source.read(kBlockHead, bytes) / 4 * 4);
  std::vector<std::uint32_t> table(bytes.size() / 4);
  for (std::size_t i = 0; i < table.size(); ++i) {
    table[i] = load<std::uint32_t>(bytes.data() + 4 * i, out.order);
  }
  if (tableBytes < 4 * traces) {
    odd.add("The file says " + std::to_string(traces) + " traces but has room for " + std::to_string(tableBytes / 4) +
            " pointers to them; the count of traces is used.");
  }
  std::size_t count = traces;
  if (traces == 0) {
    count = static_cast<std::size_t>(std::find(table.begin(), table.end(), 0u) - table.begin());
    odd.add("The file says that it holds no traces; its " + std::to_string(count) + " pointers are followed.");
  }
  if (count < table.size() && table[count] != 0 && traceMarkAt(source, table[count], out.order)) {
    odd.add("The file holds pointers to more traces than the " + std::to_string(count) +
            " that it says; those beyond are left out.");
  }
  if (count > table.size()) {
    odd.add("The file is cut off within its pointers: it says " + std::to_string(count) + " traces and names " +
            std::to_string(table.size()) + ".");
  }
  table.resize(std::min(count, table.size()));
  table.shrink_to_fit();
  out.pointers = std::move(table);
  out.stringsAt = kBlockHead + wanted;
}

}  // namespace

bool looksLikeSeg2(std::span<const std::byte> start) {
  return start.size() >= 2 && (load<std::uint16_t>(start.data(), ByteOrder::Little) == kFileMark ||
                               load<std::uint16_t>(start.data(), ByteOrder::Big) == kFileMark);
}

Result<FileHead> readFileHead(const ByteSource& source, const std::string& name, OddityList& odd) {
  FileHead out;
  std::byte head[kBlockHead];
  const std::size_t got = source.read(0, head);
  if (!looksLikeSeg2(std::span(head, got))) {
    return Failure{name + " is not a SEG-2 file (it does not begin with the mark of one); give a shot record."};
  }
  if (got < kBlockHead) {
    return Failure{name + " is cut off within its first " + std::to_string(kBlockHead) +
                   " bytes; copy it again from the recorder."};
  }
  out.order = load<std::uint16_t>(head, ByteOrder::Little) == kFileMark ? ByteOrder::Little : ByteOrder::Big;
  // Some writers put the mark of the other order; the first trace tells.
  std::byte pointer[4];
  if (source.read(kBlockHead, pointer) == 4) {
    const ByteOrder other = out.order == ByteOrder::Little ? ByteOrder::Big : ByteOrder::Little;
    if (!traceMarkAt(source, load<std::uint32_t>(pointer, out.order), out.order) &&
        traceMarkAt(source, load<std::uint32_t>(pointer, other), other)) {
      out.order = other;
      odd.add("The mark at the start of the file tells the wrong byte order; the order of its first trace is used.");
    }
  }
  if (const auto revision = load<std::uint16_t>(head + 2, out.order); revision != 1) {
    odd.add("The file says revision " + std::to_string(revision) + " of SEG-2, of which there is only 1.");
  }
  if (std::to_integer<int>(head[8]) > 2 || std::to_integer<int>(head[11]) > 2) {
    odd.add("The file says that a string or line ends with more than two characters; the first two are used.");
  }
  out.terminators.string = terminatorText(head, 8);
  out.terminators.line = terminatorText(head, 11);
  readPointers(source, load<std::uint16_t>(head + 4, out.order), load<std::uint16_t>(head + 6, out.order), out, odd);
  return out;
}

}  // namespace strikeplate::seg2
