#include "core/survey/survey_file_database.h"

#include <utility>

#include <sqlite3.h>

namespace strikeplate {
namespace {

// Long enough for another program's single write, short enough for a person to wait.
constexpr int kBusyMilliseconds = 300;

std::string sentence(int code, const std::string& path) {
  switch (code) {
    case SQLITE_BUSY:
    case SQLITE_LOCKED:
      return path + " is open in another program; close it there, then try again.";
    case SQLITE_READONLY:
    case SQLITE_PERM:
    case SQLITE_AUTH:
      return path + " may not be written; save the survey under another name.";
    case SQLITE_FULL:
      return "The disk is full, so " + path + " was not changed; make room, or save the survey on another disk.";
    case SQLITE_CANTOPEN:
      return path + " cannot be opened; check its name, its folder and your right to use it.";
    case SQLITE_CORRUPT:
    case SQLITE_NOTADB:
      return path + " is damaged; open a copy that was made earlier.";
    case SQLITE_NOMEM:
      return "There is not enough memory for " + path + "; close other programs.";
    default:
      return path + " could not be read or written (" + sqlite3_errstr(code) +
             "); save the survey under another name.";
  }
}

}  // namespace

Statement::Statement(sqlite3* database, const char* sql) {
  failed_ = sqlite3_prepare_v2(database, sql, -1, &statement_, nullptr) != SQLITE_OK;
}

Statement::~Statement() {
  sqlite3_finalize(statement_);
}

Statement& Statement::bind(std::int64_t value) {
  failed_ = sqlite3_bind_int64(statement_, next_++, value) != SQLITE_OK || failed_;
  return *this;
}

Statement& Statement::bind(std::string_view text) {
  failed_ = sqlite3_bind_text64(statement_, next_++, text.data(), text.size(), SQLITE_TRANSIENT, SQLITE_UTF8) !=
                SQLITE_OK ||
            failed_;
  return *this;
}

Statement& Statement::bindBlob(std::string_view bytes) {
  failed_ =
      sqlite3_bind_blob64(statement_, next_++, bytes.data(), bytes.size(), SQLITE_TRANSIENT) != SQLITE_OK || failed_;
  return *this;
}

bool Statement::step() {
  if (failed_) {
    return false;
  }
  const int code = sqlite3_step(statement_);
  failed_ = code != SQLITE_ROW && code != SQLITE_DONE;
  return code == SQLITE_ROW;
}

bool Statement::run() {
  step();
  sqlite3_reset(statement_);
  next_ = 1;
  return !failed_;
}

std::int64_t Statement::integer(int column) const {
  return sqlite3_column_int64(statement_, column);
}

std::string Statement::text(int column) const {
  const void* bytes = sqlite3_column_blob(statement_, column);
  const int size = sqlite3_column_bytes(statement_, column);
  return bytes == nullptr ? std::string()
                          : std::string(static_cast<const char*>(bytes), static_cast<std::size_t>(size));
}

void Database::Close::operator()(sqlite3* handle) const {
  sqlite3_close_v2(handle);
}

Result<Database> Database::open(const std::string& path, Mode mode) {
  // A file that may not be written is opened for reading by the same flags.
  const int flags = SQLITE_OPEN_READWRITE | (mode == Mode::Create ? SQLITE_OPEN_CREATE : 0);
  sqlite3* handle = nullptr;
  const int code = sqlite3_open_v2(path.c_str(), &handle, flags | SQLITE_OPEN_NOMUTEX, nullptr);
  Database database(handle, path);
  if (code != SQLITE_OK) {
    return Failure{sentence(code, path)};
  }
  sqlite3_busy_timeout(handle, kBusyMilliseconds);
  // A file from elsewhere must not be able to run anything: SQLite's own advice on untrusted databases.
  sqlite3_db_config(handle, SQLITE_DBCONFIG_DEFENSIVE, 1, nullptr);
  sqlite3_db_config(handle, SQLITE_DBCONFIG_TRUSTED_SCHEMA, 0, nullptr);
  sqlite3_db_config(handle, SQLITE_DBCONFIG_ENABLE_TRIGGER, 0, nullptr);
  sqlite3_db_config(handle, SQLITE_DBCONFIG_ENABLE_VIEW, 0, nullptr);
  database.run("PRAGMA cell_size_check = ON; PRAGMA mmap_size = 0;");
  return database;
}

bool Database::run(const char* sql) {
  return sqlite3_exec(handle(), sql, nullptr, nullptr, nullptr) == SQLITE_OK;
}

bool Database::readOnly() const {
  return sqlite3_db_readonly(handle(), "main") == 1;
}

bool Database::moved() const {
  int moved = 0;
  return sqlite3_file_control(handle(), "main", SQLITE_FCNTL_HAS_MOVED, &moved) == SQLITE_OK && moved != 0;
}

Failure Database::failure() const {
  return Failure{sentence(sqlite3_errcode(handle()) & 0xff, path_)};
}

Transaction::Transaction(Database& database) : database_(database), open_(database.run("BEGIN IMMEDIATE")) {}

Transaction::~Transaction() {
  if (open_) {
    database_.run("ROLLBACK");
  }
}

bool Transaction::commit() {
  if (!open_ || !database_.run("COMMIT")) {
    return false;
  }
  open_ = false;
  return true;
}

std::int64_t digestOf(std::string_view bytes, std::int64_t seed) {
  auto hash = static_cast<std::uint64_t>(seed);
  for (const char c : bytes) {
    hash = (hash ^ static_cast<unsigned char>(c)) * 0x100000001b3ULL;
  }
  return static_cast<std::int64_t>(hash);
}

}  // namespace strikeplate
