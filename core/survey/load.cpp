#include "core/survey/load.h"

#include <memory>
#include <optional>
#include <utility>

#include "core/base/checksum.h"
#include "core/base/numbers.h"
#include "core/line/geometry_table.h"
#include "core/record/read_files.h"
#include "core/survey/assemble.h"
#include "core/survey/merge.h"
#include "core/survey/survey_file.h"
#include "core/survey/times_table.h"

namespace strikeplate {
namespace {

bool endsWith(const std::string& path, std::string_view ending) {
  return path.size() > ending.size() && path.compare(path.size() - ending.size(), ending.size(), ending) == 0;
}

bool isSurveyFile(const std::string& path) {
  return endsWith(path, ".splate");
}

/// Whether a header word is more than what a recorder fills in for nothing, such as "0000" or "00/00/00".
bool saysSomething(const std::string& value) {
  return value.find_first_not_of("0 ./:_-") != std::string::npos;
}

/// What the first lines of the records say of the job, where the survey does not say it yet.
void takeHeaderInfo(const ShotRecord& record, SurveyInfo& info) {
  const std::pair<const char*, std::string SurveyInfo::*> kKeys[] = {
      {"CLIENT", &SurveyInfo::client}, {"COMPANY", &SurveyInfo::crew},          {"OBSERVER", &SurveyInfo::observer},
      {"JOB_ID", &SurveyInfo::title},  {"ACQUISITION_DATE", &SurveyInfo::date}, {"INSTRUMENT", &SurveyInfo::recorder},
  };
  for (const HeaderEntry& entry : record.header) {
    for (const auto& [key, member] : kKeys) {
      if (entry.key == key && (info.*member).empty() && saysSomething(entry.value)) {
        info.*member = entry.value;
      }
    }
  }
  const std::pair<const char*, std::string SurveyInfo::*> kTraceKeys[] = {
      {"LINE_ID", &SurveyInfo::line}, {"SOURCE", &SurveyInfo::source}, {"RECEIVER_SPECS", &SurveyInfo::geophoneType}};
  for (const HeaderEntry& entry : record.traces.front().header) {
    for (const auto& [key, member] : kTraceKeys) {
      if (entry.key == key && (info.*member).empty() && saysSomething(entry.value)) {
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
      tablesRead_.push_back({path, fileChecksum(path).value_or("")});
    } else {
      line_.problems.push_back(table.message());
    }
  }

  void readSurvey(const std::string& path) {
    auto file = SurveyFile::open(path, Access::Read);
    if (file) {
      surveys_.push_back(file->survey());
      ++line_.filesRead;
    } else {
      line_.problems.push_back(file.message());
    }
  }

  void readTimes(const std::string& path) {
    const auto table = readTimesTable(path);
    auto survey = table ? surveyFromTimes(*table, guessTimesColumns(*table)) : Result<Survey>(table.failure());
    if (survey) {
      surveys_.push_back(std::move(*survey));
      tablesRead_.push_back({path, fileChecksum(path).value_or("")});
      ++line_.filesRead;
    } else {
      line_.problems.push_back(survey.message());
    }
  }

  void readRecordFiles(const std::vector<std::string>& paths, const Progress& progress) {
    FilesRead read = readFiles(paths, progress);
    line_.finished = !read.unfinished;
    line_.filesRead += static_cast<int>(paths.size() - read.failures.size());
    line_.problems.insert(line_.problems.end(), read.failures.begin(), read.failures.end());
    for (RecordPtr& record : read.records) {
      for (const std::string& loss : record->losses) {
        line_.problems.push_back(record->file + " could be read in part only. " + loss);
      }
      take(std::move(record));
    }
  }

  void finish(const Progress& progress) {
    if (table_) {
      std::vector<const ShotRecord*> all;
      for (const RecordPtr& record : records_) {
        all.push_back(record.get());
      }
      const auto unused = unusedRows(*table_, all);
      line_.problems.insert(line_.problems.end(), unused.begin(), unused.end());
    }
    auto aligned = withBlowsAligned(assemble(std::move(records_)), progress);
    if (!aligned) {
      line_.finished = false;
      return;
    }
    Survey fresh = std::move(*aligned);
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
    std::vector<TableRead>& tables = line_.survey.info.tables;
    tables.insert(tables.end(), tablesRead_.begin(), tablesRead_.end());
  }

 private:
  void take(RecordPtr record) {
    if (table_) {
      GeometryApplied applied = applyGeometry(*table_, *record);
      remarks_.insert(remarks_.end(), applied.remarks.begin(), applied.remarks.end());
      record = std::make_shared<const ShotRecord>(std::move(applied.record));
    }
    records_.push_back(std::move(record));
  }

  LoadedLine& line_;
  std::optional<GeometryTable> table_;
  std::vector<RecordPtr> records_;
  std::vector<Survey> surveys_;
  std::vector<std::string> remarks_;
  std::vector<TableRead> tablesRead_;
};

}  // namespace

bool isTimesTable(const std::string& path) {
  const std::string name = lowered(path);
  return endsWith(name, ".csv") || endsWith(name, ".txt") || endsWith(name, ".tsv");
}

LoadedLine loadLine(const std::vector<std::string>& paths, const std::string& geometryTable,
                    const Progress& progress) {
  LoadedLine line;
  Loading loading(line);
  if (!geometryTable.empty()) {
    loading.readTable(geometryTable);
  }
  std::vector<std::string> recordPaths;
  for (const std::string& path : paths) {
    if (isSurveyFile(path)) {
      loading.readSurvey(path);
    } else if (isTimesTable(path)) {
      loading.readTimes(path);
    } else {
      recordPaths.push_back(path);
    }
  }
  // Reading takes about as long as aligning the blows.
  const auto half = [&progress](double from) -> Progress {
    return [&progress, from](double fraction) { return goOn(progress, from + 0.5 * fraction); };
  };
  loading.readRecordFiles(recordPaths, half(0.0));
  if (line.finished) {
    loading.finish(half(0.5));
  }
  return line;
}

}  // namespace strikeplate
