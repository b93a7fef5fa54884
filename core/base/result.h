#pragma once

#include <cassert>
#include <string>
#include <utility>
#include <variant>

namespace strikeplate {

/// Why something a user asked for could not be done: one sentence that says what, where and what to do.
struct Failure {
  std::string message;
};

/// A value, or the reason why there is none. For errors that a user or a file can cause; broken contracts assert.
template <class T>
class Result {
 public:
  Result(T value) : content_(std::move(value)) {}            // NOLINT(google-explicit-constructor)
  Result(Failure failure) : content_(std::move(failure)) {}  // NOLINT(google-explicit-constructor)

  [[nodiscard]] bool ok() const { return std::holds_alternative<T>(content_); }
  explicit operator bool() const { return ok(); }

  /// The value; needs ok().
  [[nodiscard]] const T& value() const& {
    assert(ok());
    return *std::get_if<T>(&content_);
  }
  [[nodiscard]] T& value() & {
    assert(ok());
    return *std::get_if<T>(&content_);
  }
  [[nodiscard]] T&& value() && {
    assert(ok());
    return std::move(*std::get_if<T>(&content_));
  }
  const T& operator*() const& { return value(); }
  T& operator*() & { return value(); }
  const T* operator->() const { return &value(); }
  T* operator->() { return &value(); }

  /// The reason; needs !ok().
  [[nodiscard]] const std::string& message() const {
    assert(!ok());
    return std::get_if<Failure>(&content_)->message;
  }
  [[nodiscard]] Failure failure() const { return Failure{message()}; }

 private:
  std::variant<T, Failure> content_;
};

/// For work that yields nothing but may fail.
struct Done {};
using Outcome = Result<Done>;

}  // namespace strikeplate
