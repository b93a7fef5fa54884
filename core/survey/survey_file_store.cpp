#include "core/survey/survey_file_store.h"

#include <array>
#include <cassert>
#include <utility>

#include "core/survey/edit_check.h"
#include "core/survey/survey_file_json.h"
#include "core/survey/survey_file_samples.h"

namespace strikeplate {
namespace {

constexpr const char* kTables = R"(
CREATE TABLE property (name TEXT PRIMARY KEY, value TEXT NOT NULL) WITHOUT ROWID;
CREATE TABLE record (
  id      INTEGER PRIMARY KEY,
  head    TEXT NOT NULL,
  samples BLOB NOT NULL,
  digest  INTEGER NOT NULL);
CREATE TABLE start (
  id      INTEGER PRIMARY KEY CHECK (id = 1),
  survey  TEXT NOT NULL,
  digest  INTEGER NOT NULL);
CREATE TABLE edit (
  number  INTEGER PRIMARY KEY,
  made    TEXT NOT NULL,
  author  TEXT NOT NULL,
  text    TEXT NOT NULL,
  state   TEXT NOT NULL CHECK (state IN ('done', 'undone', 'abandoned')),
  since   TEXT NOT NULL,
  changes TEXT NOT NULL,
  digest  INTEGER NOT NULL);
PRAGMA application_id = 0x53504C54;
PRAGMA user_version = 2;
)";

// What an older program wrote is written on as this one's format.
constexpr const char* kRaiseFormat = "PRAGMA user_version = 2";

constexpr std::array<const char*, 3> kStates = {"done", "undone", "abandoned"};

Failure damaged(const std::string& path, const std::string& what) {
  return Failure{path + " is damaged (" + what + "); open a copy that was made earlier."};
}

std::string stateName(EditState state) {
  return kStates[static_cast<std::size_t>(state)];
}

EditState stateFrom(const std::string& name) {
  return name == kStates[0] ? EditState::Done : name == kStates[1] ? EditState::Undone : EditState::Abandoned;
}

}  // namespace

// The id of a record, which is written first when the file does not hold it. A record that was read again is another
// object with the same bytes: it is found by its digest, and told from a chance likeness by the bytes themselves.
std::int64_t SurveyStore::idOf(Database& database, const RecordPtr& record) {
  if (const auto found = ids_.find(record.get()); found != ids_.end()) {
    return found->second;
  }
  const std::string head = recordHeadToJson(*record);
  const std::string samples = samplesToBytes(*record);
  const std::int64_t digest = digestOf(samples, digestOf(head));
  for (const Known& one : known_) {
    if (one.digest == digest && recordHeadToJson(*one.record) == head && samplesToBytes(*one.record) == samples) {
      known_.push_back({record, one.id, digest});
      ids_[record.get()] = known_.back().id;
      return known_.back().id;
    }
  }
  std::int64_t id = 1;
  for (const Known& one : known_) {
    id = std::max(id, one.id + 1);
  }
  Statement insert(database.handle(), "INSERT INTO record (id, head, samples, digest) VALUES (?, ?, ?, ?)");
  const bool readsBack = recordHeadFromJson(head, samples.size() / sizeof(float)).ok();
  recordsWritten_ = insert.bind(id).bind(head).bindBlob(samples).bind(digest).run() && readsBack && recordsWritten_;
  known_.push_back({record, id, digest});
  ids_[record.get()] = id;
  return id;
}

RecordPtr SurveyStore::recordOf(std::int64_t id) const {
  for (const Known& one : known_) {
    if (one.id == id) {
      return one.record;
    }
  }
  return nullptr;
}

void SurveyStore::forgetFrom(std::size_t knownCount) {
  while (known_.size() > knownCount) {
    ids_.erase(known_.back().record.get());
    known_.pop_back();
  }
  recordsWritten_ = true;
}

bool SurveyStore::writeStart(Database& database, const Survey& start) {
  const std::string json = surveyToJson(start, [&](const RecordPtr& record) { return idOf(database, record); });
  Statement insert(database.handle(), "INSERT INTO start (id, survey, digest) VALUES (1, ?, ?)");
  Statement property(database.handle(), "INSERT INTO property (name, value) VALUES (?, ?)");
  return recordsWritten_ && insert.bind(json).bind(digestOf(json)).run() &&
         property.bind("program").bind("Strikeplate " STRIKEPLATE_VERSION).run() &&
         property.bind("created").bind(utcNow()).run();
}

