// What the record view does at a key, or at the menu entry beside it.
#include <cmath>

#include <QKeyEvent>

#include "widgets/record_pick.h"
#include "widgets/record_steps.h"
#include "widgets/record_view.h"
#include "widgets/record_words.h"

namespace strikeplate {
namespace {

constexpr int kFar = 10;  // samples
constexpr double kKeyZoom = 1.25;
constexpr double kGainStep = 1.4142135623730951;
constexpr double kLeastGain = 1.0 / 64.0, kMostGain = 4096.0;
constexpr double kSigmaStep = 1.1;

bool isNudge(RecordCommand command) {
  return command == RecordCommand::NudgeUp || command == RecordCommand::NudgeDown ||
         command == RecordCommand::NudgeUpFar || command == RecordCommand::NudgeDownFar;
}

}  // namespace

void RecordView::keyPressEvent(QKeyEvent* event) {
  const auto command = recordCommand(*event);
  if (!command || gather() == nullptr || (gesture_ && *command != RecordCommand::Abandon)) {
    View::keyPressEvent(event);
  } else if (isNudge(*command)) {
    // A key that is held is one gesture; its release ends it.
    performTool(*command);
  } else {
    perform(*command);
  }
}

void RecordView::keyReleaseEvent(QKeyEvent* event) {
  if (nudge_ && !event->isAutoRepeat() && (event->key() == Qt::Key_Up || event->key() == Qt::Key_Down)) {
    finishNudge();
  } else {
    View::keyReleaseEvent(event);
  }
}

void RecordView::focusOutEvent(QFocusEvent* event) {
  finishNudge();
  View::focusOutEvent(event);
}

void RecordView::perform(RecordCommand command) {
  if (gather() == nullptr) {
    return;
  }
  if (isNudge(command)) {
    performTool(command);
    finishNudge();
    return;
  }
  if (command != RecordCommand::Abandon) {
    finishNudge();
  }
  if (!performTool(command) && !performPick(command) && !performStep(command)) {
    performView(command);
  }
}

bool RecordView::performTool(RecordCommand command) {
  const int later = display_.timeUp ? -1 : 1;
  switch (command) {
    case RecordCommand::NudgeUp:
      nudge(-later);
      return true;
    case RecordCommand::NudgeDown:
      nudge(later);
      return true;
    case RecordCommand::NudgeUpFar:
      nudge(-kFar * later);
      return true;
    case RecordCommand::NudgeDownFar:
      nudge(kFar * later);
      return true;
    case RecordCommand::Abandon:
      if (nudge_) {
        nudge_.reset();
        emit proposed({}, Phase::Abandon);
      } else if (gesture_) {
        abandon();
      } else {
        marked_ = {-1, -1};
        update();
      }
      return true;
    default:
      return false;
  }
}

bool RecordView::performPick(RecordCommand command) {
  if (command >= RecordCommand::Layer0 && command <= RecordCommand::Layer6) {
    assignLayer(static_cast<int>(command) - static_cast<int>(RecordCommand::Layer0));
    return true;
  }
  const Selection& s = scene_.selection;
  switch (command) {
    case RecordCommand::PickBySignal:
      pickBySignal();
      return true;
    case RecordCommand::DeletePick:
      deletePicks();
      return true;
    case RecordCommand::NarrowSigma:
    case RecordCommand::WidenSigma:
      if (hasTrace()) {
        commit(scaledSigma(*scene_.survey, s.shot, s.trace,
                           command == RecordCommand::WidenSigma ? kSigmaStep : 1.0 / kSigmaStep));
      }
      return true;
    default:
      return false;
  }
}

bool RecordView::performStep(RecordCommand command) {
  const Survey& survey = *scene_.survey;
  const Selection& s = scene_.selection;
  switch (command) {
    case RecordCommand::PreviousTrace:
      select(steppedTrace(survey, s, -1));
      return true;
    case RecordCommand::NextTrace:
      select(steppedTrace(survey, s, 1));
      return true;
    case RecordCommand::FirstTrace:
      select(steppedTrace(survey, s, -axes_.count()));
      return true;
    case RecordCommand::LastTrace:
      select(steppedTrace(survey, s, axes_.count()));
      return true;
    case RecordCommand::ExtendLeft:
    case RecordCommand::ExtendRight: {
      const int by = command == RecordCommand::ExtendRight ? 1 : -1;
      const int end = marked_.first < 0 ? s.trace : marked_.first == markAnchor_ ? marked_.second : marked_.first;
      if (const auto to = steppedTrace(survey, {s.shot, end, 0}, by)) {
        extendMarked(to->trace);
      }
      return true;
    }
    case RecordCommand::PreviousShot:
      select(steppedShot(survey, s, -1));
      return true;
    case RecordCommand::NextShot:
      select(steppedShot(survey, s, 1));
      return true;
    case RecordCommand::NextUnpicked:
      if (const auto next = nextUnpicked(survey, s)) {
        select(next);
      } else {
        emit hint(tr("Every live trace of the line is picked."));
      }
      return true;
    case RecordCommand::NextDoubtful:
      if (const auto next = nextDoubtful(survey, scene_.interpretation.get(), s)) {
        select(next);
      } else {
        emit hint(tr("No doubt hangs on a single pick."));
      }
      return true;
    default:
      return false;
  }
}

void RecordView::performView(RecordCommand command) {
  const bool inside = pointer_ && axes_.plot().contains(*pointer_);
  QPointF about = inside ? *pointer_ : axes_.plot().center();
  if (!inside && hasTrace()) {
    const auto& pick = shot().traces[static_cast<std::size_t>(scene_.selection.trace)].pick;
    const double y = pick ? axes_.yOf(scene_.selection.trace, pick->time) : about.y();
    about = inPlot({axes_.xOf(scene_.selection.trace), y});
  }
  RecordDisplay display = display_;
  switch (command) {
    case RecordCommand::ZoomIn:
      zoom(kKeyZoom, 1.0, about);
      break;
    case RecordCommand::ZoomOut:
      zoom(1.0 / kKeyZoom, 1.0, about);
      break;
    case RecordCommand::ZoomTracesIn:
      zoom(1.0, kKeyZoom, about);
      break;
    case RecordCommand::ZoomTracesOut:
      zoom(1.0, 1.0 / kKeyZoom, about);
      break;
    case RecordCommand::ZoomHome:
      goHome();
      break;
    case RecordCommand::ZoomAll:
      showAll();
      break;
    case RecordCommand::GainUp:
    case RecordCommand::GainDown:
      display.gain = std::clamp(display.gain * (command == RecordCommand::GainUp ? kGainStep : 1.0 / kGainStep),
                                kLeastGain, kMostGain);
      changeDisplay(display);
      break;
    case RecordCommand::NextStyle:
      display.style = static_cast<TraceStyle>((static_cast<int>(display.style) + 1) % 4);
      changeDisplay(display);
      break;
    case RecordCommand::Magnifier:
      display.magnifier = !display.magnifier;
      changeDisplay(display);
      break;
    default:
      break;
  }
}

void RecordView::select(const std::optional<Selection>& selection) {
  if (selection && !(*selection == scene_.selection)) {
    emit selectionWanted(*selection);
  }
}

}  // namespace strikeplate
