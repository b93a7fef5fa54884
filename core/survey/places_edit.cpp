#include "core/survey/places_edit.h"

#include <algorithm>
#include <cassert>
#include <numeric>
#include <utility>

#include "core/base/units.h"
#include "core/survey/assemble.h"

namespace strikeplate {
namespace {

// Indices in the order of rising x.
template <class Place>
std::vector<int> risingOrder(const std::vector<Place>& places) {
  std::vector<int> order(places.size());
  std::iota(order.begin(), order.end(), 0);
  std::stable_sort(order.begin(), order.end(), [&](int a, int b) {
    return places[static_cast<std::size_t>(a)].x < places[static_cast<std::size_t>(b)].x;
  });
  return order;
}

bool asNumbered(const std::vector<int>& order) {
  return std::is_sorted(order.begin(), order.end());
}

// Picks are not part of the change, so they are not kept twice.
ShotChange moved(Shot shot, int index, const ShotPoint& point) {
  for (ShotTrace& trace : shot.traces) {
    trace.pick.reset();
  }
  ShotChange change{index, shot, std::move(shot)};
  change.after.point = point;
  return change;
}

// The survey with everything at its new place and numbered anew along the line.
Survey renumbered(const Survey& survey, const LinePlaces& places, const std::vector<int>& geophoneOrder,
                  const std::vector<int>& shotOrder) {
  Survey after = survey;
  std::vector<int> newNumber(geophoneOrder.size());
  for (std::size_t i = 0; i < geophoneOrder.size(); ++i) {
    const auto old = static_cast<std::size_t>(geophoneOrder[i]);
    newNumber[old] = static_cast<int>(i);
    after.geophones[i] = places.geophones[old];
  }
  for (std::size_t i = 0; i < shotOrder.size(); ++i) {
    const auto old = static_cast<std::size_t>(shotOrder[i]);
    after.shots[i] = survey.shots[old];
    after.shots[i].point = places.shots[old];
    for (ShotTrace& trace : after.shots[i].traces) {
      trace.geophone = newNumber[static_cast<std::size_t>(trace.geophone)];
    }
  }
  after.boreholes = places.boreholes;
  return after;
}

}  // namespace

LinePlaces placesOf(const Survey& survey) {
  LinePlaces places{survey.geophones, {}, survey.boreholes};
  for (const Shot& shot : survey.shots) {
    places.shots.push_back(shot.point);
  }
  return places;
}

LinePlaces reversed(LinePlaces places) {
  if (places.geophones.empty()) {
    return places;
  }
  const auto [first, last] = std::minmax_element(places.geophones.begin(), places.geophones.end(),
                                                 [](const Geophone& a, const Geophone& b) { return a.x < b.x; });
  const double sum = first->x + last->x;
  const auto turn = [sum](auto& all) {
    for (auto& place : all) {
      place.x = sum - place.x;
    }
  };
  turn(places.geophones);
  turn(places.shots);
  turn(places.boreholes);
  return places;
}

Result<Edit> placesEdit(const Survey& survey, const LinePlaces& places, std::string text) {
  assert(places.geophones.size() == survey.geophones.size() && places.shots.size() == survey.shots.size());
  const std::vector<int> geophoneOrder = risingOrder(places.geophones);
  for (std::size_t i = 1; i < geophoneOrder.size(); ++i) {
    const double before = places.geophones[static_cast<std::size_t>(geophoneOrder[i - 1])].x;
    if (places.geophones[static_cast<std::size_t>(geophoneOrder[i])].x - before <= kSamePlace) {
      return Failure{"Geophones " + std::to_string(geophoneOrder[i - 1] + 1) + " and " +
                     std::to_string(geophoneOrder[i] + 1) + " both stand at " +
                     Units{survey.settings.feet}.length(before, 2) + "; give one of them its own position."};
    }
  }
  Edit edit{std::move(text), {}};
  const std::vector<int> shotOrder = risingOrder(places.shots);
  if (!asNumbered(geophoneOrder) || !asNumbered(shotOrder)) {
    edit.changes.emplace_back(ContentChange{survey, renumbered(survey, places, geophoneOrder, shotOrder)});
    return edit;
  }
  if (places.geophones != survey.geophones) {
    edit.changes.emplace_back(GeophonesChange{survey.geophones, places.geophones});
  }
  for (std::size_t s = 0; s < places.shots.size(); ++s) {
    if (places.shots[s] != survey.shots[s].point) {
      edit.changes.emplace_back(moved(survey.shots[s], static_cast<int>(s), places.shots[s]));
    }
  }
  if (places.boreholes != survey.boreholes) {
    edit.changes.emplace_back(BoreholesChange{survey.boreholes, places.boreholes});
  }
  return edit;
}

}  // namespace strikeplate
