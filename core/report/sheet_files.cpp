#include <algorithm>
#include <set>

#include "core/base/file_names.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

const std::string kTogether = "\xC2\xA0";  // a blank at which no line is broken

}  // namespace

std::vector<SheetFile> sheetFiles(const SheetSource& source) {
  std::vector<SheetFile> files;
  std::set<std::string> known;
  const auto take = [&](const std::string& path, const std::string& checksum) {
    if (known.insert(path + '\n' + checksum).second) {
      files.push_back({lastPart(path), checksum});
    }
  };
  for (const RecordPtr& record : source.survey.records) {
    take(record->file, record->checksum);
  }
  for (const TableRead& table : source.survey.info.tables) {
    take(table.file, table.checksum);
  }
  return files;
}

SheetTable sheetFileTable(const std::vector<SheetFile>& files) {
  SheetTable table;
  table.title = "Input files";
  table.columns = {"File", "CRC-32 (IEEE 802.3)"};
  for (const SheetFile& file : files) {
    table.rows.push_back({file.name, file.checksum.empty() ? "not known" : file.checksum});
  }
  table.note = "Checksum of each file as it was when it was read.";
  table.summary = table.rows.empty() ? "No input file." : "";
  return table;
}

std::string filesLine(const std::vector<SheetFile>& files, int most) {
  const std::size_t shown = std::min(files.size(), static_cast<std::size_t>(std::max(0, most)));
  std::string line;
  for (std::size_t i = 0; i < shown; ++i) {
    line += (i > 0 ? ", " : "") + files[i].name + (files[i].checksum.empty() ? "" : kTogether + files[i].checksum);
  }
  if (shown < files.size()) {
    line += (shown > 0 ? " and " : "") + std::to_string(files.size() - shown) + " more";
  }
  return files.empty() ? "No input file." : sentence(line);
}

}  // namespace strikeplate
