#include <array>
#include <cstddef>
#include <utility>

#include "core/survey/survey_file_json.h"
#include "core/survey/survey_file_text.h"

namespace strikeplate {
namespace {

using nlohmann::json;

json toJson(const std::optional<double>& value) {
  return value ? json(*value) : json();
}

json toJson(const std::optional<HeaderPosition>& position) {
  return position ? json::array({position->x, toJson(position->y), toJson(position->z)}) : json();
}

json toJson(const std::vector<HeaderEntry>& entries) {
  json array = json::array();
  for (const HeaderEntry& entry : entries) {
    array.push_back(json::array({textToJson(entry.key), textToJson(entry.value)}));
  }
  return array;
}

json toJson(const Trace& trace) {
  return {{"samples", trace.samples.size()},        {"interval", trace.sampleInterval}, {"delay", trace.delay},
          {"receiver", toJson(trace.receiver)},     {"descaling", trace.descaling},     {"stack", trace.stack},
          {"state", static_cast<int>(trace.state)}, {"header", toJson(trace.header)}};
}

std::optional<double> numberFrom(const json& from) {
  return from.is_null() ? std::nullopt : std::optional<double>(from.get<double>());
}

std::optional<HeaderPosition> positionFrom(const json& from) {
  if (from.is_null()) {
    return std::nullopt;
  }
  return HeaderPosition{from.at(0).get<double>(), numberFrom(from.at(1)), numberFrom(from.at(2))};
}

std::vector<HeaderEntry> entriesFrom(const json& from) {
  std::vector<HeaderEntry> entries;
  for (const json& one : from) {
    entries.push_back({textFromJson(one.at(0)), textFromJson(one.at(1))});
  }
  return entries;
}

Trace traceFrom(const json& from, std::size_t& samplesLeft) {
  const auto samples = from.at("samples").get<std::size_t>();
  const int state = from.at("state").get<int>();
  Trace trace;
  trace.sampleInterval = from.at("interval").get<double>();
  if (samples > samplesLeft || state < 0 || state > 3 || !(trace.sampleInterval > 0.0)) {
    throw json::other_error::create(501, "a trace's head is not sound", nullptr);
  }
  samplesLeft -= samples;
  trace.samples.resize(samples);
  trace.delay = from.at("delay").get<double>();
  trace.receiver = positionFrom(member(from, "receiver"));
  trace.descaling = from.at("descaling").get<double>();
  trace.stack = from.at("stack").get<int>();
  trace.state = static_cast<TraceState>(state);
  trace.header = entriesFrom(from.at("header"));
  return trace;
}

ShotRecord recordFrom(const json& from, std::size_t mostSamples) {
  ShotRecord record;
  record.file = textFromJson(from.at("file"));
  record.firstTraceInFile = from.at("firstTrace").get<int>();
  record.format = textFromJson(from.at("format"));
  record.checksum = textFromJson(member(from, "checksum"));
  record.source = positionFrom(member(from, "source"));
  record.sourceDepth = numberFrom(member(from, "sourceDepth"));
  record.header = entriesFrom(from.at("header"));
  for (const json& oddity : from.at("oddities")) {
    record.oddities.push_back(textFromJson(oddity));
  }
  for (const json& trace : from.at("traces")) {
    record.traces.push_back(traceFrom(trace, mostSamples));
  }
  return record;
}

}  // namespace

std::string recordHeadToJson(const ShotRecord& record) {
  json traces = json::array();
  for (const Trace& trace : record.traces) {
    traces.push_back(toJson(trace));
  }
  json oddities = json::array();
  for (const std::string& oddity : record.oddities) {
    oddities.push_back(textToJson(oddity));
  }
  json object = {{"file", textToJson(record.file)},
                 {"firstTrace", record.firstTraceInFile},
                 {"format", textToJson(record.format)},
                 {"source", toJson(record.source)},
                 {"sourceDepth", toJson(record.sourceDepth)},
                 {"header", toJson(record.header)},
                 {"oddities", oddities},
                 {"traces", traces}};
  if (!record.checksum.empty()) {
    object["checksum"] = record.checksum;
  }
  return object.dump();
}

Result<ShotRecord> recordHeadFromJson(const std::string& text, std::size_t mostSamples) {
  try {
    return recordFrom(json::parse(text), mostSamples);
  } catch (const json::exception& error) {
    return Failure{error.what()};
  }
}

}  // namespace strikeplate
