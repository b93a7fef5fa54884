#include "core/record/oddity_list.h"

#include <cassert>
#include <utility>

namespace strikeplate {

bool OddityList::isFull() {
  constexpr std::size_t kMost = 50;
  more_ = more_ || items_.size() >= kMost;
  return more_;
}

void OddityList::add(std::string sentence, Kind kind) {
  for (const Item& item : items_) {
    if (item.traces.empty() && item.text == sentence) {
      return;
    }
  }
  if (!isFull()) {
    items_.push_back({std::move(sentence), {}, kind});
  }
}

void OddityList::addForTrace(int trace, const std::string& words, Kind kind) {
  auto place = itemOfWords_.find(words);
  if (place == itemOfWords_.end()) {
    if (isFull()) {
      return;
    }
    place = itemOfWords_.emplace(words, items_.size()).first;
    items_.push_back({words, {}, kind});
  }
  std::vector<int>& traces = items_[place->second].traces;
  if (traces.empty() || traces.back() != trace) {
    traces.push_back(trace);
  }
}

std::string OddityList::Item::sentence() const {
  return traces.empty() ? text : tracesListed(traces) + ": " + text + ".";
}

std::vector<std::string> OddityList::losses() const {
  std::vector<std::string> out;
  for (const Item& item : items_) {
    if (item.kind == Kind::Lost) {
      out.push_back(item.sentence());
    }
  }
  return out;
}

std::vector<std::string> OddityList::sentences() const {
  std::vector<std::string> out;
  out.reserve(items_.size());
  for (const Item& item : items_) {
    out.push_back(item.sentence());
  }
  if (more_) {
    out.push_back("More is odd about this file; only the first " + std::to_string(items_.size()) +
                  " things are listed.");
  }
  return out;
}

std::string listed(const std::vector<int>& numbers) {
  assert(!numbers.empty());
  constexpr std::size_t kMostRuns = 20;
  std::vector<std::string> runs;
  for (std::size_t i = 0; i < numbers.size();) {
    if (runs.size() >= kMostRuns) {
      runs.push_back(std::to_string(numbers.size() - i) + " more");
      break;
    }
    std::size_t j = i;
    while (j + 1 < numbers.size() && numbers[j + 1] == numbers[j] + 1) {
      ++j;
    }
    if (j >= i + 2) {
      runs.push_back(std::to_string(numbers[i]) + " to " + std::to_string(numbers[j]));
    } else {
      for (std::size_t k = i; k <= j; ++k) {
        runs.push_back(std::to_string(numbers[k]));
      }
    }
    i = j + 1;
  }
  std::string text = runs[0];
  for (std::size_t i = 1; i < runs.size(); ++i) {
    text += (i + 1 == runs.size() ? " and " : ", ") + runs[i];
  }
  return text;
}

std::string tracesListed(const std::vector<int>& numbers) {
  return (numbers.size() == 1 ? "Trace " : "Traces ") + listed(numbers);
}

}  // namespace strikeplate
