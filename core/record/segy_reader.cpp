#include "core/record/segy_reader.h"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <utility>

#include "core/record/byte_source.h"
#include "core/record/oddity_list.h"
#include "core/record/sample_check.h"
#include "core/record/segy_head.h"
#include "core/record/segy_samples.h"
#include "core/record/segy_trace.h"

namespace strikeplate {
namespace {

using namespace segy;

class SegyReader {
 public:
  SegyReader(const ByteSource& source, std::string name) : source_(source), name_(std::move(name)) {}

  Result<std::vector<ShotRecord>> read() {
    auto head = readHead(source_, name_, odd_);
    if (!head) {
      return head.failure();
    }
    head_ = std::move(*head);
    if (!layOut()) {
      return Failure{name_ + " holds no trace that can be read; copy it again from the recorder."};
    }
    if (!settleIntervals()) {
      return Failure{name_ + " says no sample interval in any header; without it there are no times."};
    }
    Split split = splitIntoShots(headers_);
    shotStarts_ = std::move(split.starts);
    findPositions();
    if (shotStarts_.size() > 1) {
      odd_.add("The file holds " + std::to_string(shotStarts_.size()) + " shots, told apart by their " + split.by +
               ".");
    }
    return makeRecords();
  }

 private:
  struct Place {
    std::uint64_t dataAt = 0;
    std::uint64_t samples = 0;
  };

  bool layOut();
  [[nodiscard]] bool fits(std::uint64_t samples) const;
  [[nodiscard]] bool walkFits() const;
  bool readTraceHeaderAt(std::uint64_t at, TraceHeader& header) const;
  void addTraces(std::uint64_t fixedSamples);
  bool settleIntervals();
  void findPositions();
  std::vector<ShotRecord> makeRecords();
  Trace makeTrace(std::size_t index);

