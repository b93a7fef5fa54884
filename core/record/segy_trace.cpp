#include "core/record/segy_trace.h"

#include <cmath>
#include <cstring>

#include <segyio/segy.h>

#include "core/base/numbers.h"

namespace strikeplate::segy {
namespace {

constexpr double kFoot = 0.3048;

// Scalars multiply when positive and divide when negative; 0 stands for 1.
double scaleOf(std::int16_t scalar) {
  return scalar == 0 ? 1.0 : scalar > 0 ? static_cast<double>(scalar) : -1.0 / scalar;
}

class Fields {
 public:
  Fields(std::span<const std::byte> bytes, ByteOrder order) : bytes_(bytes), order_(order) {}

  template <class Number>
  [[nodiscard]] Number at(int position) const {
    return load<Number>(bytes_.data() + position - 1, order_);
  }
  [[nodiscard]] double word(int position) const { return at<std::int32_t>(position); }

 private:
  std::span<const std::byte> bytes_;
  ByteOrder order_;
};

// The second trace header of revision 2 gives positions and the interval as 8-byte floats.
void readExtension(const Fields& fields, double metres, TraceHeader& out) {
  const auto take = [&](int position, double scale, double& into) {
    const auto value = fields.at<double>(position);
    if (std::isfinite(value) && value != 0.0) {
      into = value * scale;
    }
  };
  take(97, metres, out.source.x);
  take(105, metres, *out.source.y);
  take(113, metres, out.receiver.x);
  take(121, metres, *out.receiver.y);
  take(129, metres, out.offset);
  if (const auto samples = fields.at<std::uint32_t>(137); samples > 0) {
    out.samples = samples;
  }
  double micros = 0.0;
  take(145, 1.0, micros);
  if (micros > 0.0) {
    out.interval = micros * 1e-6;
  }
}

bool hasExtension(std::span<const std::byte> bytes) {
  constexpr std::size_t kNameAt = SEGY_TRACE_HEADER_SIZE + 232;
  return bytes.size() >= 2 * SEGY_TRACE_HEADER_SIZE && std::memcmp(bytes.data() + kNameAt, "SEG00001", 8) == 0;
}

template <class Key>
std::vector<std::size_t> changes(const std::vector<TraceHeader>& headers, Key key) {
  std::vector<std::size_t> starts{0};
  for (std::size_t i = 1; i < headers.size(); ++i) {
    if (key(headers[i]) != key(headers[i - 1])) {
      starts.push_back(i);
    }
  }
  return starts;
}

}  // namespace

TraceHeader readTraceHeader(std::span<const std::byte> bytes, const Head& head) {
  const Fields fields(bytes, head.order);
  const double metres = head.feet ? kFoot : 1.0;
  const double along = metres * scaleOf(fields.at<std::int16_t>(SEGY_TR_SOURCE_GROUP_SCALAR));
  const double up = metres * scaleOf(fields.at<std::int16_t>(SEGY_TR_ELEV_SCALAR));
  const double time = 1e-3 * scaleOf(fields.at<std::int16_t>(SEGY_TR_SCALAR_TRACE_HEADER));
  TraceHeader out;
  out.fieldRecord = fields.at<std::int32_t>(SEGY_TR_FIELD_RECORD);
  out.channel = fields.at<std::int32_t>(SEGY_TR_NUMBER_ORIG_FIELD);
  out.sourcePoint = fields.at<std::int32_t>(SEGY_TR_ENERGY_SOURCE_POINT);
  out.id = fields.at<std::int16_t>(SEGY_TR_TRACE_ID);
  out.stack = std::max<int>(1, fields.at<std::int16_t>(SEGY_TR_SUMMED_TRACES));
  out.offset = fields.word(SEGY_TR_OFFSET) * metres;
  out.source = {fields.word(SEGY_TR_SOURCE_X) * along, fields.word(SEGY_TR_SOURCE_Y) * along,
                fields.word(SEGY_TR_SOURCE_SURF_ELEV) * up};
  out.receiver = {fields.word(SEGY_TR_GROUP_X) * along, fields.word(SEGY_TR_GROUP_Y) * along,
                  fields.word(SEGY_TR_RECV_GROUP_ELEV) * up};
  out.sourceDepth = fields.word(SEGY_TR_SOURCE_DEPTH) * up;
  const int units = fields.at<std::int16_t>(SEGY_TR_COORD_UNITS);
  out.lengths = units < 2 || units > 4;
  out.delay = fields.at<std::int16_t>(SEGY_TR_DELAY_REC_TIME) * time;
  out.samples = fields.at<std::uint16_t>(SEGY_TR_SAMPLE_COUNT);
  const int micros = fields.at<std::int16_t>(SEGY_TR_SAMPLE_INTER);
  out.interval = micros > 0 ? micros * 1e-6 : 0.0;
  if (hasExtension(bytes)) {
    readExtension(Fields(bytes.subspan(SEGY_TRACE_HEADER_SIZE), head.order), metres, out);
  }
  return out;
}

TraceState stateOf(int id, int trace, OddityList& odd) {
  switch (id) {
    case 2:
      odd.addForTrace(trace, "dead according to its header");
      return TraceState::Dead;
    case 3:
    case 4:
    case 5:
    case 6:
    case 7:
    case 8:
      odd.addForTrace(trace, "no seismic data according to its trace identification code " + std::to_string(id) +
                                 ", so it is set dead");
      return TraceState::Dead;
    default:
      return TraceState::Live;
  }
}

std::vector<HeaderEntry> shownWords(const TraceHeader& header) {
  std::vector<HeaderEntry> words = {{"Field record", std::to_string(header.fieldRecord)},
                                    {"Channel", std::to_string(header.channel)},
                                    {"Source point", std::to_string(header.sourcePoint)},
                                    {"Trace id", std::to_string(header.id)}};
  if (header.sourceDepth != 0.0) {
    words.push_back({"Source depth, m", fullPrecision(header.sourceDepth)});
  }
  return words;
}

Split splitIntoShots(const std::vector<TraceHeader>& headers) {
  auto starts = changes(headers, [](const TraceHeader& h) { return h.fieldRecord; });
  if (starts.size() > 1) {
    return {std::move(starts), "field record"};
  }
  starts = changes(headers, [](const TraceHeader& h) { return h.sourcePoint; });
  if (starts.size() > 1) {
    return {std::move(starts), "source point"};
  }
  starts = changes(headers, [](const TraceHeader& h) { return std::pair(h.source.x, *h.source.y); });
  if (starts.size() > 1 && 2 * starts.size() <= headers.size()) {
    return {std::move(starts), "source position"};
  }
  return {{0}, ""};
}

}  // namespace strikeplate::segy
