#pragma once

#include <cstdint>
#include <memory>
#include <string>
#include <string_view>
#include <utility>

#include "core/base/result.h"

struct sqlite3;
struct sqlite3_stmt;

namespace strikeplate {

/// A prepared statement; ended when it goes out of scope. Texts and blobs are copied in and out.
class Statement {
 public:
  Statement(sqlite3* database, const char* sql);
  ~Statement();
  Statement(const Statement&) = delete;
  Statement& operator=(const Statement&) = delete;

  Statement& bind(std::int64_t value);
  Statement& bind(std::string_view text);
  Statement& bindBlob(std::string_view bytes);

  /// The next row; false at the end and on an error, which failed() tells.
  bool step();
  /// Carries the statement out and makes it ready for the next values; false on an error.
  bool run();
  [[nodiscard]] bool failed() const { return failed_; }

  [[nodiscard]] std::int64_t integer(int column) const;
  [[nodiscard]] std::string text(int column) const;

 private:
  sqlite3_stmt* statement_ = nullptr;
  int next_ = 1;  // parameter to bind
  bool failed_ = false;
};

/// An open SQLite database; closed when it goes out of scope.
class Database {
 public:
  enum class Mode { Create, Existing };
  static Result<Database> open(const std::string& path, Mode mode);

  Database(Database&& other) noexcept = default;
  Database& operator=(Database&& other) noexcept = default;

  [[nodiscard]] sqlite3* handle() const { return handle_.get(); }
  bool run(const char* sql);
  [[nodiscard]] bool readOnly() const;
  /// Whether the file no longer stands under its name.
  [[nodiscard]] bool moved() const;
  /// What the last call met, as one sentence about the file that says what to do.
  [[nodiscard]] Failure failure() const;

 private:
  Database(sqlite3* handle, std::string path) : handle_(handle), path_(std::move(path)) {}
  struct Close {
    void operator()(sqlite3* handle) const;
  };
  std::unique_ptr<sqlite3, Close> handle_;
  std::string path_;
};

/// A transaction that is rolled back at the end of its scope unless it was committed.
class Transaction {
 public:
  explicit Transaction(Database& database);
  ~Transaction();
  Transaction(const Transaction&) = delete;
  Transaction& operator=(const Transaction&) = delete;
  [[nodiscard]] bool begun() const { return open_; }
  bool commit();

 private:
  Database& database_;
  bool open_;
};

/// 64-bit FNV-1a hash (Fowler, Noll & Vo; Internet draft eastlake-fnv), going on from `seed`.
std::int64_t digestOf(std::string_view bytes, std::int64_t seed = static_cast<std::int64_t>(0xcbf29ce484222325ULL));

}  // namespace strikeplate
