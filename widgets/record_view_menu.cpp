// What the record view offers at a right click.
#include <QMenu>

#include "widgets/record_pick.h"
#include "widgets/record_view.h"

namespace strikeplate {
namespace {

QString keyOf(RecordCommand command) {
  for (const RecordKey& key : recordKeys()) {
    if (key.command == command) {
      return key.keyText();
    }
  }
  return {};
}

}  // namespace

QMenu* RecordView::makeMenu(int trace) {
  auto* menu = new QMenu(this);
  const auto command = [&](const QString& text, RecordCommand what) {
    QAction* action = menu->addAction(text + '\t' + keyOf(what));
    connect(action, &QAction::triggered, this, [this, what] { perform(what); });
    return action;
  };
  const int of = scene_.selection.shot;
  if (trace >= 0) {
    const ShotTrace& here = shot().traces[static_cast<std::size_t>(trace)];
    command(tr("Pick trace %1 by its signal").arg(trace + 1), RecordCommand::PickBySignal)
        ->setEnabled(here.state != TraceState::Dead);
    const bool many = marked_.first >= 0 && marked_.first < marked_.second;
    if (many || here.pick) {
      command(many ? tr("Delete picks of traces %1 to %2").arg(marked_.first + 1).arg(marked_.second + 1)
                   : tr("Delete pick"),
              RecordCommand::DeletePick);
      QMenu* layers = menu->addMenu(tr("Layer"));
      for (int layer = 0; layer <= 6; ++layer) {
        const auto what = static_cast<RecordCommand>(static_cast<int>(RecordCommand::Layer0) + layer);
        QAction* action = layers->addAction((layer == 0 ? tr("As the program finds") : tr("Layer %1").arg(layer)) +
                                            '\t' + keyOf(what));
        action->setCheckable(true);
        action->setChecked(here.pick && here.pick->layer == layer);
        connect(action, &QAction::triggered, this, [this, what] { perform(what); });
      }
    }
    menu->addSeparator();
    for (const auto& [state, text] :
         {std::pair(TraceState::Live, tr("Trace is live")), std::pair(TraceState::Noisy, tr("Trace is noisy")),
          std::pair(TraceState::Reversed, tr("Trace is reversed")),
          std::pair(TraceState::Dead, tr("Trace is dead"))}) {
      QAction* action = menu->addAction(text);
      action->setCheckable(true);
      action->setChecked(here.state == state);
      connect(action, &QAction::triggered, this, [this, of, trace, state = state] {
        if (of < static_cast<int>(scene_.survey->shots.size()) && of == scene_.selection.shot &&
            trace < axes_.count() && shot().traces[static_cast<std::size_t>(trace)].state != state) {
          commit(edits::setTraceState(*scene_.survey, of, trace, state));
        }
      });
    }
    menu->addSeparator();
  }
  connect(menu->addAction(tr("Pick this shot automatically")), &QAction::triggered, this,
          [this, of] { emit pickShotWanted(of); });
  connect(menu->addAction(tr("Delete all picks of this shot")), &QAction::triggered, this, [this, of] {
    if (of == scene_.selection.shot && gather() != nullptr) {
      commit(deletedPicks(*scene_.survey, of, 0, axes_.count() - 1));
    }
  });
  menu->addSeparator();
  command(tr("First breaks of all traces"), RecordCommand::ZoomHome);
  command(tr("Whole record"), RecordCommand::ZoomAll);
  command(tr("Magnifier"), RecordCommand::Magnifier);
  return menu;
}

}  // namespace strikeplate
