// The menu at the right button of the travel-time plot: what fits where it was opened.
#include <cmath>

#include <QMenu>
#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/branch_actions.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {
namespace {

constexpr double kReach = 14.0;  // px
constexpr int kMostLayer = 6;

}  // namespace

void TravelTimePlot::menuAt(const QPoint& position) {
  const int arrival = arrivalAt(position, kReach);
  if (arrival >= 0) {
    const Arrival& a = scene_.interpretation->times.arrivals[static_cast<std::size_t>(arrival)];
    if (!marked_.contains({a.shot, a.trace})) {
      marked_.clear();
      emit selectionWanted({a.shot, a.trace, a.layer});
    }
  }
  auto* menu = new QMenu(this);
  menu->setAttribute(Qt::WA_DeleteOnClose);
  const auto count = static_cast<int>(chosen().size());
  if (count > 0) {
    const QString picks = count == 1 ? tr("this pick") : tr("%1 picks").arg(count);
    QMenu* layers = menu->addMenu(tr("&Give %1 to").arg(picks));
    for (int layer = 1; layer <= kMostLayer; ++layer) {
      layers->addAction(tr("Layer &%1").arg(layer), this, [this, layer] { assignChosen(layer); });
    }
    layers->addAction(tr("Let the &program assign"), this, [this] { assignChosen(0); });
    menu->addAction(tr("De&lete %1").arg(picks), this, &TravelTimePlot::deleteChosen);
    menu->addSeparator();
  }
  fillBranchMenu(*menu, selectedArrival());
  fillShotMenu(*menu, position);
  menu->popup(plot().mapToGlobal(position));
}

void TravelTimePlot::fillBranchMenu(QMenu& menu, int arrival) {
  if (arrival < 0) {
    return;
  }
  const Survey& survey = *scene_.survey;
  const Interpretation& interpretation = *scene_.interpretation;
  if (!splitBranch(survey, interpretation, arrival).changes.empty()) {
    menu.addAction(tr("&Split the branch here"), this, &TravelTimePlot::splitBranchHere);
  }
  if (!mergeBranch(survey, interpretation, arrival).changes.empty()) {
    menu.addAction(tr("&Merge with the branch beyond"), this, &TravelTimePlot::mergeBranchHere);
  }
  if (!dissolveBranch(survey, interpretation, arrival).changes.empty()) {
    menu.addAction(tr("&Dissolve the branch"), this, &TravelTimePlot::dissolveBranchHere);
  }
  if (branchOf(interpretation, arrival) != nullptr) {
    menu.addAction(tr("Branch end one pick &out"), this, [this] { slideFarEnd(1); });
    menu.addAction(tr("Branch end one pick &in"), this, [this] { slideFarEnd(-1); });
  }
  menu.addSeparator();
}

void TravelTimePlot::fillShotMenu(QMenu& menu, const QPoint& position) {
  const int shot = scene_.selection.shot;
  if (shot >= 0 && !display_.residuals) {
    const Units units{scene_.survey->settings.feet};
    const double x = units.toMetres(plot().xAxis->pixelToCoord(position.x()));
    const double offset = std::abs(x - scene_.survey->shots[static_cast<std::size_t>(shot)].point.x);
    const double time = 1e-3 * (plot().yAxis->pixelToCoord(position.y()) + display_.reductionAt(offset));
    menu.addAction(tr("Critical distance of shot %1 here...").arg(shot + 1), this,
                   [this, offset] { askMark(MarkKind::CriticalDistance, offset); });
    menu.addAction(tr("Reflection time at zero offset of shot %1 here...").arg(shot + 1), this,
                   [this, time] { askMark(MarkKind::ReflectionTime, time); });
    for (const ShotMark& mark : scene_.survey->shots[static_cast<std::size_t>(shot)].marks) {
      menu.addAction(
          mark.kind == MarkKind::CriticalDistance ? tr("Remove the critical distance marked by hand")
                                                  : tr("Remove the reflection time marked by hand"),
          this, [this, shot, kind = mark.kind] { proposeIfAny(edits::removeMark(*scene_.survey, shot, kind), {}); });
    }
    menu.addSeparator();
  }
  if (shot >= 0) {
    QAction* keep = menu.addAction(tr("&Keep shot %1 in view").arg(shot + 1), this, &TravelTimePlot::keepShot);
    keep->setCheckable(true);
    keep->setChecked(display_.kept.contains(shot));
  }
  const auto addSwitch = [&](const QString& text, bool TravelTimeDisplay::*what) {
    QAction* action = menu.addAction(text);
    action->setCheckable(true);
    action->setChecked(display_.*what);
    connect(action, &QAction::toggled, this, [this, what](bool on) {
      TravelTimeDisplay changed = display_;
      changed.*what = on;
      setDisplay(changed);
    });
  };
  addSwitch(tr("&All shots"), &TravelTimeDisplay::allShots);
  addSwitch(tr("&Reciprocal times"), &TravelTimeDisplay::reciprocals);
  menu.addAction(tr("&Forward, reverse or both stand out"), this, &TravelTimePlot::nextSide);
}

}  // namespace strikeplate