bool SurveyStore::writeEntry(Database& database, const HistoryEntry& entry, std::size_t index) {
  const auto number = static_cast<std::int64_t>(index + 1);
  if (index < edits_) {
    Statement update(database.handle(), "UPDATE edit SET state = ?, since = ? WHERE number = ?");
    return update.bind(stateName(entry.state)).bind(entry.since).bind(number).run();
  }
  const std::string changes =
      changesToJson(entry.edit.changes, [&](const RecordPtr& record) { return idOf(database, record); });
  Statement insert(database.handle(),
                   "INSERT INTO edit (number, made, author, text, state, since, changes, digest) "
                   "VALUES (?, ?, ?, ?, ?, ?, ?, ?)");
  return recordsWritten_ && insert.bind(number)
                                .bind(entry.made)
                                .bind(entry.author)
                                .bind(entry.edit.text)
                                .bind(stateName(entry.state))
                                .bind(entry.since)
                                .bind(changes)
                                .bind(digestOf(changes))
                                .run();
}

Outcome SurveyStore::writeNew(Database& database, const History& history) {
  Transaction transaction(database);
  bool good = transaction.begun() && database.run(kTables) && writeStart(database, history.start());
  for (std::size_t i = 0; good && i < history.entries().size(); ++i) {
    good = writeEntry(database, history.entries()[i], i);
  }
  if (!good || !transaction.commit()) {
    return database.failure();
  }
  edits_ = history.entries().size();
  return Done{};
}

Outcome SurveyStore::write(Database& database, const History& history, const std::vector<std::size_t>& entries) {
  const std::size_t knownBefore = known_.size();
  Transaction transaction(database);
  bool good = transaction.begun() && database.run(kRaiseFormat);
  for (std::size_t i = 0; good && i < entries.size(); ++i) {
    good = writeEntry(database, history.entries()[entries[i]], entries[i]);
  }
  if (!good || !transaction.commit()) {
    const Failure failure = database.failure();
    forgetFrom(knownBefore);
    return failure;
  }
  edits_ = history.entries().size();
  return Done{};
}

Outcome SurveyStore::readRecords(Database& database, const std::string& path) {
  Statement select(database.handle(), "SELECT id, head, samples, digest FROM record ORDER BY id");
  while (select.step()) {
    const std::string head = select.text(1);
    const std::string samples = select.text(2);
    const std::string name = "record " + std::to_string(select.integer(0));
    if (digestOf(samples, digestOf(head)) != select.integer(3)) {
      return damaged(path, name);
    }
    auto record = recordHeadFromJson(head, samples.size() / sizeof(float));
    if (!record || !samplesFromBytes(samples, *record)) {
      return damaged(path, name);
    }
    known_.push_back(
        {std::make_shared<const ShotRecord>(std::move(record).value()), select.integer(0), select.integer(3)});
    ids_[known_.back().record.get()] = known_.back().id;
  }
  return select.failed() ? Outcome(database.failure()) : Outcome(Done{});
}

Result<History> SurveyStore::readStart(Database& database, const std::string& path) const {
  Statement select(database.handle(), "SELECT survey, digest FROM start WHERE id = 1");
  if (!select.step()) {
    return select.failed() ? database.failure() : damaged(path, "it holds no survey");
  }
  const std::string json = select.text(0);
  if (digestOf(json) != select.integer(1)) {
    return damaged(path, "the survey it starts with");
  }
  auto survey = surveyFromJson(json, [this](std::int64_t id) { return recordOf(id); });
  if (!survey || !surveyIsSound(*survey)) {
    return damaged(path, "the survey it starts with");
  }
  return History(std::move(survey).value());
}

Outcome SurveyStore::readEdits(Database& database, const std::string& path, History& history) {
  Statement select(database.handle(),
                   "SELECT number, made, author, text, state, since, changes, digest FROM edit ORDER BY number");
  while (select.step()) {
    const Failure failure = damaged(path, "edit " + std::to_string(select.integer(0)));
    const std::string json = select.text(6);
    if (select.integer(0) != static_cast<std::int64_t>(++edits_) || digestOf(json) != select.integer(7)) {
      return failure;
    }
    auto changes = changesFromJson(json, [this](std::int64_t id) { return recordOf(id); });
    if (!changes || !history.restore({{select.text(3), std::move(changes).value()},
                                      select.text(1),
                                      select.text(2),
                                      stateFrom(select.text(4)),
                                      select.text(5)})) {
      return failure;
    }
  }
  return select.failed() ? Outcome(database.failure()) : Outcome(Done{});
}

Result<History> SurveyStore::readAll(Database& database, const std::string& path) {
  if (const Outcome records = readRecords(database, path); !records) {
    return records.failure();
  }
  Result<History> history = readStart(database, path);
  if (!history) {
    return history;
  }
  if (const Outcome edits = readEdits(database, path, *history); !edits) {
    return edits.failure();
  }
  return history;
}

}  // namespace strikeplate
