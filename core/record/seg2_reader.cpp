#include "core/record/seg2_reader.h"

#include <algorithm>
#include <cstdint>
#include <limits>
#include <unordered_set>
#include <utility>
#include <vector>

#include "core/record/byte_source.h"
#include "core/record/oddity_list.h"
#include "core/record/sample_check.h"
#include "core/record/seg2_head.h"
#include "core/record/seg2_keywords.h"
#include "core/record/seg2_layout.h"
#include "core/record/seg2_samples.h"
#include "core/record/seg2_strings.h"

namespace strikeplate {
namespace {

using namespace seg2;

// Memory that keywords take.
std::uint64_t bytesOf(const std::vector<HeaderEntry>& words) {
  std::uint64_t bytes = 0;
  for (const HeaderEntry& word : words) {
    bytes += sizeof(HeaderEntry) + word.key.size() + word.value.size();
  }
  return bytes;
}

// What a file may make us keep: two and a half times its size and a little. Honest files stay far below; one whose
// counts or pointers lie is stopped here.
class Budget {
 public:
  explicit Budget(std::uint64_t fileSize) : left_(5 * fileSize / 2 + 8192) {}
  bool take(std::uint64_t bytes) {
    if (bytes > left_) {
      return false;
    }
    left_ -= bytes;
    return true;
  }

 private:
  std::uint64_t left_;
};

struct TraceHead {
  std::uint64_t dataAt = 0;
  std::uint64_t samples = 0;
  int code = 0;
  std::vector<HeaderEntry> words;
};

class Seg2Reader {
 public:
  Seg2Reader(const ByteSource& source, std::string name) : source_(source), size_(source.size()), budget_(size_) {
    record_.file = std::move(name);
    record_.format = "SEG-2";
  }

  Result<ShotRecord> read() {
    auto head = readFileHead(source_, record_.file, odd_);
    if (!head) {
      return head.failure();
    }
    head_ = std::move(*head);
    readFileWords();
    const double metres = metresPerUnit(record_.header, odd_);
    record_.traces.reserve(std::min<std::uint64_t>(head_.pointers.size(), size_ / (8 * sizeof(Trace)) + 1));
    for (std::size_t i = 0; i < head_.pointers.size() && !stopped_; ++i) {
      readTrace(i, metres);
    }
    if (record_.traces.empty()) {
      return Failure{record_.file + " holds no trace that can be read (" + firstReason_ +
                     "); copy it again from the recorder."};
    }
    if (!settleIntervals()) {
      return Failure{record_.file + " does not say its SAMPLE_INTERVAL in any trace; without it there are no times."};
    }
    compareTraces();
    record_.oddities = odd_.sentences();
    record_.losses = odd_.losses();
    return std::move(record_);
  }

 private:
  void readFileWords();
  void readTrace(std::size_t index, double metres);
  bool readTraceHead(std::size_t index, TraceHead& head);
  std::uint64_t trustedSamples(std::size_t index, std::uint64_t dataAt, std::uint32_t dataSize, std::uint32_t samples,
                               int code);
  bool readSamples(int number, const TraceHead& head, Trace& trace);
  void unreadable(int number, const std::string& why);
  void fillGap(std::size_t until);
  bool settleIntervals();
  void compareTraces();

