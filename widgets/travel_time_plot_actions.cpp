// What the travel-time plot proposes, from its keys, its menu and the window's menus.
#include <algorithm>
#include <cmath>

#include <QRubberBand>

#include "core/base/units.h"
#include "widgets/branch_actions.h"
#include "widgets/lasso_line.h"
#include "widgets/mark_dialog.h"
#include "widgets/travel_time_plot.h"
#include "widgets/travel_time_words.h"

namespace strikeplate {

void TravelTimePlot::assignChosen(int layer) {
  const std::vector<TraceOfShot> traces = chosen();
  if (!scene_.survey || traces.empty()) {
    return;
  }
  const Edit edit = assignTraces(*scene_.survey, traces, layer);
  if (!edit.changes.empty()) {
    emit proposed(edit, Phase::Commit);
  }
}

void TravelTimePlot::deleteChosen() {
  std::vector<PickChange> changes;
  for (const TraceOfShot& t : chosen()) {
    if (scene_.survey->shots[static_cast<std::size_t>(t.shot)].traces[static_cast<std::size_t>(t.trace)].pick) {
      changes.push_back({t.shot, t.trace, std::nullopt, std::nullopt});
    }
  }
  if (!changes.empty()) {
    const std::string text =
        changes.size() == 1 ? "Delete a pick" : "Delete " + std::to_string(changes.size()) + " picks";
    emit proposed(edits::setPicks(*scene_.survey, changes, text), Phase::Commit);
    marked_.clear();
  }
}

void TravelTimePlot::abandon() {
  band_->hide();
  lasso_->hide();
  drawn_.clear();
  if (drag_) {
    drag_.reset();
    emit proposed({}, Phase::Abandon);
  } else if (!marked_.empty()) {
    marked_.clear();
    draw();
  }
}

int TravelTimePlot::selectedArrival() const {
  const Selection& s = scene_.selection;
  return scene_.interpretation && s.shot >= 0 && s.trace >= 0 ? scene_.interpretation->arrivalOf(s.shot, s.trace)
                                                              : -1;
}

void TravelTimePlot::proposeIfAny(const Edit& edit, const QString& otherwise) {
  if (edit.changes.empty()) {
    emit hint(otherwise);
  } else {
    emit proposed(edit, Phase::Commit);
  }
}

void TravelTimePlot::splitBranchHere() {
  const int arrival = selectedArrival();
  proposeIfAny(arrival < 0 ? Edit{} : splitBranch(*scene_.survey, *scene_.interpretation, arrival),
               tr("Select a pick behind the first of its branch; the branch is split there."));
}

void TravelTimePlot::mergeBranchHere() {
  const int arrival = selectedArrival();
  proposeIfAny(arrival < 0 ? Edit{} : mergeBranch(*scene_.survey, *scene_.interpretation, arrival),
               tr("Select a pick of a branch that has another one beyond it; the two are merged."));
}

void TravelTimePlot::dissolveBranchHere() {
  const int arrival = selectedArrival();
  proposeIfAny(arrival < 0 ? Edit{} : dissolveBranch(*scene_.survey, *scene_.interpretation, arrival),
               tr("Select a pick of a branch that was assigned by hand; the program assigns it again."));
}

void TravelTimePlot::slideFarEnd(int by) {
  const int arrival = selectedArrival();
  const Branch* branch = arrival < 0 ? nullptr : branchOf(*scene_.interpretation, arrival);
  if (branch == nullptr) {
    emit hint(tr("Select a pick of the branch whose end is to slide."));
    return;
  }
  const TravelTimes& times = scene_.interpretation->times;
  const BranchEnd end{branch->shot, branch->side, branch->layer, true, branch->arrivals.back()};
  // The arrivals of a shot lie by rising x, so the next one outwards is the next to the side of the branch.
  const int to = end.arrival + by * branch->side;
  const bool there = to >= 0 && to < static_cast<int>(times.arrivals.size()) &&
                     times.arrivals[static_cast<std::size_t>(to)].shot == branch->shot;
  proposeIfAny(there ? slideBranchEnd(*scene_.survey, times, end, to) : Edit{},
               tr("The end of this branch cannot slide any farther."));
}

void TravelTimePlot::askMark(MarkKind kind, double proposed) {
  if (scene_.selection.shot < 0) {
    emit hint(tr("Select a shot first."));
    return;
  }
  auto* dialog = new MarkDialog(*scene_.survey, scene_.selection.shot, kind, proposed, this);
  dialog->setAttribute(Qt::WA_DeleteOnClose);
  connect(dialog, &QDialog::accepted, this, [this, dialog] { proposeIfAny(dialog->edit(), {}); });
  dialog->open();
}

void TravelTimePlot::keepShot() {
  const int shot = scene_.selection.shot;
  if (shot >= 0 && display_.kept.erase(shot) == 0) {
    display_.kept.insert(shot);
  }
  draw();
  emit hint(display_.kept.contains(shot) ? tr("Shot %1 stays in view when not all shots are shown.").arg(shot + 1)
                                         : tr("Shot %1 no longer stays in view.").arg(shot + 1));
}

void TravelTimePlot::nextSide() {
  display_.side = display_.side == 0 ? 1 : display_.side > 0 ? -1 : 0;
  draw();
  emit hint(display_.side == 0  ? tr("Forward and reverse curves alike.")
            : display_.side > 0 ? tr("Forward curves stand out: geophones beyond the shot.")
                                : tr("Reverse curves stand out: geophones before the shot."));
}

}  // namespace strikeplate
