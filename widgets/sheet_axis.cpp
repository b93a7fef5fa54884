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
