#include "widgets/record_keys.h"

#include <algorithm>
#include <array>

#include <QKeyEvent>
#include <QKeySequence>

namespace strikeplate {
namespace {

constexpr int kNone = 0;
constexpr int kShift = Qt::ShiftModifier;
constexpr int kControl = Qt::ControlModifier;

constexpr std::array kKeys = {
    RecordKey{RecordCommand::NudgeUp, Qt::Key_Up, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "moves the pick up by one sample")},
    RecordKey{RecordCommand::NudgeDown, Qt::Key_Down, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "moves the pick down by one sample")},
    RecordKey{RecordCommand::NudgeUpFar, Qt::Key_Up, kShift,
              QT_TRANSLATE_NOOP("RecordKey", "moves the pick up by ten samples")},
    RecordKey{RecordCommand::NudgeDownFar, Qt::Key_Down, kShift,
              QT_TRANSLATE_NOOP("RecordKey", "moves the pick down by ten samples")},
    RecordKey{RecordCommand::PickBySignal, Qt::Key_Space, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "picks the trace where its signal begins")},
    RecordKey{RecordCommand::NarrowSigma, Qt::Key_Comma, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "makes the pick's sigma smaller")},
    RecordKey{RecordCommand::WidenSigma, Qt::Key_Period, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "makes the pick's sigma larger")},
    RecordKey{RecordCommand::DeletePick, Qt::Key_Delete, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "deletes the pick, or those of the traces marked")},
    RecordKey{RecordCommand::DeletePick, Qt::Key_Backspace, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "deletes the pick, or those of the traces marked")},
    RecordKey{RecordCommand::Layer0, Qt::Key_0, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "leaves the layer to the program")},
    RecordKey{RecordCommand::Layer1, Qt::Key_1, kNone, QT_TRANSLATE_NOOP("RecordKey", "gives the pick to layer 1")},
    RecordKey{RecordCommand::Layer2, Qt::Key_2, kNone, QT_TRANSLATE_NOOP("RecordKey", "gives the pick to layer 2")},
    RecordKey{RecordCommand::Layer3, Qt::Key_3, kNone, QT_TRANSLATE_NOOP("RecordKey", "gives the pick to layer 3")},
    RecordKey{RecordCommand::Layer4, Qt::Key_4, kNone, QT_TRANSLATE_NOOP("RecordKey", "gives the pick to layer 4")},
    RecordKey{RecordCommand::Layer5, Qt::Key_5, kNone, QT_TRANSLATE_NOOP("RecordKey", "gives the pick to layer 5")},
    RecordKey{RecordCommand::Layer6, Qt::Key_6, kNone, QT_TRANSLATE_NOOP("RecordKey", "gives the pick to layer 6")},
    RecordKey{RecordCommand::PreviousTrace, Qt::Key_Left, kNone, QT_TRANSLATE_NOOP("RecordKey", "trace to the left")},
    RecordKey{RecordCommand::NextTrace, Qt::Key_Right, kNone, QT_TRANSLATE_NOOP("RecordKey", "trace to the right")},
    RecordKey{RecordCommand::ExtendLeft, Qt::Key_Left, kShift,
              QT_TRANSLATE_NOOP("RecordKey", "marks traces to the left")},
    RecordKey{RecordCommand::ExtendRight, Qt::Key_Right, kShift,
              QT_TRANSLATE_NOOP("RecordKey", "marks traces to the right")},
    RecordKey{RecordCommand::FirstTrace, Qt::Key_Home, kNone, QT_TRANSLATE_NOOP("RecordKey", "first trace")},
    RecordKey{RecordCommand::LastTrace, Qt::Key_End, kNone, QT_TRANSLATE_NOOP("RecordKey", "last trace")},
    RecordKey{RecordCommand::NextUnpicked, Qt::Key_N, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "next trace without a pick")},
    RecordKey{RecordCommand::NextDoubtful, Qt::Key_D, kNone, QT_TRANSLATE_NOOP("RecordKey", "next doubtful pick")},
    RecordKey{RecordCommand::PreviousShot, Qt::Key_PageUp, kNone, QT_TRANSLATE_NOOP("RecordKey", "shot before")},
    RecordKey{RecordCommand::NextShot, Qt::Key_PageDown, kNone, QT_TRANSLATE_NOOP("RecordKey", "next shot")},
    RecordKey{RecordCommand::ZoomIn, Qt::Key_Plus, kNone, QT_TRANSLATE_NOOP("RecordKey", "shows less time, larger")},
    RecordKey{RecordCommand::ZoomIn, Qt::Key_Equal, kNone, QT_TRANSLATE_NOOP("RecordKey", "shows less time, larger")},
    RecordKey{RecordCommand::ZoomOut, Qt::Key_Minus, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "shows more time, smaller")},
    RecordKey{RecordCommand::ZoomTracesIn, Qt::Key_Plus, kControl,
              QT_TRANSLATE_NOOP("RecordKey", "shows fewer traces, wider")},
    RecordKey{RecordCommand::ZoomTracesIn, Qt::Key_Equal, kControl,
              QT_TRANSLATE_NOOP("RecordKey", "shows fewer traces, wider")},
    RecordKey{RecordCommand::ZoomTracesOut, Qt::Key_Minus, kControl,
              QT_TRANSLATE_NOOP("RecordKey", "shows more traces, narrower")},
    RecordKey{RecordCommand::ZoomHome, Qt::Key_Z, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "shows the first breaks of all traces")},
    RecordKey{RecordCommand::ZoomAll, Qt::Key_A, kNone, QT_TRANSLATE_NOOP("RecordKey", "shows the whole record")},
    RecordKey{RecordCommand::GainUp, Qt::Key_BracketRight, kNone, QT_TRANSLATE_NOOP("RecordKey", "more gain")},
    RecordKey{RecordCommand::GainDown, Qt::Key_BracketLeft, kNone, QT_TRANSLATE_NOOP("RecordKey", "less gain")},
    RecordKey{RecordCommand::NextStyle, Qt::Key_S, kNone,
              QT_TRANSLATE_NOOP("RecordKey", "wiggle, area, both or density")},
    RecordKey{RecordCommand::Magnifier, Qt::Key_M, kNone, QT_TRANSLATE_NOOP("RecordKey", "magnifier on and off")},
    RecordKey{RecordCommand::Abandon, Qt::Key_Escape, kNone, QT_TRANSLATE_NOOP("RecordKey", "abandons the gesture")},
};

/// Where these stand on the keyboard, and so whether Shift is held for them, differs from country to country.
bool isSign(int key) {
  return key == Qt::Key_Plus || key == Qt::Key_Minus || key == Qt::Key_Equal || key == Qt::Key_BracketLeft ||
         key == Qt::Key_BracketRight || key == Qt::Key_Comma || key == Qt::Key_Period;
}

}  // namespace

QString RecordKey::keyText() const {
  return QKeySequence(key | modifiers).toString(QKeySequence::NativeText);
}

std::span<const RecordKey> recordKeys() {
  return kKeys;
}

std::optional<RecordCommand> recordCommand(const QKeyEvent& event) {
  int modifiers = (event.modifiers() & (Qt::ShiftModifier | Qt::ControlModifier)).toInt();
  if (event.modifiers() & (Qt::AltModifier | Qt::MetaModifier)) {
    return std::nullopt;
  }
  if (isSign(event.key())) {
    modifiers &= ~kShift;
  }
  const auto found = std::find_if(kKeys.begin(), kKeys.end(), [&](const RecordKey& each) {
    return each.key == event.key() && each.modifiers == modifiers;
  });
  return found == kKeys.end() ? std::nullopt : std::optional(found->command);
}

}  // namespace strikeplate
