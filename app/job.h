#pragma once

#include <atomic>
#include <functional>
#include <thread>
#include <utility>

#include <QMetaObject>
#include <QObject>

#include "core/base/progress.h"

namespace strikeplate {

/// One long piece of work off the GUI thread, with progress and cancel. Starting another waits for the one that runs,
/// which is told to stop.
class Job : public QObject {
  Q_OBJECT
 public:
  using QObject::QObject;
  ~Job() override { cancel(); }
  Job(const Job&) = delete;
  Job& operator=(const Job&) = delete;

  /// Runs work(progress) in a thread of its own, then done(result) in the thread of this object, unless cancelled.
  template <class Work, class DoneWith>
  void start(Work work, DoneWith done) {
    cancel();
    if (thread_.joinable()) {
      thread_.join();
    }
    cancelled_ = false;
    running_ = true;
    thread_ = std::jthread([this, work = std::move(work), done = std::move(done)]() mutable {
      auto result = work(Progress([this](double fraction) {
        QMetaObject::invokeMethod(
            this, [this, fraction] { emit progressed(fraction); }, Qt::QueuedConnection);
        return !cancelled_;
      }));
      QMetaObject::invokeMethod(
          this,
          [this, result = std::move(result), done = std::move(done)]() mutable {
            running_ = false;
            if (!cancelled_) {
              done(std::move(result));
            }
            emit finished();
          },
          Qt::QueuedConnection);
    });
  }

  void cancel() { cancelled_ = true; }
  [[nodiscard]] bool running() const { return running_; }

 signals:
  void progressed(double fraction);
  void finished();

 private:
  std::atomic<bool> cancelled_{false};
  std::atomic<bool> running_{false};
  std::jthread thread_;
};

}  // namespace strikeplate
