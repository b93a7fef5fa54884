#include "widgets/sheet_axis.h"

#include <algorithm>
#include <cmath>

#include "core/base/numbers.h"

namespace strikeplate {

SheetTicks sheetTicks(double low, double high, int most) {
  SheetTicks ticks;
  if (!(high > low) || most < 1) {
    return ticks;
  }
  const double rough = (high - low) / most;
  const double power = std::pow(10.0, std::floor(std::log10(rough)));
  double step = 10.0 * power;
  for (const double factor : {1.0, 2.0, 5.0}) {
    if (factor * power >= rough * (1.0 - 1e-9)) {
      step = factor * power;
      break;
    }
  }
  ticks.decimals = std::max(0, static_cast<int>(-std::floor(std::log10(step) + 1e-9)));
  const auto first = static_cast<long long>(std::ceil(low / step - 1e-9));
  const auto last = static_cast<long long>(std::floor(high / step + 1e-9));
  for (long long i = first; i <= last; ++i) {
    ticks.at.push_back(static_cast<double>(i) * step);
  }
  return ticks;
}

std::vector<QPolygonF> lineWithin(const QPolygonF& points, const QRectF& area) {
  std::vector<QPolygonF> parts;
  bool open = false;  // the last part ends where the next step begins
  for (qsizetype i = 0; i + 1 < points.size(); ++i) {
    const QPointF from = points[i];
    const QPointF step = points[i + 1] - from;
    double enter = 0.0, leave = 1.0;
    const auto cut = [&](double towards, double room) {
      if (towards == 0.0) {
        leave = room < 0.0 ? -1.0 : leave;
      } else {
        const double at = room / towards;
        (towards < 0.0 ? enter : leave) = towards < 0.0 ? std::max(enter, at) : std::min(leave, at);
      }
    };
    cut(-step.x(), from.x() - area.left());
    cut(step.x(), area.right() - from.x());
    cut(-step.y(), from.y() - area.top());
    cut(step.y(), area.bottom() - from.y());
    if (enter > leave) {
      open = false;
      continue;
    }
    if (!open || enter > 0.0) {
      parts.push_back({});
      parts.back() << from + enter * step;
    }
    parts.back() << from + leave * step;
    open = leave == 1.0;
  }
  return parts;
}

void paintAxes(SheetPaper& paper, const SheetFrame& frame, const SheetAxes& axes) {
  const Look& look = paper.look();
  const SheetText number{6.5, false, look.ink, Qt::AlignHCenter};
  const SheetText side{6.5, false, look.ink, Qt::AlignRight};
  const QRectF& area = frame.area;
  const SheetTicks xs =
      sheetTicks(frame.left * axes.scaleX, frame.right * axes.scaleX, static_cast<int>(area.width() / 14.0));
  for (const double tick : xs.at) {
    const double x = frame.x(tick / axes.scaleX);
    paper.line({x, area.top()}, {x, area.bottom()}, look.grid, 0.12);
    paper.line({x, area.bottom()}, {x, area.bottom() + 1.0}, look.ink, 0.2);
    paper.label({x, area.bottom() + 3.6}, QString::fromStdString(fixed(tick, xs.decimals)), number);
  }
  const SheetTicks ys =
      sheetTicks(std::min(frame.bottom, frame.top) * axes.scaleY, std::max(frame.bottom, frame.top) * axes.scaleY,
                 static_cast<int>(area.height() / axes.tickHeight));
  for (const double tick : ys.at) {
    const double y = frame.y(tick / axes.scaleY);
    paper.line({area.left(), y}, {area.right(), y}, look.grid, 0.12);
    paper.line({area.left() - 1.0, y}, {area.left(), y}, look.ink, 0.2);
    paper.label({area.left() - 1.6, y + 0.8}, QString::fromStdString(fixed(tick, ys.decimals)), side);
  }
  paper.label({area.center().x(), area.bottom() + 7.2}, axes.titleX, {7.0, false, look.ink, Qt::AlignHCenter});
  paper.uprightLabel({area.left() - 10.4, area.center().y()}, axes.titleY, {7.0, false, look.ink});
}

}  // namespace strikeplate
