#include "core/survey/survey_file_samples.h"

#include <bit>
#include <cstddef>
#include <cstring>

namespace strikeplate {

static_assert(std::endian::native == std::endian::little, "the survey file's samples are copied as they are");
static_assert(sizeof(float) == 4);

std::string samplesToBytes(const ShotRecord& record) {
  std::size_t count = 0;
  for (const Trace& trace : record.traces) {
    count += trace.samples.size();
  }
  std::string bytes;
  bytes.reserve(count * sizeof(float));
  for (const Trace& trace : record.traces) {
    bytes.append(reinterpret_cast<const char*>(trace.samples.data()), trace.samples.size() * sizeof(float));
  }
  return bytes;
}

bool samplesFromBytes(std::string_view bytes, ShotRecord& record) {
  for (Trace& trace : record.traces) {
    const std::size_t size = trace.samples.size() * sizeof(float);
    if (bytes.size() < size) {
      return false;
    }
    if (size > 0) {
      std::memcpy(trace.samples.data(), bytes.data(), size);
    }
    bytes.remove_prefix(size);
  }
  return bytes.empty();
}

}  // namespace strikeplate
