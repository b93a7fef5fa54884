#pragma once

#include <atomic>
#include <condition_variable>
#include <memory>
#include <mutex>
#include <optional>
#include <thread>

#include <QObject>

#include "core/survey/interpretation.h"

namespace strikeplate {

using SurveyPtr = std::shared_ptr<const Survey>;
using InterpretationPtr = std::shared_ptr<const Interpretation>;

/// Runs `interpret` off the GUI thread. The newest request wins: one that is overtaken while it waits is dropped, and
/// a full interpretation that is overtaken while it runs is stopped.
class Interpreter : public QObject {
  Q_OBJECT
 public:
  enum class Kind {
    Live,  ///< hyperparameters held, for every step of a drag
    Full,  ///< a live answer at once if there is something to start from, then the full one
  };

  explicit Interpreter(QObject* parent = nullptr);
  ~Interpreter() override;
  Interpreter(const Interpreter&) = delete;
  Interpreter& operator=(const Interpreter&) = delete;

  /// Asks for an interpretation of `survey`. `before` may be null; a live answer starts from it.
  void request(SurveyPtr survey, InterpretationPtr before, Kind kind);
  /// True while anything is asked for and not yet answered in full.
  [[nodiscard]] bool busy() const;

 signals:
  /// In the thread of this object. `survey` is the one that was asked about.
  void ready(strikeplate::SurveyPtr survey, strikeplate::InterpretationPtr interpretation, bool full);
  /// Of a full interpretation, 0 to 1.
  void progressed(double fraction);

 private:
  struct Request {
    SurveyPtr survey;
    InterpretationPtr before;
    Kind kind = Kind::Live;
    quint64 number = 0;
  };

  void work(const std::stop_token& stop);
  void answer(Request request);
  void post(const Request& request, InterpretationPtr interpretation, bool full);

  mutable std::mutex mutex_;
  std::condition_variable_any wake_;
  std::optional<Request> waiting_;
  std::atomic<quint64> newest_{0};
  std::atomic<bool> running_{false};
  std::jthread thread_;  // last, so that it ends before what it uses
};

}  // namespace strikeplate
