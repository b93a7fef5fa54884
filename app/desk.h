#pragma once

#include <memory>
#include <optional>
#include <vector>

#include <QObject>
#include <QString>

#include "app/interpreter.h"
#include "core/base/result.h"
#include "core/survey/edit.h"
#include "core/survey/survey_file.h"
#include "widgets/scene.h"

namespace strikeplate {

/// The one object that changes the survey. Views propose edits; the desk applies each, writes it to the survey file,
/// and hands the new survey, and the new interpretation when it is ready, to every view.
class Desk : public QObject {
  Q_OBJECT
 public:
  explicit Desk(QObject* parent = nullptr);
  ~Desk() override;

  /// Starts a new survey in a file of its own at `path`; the one before stays as it is on disk.
  Outcome begin(const Survey& survey, const QString& path);
  /// Opens a survey file with its history.
  Outcome open(const QString& path);
  /// Copies the survey with its history to `path` and goes on there.
  Outcome saveAs(const QString& path);

  [[nodiscard]] const Scene& scene() const { return scene_; }
  [[nodiscard]] const Survey& survey() const { return *committed_; }
  [[nodiscard]] QString path() const { return path_; }
  /// Edits that stand, without those taken back.
  [[nodiscard]] int editCount() const;
  [[nodiscard]] bool canUndo() const { return file_ && file_->history().canUndo(); }
  [[nodiscard]] bool canRedo() const { return file_ && file_->history().canRedo(); }
  [[nodiscard]] QString undoText() const;
  [[nodiscard]] QString redoText() const;
  /// True while the interpretation shown is not the full one of the survey shown.
  [[nodiscard]] bool interpreting() const { return !interpretationIsFull_; }

 public slots:
  void propose(const strikeplate::Edit& edit, strikeplate::Phase phase);
  void commit(const strikeplate::Edit& edit) { propose(edit, Phase::Commit); }
  void undo();
  void redo();
  void select(const strikeplate::Selection& selection);
  void point(double x);

 signals:
  void sceneChanged();  ///< survey, gathers or interpretation
  void selectionChanged();
  /// Another line of the job came to hand; sceneChanged() follows.
  void lineChanged();
  void plumbLineChanged(double x);  ///< m; NaN when the pointer has left
  void historyChanged();
  void interpretationProgressed(double fraction);
  /// An edit could not be written; the survey shown keeps it. One sentence.
  void notSaved(const QString& sentence);

 private:
  void takeOver(SurveyFile file, const QString& path);
  void afterHistoryMoved(const Outcome& written);
  void showSurvey(std::shared_ptr<const Survey> survey, Interpreter::Kind kind);
  void refreshGathers(const Survey& survey);
  void takeInterpretation(const SurveyPtr& survey, const InterpretationPtr& interpretation, bool full);
  void keepSelectionValid();
  void report(const Outcome& outcome);

  std::unique_ptr<SurveyFile> file_;
  QString path_;
  std::shared_ptr<const Survey> committed_;
  Scene scene_;
  bool interpretationIsFull_ = false;
  Interpreter interpreter_;
};

}  // namespace strikeplate
