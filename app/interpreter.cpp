#include "app/interpreter.h"

#include <utility>

#include <QMetaObject>

namespace strikeplate {

Interpreter::Interpreter(QObject* parent)
    : QObject(parent), thread_([this](const std::stop_token& stop) { work(stop); }) {}

Interpreter::~Interpreter() {
  ++newest_;  // what runs is no longer wanted
  thread_.request_stop();
  wake_.notify_all();
}

void Interpreter::request(SurveyPtr survey, InterpretationPtr before, Kind kind) {
  {
    const std::lock_guard lock(mutex_);
    waiting_ = Request{std::move(survey), std::move(before), kind, ++newest_};
  }
  wake_.notify_one();
}

bool Interpreter::busy() const {
  const std::lock_guard lock(mutex_);
  return waiting_.has_value() || running_;
}

void Interpreter::work(const std::stop_token& stop) {
  while (!stop.stop_requested()) {
    std::optional<Request> request;
    {
      std::unique_lock lock(mutex_);
      wake_.wait(lock, stop, [this] { return waiting_.has_value(); });
      request.swap(waiting_);
      running_ = request.has_value();
    }
    if (request) {
      answer(std::move(*request));
      running_ = false;
    }
  }
}

void Interpreter::answer(Request request) {
  if (request.before) {
    post(request, std::make_shared<Interpretation>(interpretLive(*request.survey, *request.before)), false);
    if (request.kind == Kind::Live) {
      return;
    }
  }
  const auto wanted = [this, number = request.number](double fraction) {
    if (newest_ != number) {
      return false;
    }
    QMetaObject::invokeMethod(
        this, [this, fraction] { emit progressed(fraction); }, Qt::QueuedConnection);
    return true;
  };
  auto full = std::make_shared<Interpretation>(interpret(*request.survey, wanted));
  if (newest_ == request.number) {
    post(request, std::move(full), true);
  }
}

void Interpreter::post(const Request& request, InterpretationPtr interpretation, bool full) {
  QMetaObject::invokeMethod(
      this,
      [this, survey = request.survey, answer = std::move(interpretation), full] { emit ready(survey, answer, full); },
      Qt::QueuedConnection);
}

}  // namespace strikeplate
