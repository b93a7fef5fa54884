#include "widgets/record_axes.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

namespace strikeplate {
namespace {

/// Low and high moved and cut so that they lie within the limits.
void keepWithin(double& low, double& high, double lowLimit, double highLimit, double least) {
  const double most = highLimit - lowLimit;
  if (high - low >= most) {
    low = lowLimit;
    high = highLimit;
    return;
  }
  const double width = std::max(high - low, std::min(least, most));
  const double middle = std::clamp(0.5 * (low + high), lowLimit + 0.5 * width, highLimit - 0.5 * width);
  low = middle - 0.5 * width;
  high = middle + 0.5 * width;
}

}  // namespace

RecordAxes::RecordAxes(const Gather& gather, double triggerCorrection, const RecordDisplay& display,
                       const QRectF& plot, const RecordRange& range)
    : plot_(plot), range_(range), timeUp_(display.timeUp), truePosition_(display.truePosition) {
  for (std::size_t t = 0; t < gather.geophones.size(); ++t) {
    metres_.push_back(gather.geophones[t].x);
    place_.push_back(truePosition_ ? metres_.back() : static_cast<double>(t) + 1.0);
    shift_.push_back(triggerCorrection -
                     (display.reducingVelocity > 0.0 ? gather.offset(t) / display.reducingVelocity : 0.0));
  }
  spacing_ = medianSpacing();
}

double RecordAxes::medianSpacing() const {
  if (place_.size() < 2) {
    return plot_.width();
  }
  std::vector<double> sorted = place_;
  std::sort(sorted.begin(), sorted.end());
  std::vector<double> gaps;
  for (std::size_t i = 1; i < sorted.size(); ++i) {
    if (sorted[i] > sorted[i - 1]) {
      gaps.push_back(sorted[i] - sorted[i - 1]);
    }
  }
  if (gaps.empty()) {
    return plot_.width();
  }
  const auto middle = gaps.begin() + static_cast<std::ptrdiff_t>(gaps.size() / 2);
  std::nth_element(gaps.begin(), middle, gaps.end());
  return *middle / (range_.right - range_.left) * plot_.width();
}

double RecordAxes::xAt(double place) const {
  return plot_.left() + (place - range_.left) / (range_.right - range_.left) * plot_.width();
}

double RecordAxes::placeAt(double x) const {
  return range_.left + (x - plot_.left()) / plot_.width() * (range_.right - range_.left);
}

double RecordAxes::xOfMetres(double metres) const {
  if (truePosition_) {
    return xAt(metres);
  }
  std::vector<std::pair<double, double>> known;  // m, place
  for (std::size_t t = 0; t < metres_.size(); ++t) {
    known.emplace_back(metres_[t], place_[t]);
  }
  std::sort(known.begin(), known.end());
  const auto after =
      std::find_if(known.begin(), known.end(), [metres](const auto& point) { return point.first >= metres; });
  if (known.size() < 2) {
    return known.size() == 1 && known.front().first == metres ? xAt(known.front().second)
                                                              : std::numeric_limits<double>::quiet_NaN();
  }
  const auto right = after == known.begin() ? known.begin() + 1 : after == known.end() ? known.end() - 1 : after;
  const auto left = right - 1;
  const double f = right->first > left->first ? (metres - left->first) / (right->first - left->first) : 0.0;
  return f < -0.5 || f > 1.5 ? std::numeric_limits<double>::quiet_NaN()
                             : xAt(left->second + f * (right->second - left->second));
}

double RecordAxes::metresAt(double x) const {
  if (truePosition_) {
    return placeAt(x);
  }
  const int trace = traceAt(x);
  return trace < 0 ? std::numeric_limits<double>::quiet_NaN() : metres_[static_cast<std::size_t>(trace)];
}

int RecordAxes::traceAt(double x) const {
  const double place = placeAt(x);
  const auto nearest = std::min_element(place_.begin(), place_.end(), [place](double a, double b) {
    return std::abs(a - place) < std::abs(b - place);
  });
  return nearest == place_.end() ? -1 : static_cast<int>(nearest - place_.begin());
}

double RecordAxes::shownTime(int trace, double recorderTime) const {
  return recorderTime + shift_[static_cast<std::size_t>(trace)];
}

double RecordAxes::recorderTime(int trace, double shownTime) const {
  return shownTime - shift_[static_cast<std::size_t>(trace)];
}

double RecordAxes::yOfShown(double shownTime) const {
  const double f = (shownTime - range_.first) / (range_.last - range_.first);
  return timeUp_ ? plot_.bottom() - f * plot_.height() : plot_.top() + f * plot_.height();
}

double RecordAxes::shownAt(double y) const {
  const double f = (timeUp_ ? plot_.bottom() - y : y - plot_.top()) / plot_.height();
  return range_.first + f * (range_.last - range_.first);
}

RecordRange zoomedTime(RecordRange range, double factor, double about) {
  range.first = about + (range.first - about) / factor;
  range.last = about + (range.last - about) / factor;
  return range;
}

RecordRange zoomedTraces(RecordRange range, double factor, double about) {
  range.left = about + (range.left - about) / factor;
  range.right = about + (range.right - about) / factor;
  return range;
}

RecordRange panned(RecordRange range, double seconds, double places) {
  range.first += seconds;
  range.last += seconds;
  range.left += places;
  range.right += places;
  return range;
}

RecordRange within(RecordRange range, const RecordRange& limits, double leastTime, double leastPlace) {
  keepWithin(range.first, range.last, limits.first, limits.last, leastTime);
  keepWithin(range.left, range.right, limits.left, limits.right, leastPlace);
  return range;
}

}  // namespace strikeplate
