#include "widgets/branch_actions.h"

#include <algorithm>

namespace strikeplate {
namespace {

constexpr int kMostLayer = 6;

const Arrival& at(const Interpretation& interpretation, int arrival) {
  return interpretation.times.arrivals[static_cast<std::size_t>(arrival)];
}

void assign(Edit& edit, const Survey& survey, const Interpretation& interpretation, const std::vector<int>& arrivals,
            int layer) {
  if (arrivals.empty()) {
    return;
  }
  std::vector<int> traces;
  for (const int arrival : arrivals) {
    traces.push_back(at(interpretation, arrival).trace);
  }
  const Edit part = edits::assignLayer(survey, at(interpretation, arrivals.front()).shot, traces, layer);
  edit.changes.insert(edit.changes.end(), part.changes.begin(), part.changes.end());
}

/// The branches of the same shot and side beyond a layer, by rising layer.
std::vector<const Branch*> beyond(const Interpretation& interpretation, const Branch& branch, int layer) {
  std::vector<const Branch*> out;
  for (const Branch& other : interpretation.branches) {
    if (other.shot == branch.shot && other.side == branch.side && other.layer > layer) {
      out.push_back(&other);
    }
  }
  std::sort(out.begin(), out.end(), [](const Branch* a, const Branch* b) { return a->layer < b->layer; });
  return out;
}

std::string nameOf(const Branch& branch) {
  return " the layer " + std::to_string(branch.layer) + " branch, shot " + std::to_string(branch.shot + 1);
}

}  // namespace

const Branch* branchOf(const Interpretation& interpretation, int arrival) {
  for (const Branch& branch : interpretation.branches) {
    if (std::find(branch.arrivals.begin(), branch.arrivals.end(), arrival) != branch.arrivals.end()) {
      return &branch;
    }
  }
  return nullptr;
}

Edit splitBranch(const Survey& survey, const Interpretation& interpretation, int arrival) {
  const Branch* branch = branchOf(interpretation, arrival);
  if (branch == nullptr || branch->arrivals.front() == arrival) {
    return {};
  }
  const auto outer = beyond(interpretation, *branch, branch->layer);
  if ((outer.empty() ? branch->layer : outer.back()->layer) >= kMostLayer) {
    return {};
  }
  Edit edit{"Split" + nameOf(*branch), {}};
  const auto from = std::find(branch->arrivals.begin(), branch->arrivals.end(), arrival);
  assign(edit, survey, interpretation, {from, branch->arrivals.end()}, branch->layer + 1);
  for (const Branch* other : outer) {
    assign(edit, survey, interpretation, other->arrivals, other->layer + 1);
  }
  return edit;
}

Edit mergeBranch(const Survey& survey, const Interpretation& interpretation, int arrival) {
  const Branch* branch = branchOf(interpretation, arrival);
  const auto outer =
      branch != nullptr ? beyond(interpretation, *branch, branch->layer) : std::vector<const Branch*>{};
  if (outer.empty()) {
    return {};
  }
  Edit edit{"Merge" + nameOf(*branch) + ", with the next", {}};
  const int step = outer.front()->layer - branch->layer;
  for (const Branch* other : outer) {
    assign(edit, survey, interpretation, other->arrivals, other->layer - step);
  }
  return edit;
}

Edit dissolveBranch(const Survey& survey, const Interpretation& interpretation, int arrival) {
  const Branch* branch = branchOf(interpretation, arrival);
  if (branch == nullptr || std::none_of(branch->arrivals.begin(), branch->arrivals.end(),
                                        [&](int i) { return at(interpretation, i).layerByHand; })) {
    return {};
  }
  Edit edit{"Dissolve" + nameOf(*branch), {}};
  assign(edit, survey, interpretation, branch->arrivals, 0);
  return edit;
}

}  // namespace strikeplate
