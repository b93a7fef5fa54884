#include "core/survey/load.h"

#include <memory>
#include <optional>
#include <utility>

#include "core/line/geometry_table.h"
#include "core/record/read_records.h"
#include "core/survey/assemble.h"
#include "core/survey/merge.h"
#include "core/survey/survey_file.h"

namespace strikeplate {
namespace {

bool isSurveyFile(const std::string& path) {
  constexpr std::string_view kEnding = ".splate";
  return path.size() > kEnding.size() && path.compare(path.size() - kEnding.size(), kEnding.size(), kEnding) == 0;
}

/// What the first lines of the records say of the job, where the survey does not say it yet.
void takeHeaderInfo(const ShotRecord& record, SurveyInfo& info) {
  const std::pair<const char*, std::string SurveyInfo::*> kKeys[] = {
      {"CLIENT", &SurveyInfo::client}, {"COMPANY", &SurveyInfo::crew},          {"OBSERVER", &SurveyInfo::observer},
      {"JOB_ID", &SurveyInfo::title},  {"ACQUISITION_DATE", &SurveyInfo::date}, {"INSTRUMENT", &SurveyInfo::recorder},
  };
  for (const HeaderEntry& entry : record.header) {
    for (const auto& [key, member] : kKeys) {
      if (entry.key == key && (info.*member).empty()) {
        info.*member = entry.value;
      }
    }
  }
  const std::pair<const char*, std::string SurveyInfo::*> kTraceKeys[] = {
      {"LINE_ID", &SurveyInfo::line}, {"SOURCE", &SurveyInfo::source}, {"RECEIVER_SPECS", &SurveyInfo::geophoneType}};
  for (const HeaderEntry& entry : record.traces.front().header) {
    for (const auto& [key, member] : kTraceKeys) {
      if (entry.key == key && (info.*member).empty()) {
        info.*member = entry.value;
      }
    }
  }
}

/// The files in the making of a line.
class Loading {
 public:
  explicit Loading(LoadedLine& line) : line_(line) {}

  void readTable(const std::string& path) {
    auto table = readGeometryTable(path);
    if (table) {
      table_ = std::move(*table);
    } else {
      line_.problems.push_back(table.message());
    }
  }

  void read(const std::string& path) {
    if (isSurveyFile(path)) {
      auto file = SurveyFile::open(path, Access::Read);
      if (file) {
        surveys_.push_back(file->survey());
        ++line_.filesRead;
      } else {
        line_.problems.push_back(file.message());
      }
      return;
    }
    auto records = readRecords(path);
    if (!records) {
      line_.problems.push_back(records.message());
      return;
    }
    ++line_.filesRead;
    for (ShotRecord& record : *records) {
      take(std::move(record));
    }
  }

  void finish() {
    if (table_) {
      std::vector<const ShotRecord*> all;
      for (const RecordPtr& record : records_) {
        all.push_back(record.get());
      }
      const auto unused = unusedRows(*table_, all);
      line_.problems.insert(line_.problems.end(), unused.begin(), unused.end());
    }
    Survey fresh = withBlowsAligned(assemble(std::move(records_)));
    for (const RecordPtr& record : fresh.records) {
      takeHeaderInfo(*record, fresh.info);
    }
    fresh.remarks.insert(fresh.remarks.end(), remarks_.begin(), remarks_.end());
    Survey survey = surveys_.empty() ? Survey{} : surveys_.front();
    for (std::size_t i = 1; i < surveys_.size(); ++i) {
      survey = merged(std::move(survey), surveys_[i]);
    }
    const SurveyInfo info = surveys_.empty() ? fresh.info : survey.info;
    line_.survey = surveys_.empty() ? std::move(fresh) : merged(std::move(survey), fresh);
    line_.survey.info = info;
  }

 private:
  void take(ShotRecord record) {
    if (table_) {
      GeometryApplied applied = applyGeometry(*table_, record);
      remarks_.insert(remarks_.end(), applied.remarks.begin(), applied.remarks.end());
      record = std::move(applied.record);
    }
    records_.push_back(std::make_shared<const ShotRecord>(std::move(record)));
  }

  LoadedLine& line_;
  std::optional<GeometryTable> table_;
  std::vector<RecordPtr> records_;
  std::vector<Survey> surveys_;
  std::vector<std::string> remarks_;
};

}  // namespace

LoadedLine loadLine(const std::vector<std::string>& paths, const std::string& geometryTable,
                    const Progress& progress) {
  LoadedLine line;
  Loading loading(line);
  if (!geometryTable.empty()) {
    loading.readTable(geometryTable);
  }
  for (std::size_t i = 0; i < paths.size(); ++i) {
    if (!goOn(progress, 0.9 * static_cast<double>(i) / static_cast<double>(paths.size()))) {
      line.finished = false;
      return line;
    }
    loading.read(paths[i]);
  }
  loading.finish();
  return line;
}

}  // namespace strikeplate
