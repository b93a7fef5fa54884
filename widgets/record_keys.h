#pragma once

#include <optional>
#include <span>

#include <QCoreApplication>
#include <QString>

class QKeyEvent;

namespace strikeplate {

/// Everything that the record view does at a key.
enum class RecordCommand {
  NudgeUp,
  NudgeDown,
  NudgeUpFar,
  NudgeDownFar,
  PreviousTrace,
  NextTrace,
  ExtendLeft,
  ExtendRight,
  FirstTrace,
  LastTrace,
  NextUnpicked,
  NextDoubtful,
  PreviousShot,
  NextShot,
  PickBySignal,
  DeletePick,
  NarrowSigma,
  WidenSigma,
  Layer0,
  Layer1,
  Layer2,
  Layer3,
  Layer4,
  Layer5,
  Layer6,
  ZoomIn,
  ZoomOut,
  ZoomTracesIn,
  ZoomTracesOut,
  ZoomHome,
  ZoomAll,
  GainUp,
  GainDown,
  Magnifier,
  NextStyle,
  Abandon,
};

/// One line of the list of keys. A command may have more than one key; the first is the one to show.
struct RecordKey {
  RecordCommand command;
  int key;        ///< Qt::Key
  int modifiers;  ///< Qt::KeyboardModifiers, of Shift and Control
  const char* name;

  /// What the command does, and its key in words, both for the screen.
  [[nodiscard]] QString text() const { return QCoreApplication::translate("RecordKey", name); }
  [[nodiscard]] QString keyText() const;
};

/// All keys of the record view, in the order in which a list shows them.
std::span<const RecordKey> recordKeys();

/// The command of a key press; none when the record view has no use for it.
std::optional<RecordCommand> recordCommand(const QKeyEvent& event);

}  // namespace strikeplate
