#include <array>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <set>

#include <boost/crc.hpp>

#include "core/base/file_names.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

const std::string kTogether = "\xC2\xA0";  // a blank at which no line is broken

}  // namespace

std::optional<std::string> fileChecksum(const std::string& path) {
  std::error_code none;
  if (!std::filesystem::is_regular_file(path, none)) {
    return std::nullopt;
  }
  std::ifstream file(path, std::ios::binary);
  boost::crc_32_type crc;
  std::array<char, 65536> block{};
  while (file.read(block.data(), block.size()) || file.gcount() > 0) {
    crc.process_bytes(block.data(), static_cast<std::size_t>(file.gcount()));
  }
  if (file.bad() || !file.eof()) {
    return std::nullopt;
  }
  std::array<char, 9> digits{};
  std::snprintf(digits.data(), digits.size(), "%08x", static_cast<unsigned>(crc.checksum()));
  return std::string(digits.data());
}

std::vector<SheetFile> sheetFiles(const SheetSource& source) {
  std::vector<std::string> paths;
  for (const RecordPtr& record : source.survey.records) {
    paths.push_back(record->file);
  }
  paths.insert(paths.end(), source.options.inputFiles.begin(), source.options.inputFiles.end());
  std::vector<SheetFile> files;
  std::set<std::string> known;
  for (const std::string& path : paths) {
    if (known.insert(path).second) {
      files.push_back({lastPart(path), fileChecksum(path).value_or("")});
    }
  }
  return files;
}

SheetTable sheetFileTable(const std::vector<SheetFile>& files) {
  SheetTable table;
  table.title = "Input files";
  table.columns = {"File", "CRC-32 (IEEE 802.3)"};
  for (const SheetFile& file : files) {
    table.rows.push_back({file.name, file.checksum.empty() ? "not at hand" : file.checksum});
  }
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
