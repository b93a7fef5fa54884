#include "widgets/line_strip.h"

#include <algorithm>
#include <cmath>

#include <QHelpEvent>
#include <QToolTip>

#include "core/base/units.h"

namespace strikeplate {

LineStrip::LineStrip(QWidget* parent) : View(parent) {
  setFocusPolicy(Qt::StrongFocus);
  setMouseTracking(true);
  setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
  setAccessibleName(tr("Line strip"));
}

void LineStrip::setAxisMargins(int left, int right) {
  marginLeft_ = left;
  marginRight_ = right;
  update();
}

void LineStrip::showScene(const Scene& scene) {
  scene_ = scene;
  shots_ = stripShots(scene);
  tellSelection();
  update();
}

void LineStrip::showSelection(const Selection& selection) {
  scene_.selection = selection;
  tellSelection();
  update();
}

void LineStrip::tellSelection() {
  setAccessibleDescription(empty() ? QString() : shotWords(scene_, scene_.selection.shot));
}

void LineStrip::showPlumbLine(double x) {
  plumbLine_ = x;
  update();
}

void LineStrip::showPositionRange(double left, double right) {
  range_ = {left, right};
  update();
}

void LineStrip::setLook(const Look& look) {
  look_ = look;
  update();
}

PositionGesture::Axis LineStrip::axis() const {
  return {static_cast<double>(marginLeft_), std::max(1.0, static_cast<double>(width() - marginLeft_ - marginRight_)),
          range_, scene_.survey ? wholeLine(*scene_.survey) : PositionRange{}};
}

LineStrip::Target LineStrip::targetAt(const QPointF& position) const {
  Target target;
  if (empty()) {
    return target;
  }
  // The selected shot is taken last of those that stand at one place, so that clicking again goes round them.
  double nearest = std::max(shotRadius(), 5.0) + 4.0;
  const int count = static_cast<int>(shots_.size());
  for (int n = 1; n <= count; ++n) {
    const int shot = (std::max(scene_.selection.shot, 0) + n) % count;
    const QPointF away = shotPlace(shot) - position;
    if (std::hypot(away.x(), away.y()) < nearest - 1e-6) {
      nearest = std::hypot(away.x(), away.y());
      target.shot = shot;
    }
  }
  double close = 8.0;
  for (int g = 0; target.shot < 0 && g < static_cast<int>(scene_.survey->geophones.size()); ++g) {
    const QPointF away = geophonePlace(g) - position;
    if (std::abs(away.y()) < 12.0 && std::abs(away.x()) < close) {
      close = std::abs(away.x());
      target.geophone = g;
    }
  }
  return target;
}

QString LineStrip::wordsAt(const QPointF& position) const {
  const Target target = targetAt(position);
  if (target.shot >= 0) {
    return shotWords(scene_, target.shot);
  }
  if (target.geophone >= 0) {
    return geophoneWords(scene_, target.geophone);
  }
  return empty() ? QString()
                 : QString::fromStdString(Units{scene_.survey->settings.feet}.length(axis().at(position.x())));
}

bool LineStrip::event(QEvent* event) {
  if (event->type() == QEvent::ToolTip) {
    const auto* help = dynamic_cast<QHelpEvent*>(event);
    const Target target = targetAt(help->pos());
    if (target.shot >= 0 || target.geophone >= 0) {
      QToolTip::showText(help->globalPos(), wordsAt(help->pos()), this);
    } else {
      QToolTip::hideText();
    }
    return true;
  }
  return View::event(event);
}

}  // namespace strikeplate
