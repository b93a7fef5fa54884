#include "core/survey/survey_file_guard.h"

#include <array>
#include <cstdint>
#include <filesystem>
#include <fstream>
#include <string_view>
#include <system_error>

#include <fcntl.h>
#include <unistd.h>

namespace strikeplate {
namespace {

constexpr std::uint32_t kApplicationId = 0x53504C54;
constexpr std::uint32_t kFormat = 3;
constexpr std::size_t kHeadSize = 100;
constexpr std::string_view kMagic("SQLite format 3\0", 16);

std::uint32_t bigEndian(const std::array<char, kHeadSize>& head, std::size_t offset) {
  std::uint32_t value = 0;
  for (std::size_t i = 0; i < 4; ++i) {
    value = (value << 8U) | static_cast<unsigned char>(head[offset + i]);
  }
  return value;
}

// A name that was just given lasts through a power failure only when its folder is on the disk too.
void syncFolderOf(const std::string& path) {
  const std::string folder = std::filesystem::absolute(path).parent_path().string();
  const int descriptor = ::open(folder.c_str(), O_RDONLY | O_DIRECTORY);
  if (descriptor >= 0) {
    ::fsync(descriptor);
    ::close(descriptor);
  }
}

}  // namespace

Outcome checkHead(const std::string& path) {
  std::error_code error;
  if (!std::filesystem::exists(path, error)) {
    return Failure{path + " does not exist; check its name and its folder."};
  }
  std::ifstream file(path, std::ios::binary);
  std::array<char, kHeadSize> head{};
  file.read(head.data(), head.size());
  const auto size = static_cast<std::size_t>(file.gcount());
  if (size == 0) {
    const bool empty = std::filesystem::is_regular_file(path, error) && std::filesystem::is_empty(path, error);
    return Failure{empty ? path + " is empty; open a copy that was made earlier."
                         : path + " cannot be read; check that it is a file and your right to read it."};
  }
  if (size < kHeadSize || std::string_view(head.data(), kMagic.size()) != kMagic ||
      bigEndian(head, 68) != kApplicationId) {
    return Failure{path + " is not a survey file; choose a file named .splate that this program wrote."};
  }
  const std::uint32_t format = bigEndian(head, 60);
  if (format > kFormat) {
    return Failure{path + " was written by a newer program (format " + std::to_string(format) +
                   ", this one knows up to " + std::to_string(kFormat) +
                   ") and was not changed; open it with the newer program."};
  }
  return Done{};
}

Outcome checkStructure(Database& database, const std::string& path) {
  Statement check(database.handle(), "PRAGMA integrity_check(1)");
  if (!check.step()) {
    return database.failure();
  }
  const std::string answer = check.text(0);
  if (answer != "ok") {
    return Failure{path + " is damaged (" + answer + "); open a copy that was made earlier."};
  }
  return Done{};
}

Outcome lockForWriting(Database& database) {
  if (!database.run("PRAGMA locking_mode = EXCLUSIVE; PRAGMA journal_mode = DELETE; PRAGMA synchronous = EXTRA;") ||
      !database.run("BEGIN EXCLUSIVE; COMMIT")) {
    return database.failure();
  }
  return Done{};
}

Outcome checkReplaceable(const std::string& path) {
  std::error_code error;
  if (!std::filesystem::exists(path, error) || !checkHead(path).ok()) {
    return Done{};
  }
  Result<Database> present = Database::open(path, Database::Mode::Existing);
  // One that cannot even be opened as a database is no one's open survey; its owner asked to replace it.
  if (!present || present->readOnly()) {
    return Failure{path + " may not be written; save the survey under another name."};
  }
  return lockForWriting(*present);
}

Outcome giveName(const std::string& finished, const std::string& path) {
  std::error_code error;
  // A journal left by a killed program belongs to the file that is replaced, and must not meet the new one.
  std::filesystem::remove(path + "-journal", error);
  std::filesystem::rename(finished, path, error);
  if (error) {
    std::error_code ignored;
    std::filesystem::remove(finished, ignored);
    return Failure{path + " could not be written (" + error.message() + "); save the survey under another name."};
  }
  syncFolderOf(path);
  return Done{};
}

}  // namespace strikeplate