  const ByteSource& source_;
  std::string name_;
  OddityList odd_;
  Head head_;
  std::vector<TraceHeader> headers_;
  std::vector<Place> places_;
  std::vector<std::size_t> shotStarts_;  // first trace of each shot, from 0
  bool placed_ = false;                  // headers give positions
  bool spread_ = false;                  // headers give positions of the geophones too
  bool sideways_ = false;                // headers give y
  bool elevated_ = false;                // headers give elevations
  std::vector<std::byte> scratch_;
};

bool SegyReader::readTraceHeaderAt(std::uint64_t at, TraceHeader& header) const {
  std::vector<std::byte> bytes(head_.headerBytes);
  if (source_.read(at, bytes) < bytes.size()) {
    return false;
  }
  header = readTraceHeader(bytes, head_);
  return true;
}

// Whether traces of equal length fill the file to its end.
bool SegyReader::fits(std::uint64_t samples) const {
  const std::uint64_t each = head_.headerBytes + samples * static_cast<std::uint64_t>(sampleBytes(head_.code));
  return samples > 0 && (source_.size() - head_.firstTraceAt) % each == 0;
}

// Whether traces, each as long as its own header says, fill the file to its end.
bool SegyReader::walkFits() const {
  std::uint64_t at = head_.firstTraceAt;
  TraceHeader header;
  while (at < source_.size() && readTraceHeaderAt(at, header)) {
    const std::uint64_t samples = header.samples > 0 ? header.samples : head_.samples;
    at += head_.headerBytes + samples * static_cast<std::uint64_t>(sampleBytes(head_.code));
  }
  return at == source_.size();
}

// Finds the traces: all as long as the binary header says, or as the first trace says, or each as its own header
// says, whichever fills the file. A file that none of them fills is cut off.
bool SegyReader::layOut() {
  TraceHeader first;
  if (!readTraceHeaderAt(head_.firstTraceAt, first)) {
    return false;
  }
  const bool agree = first.samples == head_.samples || first.samples == 0;
  if (head_.samples > 0 && (agree || fits(head_.samples) || head_.fixedLength)) {
    if (fits(head_.samples) || head_.fixedLength || !walkFits()) {
      addTraces(head_.samples);
    } else {
      addTraces(0);
    }
  } else if (fits(first.samples)) {
    odd_.add("The binary header says " + std::to_string(head_.samples) + " samples in a trace, the traces have " +
             std::to_string(first.samples) + ".");
    addTraces(first.samples);
  } else {
    addTraces(0);
  }
  return !headers_.empty();
}

void SegyReader::addTraces(std::uint64_t fixedSamples) {
  const auto width = static_cast<std::uint64_t>(sampleBytes(head_.code));
  std::uint64_t at = head_.firstTraceAt;
  TraceHeader header;
  while (at < source_.size() && readTraceHeaderAt(at, header)) {
    const int number = static_cast<int>(headers_.size()) + 1;
    const std::uint64_t own = header.samples > 0 ? header.samples : head_.samples;
    const std::uint64_t samples = fixedSamples > 0 ? fixedSamples : own;
    at += head_.headerBytes;
    const std::uint64_t there = std::min(samples, (source_.size() - at) / width);
    if (there < samples) {
      odd_.addForTrace(number,
                       "cut off, only its first " + std::to_string(there) + " of " + std::to_string(samples) +
                           " samples are in the file, and what came behind it is missing",
                       OddityList::Kind::Lost);
    } else if (fixedSamples > 0 && header.samples > 0 && header.samples != fixedSamples) {
      odd_.addForTrace(number, "its header says " + std::to_string(header.samples) + " samples, there are " +
                                   std::to_string(fixedSamples));
    }
    if (there > 0) {
      headers_.push_back(header);
      places_.push_back({at, there});
    }
    at += samples * width;
  }
  if (at < source_.size()) {
    odd_.add("The file ends within the header of trace " + std::to_string(headers_.size() + 1) +
                 "; that trace and any behind it are missing.",
             OddityList::Kind::Lost);
  }
}

bool SegyReader::settleIntervals() {
  double given = head_.interval;
  for (const TraceHeader& header : headers_) {
    given = given > 0.0 ? given : header.interval;
  }
  if (!(given > 0.0)) {
    return false;
  }
  if (!(head_.interval > 0.0)) {
    odd_.add("The binary header gives no sample interval; that of the trace headers is used.");
  }
  for (std::size_t i = 0; i < headers_.size(); ++i) {
    TraceHeader& header = headers_[i];
    if (!(header.interval > 0.0)) {
      header.interval = given;
      continue;
    }
    // Revision 2 gives the interval to a fraction of a microsecond, of which the trace header's word is the whole
    // part.
    const bool sameButFraction = std::abs(header.interval - given) < 1e-6;
    if (sameButFraction) {
      header.interval = head_.revision >= 2 ? given : header.interval;
    } else if (head_.interval > 0.0) {
      odd_.addForTrace(static_cast<int>(i) + 1,
                       "its sample interval is not that of the binary header, the trace's own is used");
    }
  }
  return true;
}

void SegyReader::findPositions() {
  bool offsets = false;
  bool angles = false;
  bool receivers = false;
  for (const TraceHeader& h : headers_) {
    angles = angles || !h.lengths;
    placed_ = placed_ || h.source.x != 0.0 || h.receiver.x != 0.0 || *h.source.y != 0.0 || *h.receiver.y != 0.0;
    receivers = receivers || h.receiver.x != 0.0 || *h.receiver.y != 0.0;
    sideways_ = sideways_ || *h.source.y != 0.0 || *h.receiver.y != 0.0;
    elevated_ = elevated_ || *h.source.z != 0.0 || *h.receiver.z != 0.0;
    offsets = offsets || h.offset != headers_[0].offset;
  }
  if (angles) {
    placed_ = false;
    odd_.add("Positions are given as angles on the globe and are not used; give a geometry table.");
    return;
  }
  // One geophone at 0 is a position; a whole spread there is not.
  spread_ = receivers || (placed_ && shotStarts_.size() == headers_.size());
  if (placed_ && !spread_) {
    odd_.add("The headers give no positions of the geophones.");
  }
  if (placed_ || !offsets) {
    return;
  }
  placed_ = true;
  spread_ = true;
  odd_.add("The headers give no positions; geophones are placed by their offset from a shot at 0 m.");
  for (TraceHeader& h : headers_) {
    h.receiver.x = h.offset;
  }
}

HeaderPosition trimmedPosition(HeaderPosition position, bool sideways, bool elevated) {
  if (!elevated) {
    position.z.reset();
  }
  if (!sideways) {
    position.y.reset();
  }
  return position;
}

Trace SegyReader::makeTrace(std::size_t index) {
  const TraceHeader& header = headers_[index];
  const int number = static_cast<int>(index) + 1;
  Trace trace;
  trace.samples =
      readSamples(source_, places_[index].dataAt, places_[index].samples, head_.code, head_.order, scratch_);
  if (const std::size_t bad = zeroNonNumbers(trace.samples); bad > 0) {
    odd_.addForTrace(number, std::to_string(bad) + " of its samples are not numbers and are taken as 0");
  }
  trace.sampleInterval = header.interval;
  trace.delay = header.delay;
  if (spread_) {
    trace.receiver = trimmedPosition(header.receiver, sideways_, elevated_);
  }
  trace.stack = header.stack;
  trace.state = stateOf(header.id, number, odd_);
  trace.header = shownWords(header);
  return trace;
}

std::vector<ShotRecord> SegyReader::makeRecords() {
  if (!placed_) {
    odd_.add("The headers give no positions.");
  }
  const bool textForEach = shotStarts_.size() * head_.text.size() < source_.size() / 4;
  std::vector<ShotRecord> records(shotStarts_.size());
  for (std::size_t s = 0; s < records.size(); ++s) {
    const std::size_t begin = shotStarts_[s];
    const std::size_t end = s + 1 < records.size() ? shotStarts_[s + 1] : headers_.size();
    ShotRecord& record = records[s];
    record.file = name_;
    record.firstTraceInFile = static_cast<int>(begin) + 1;
    record.format = "SEG-Y rev " + std::to_string(head_.revision);
    if (placed_) {
      record.source = trimmedPosition(headers_[begin].source, sideways_, elevated_);
      record.sourceDepth = headers_[begin].sourceDepth;
    }
    if (!head_.text.empty() && (s == 0 || textForEach)) {
      record.header.push_back({"Text header", head_.text});
    }
    record.traces.reserve(end - begin);
    for (std::size_t i = begin; i < end; ++i) {
      record.traces.push_back(makeTrace(i));
    }
  }
  records[0].oddities = odd_.sentences();
  records[0].losses = odd_.losses();
  return records;
}

}  // namespace

Result<std::vector<ShotRecord>> readSegy(const std::string& path) {
  const auto source = openBytes(path);
  if (!source) {
    return source.failure();
  }
  return SegyReader(**source, path).read();
}

Result<std::vector<ShotRecord>> readSegyBytes(std::span<const std::byte> bytes, const std::string& name) {
  if (bytes.empty()) {
    return Failure{name + " is empty; copy it again from the recorder."};
  }
  return SegyReader(*bytesInMemory(bytes), name).read();
}

}  // namespace strikeplate
