// The keys of the travel-time plot.
#include <algorithm>

#include <QKeyEvent>
#include <qcustomplot.h>

#include "widgets/branch_actions.h"
#include "widgets/travel_time_plot.h"
#include "widgets/travel_time_words.h"

namespace strikeplate {
namespace {

constexpr int kMostLayer = 6;

}  // namespace

void TravelTimePlot::stepTrace(int by, bool mark) {
  const Selection s = scene_.selection;
  if (!scene_.interpretation || s.shot < 0) {
    return;
  }
  const auto& arrivals = scene_.interpretation->times.arrivals;
  std::vector<std::size_t> curve;
  std::ptrdiff_t at = -1;
  for (std::size_t i = 0; i < arrivals.size(); ++i) {
    if (arrivals[i].shot == s.shot) {
      at = arrivals[i].trace == s.trace ? std::ssize(curve) : at;
      curve.push_back(i);
    }
  }
  if (curve.empty()) {
    return;
  }
  const std::ptrdiff_t next = at < 0 ? 0 : std::clamp<std::ptrdiff_t>(at + by, 0, std::ssize(curve) - 1);
  const Arrival& a = arrivals[curve[static_cast<std::size_t>(next)]];
  if (mark) {
    marked_.insert({a.shot, a.trace});
    if (s.trace >= 0) {
      marked_.insert({s.shot, s.trace});
    }
  } else {
    marked_.clear();
  }
  const int arrival = static_cast<int>(curve[static_cast<std::size_t>(next)]);
  emit hint(arrivalWords(scene_, arrival));
  emit selectionWanted({a.shot, a.trace, a.layer});
  emit plumbLineWanted(scene_.interpretation->times.geophones[static_cast<std::size_t>(a.geophone)].x);
  draw();
}

void TravelTimePlot::stepShot(int by) {
  const int last = scene_.survey ? static_cast<int>(scene_.survey->shots.size()) - 1 : -1;
  if (last >= 0) {
    emit selectionWanted({std::clamp(scene_.selection.shot + by, 0, last), -1, 0});
  }
}

void TravelTimePlot::keyPressEvent(QKeyEvent* event) {
  const bool shift = event->modifiers().testFlag(Qt::ShiftModifier);
  const int layer = event->key() - Qt::Key_0;
  if (layer >= 0 && layer <= kMostLayer && !event->modifiers().testFlag(Qt::ControlModifier)) {
    assignChosen(layer);
    return;
  }
  const int step = event->key() == Qt::Key_Left ? -1 : 1;
  if (event->modifiers().testFlag(Qt::AltModifier) &&
      (event->key() == Qt::Key_Left || event->key() == Qt::Key_Right)) {
    const int arrival = selectedArrival();
    const Branch* branch = arrival < 0 ? nullptr : branchOf(*scene_.interpretation, arrival);
    slideFarEnd(branch != nullptr ? step * branch->side : step);
    return;
  }
  switch (event->key()) {
    case Qt::Key_S:
      splitBranchHere();
      break;
    case Qt::Key_M:
      mergeBranchHere();
      break;
    case Qt::Key_D:
      dissolveBranchHere();
      break;
    case Qt::Key_K:
      keepShot();
      break;
    case Qt::Key_F:
      nextSide();
      break;
    case Qt::Key_Menu:
      menuAt(placeOf(selectedArrival()).value_or(QPointF(plot().rect().center())).toPoint());
      break;
    case Qt::Key_Left:
    case Qt::Key_Right:
      stepTrace(step, shift);
      break;
    case Qt::Key_PageUp:
    case Qt::Key_PageDown:
      stepShot(event->key() == Qt::Key_PageUp ? -1 : 1);
      break;
    case Qt::Key_Delete:
    case Qt::Key_Backspace:
      deleteChosen();
      break;
    case Qt::Key_Escape:
      abandon();
      PositionView::keyPressEvent(event);
      break;
    default:
      PositionView::keyPressEvent(event);
  }
}

}  // namespace strikeplate
