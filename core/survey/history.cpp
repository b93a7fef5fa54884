#include "core/survey/history.h"

#include <algorithm>
#include <cassert>
#include <chrono>
#include <ctime>
#include <utility>

#include "core/survey/edit_check.h"

namespace strikeplate {

std::string utcNow() {
  const std::time_t now = std::chrono::system_clock::to_time_t(std::chrono::system_clock::now());
  std::tm parts{};
  gmtime_r(&now, &parts);
  char text[32];
  const std::size_t length = std::strftime(text, sizeof text, "%Y-%m-%dT%H:%M:%SZ", &parts);
  return {text, length};
}

int History::undoIndex() const {
  const auto last =
      std::find_if(entries_.rbegin(), entries_.rend(), [](const auto& e) { return e.state == EditState::Done; });
  return static_cast<int>(entries_.rend() - last) - 1;
}

int History::redoIndex() const {
  const auto first =
      std::find_if(entries_.begin(), entries_.end(), [](const auto& e) { return e.state == EditState::Undone; });
  return first == entries_.end() ? -1 : static_cast<int>(first - entries_.begin());
}

void History::append(Edit edit, std::string author, std::string time) {
  assert(editFits(survey_, edit));
  for (HistoryEntry& entry : entries_) {
    if (entry.state == EditState::Undone) {
      entry.state = EditState::Abandoned;
      entry.since = time;
    }
  }
  apply(survey_, edit);
  entries_.push_back({std::move(edit), time, std::move(author), EditState::Done, time});
}

void History::undo(const std::string& time) {
  const int index = undoIndex();
  if (index >= 0) {
    HistoryEntry& entry = entries_[static_cast<std::size_t>(index)];
    apply(survey_, inverted(entry.edit));
    entry.state = EditState::Undone;
    entry.since = time;
  }
}

void History::redo(const std::string& time) {
  const int index = redoIndex();
  if (index >= 0) {
    HistoryEntry& entry = entries_[static_cast<std::size_t>(index)];
    apply(survey_, entry.edit);
    entry.state = EditState::Done;
    entry.since = time;
  }
}

std::string History::undoText() const {
  const int index = undoIndex();
  return index < 0 ? std::string() : entries_[static_cast<std::size_t>(index)].edit.text;
}

std::string History::redoText() const {
  const int index = redoIndex();
  return index < 0 ? std::string() : entries_[static_cast<std::size_t>(index)].edit.text;
}

bool History::restore(HistoryEntry entry) {
  if (entry.state == EditState::Done) {
    if (canRedo() || !editFits(survey_, entry.edit)) {
      return false;
    }
    apply(survey_, entry.edit);
  }
  entries_.push_back(std::move(entry));
  return true;
}

}  // namespace strikeplate
