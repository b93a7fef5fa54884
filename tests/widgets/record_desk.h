#pragma once

#include <memory>
#include <vector>

#include <QApplication>
#include <QObject>

#include "core/survey/edit.h"
#include "core/survey/gathers.h"
#include "widgets/record_view.h"

namespace strikeplate::testing {

/// What the workstation does for a view, in small: shows the scene, carries proposed edits out, keeps count of them.
class RecordDesk : public QObject {
 public:
  explicit RecordDesk(const Survey& survey, int shot = 0) : committed(std::make_shared<Survey>(survey)) {
    scene.gathers = std::make_shared<std::vector<Gather>>(gathersOf(survey));
    scene.selection = {shot, -1, 0};
    scene.survey = committed;
    view.resize(720, 560);
    view.showScene(scene);
    view.show();
    connect(&view, &View::proposed, this, [this](const Edit& edit, Phase phase) { take(edit, phase); });
    connect(&view, &View::selectionWanted, this, [this](const Selection& selection) {
      scene.selection = selection;
      view.showSelection(selection);
    });
    connect(&view, &View::hint, this, [this](const QString& text) { hint = text; });
    connect(&view, &View::plumbLineWanted, this, [this](double x) {
      plumbLine = x;
      view.showPlumbLine(x);
    });
  }

  void showInterpretation(const Interpretation& interpretation) {
    scene.interpretation = std::make_shared<Interpretation>(interpretation);
    view.showScene(scene);
  }

  [[nodiscard]] const ShotTrace& trace(int t) const {
    return scene.survey->shots[static_cast<std::size_t>(scene.selection.shot)].traces[static_cast<std::size_t>(t)];
  }
  [[nodiscard]] const Gather& gather() const {
    return (*scene.gathers)[static_cast<std::size_t>(scene.selection.shot)];
  }
  /// Where a trace at a recorder time lies on the widget.
  [[nodiscard]] QPoint at(int t, double time) const {
    return QPointF(view.axes().xOf(t), view.axes().yOf(t, time)).toPoint();
  }

  std::shared_ptr<const Survey> committed;
  Scene scene;
  std::vector<Edit> edits;  ///< committed
  int live = 0, abandoned = 0;
  QString hint;
  double plumbLine = Estimate::kNaN;
  RecordView view;

 private:
  void take(const Edit& edit, Phase phase) {
    live += phase == Phase::Live ? 1 : 0;
    abandoned += phase == Phase::Abandon ? 1 : 0;
    if (phase == Phase::Commit) {
      edits.push_back(edit);
      committed = std::make_shared<Survey>(applied(*committed, edit));
    }
    scene.survey = phase == Phase::Live ? std::make_shared<Survey>(applied(*committed, edit)) : committed;
    view.showScene(scene);
  }
};

}  // namespace strikeplate::testing
