#include "core/record/read_files.h"

#include <memory>
#include <utility>

#include "core/record/read_records.h"

namespace strikeplate {

FilesRead readFiles(const std::vector<std::string>& paths, const Progress& progress) {
  FilesRead out;
  for (std::size_t i = 0; i < paths.size(); ++i) {
    if (!goOn(progress, static_cast<double>(i) / static_cast<double>(paths.size()))) {
      out.unfinished = true;
      return out;
    }
    auto records = readRecords(paths[i]);
    if (!records) {
      out.failures.push_back(records.message());
      continue;
    }
    for (ShotRecord& record : *records) {
      out.records.push_back(std::make_shared<const ShotRecord>(std::move(record)));
    }
  }
  return out;
}

}  // namespace strikeplate
