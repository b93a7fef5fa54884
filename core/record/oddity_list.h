#pragma once

#include <map>
#include <string>
#include <vector>

namespace strikeplate {

/// Collects what is odd about a file, so that what holds for many traces is said once. Of a wreck that has something
/// new wrong at every trace only the first fifty things are kept.
class OddityList {
 public:
  /// Whether something is merely odd, or part of the file is lost by it.
  enum class Kind { Odd, Lost };

  /// Something about the whole file: one sentence.
  void add(std::string sentence, Kind kind = Kind::Odd);

  /// Something about one trace (number in the file, from 1), in words that go on after "Trace 3" or "Traces 3 to 7",
  /// such as "without a receiver location".
  void addForTrace(int trace, const std::string& words, Kind kind = Kind::Odd);

  /// One sentence for each thing, in the order in which they were first met.
  [[nodiscard]] std::vector<std::string> sentences() const;

  /// Those of them by which part of the file is lost.
  [[nodiscard]] std::vector<std::string> losses() const;

 private:
  struct Item {
    std::string text;
    std::vector<int> traces;  // empty: the whole file
    Kind kind = Kind::Odd;

    [[nodiscard]] std::string sentence() const;
  };
  bool isFull();

  std::vector<Item> items_;
  bool more_ = false;
  std::map<std::string, std::size_t> itemOfWords_;
};

/// Numbers in words: "3", "3 and 5", "3, 5 and 7 to 9"; beyond twenty runs of numbers the rest is counted. Needs at
/// least one number; they are rising.
std::string listed(const std::vector<int>& numbers);

/// "Trace 3" or "Traces 3, 5 and 7 to 9".
std::string tracesListed(const std::vector<int>& numbers);

}  // namespace strikeplate
