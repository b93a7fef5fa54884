#include "core/line/geometry_checks.h"

#include <algorithm>
#include <cmath>

#include "core/base/numbers.h"
#include "core/record/oddity_list.h"

namespace strikeplate {
namespace {

constexpr double kSamePlace = 0.01;  // m

std::string metres(double value) {
  return fixed(value, 2) + " m";
}

double medianOf(std::vector<double> values) {
  const auto half = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
  std::nth_element(values.begin(), half, values.end());
  return *half;
}

// Differences between neighbours that do not stand at one place.
std::vector<double> spacingsOf(const std::vector<Geophone>& sorted) {
  std::vector<double> spacings;
  for (std::size_t i = 1; i < sorted.size(); ++i) {
    if (sorted[i].x - sorted[i - 1].x > kSamePlace) {
      spacings.push_back(sorted[i].x - sorted[i - 1].x);
    }
  }
  return spacings;
}

void checkSpacing(const std::vector<Geophone>& sorted, double usual, std::vector<std::string>& out) {
  constexpr double kAlike = 0.1;
  const std::vector<double> spacings = spacingsOf(sorted);
  const auto alike = std::count_if(spacings.begin(), spacings.end(),
                                   [&](double s) { return std::abs(s - usual) <= kAlike * usual; });
  const bool regular = spacings.size() >= 3 && 3 * static_cast<std::size_t>(alike) >= 2 * spacings.size();
  for (std::size_t i = 1; i < sorted.size(); ++i) {
    const double spacing = sorted[i].x - sorted[i - 1].x;
    if (spacing <= kSamePlace) {
      out.push_back("Two geophones stand at " + metres(sorted[i].x) + "; check their positions.");
    } else if (regular && (spacing < 0.6 * usual || spacing > 1.7 * usual)) {
      out.push_back("Between the geophones at " + metres(sorted[i - 1].x) + " and " + metres(sorted[i].x) +
                    " the spacing is " + metres(spacing) + ", elsewhere " + metres(usual) +
                    "; check whether one is missing or misplaced.");
    }
  }
}

void checkElevations(const std::vector<Geophone>& sorted, double usual, std::vector<std::string>& out) {
  constexpr double kLeastSpike = 0.5;
  for (std::size_t i = 1; i + 1 < sorted.size(); ++i) {
    const Geophone& left = sorted[i - 1];
    const Geophone& right = sorted[i + 1];
    if (right.x - left.x <= kSamePlace) {
      continue;
    }
    const double f = (sorted[i].x - left.x) / (right.x - left.x);
    const double spike = sorted[i].elevation - (left.elevation + f * (right.elevation - left.elevation));
    // Beside a spike its neighbours bend half as much the other way; only the spike itself is named.
    const bool own = std::abs(spike) > kLeastSpike && std::abs(spike) > 0.5 * usual &&
                     std::abs(right.elevation - left.elevation) < std::abs(spike);
    if (own) {
      out.push_back("The geophone at " + metres(sorted[i].x) + " stands " + metres(std::abs(spike)) +
                    (spike > 0.0 ? " above" : " below") + " the line between its neighbours; check its elevation.");
    }
  }
}

void checkShot(const ShotPoint& shot, const std::vector<Geophone>& sorted, double usual, const Ground& ground,
               std::vector<std::string>& out) {
  const auto nearest = std::min_element(sorted.begin(), sorted.end(), [&](const Geophone& a, const Geophone& b) {
    return std::abs(a.x - shot.x) < std::abs(b.x - shot.x);
  });
  const double distance = std::abs(nearest->x - shot.x);
  if (distance > kSamePlace && distance < 0.1 * usual) {
    out.push_back("The shot at " + metres(shot.x) + " is only " + metres(distance) + " from the geophone at " +
                  metres(nearest->x) + "; check which of the two is right.");
  }
  constexpr double kOffGround = 1.0;
  const double above = shot.elevation - ground.at(shot.x);
  if (shot.x >= sorted.front().x && shot.x <= sorted.back().x && std::abs(above) > kOffGround) {
    out.push_back("The shot at " + metres(shot.x) + " is " + metres(std::abs(above)) +
                  (above > 0.0 ? " above" : " below") + " the ground between the geophones; check its elevation.");
  }
}

}  // namespace

std::vector<std::string> checkGeometry(const std::vector<Geophone>& geophones, const std::vector<ShotPoint>& shots) {
  std::vector<std::string> out;
  if (geophones.empty()) {
    return out;
  }
  std::vector<Geophone> sorted = geophones;
  std::stable_sort(sorted.begin(), sorted.end(), [](const Geophone& a, const Geophone& b) { return a.x < b.x; });
  const std::vector<double> spacings = spacingsOf(sorted);
  const double usual = spacings.empty() ? 0.0 : medianOf(spacings);
  checkSpacing(sorted, usual, out);
  checkElevations(sorted, usual, out);
  const Ground ground(sorted, {});
  for (const ShotPoint& shot : shots) {
    checkShot(shot, sorted, usual, ground, out);
  }
  return out;
}

std::vector<std::string> checkHeaders(const ShotRecord& record) {
  std::vector<std::string> out;
  std::vector<double> x;
  std::vector<int> together;
  int rising = 0;
  int falling = 0;
  for (std::size_t i = 0; i < record.traces.size(); ++i) {
    const auto& receiver = record.traces[i].receiver;
    if (!receiver) {
      continue;
    }
    if (!x.empty()) {
      const double step = receiver->x - x.back();
      rising += step > kSamePlace ? 1 : 0;
      falling += step < -kSamePlace ? 1 : 0;
      if (std::abs(step) <= kSamePlace) {
        together.push_back(record.firstTraceInFile + static_cast<int>(i));
      }
    }
    x.push_back(receiver->x);
  }
  if (!together.empty()) {
    out.push_back(record.file + ": " + tracesListed(together) +
                  " stand where the trace before stands; check the geophones' positions.");
  }
  if (rising > 0 && falling > 0) {
    out.push_back(record.file + ": the geophones run back and forth; check their positions.");
  }
  if (record.source && x.size() > 1) {
    const auto [low, high] = std::minmax_element(x.begin(), x.end());
    const double beyond = std::max(*low - record.source->x, record.source->x - *high);
    if (*high - *low > kSamePlace && beyond > 10.0 * (*high - *low)) {
      out.push_back(record.file + ": the shot stands " + metres(beyond) +
                    " beyond the geophones, more than ten times the length of the spread; check its position.");
    }
  }
  return out;
}

}  // namespace strikeplate
