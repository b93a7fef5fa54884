#include "core/record/seg2_writer.h"

#include <algorithm>
#include <cassert>
#include <cstdint>
#include <fstream>
#include <limits>
#include <set>
#include <utility>

#include "core/base/numbers.h"
#include "core/record/seg2_layout.h"
#include "core/record/seg2_samples.h"

namespace strikeplate {
namespace {

using namespace seg2;

std::string upper(std::string text) {
  for (char& c : text) {
    if (c >= 'a' && c <= 'z') {
      c = static_cast<char>(c - 'a' + 'A');
    }
  }
  return text;
}

std::string positionText(const HeaderPosition& position) {
  std::string text = fullPrecision(position.x);
  if (position.y || position.z) {
    text += " " + fullPrecision(position.y.value_or(0.0));
  }
  if (position.z) {
    text += " " + fullPrecision(*position.z);
  }
  return text;
}

// The keywords to write: `own` from the record's fields, the rest from its header; sorted, NOTE last.
std::vector<HeaderEntry> sortedWords(const std::vector<HeaderEntry>& header, std::vector<HeaderEntry> own,
                                     const std::set<std::string>& fieldWords) {
  for (const HeaderEntry& entry : header) {
    if (!fieldWords.contains(upper(entry.key)) && !entry.key.empty()) {
      own.push_back({upper(entry.key), entry.value});
    }
  }
  std::stable_sort(own.begin(), own.end(), [](const HeaderEntry& a, const HeaderEntry& b) {
    return std::pair(a.key == "NOTE", a.key) < std::pair(b.key == "NOTE", b.key);
  });
  return own;
}

std::vector<HeaderEntry> traceWords(const Trace& trace, const ShotRecord& record) {
  std::vector<HeaderEntry> own = {{"DELAY", fullPrecision(trace.delay)},
                                  {"DESCALING_FACTOR", fullPrecision(trace.descaling)},
                                  {"SAMPLE_INTERVAL", fullPrecision(trace.sampleInterval)},
                                  {"STACK", std::to_string(trace.stack)}};
  if (trace.receiver) {
    own.push_back({"RECEIVER_LOCATION", positionText(*trace.receiver)});
  }
  if (record.source) {
    own.push_back({"SOURCE_LOCATION", positionText(*record.source)});
  }
  if (trace.state == TraceState::Reversed) {
    own.push_back({"POLARITY", "-1"});
  }
  if (trace.state == TraceState::Dead) {
    own.push_back({"TRACE_TYPE", "DEAD"});
  }
  return sortedWords(trace.header, std::move(own),
                     {"DELAY", "DESCALING_FACTOR", "SAMPLE_INTERVAL", "STACK", "RECEIVER_LOCATION", "SOURCE_LOCATION",
                      "POLARITY", "TRACE_TYPE", "SKEW"});
}

template <class Number>
void append(std::vector<std::byte>& bytes, Number value, ByteOrder order) {
  const std::size_t at = bytes.size();
  bytes.resize(at + sizeof(Number));
  store(bytes.data() + at, value, order);
}

void append(std::vector<std::byte>& bytes, const std::string& text) {
  for (const char c : text) {
    bytes.push_back(static_cast<std::byte>(c));
  }
}

void padToFour(std::vector<std::byte>& bytes) {
  bytes.resize((bytes.size() + 3) / 4 * 4);
}

std::string withLineEnds(const std::string& value, const std::string& lineEnd) {
  std::string out;
  for (const char c : value) {
    out += c == '\n' ? lineEnd : std::string(1, c);
  }
  return out;
}

// Appends strings, each with its count, and the zero count that ends them; false when one is too long.
bool appendStrings(std::vector<std::byte>& bytes, const std::vector<HeaderEntry>& words,
                   const Seg2WriteOptions& options) {
  for (const HeaderEntry& word : words) {
    const std::string text =
        word.key + " " + withLineEnds(word.value, options.terminators.line) + options.terminators.string;
    if (text.size() + 2 > std::numeric_limits<std::uint16_t>::max()) {
      return false;
    }
    append(bytes, static_cast<std::uint16_t>(text.size() + 2), options.order);
    append(bytes, text);
  }
  append(bytes, std::uint16_t{0}, options.order);
  padToFour(bytes);
  return true;
}

void storeTerminator(std::byte* at, const std::string& terminator) {
  at[0] = static_cast<std::byte>(terminator.size());
  for (std::size_t i = 0; i < terminator.size(); ++i) {
    at[1 + i] = static_cast<std::byte>(terminator[i]);
  }
}

Result<std::vector<std::byte>> fileBlock(const ShotRecord& record, const Seg2WriteOptions& options) {
  const std::size_t slots =
      std::max(record.traces.size(), static_cast<std::size_t>(std::max(options.pointerSlots, 0)));
  if (slots > static_cast<std::size_t>(kMostTraces)) {
    return Failure{record.file + " has more traces than a SEG-2 file can hold (" + std::to_string(kMostTraces) +
                   ")."};
  }
  std::vector<std::byte> bytes(kBlockHead + 4 * slots);
  store(bytes.data(), kFileMark, options.order);
  store(bytes.data() + 2, std::uint16_t{1}, options.order);
  store(bytes.data() + 4, static_cast<std::uint16_t>(4 * slots), options.order);
  store(bytes.data() + 6, static_cast<std::uint16_t>(record.traces.size()), options.order);
  storeTerminator(bytes.data() + 8, options.terminators.string);
  storeTerminator(bytes.data() + 11, options.terminators.line);
  if (!appendStrings(bytes, sortedWords(record.header, {{"UNITS", "METERS"}}, {"UNITS"}), options)) {
    return Failure{record.file + " has a file keyword too long for SEG-2 (65 kB); shorten its note."};
  }
  return bytes;
}

Outcome appendTrace(std::vector<std::byte>& bytes, const ShotRecord& record, std::size_t index,
                    const Seg2WriteOptions& options) {
  const Trace& trace = record.traces[index];
  const std::string name = record.file + ", trace " + std::to_string(index + 1);
  std::vector<std::byte> block(kBlockHead);
  if (!appendStrings(block, traceWords(trace, record), options) || block.size() > kLargestBlock) {
    return Failure{name + " has keywords too long for SEG-2 (65 kB); shorten its note."};
  }
  const auto data = encode(options.formatCode, options.order, trace.samples);
  if (!data) {
    return Failure{name + ": " + data.message() + "."};
  }
  if (bytes.size() + block.size() + data->size() > std::numeric_limits<std::uint32_t>::max()) {
    return Failure{name + " ends beyond the 4 GB that a SEG-2 file can hold; write fewer traces."};
  }
  store(block.data(), kTraceMark, options.order);
  store(block.data() + 2, static_cast<std::uint16_t>(block.size()), options.order);
  store(block.data() + 4, static_cast<std::uint32_t>(data->size()), options.order);
  store(block.data() + 8, static_cast<std::uint32_t>(trace.samples.size()), options.order);
  block[12] = static_cast<std::byte>(options.formatCode);
  store(bytes.data() + kBlockHead + 4 * index, static_cast<std::uint32_t>(bytes.size()), options.order);
  bytes.insert(bytes.end(), block.begin(), block.end());
  bytes.insert(bytes.end(), data->begin(), data->end());
  padToFour(bytes);
  return Done{};
}

}  // namespace

Result<std::vector<std::byte>> seg2Bytes(const ShotRecord& record, const Seg2WriteOptions& options) {
  assert(isFormat(options.formatCode));
  assert(options.terminators.string.size() <= 2 && options.terminators.line.size() <= 2);
  auto bytes = fileBlock(record, options);
  if (!bytes) {
    return bytes;
  }
  for (std::size_t i = 0; i < record.traces.size(); ++i) {
    if (auto done = appendTrace(*bytes, record, i, options); !done) {
      return done.failure();
    }
  }
  return bytes;
}

Outcome writeSeg2(const std::string& path, const ShotRecord& record, const Seg2WriteOptions& options) {
  const auto bytes = seg2Bytes(record, options);
  if (!bytes) {
    return bytes.failure();
  }
  std::ofstream file(path, std::ios::binary | std::ios::trunc);
  file.write(reinterpret_cast<const char*>(bytes->data()), static_cast<std::streamsize>(bytes->size()));
  file.close();
  if (!file) {
    return Failure{path + " could not be written whole; check that the folder exists and its disk has room."};
  }
  return Done{};
}

}  // namespace strikeplate
