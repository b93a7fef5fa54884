#include <algorithm>

#include "tests/core/survey/random_survey.h"

namespace strikeplate::testing {
namespace {

bool same(const std::optional<HeaderPosition>& a, const std::optional<HeaderPosition>& b) {
  return a.has_value() == b.has_value() && (!a || (a->x == b->x && a->y == b->y && a->z == b->z));
}

bool same(const std::vector<HeaderEntry>& a, const std::vector<HeaderEntry>& b) {
  return std::equal(a.begin(), a.end(), b.begin(), b.end(),
                    [](const HeaderEntry& p, const HeaderEntry& q) { return p.key == q.key && p.value == q.value; });
}

bool same(const Trace& a, const Trace& b) {
  return a.samples == b.samples && a.sampleInterval == b.sampleInterval && a.delay == b.delay &&
         same(a.receiver, b.receiver) && a.descaling == b.descaling && a.stack == b.stack && a.state == b.state &&
         same(a.header, b.header);
}

bool same(const RecordPtr& a, const RecordPtr& b) {
  return a->file == b->file && a->checksum == b->checksum && a->firstTraceInFile == b->firstTraceInFile &&
         a->format == b->format && same(a->source, b->source) && a->sourceDepth == b->sourceDepth &&
         same(a->header, b->header) && a->oddities == b->oddities &&
         std::equal(a->traces.begin(), a->traces.end(), b->traces.begin(), b->traces.end(),
                    [](const Trace& p, const Trace& q) { return same(p, q); });
}

}  // namespace

bool sameContent(const Survey& a, const Survey& b) {
  Survey withRecordsOfA = b;
  withRecordsOfA.records = a.records;
  return a == withRecordsOfA && std::equal(a.records.begin(), a.records.end(), b.records.begin(), b.records.end(),
                                           [](const RecordPtr& p, const RecordPtr& q) { return same(p, q); });
}

}  // namespace strikeplate::testing
