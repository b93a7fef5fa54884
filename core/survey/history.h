#pragma once

#include <cstddef>
#include <string>
#include <utility>
#include <vector>

#include "core/survey/edit.h"

namespace strikeplate {

/// Where an edit of the history stands. Abandoned ones were undone and then overtaken by a new edit.
enum class EditState { Done, Undone, Abandoned };

/// One edit with who made it and when.
struct HistoryEntry {
  Edit edit;
  std::string made;    ///< UTC, such as "2026-05-04T09:12:33Z"
  std::string author;  ///< may be empty
  EditState state = EditState::Done;
  std::string since;  ///< UTC, when it came into this state
};

/// Present time in UTC as the history writes it.
std::string utcNow();

/// A survey with everything that was ever done to it. Entries stand in the order in which they were made; undone ones
/// are behind the done ones. No edit is ever taken out.
class History {
 public:
  explicit History(Survey start) : start_(start), survey_(std::move(start)) {}

  [[nodiscard]] const Survey& start() const { return start_; }    ///< before the first edit
  [[nodiscard]] const Survey& survey() const { return survey_; }  ///< with every done edit carried out
  [[nodiscard]] const std::vector<HistoryEntry>& entries() const { return entries_; }

  /// Carries the edit out; what was undone becomes abandoned. Needs an edit that fits the survey (see editFits).
  void append(Edit edit, std::string author, std::string time);
  [[nodiscard]] bool canUndo() const { return undoIndex() >= 0; }
  [[nodiscard]] bool canRedo() const { return redoIndex() >= 0; }
  /// Takes back the last done edit; nothing happens when there is none.
  void undo(const std::string& time);
  /// Carries out the first undone edit; nothing happens when there is none.
  void redo(const std::string& time);
  /// What undo and redo would take back or carry out; empty when nothing.
  [[nodiscard]] std::string undoText() const;
  [[nodiscard]] std::string redoText() const;

  /// Puts an entry behind the others as it is, carrying it out when it is done. For reading a file. False, and
  /// nothing changes, when its edit does not fit or a done entry follows an undone one.
  bool restore(HistoryEntry entry);

 private:
  [[nodiscard]] int undoIndex() const;
  [[nodiscard]] int redoIndex() const;

  Survey start_;
  Survey survey_;
  std::vector<HistoryEntry> entries_;
};

}  // namespace strikeplate
