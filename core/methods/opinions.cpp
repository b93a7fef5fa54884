#include "core/methods/opinions.h"

#include <cmath>
#include <utility>

#include "core/methods/flat_layers.h"
#include "core/methods/opinion_routes.h"
#include "core/traveltime/branches.h"

namespace strikeplate {
namespace opinion_routes {
namespace {

/// Joins two data of one place by their variances.
Datum joined(const Datum& a, const Datum& b) {
  if (!(a.sigma > 0.0) || !(b.sigma > 0.0)) {
    return a.sigma > 0.0 ? b : a;
  }
  const double wa = 1.0 / (a.sigma * a.sigma), wb = 1.0 / (b.sigma * b.sigma);
  return {(wa * a.value + wb * b.value) / (wa + wb), std::sqrt(1.0 / (wa + wb))};
}

void put(std::vector<std::map<double, Datum>>& table, std::size_t layer, double x, const Datum& datum) {
  if (table.size() <= layer) {
    table.resize(layer + 1);
  }
  const auto [entry, isNew] = table[layer].try_emplace(x, datum);
  if (!isNew) {
    entry->second = joined(entry->second, datum);
  }
}

std::optional<Datum> interpolated(const std::map<double, Datum>& table, double x) {
  if (table.empty()) {
    return std::nullopt;
  }
  const auto after = table.lower_bound(x);
  if (after == table.begin()) {
    return after->second;
  }
  const auto before = std::prev(after);
  if (after == table.end()) {
    return before->second;
  }
  const double part = (x - before->first) / (after->first - before->first);
  return Datum{(1.0 - part) * before->second.value + part * after->second.value,
               std::hypot((1.0 - part) * before->second.sigma, part * after->second.sigma)};
}

}  // namespace

void Surest::offer(Opinion opinion) {
  const auto key = std::make_tuple(opinion.layer, opinion.shot, opinion.x);
  const auto found = best_.find(key);
  if (found == best_.end()) {
    best_.emplace(key, std::move(opinion));
    return;
  }
  const Estimate &old = found->second.depth, &now = opinion.depth;
  if (now.determined && (!old.determined || now.sigma < old.sigma)) {
    found->second = std::move(opinion);
  }
}

void Surest::moveInto(std::vector<Opinion>& opinions) {
  for (auto& [key, opinion] : best_) {
    opinions.push_back(std::move(opinion));
  }
  best_.clear();
}

std::vector<LineFit> linesDownTo(const Evidence& evidence, int shot, int side, int deepest) {
  std::vector<LineFit> lines;
  for (int layer = 1; layer <= deepest; ++layer) {
    const Branch* branch = findBranch(evidence.branches, shot, side, layer);
    if (branch == nullptr || !branch->fit.determined) {
      break;
    }
    lines.push_back(branch->fit);
  }
  return lines;
}

OverburdenModel::OverburdenModel(const Evidence& evidence) {
  for (const Branch& branch : evidence.branches) {
    if (!branch.fit.determined || !(branch.fit.slope > 0.0)) {
      continue;
    }
    const double x = evidence.times.shots[static_cast<std::size_t>(branch.shot)].x;
    put(slowness_, static_cast<std::size_t>(branch.layer - 1), x, {branch.fit.slope, std::sqrt(branch.fit.varSlope)});
    if (branch.layer < 2) {
      continue;
    }
    const auto lines = linesDownTo(evidence, branch.shot, branch.side, branch.layer);
    if (static_cast<int>(lines.size()) < branch.layer) {
      continue;
    }
    const FlatLayers layers = flatLayersFromIntercepts(lines);
    if (layers.determined) {
      put(thickness_, static_cast<std::size_t>(branch.layer - 2), x,
          {layers.thickness.back().value, layers.thickness.back().sigma});
    }
  }
}

std::optional<Overburden> OverburdenModel::above(int layer, double x) const {
  const auto count = static_cast<std::size_t>(layer - 1);
  if (slowness_.size() < count || thickness_.size() + 1 < count) {
    return std::nullopt;
  }
  Overburden above;
  for (std::size_t k = 0; k < count; ++k) {
    const auto slowness = interpolated(slowness_[k], x);
    const auto thickness = k + 1 < count ? interpolated(thickness_[k], x) : Datum{};
    if (!slowness || !thickness) {
      return std::nullopt;
    }
    above.slowness.push_back(*slowness);
    if (k + 1 < count) {
      above.thickness.push_back(*thickness);
    }
  }
  return above;
}

}  // namespace opinion_routes

std::vector<Opinion> secondOpinions(const TravelTimes& times, const std::vector<Branch>& branches) {
  const opinion_routes::Evidence evidence{times, branches};
  std::vector<Opinion> opinions;
  opinion_routes::addLevelLayers(evidence, opinions);
  opinion_routes::addDippingLayers(evidence, opinions);
  const opinion_routes::OverburdenModel overburden(evidence);
  opinion_routes::addStationDepths(evidence, overburden, opinions);
  opinion_routes::addTimeTerms(evidence, overburden, opinions);
  return opinions;
}

}  // namespace strikeplate
