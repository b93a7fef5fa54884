#include "core/survey/survey_file.h"

#include <filesystem>
#include <optional>
#include <system_error>
#include <utility>
#include <vector>

#include "core/survey/edit_check.h"
#include "core/survey/survey_file_database.h"
#include "core/survey/survey_file_guard.h"
#include "core/survey/survey_file_store.h"

namespace strikeplate {
namespace {

// How an entry stands on the disk.
struct Written {
  EditState state;
  std::string since;
};

struct Opened {
  Database database;
  SurveyStore store;
  History history;
};

Result<Opened> openChecked(const std::string& path, bool lock) {
  if (const Outcome head = checkHead(path); !head) {
    return head.failure();
  }
  Result<Database> database = Database::open(path, Database::Mode::Existing);
  if (!database) {
    return database.failure();
  }
  if (lock && !database->readOnly()) {
    if (const Outcome locked = lockForWriting(*database); !locked) {
      return locked.failure();
    }
  }
  if (const Outcome structure = checkStructure(*database, path); !structure) {
    return structure.failure();
  }
  SurveyStore store;
  Result<History> history = store.readAll(*database, path);
  if (!history) {
    return history.failure();
  }
  return Opened{std::move(database).value(), std::move(store), std::move(history).value()};
}

// Writes a complete file under a passing name; it is closed, and has been read back, when this returns.
Outcome writeFinished(const std::string& path, const History& history) {
  Result<Database> database = Database::open(path, Database::Mode::Create);
  if (!database) {
    return database.failure();
  }
  if (const Outcome locked = lockForWriting(*database); !locked) {
    return locked;
  }
  SurveyStore store;
  if (Outcome written = store.writeNew(*database, history); !written) {
    return written;
  }
  database = Failure{"closed"};
  const Result<Opened> back = openChecked(path, false);
  return back ? Outcome(Done{}) : Outcome(back.failure());
}

Outcome writeComplete(const std::string& path, const History& history) {
  if (!surveyIsSound(history.start())) {
    return Failure{"The survey has a number that is not finite or a place that does not exist, so " + path +
                   " was not written; look through the geometry."};
  }
  if (Outcome replaceable = checkReplaceable(path); !replaceable) {
    return replaceable;
  }
  const std::string passing = path + ".new";
  std::error_code ignored;
  std::filesystem::remove(passing, ignored);
  std::filesystem::remove(passing + "-journal", ignored);
  if (Outcome written = writeFinished(passing, history); !written) {
    std::filesystem::remove(passing, ignored);
    return written;
  }
  return giveName(passing, path);
}

}  // namespace

struct SurveyFile::Body {
  std::string path;
  Access access = Access::Write;
  std::string author;
  Database database;
  SurveyStore store;
  History history;
  std::vector<Written> written;

  [[nodiscard]] std::vector<std::size_t> pending() const {
    std::vector<std::size_t> entries;
    for (std::size_t i = 0; i < history.entries().size(); ++i) {
      const HistoryEntry& entry = history.entries()[i];
      if (i >= written.size() || written[i].state != entry.state || written[i].since != entry.since) {
        entries.push_back(i);
      }
    }
    return entries;
  }

  void markWritten() {
    written.clear();
    for (const HistoryEntry& entry : history.entries()) {
      written.push_back({entry.state, entry.since});
    }
  }

  [[nodiscard]] std::optional<Failure> whyNotWritable() const {
    if (access == Access::Read || database.readOnly()) {
      return Failure{path + " may not be written; save the survey under another name."};
    }
    if (database.moved()) {
      return Failure{path + " was moved or deleted while it was open; save the survey under another name."};
    }
    return std::nullopt;
  }

  Outcome flush() {
    const std::vector<std::size_t> entries = pending();
    if (entries.empty()) {
      return Done{};
    }
    if (auto reason = whyNotWritable()) {
      return *reason;
    }
    if (Outcome outcome = store.write(database, history, entries); !outcome) {
      return outcome;
    }
    if (auto reason = whyNotWritable()) {
      return *reason;
    }
    markWritten();
    return Done{};
  }
};

SurveyFile::SurveyFile(std::unique_ptr<Body> body) : body_(std::move(body)) {}
SurveyFile::SurveyFile(SurveyFile&& other) noexcept = default;
SurveyFile& SurveyFile::operator=(SurveyFile&& other) noexcept = default;
SurveyFile::~SurveyFile() = default;

Result<SurveyFile> SurveyFile::create(const std::string& path, const History& history) {
  if (const Outcome outcome = writeComplete(path, history); !outcome) {
    return outcome.failure();
  }
  return open(path, Access::Write);
}

Result<SurveyFile> SurveyFile::create(const std::string& path, const Survey& survey) {
  return create(path, History(survey));
}

Result<SurveyFile> SurveyFile::open(const std::string& path, Access access) {
  Result<Opened> opened = openChecked(path, access == Access::Write);
  if (!opened) {
    return opened.failure();
  }
  auto body = std::make_unique<Body>(
      Body{path, access, {}, std::move(opened->database), std::move(opened->store), std::move(opened->history), {}});
  body->markWritten();
  return SurveyFile(std::move(body));
}

const std::string& SurveyFile::path() const {
  return body_->path;
}

bool SurveyFile::readOnly() const {
  return body_->access == Access::Read || body_->database.readOnly();
}

const History& SurveyFile::history() const {
  return body_->history;
}

void SurveyFile::setAuthor(std::string author) {
  body_->author = std::move(author);
}

Outcome SurveyFile::append(const Edit& edit) {
  if (!editFits(survey(), edit)) {
    return Failure{"\"" + edit.text + "\" does not fit the survey and was not carried out; try it again."};
  }
  body_->history.append(edit, body_->author, utcNow());
  return body_->flush();
}

Outcome SurveyFile::undo() {
  body_->history.undo(utcNow());
  return body_->flush();
}

Outcome SurveyFile::redo() {
  body_->history.redo(utcNow());
  return body_->flush();
}

bool SurveyFile::unsaved() const {
  return !body_->pending().empty();
}

Outcome SurveyFile::flush() {
  return body_->flush();
}

Outcome SurveyFile::saveAs(const std::string& path) {
  std::error_code error;
  if (!body_->database.moved() && std::filesystem::equivalent(path, body_->path, error)) {
    return flush();
  }
  Result<SurveyFile> next = create(path, body_->history);
  if (!next) {
    return next.failure();
  }
  next->setAuthor(body_->author);
  *this = std::move(next).value();
  return Done{};
}

Outcome SurveyFile::copyTo(const std::string& path) const {
  std::error_code error;
  if (!body_->database.moved() && std::filesystem::equivalent(path, body_->path, error)) {
    return Failure{path + " is the open file itself; choose another name for the copy."};
  }
  return writeComplete(path, body_->history);
}

}  // namespace strikeplate