  const ByteSource& source_;
  std::uint64_t size_;
  Budget budget_;
  FileHead head_;
  ShotRecord record_;
  OddityList odd_;
  std::vector<bool> intervalGiven_;
  std::unordered_set<std::uint32_t> readPointers_;  // of the traces read so far
  std::vector<std::byte> scratch_;
  std::string firstReason_ = "it is cut off before the first one";
  bool stopped_ = false;
};

void Seg2Reader::readFileWords() {
  std::uint64_t end = size_;
  for (const std::uint32_t pointer : head_.pointers) {
    if (pointer >= head_.stringsAt) {
      end = std::min<std::uint64_t>(end, pointer);
    }
  }
  constexpr std::uint64_t kMostWords = 65536;
  const std::uint64_t count = end > head_.stringsAt ? std::min(end - head_.stringsAt, kMostWords) : 0;
  scratch_.resize(count);
  scratch_.resize(source_.read(head_.stringsAt, scratch_));
  Strings strings = parseStrings(scratch_, head_.order, head_.terminators);
  budget_.take(bytesOf(strings.entries));
  if (strings.overran) {
    odd_.add("A string at the start of the file is longer or shorter than its count says.");
  }
  record_.header = std::move(strings.entries);
}

void Seg2Reader::unreadable(int number, const std::string& why) {
  odd_.addForTrace(number, why, OddityList::Kind::Lost);
  if (record_.traces.empty()) {
    firstReason_ = why;
  }
}

bool Seg2Reader::readTraceHead(std::size_t index, TraceHead& out) {
  const int number = static_cast<int>(index) + 1;
  const std::uint64_t at = head_.pointers[index];
  std::byte head[kBlockHead];
  if (at + kBlockHead >= size_ || source_.read(at, head) < kBlockHead) {
    unreadable(number, "missing, the file ends before it");
    return false;
  }
  const auto mark = load<std::uint16_t>(head, head_.order);
  const auto blockSize = load<std::uint16_t>(head + 2, head_.order);
  const int code = std::to_integer<int>(head[12]);
  if (at < kBlockHead || blockSize < kBlockHead || (mark != kTraceMark && !isFormat(code))) {
    unreadable(number, "missing, its pointer does not lead to a trace");
    return false;
  }
  if (!isFormat(code)) {
    unreadable(number,
               "not read, its sample format code " + std::to_string(code) + " is not one of SEG-2's (1 to 5)");
    return false;
  }
  if (at + blockSize >= size_) {
    unreadable(number, "missing, the file ends before its samples");
    return false;
  }
  if (mark != kTraceMark) {
    odd_.addForTrace(number, "the mark at its start is wrong, it is read none the less");
  }
  out.code = code;
  out.dataAt = at + blockSize;
  out.samples = trustedSamples(index, out.dataAt, load<std::uint32_t>(head + 4, head_.order),
                               load<std::uint32_t>(head + 8, head_.order), code);
  scratch_.resize(blockSize - kBlockHead);
  scratch_.resize(source_.read(at + kBlockHead, scratch_));
  Strings strings = parseStrings(scratch_, head_.order, head_.terminators);
  if (strings.overran) {
    odd_.addForTrace(number, "a string in its header is longer or shorter than its count says");
  }
  out.words = std::move(strings.entries);
  return true;
}

// The count of samples and the size of the data block should tell the same; where not, the count is believed as long
// as it does not run into the next trace.
std::uint64_t Seg2Reader::trustedSamples(std::size_t index, std::uint64_t dataAt, std::uint32_t dataSize,
                                         std::uint32_t samples, int code) {
  const std::uint64_t need = dataBytes(code, samples);
  constexpr std::uint64_t kPadding = 16;
  if (need == dataSize || (samples > 0 && need < dataSize && dataSize - need < kPadding)) {
    return samples;
  }
  std::uint64_t room = std::numeric_limits<std::uint64_t>::max();
  for (const std::uint32_t pointer : head_.pointers) {
    if (pointer >= dataAt) {
      room = std::min<std::uint64_t>(room, pointer - dataAt);
    }
  }
  const bool countFits = samples > 0 && need <= room;
  odd_.addForTrace(static_cast<int>(index) + 1,
                   countFits ? "its count of samples and the size of its data differ, the count is used"
                             : "its count of samples and the size of its data differ, the size is used");
  return countFits ? samples : samplesIn(code, dataSize);
}

bool Seg2Reader::readSamples(int number, const TraceHead& head, Trace& trace) {
  const std::uint64_t there = samplesIn(head.code, size_ - head.dataAt);
  const std::uint64_t count = std::min(head.samples, there);
  if (count == 0) {
    unreadable(number, "missing, the file holds no samples of it");
    return false;
  }
  const std::uint64_t bytes = dataBytes(head.code, count);
  if (!budget_.take(count * sizeof(float) + sizeof(Trace) + bytesOf(head.words))) {
    unreadable(number, "not read on from here, the traces claim more data than the file can hold");
    stopped_ = true;
    return false;
  }
  trace.samples.resize(count);
  std::size_t got = 0;
  if (head.code == kFloat32 && head_.order == kNativeOrder) {
    got = source_.read(head.dataAt, std::as_writable_bytes(std::span(trace.samples)));
  } else {
    scratch_.resize(bytes);
    got = source_.read(head.dataAt, scratch_);
    trace.samples.resize(std::min<std::uint64_t>(count, samplesIn(head.code, got)));
    decode(head.code, head_.order, scratch_, trace.samples);
  }
  trace.samples.resize(std::min<std::uint64_t>(count, samplesIn(head.code, got)));
  if (trace.samples.size() < head.samples) {
    odd_.addForTrace(number,
                     "cut off, only its first " + std::to_string(trace.samples.size()) + " of " +
                         std::to_string(head.samples) + " samples are in the file",
                     OddityList::Kind::Lost);
  }
  if (const std::size_t bad = zeroNonNumbers(trace.samples); bad > 0) {
    odd_.addForTrace(number, std::to_string(bad) + " of its samples are not numbers and are taken as 0");
  }
  return !trace.samples.empty();
}

// Dead traces for those that could not be read before a readable one, so that numbers stay true.
void Seg2Reader::fillGap(std::size_t until) {
  while (record_.traces.size() < until) {
    Trace dead;
    dead.state = TraceState::Dead;
    dead.samples.assign(1, 0.0F);
    record_.traces.push_back(std::move(dead));
    intervalGiven_.push_back(false);
  }
}

void Seg2Reader::readTrace(std::size_t index, double metres) {
  const int number = static_cast<int>(index) + 1;
  TraceHead head;
  Trace trace;
  if (readPointers_.contains(head_.pointers[index])) {
    unreadable(number, "missing, its pointer leads to an earlier trace");
    return;
  }
  if (!readTraceHead(index, head) || !readSamples(number, head, trace)) {
    return;
  }
  readPointers_.insert(head_.pointers[index]);
  if (!budget_.take((index - record_.traces.size()) * sizeof(Trace))) {
    stopped_ = true;
    return;
  }
  fillGap(index);
  const TraceWords words = readTraceWords(head.words, metres, number, odd_);
  trace.sampleInterval = words.sampleInterval.value_or(0.0);
  trace.delay = words.delay;
  trace.receiver = words.receiver;
  trace.descaling = words.descaling;
  trace.stack = words.stack;
  trace.state = words.state;
  trace.header = std::move(head.words);
  if (words.source && !record_.source) {
    record_.source = words.source;
  } else if (words.source && (words.source->x != record_.source->x || words.source->y != record_.source->y)) {
    odd_.addForTrace(number, "its SOURCE_LOCATION is not that of the first trace, which is used");
  }
  if (!words.receiver && trace.state != TraceState::Dead) {
    odd_.addForTrace(number, "without a RECEIVER_LOCATION");
  }
  record_.traces.push_back(std::move(trace));
  intervalGiven_.push_back(words.sampleInterval.has_value());
}

// Traces without their own interval take the first one that was given.
bool Seg2Reader::settleIntervals() {
  const auto first = std::find(intervalGiven_.begin(), intervalGiven_.end(), true);
  if (first == intervalGiven_.end()) {
    return false;
  }
  const Trace& model = record_.traces[static_cast<std::size_t>(first - intervalGiven_.begin())];
  for (std::size_t i = 0; i < record_.traces.size(); ++i) {
    Trace& trace = record_.traces[i];
    if (!intervalGiven_[i]) {
      trace.sampleInterval = model.sampleInterval;
      if (trace.header.empty()) {
        trace.delay = model.delay;
      } else {
        odd_.addForTrace(static_cast<int>(i) + 1, "without a SAMPLE_INTERVAL, that of another trace is used");
      }
    }
  }
  return true;
}

void Seg2Reader::compareTraces() {
  const Trace& first = record_.traces[0];
  for (std::size_t i = 1; i < record_.traces.size(); ++i) {
    const Trace& trace = record_.traces[i];
    if (trace.sampleInterval != first.sampleInterval || trace.delay != first.delay) {
      odd_.addForTrace(static_cast<int>(i) + 1, "its times (SAMPLE_INTERVAL, DELAY) are not those of trace 1");
    }
  }
  if (!record_.source) {
    odd_.add("No trace gives a SOURCE_LOCATION.");
  }
}

}  // namespace

Result<ShotRecord> readSeg2(const std::string& path) {
  const auto source = openBytes(path);
  if (!source) {
    return source.failure();
  }
  return Seg2Reader(**source, path).read();
}

Result<ShotRecord> readSeg2Bytes(std::span<const std::byte> bytes, const std::string& name) {
  if (bytes.empty()) {
    return Failure{name + " is empty; copy it again from the recorder."};
  }
  return Seg2Reader(*bytesInMemory(bytes), name).read();
}

}  // namespace strikeplate
