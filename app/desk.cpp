#include "app/desk.h"

#include <algorithm>
#include <utility>

#include "core/survey/gathers.h"

namespace strikeplate {

Desk::Desk(QObject* parent) : QObject(parent), committed_(std::make_shared<Survey>()) {
  scene_.survey = committed_;
  scene_.gathers = std::make_shared<std::vector<Gather>>();
  connect(&interpreter_, &Interpreter::ready, this, &Desk::takeInterpretation);
  connect(&interpreter_, &Interpreter::progressed, this, &Desk::interpretationProgressed);
}

Desk::~Desk() = default;

Outcome Desk::begin(const Survey& survey, const QString& path) {
  auto file = SurveyFile::create(path.toStdString(), survey);
  if (!file) {
    return file.failure();
  }
  takeOver(std::move(*file), path);
  return Done{};
}

Outcome Desk::open(const QString& path) {
  auto opened = SurveyFile::open(path.toStdString());
  if (!opened) {
    return opened.failure();
  }
  takeOver(std::move(*opened), path);
  return Done{};
}

Outcome Desk::saveAs(const QString& path) {
  if (!file_) {
    return Failure{"There is no survey to save yet; open shot records first."};
  }
  const Outcome saved = file_->saveAs(path.toStdString());
  if (saved) {
    path_ = path;
    emit historyChanged();
  }
  return saved;
}

void Desk::takeOver(SurveyFile file, const QString& path) {
  file_ = std::make_unique<SurveyFile>(std::move(file));
  file_->setAuthor(qEnvironmentVariable("USER").toStdString());
  path_ = path;
  committed_ = std::make_shared<Survey>(file_->survey());
  scene_.interpretation.reset();
  scene_.selection = {committed_->shots.empty() ? -1 : 0, -1, 0};
  scene_.gathers = std::make_shared<std::vector<Gather>>();
  scene_.survey = std::make_shared<Survey>();
  showSurvey(committed_, Interpreter::Kind::Full);
  emit selectionChanged();
  emit historyChanged();
}

int Desk::editCount() const {
  if (!file_) {
    return 0;
  }
  const auto& entries = file_->history().entries();
  return static_cast<int>(std::count_if(entries.begin(), entries.end(),
                                        [](const HistoryEntry& e) { return e.state == EditState::Done; }));
}

QString Desk::undoText() const {
  return canUndo() ? QString::fromStdString(file_->history().undoText()) : QString();
}

QString Desk::redoText() const {
  return canRedo() ? QString::fromStdString(file_->history().redoText()) : QString();
}

void Desk::propose(const Edit& edit, Phase phase) {
  switch (phase) {
    case Phase::Live:
      showSurvey(std::make_shared<Survey>(applied(*committed_, edit)), Interpreter::Kind::Live);
      break;
    case Phase::Abandon:
      showSurvey(committed_, Interpreter::Kind::Full);
      break;
    case Phase::Commit:
      if (file_ && !edit.changes.empty()) {
        afterHistoryMoved(file_->append(edit));
      }
      break;
  }
}

void Desk::undo() {
  if (canUndo()) {
    afterHistoryMoved(file_->undo());
  }
}

void Desk::redo() {
  if (canRedo()) {
    afterHistoryMoved(file_->redo());
  }
}

void Desk::afterHistoryMoved(const Outcome& written) {
  report(written);
  const bool sameLine = committed_->lineAtHand == file_->survey().lineAtHand &&
                        committed_->otherLines.size() == file_->survey().otherLines.size();
  committed_ = std::make_shared<Survey>(file_->survey());
  if (!sameLine) {
    scene_.interpretation.reset();
    scene_.selection = {committed_->shots.empty() ? -1 : 0, -1, 0};
    scene_.gathers = std::make_shared<std::vector<Gather>>();
    scene_.survey = std::make_shared<Survey>();
    emit lineChanged();
  }
  showSurvey(committed_, Interpreter::Kind::Full);
  if (!sameLine) {
    emit selectionChanged();
  }
  emit historyChanged();
}

void Desk::report(const Outcome& outcome) {
  if (!outcome) {
    emit notSaved(QString::fromStdString(outcome.message()));
  }
}

void Desk::select(const Selection& selection) {
  if (selection == scene_.selection) {
    return;
  }
  scene_.selection = selection;
  keepSelectionValid();
  emit selectionChanged();
}

void Desk::point(double x) {
  emit plumbLineChanged(x);
}

void Desk::keepSelectionValid() {
  const auto& shots = scene_.survey->shots;
  Selection& s = scene_.selection;
  s.shot = std::clamp(s.shot, -1, static_cast<int>(shots.size()) - 1);
  const int traces = s.shot < 0 ? 0 : static_cast<int>(shots[static_cast<std::size_t>(s.shot)].traces.size());
  s.trace = std::clamp(s.trace, -1, traces - 1);
}

void Desk::showSurvey(std::shared_ptr<const Survey> survey, Interpreter::Kind kind) {
  refreshGathers(*survey);
  scene_.survey = std::move(survey);
  keepSelectionValid();
  interpretationIsFull_ = false;
  interpreter_.request(scene_.survey, scene_.interpretation, kind);
  emit sceneChanged();
}

void Desk::refreshGathers(const Survey& survey) {
  const auto& old = *scene_.gathers;
  const bool comparable = old.size() == survey.shots.size() && scene_.survey->shots.size() == survey.shots.size();
  const auto samePlaces = [&](std::size_t s) {
    return scene_.survey->shots[s].point == survey.shots[s].point && scene_.survey->geophones == survey.geophones;
  };
  const auto unchanged = [&](std::size_t s) {
    return comparable && samePlaces(s) && sameStack(*scene_.survey, survey, static_cast<int>(s));
  };
  bool allUnchanged = comparable;
  for (std::size_t s = 0; s < survey.shots.size() && allUnchanged; ++s) {
    allUnchanged = unchanged(s);
  }
  if (allUnchanged) {
    return;
  }
  auto fresh = std::make_shared<std::vector<Gather>>();
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    fresh->push_back(unchanged(s) ? old[s] : gatherOf(survey, static_cast<int>(s)));
  }
  scene_.gathers = std::move(fresh);
}

void Desk::takeInterpretation(const SurveyPtr& survey, const InterpretationPtr& interpretation, bool full) {
  // An answer about other records or shots than those shown now would not fit the views' indices.
  if (survey->lineAtHand != scene_.survey->lineAtHand || survey->records != scene_.survey->records ||
      survey->shots.size() != scene_.survey->shots.size() ||
      survey->geophones.size() != scene_.survey->geophones.size()) {
    return;
  }
  scene_.interpretation = interpretation;
  interpretationIsFull_ = full && survey == scene_.survey;
  emit sceneChanged();
}

}  // namespace strikeplate
