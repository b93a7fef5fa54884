#include "widgets/record_view.h"

#include <algorithm>
#include <cmath>

#include <QKeyEvent>
#include <QMouseEvent>
#include <QPainter>

#include "core/base/units.h"
#include "core/picking/trace_picker.h"

namespace strikeplate {

RecordView::RecordView(QWidget* parent) : View(parent) {
  setFocusPolicy(Qt::StrongFocus);
  setMinimumSize(320, 240);
  setAccessibleName(tr("Record"));
}

void RecordView::showScene(const Scene& scene) {
  scene_ = scene;
  update();
}

void RecordView::showSelection(const Selection& selection) {
  scene_.selection = selection;
  update();
}

void RecordView::setLook(const Look& look) {
  look_ = look;
  update();
}

const Gather* RecordView::gather() const {
  const auto s = static_cast<std::size_t>(scene_.selection.shot);
  return scene_.gathers && scene_.selection.shot >= 0 && s < scene_.gathers->size() ? &(*scene_.gathers)[s] : nullptr;
}

QRectF RecordView::plot() const {
  return QRectF(64, 44, width() - 76, height() - 88);
}

double RecordView::xOf(std::size_t trace) const {
  return plot().left() +
         plot().width() * (static_cast<double>(trace) + 0.5) / static_cast<double>(gather()->traces.size());
}

int RecordView::traceAt(double x) const {
  const double f = (x - plot().left()) / plot().width() * static_cast<double>(gather()->traces.size());
  return std::clamp(static_cast<int>(std::floor(f)), 0, static_cast<int>(gather()->traces.size()) - 1);
}

double RecordView::lastTime() const {
  double last = 0.03;
  for (const ShotTrace& trace : scene_.survey->shots[static_cast<std::size_t>(scene_.selection.shot)].traces) {
    last = trace.pick ? std::max(last, 1.4 * trace.pick->time) : last;
  }
  return last;
}

double RecordView::timeAt(double y) const {
  return -0.005 + (y - plot().top()) / plot().height() * (lastTime() + 0.005);
}
double RecordView::yOf(double time) const {
  return plot().top() + (time + 0.005) / (lastTime() + 0.005) * plot().height();
}

void RecordView::paintTrace(QPainter& painter, const Gather& g, std::size_t trace) const {
  const auto& samples = g.traces[trace];
  const double first = std::max(0.0, std::floor((-0.005 - g.start) / g.sampleInterval));
  const auto end = std::min(samples.size(),
                            static_cast<std::size_t>(std::max(0.0, (lastTime() - g.start) / g.sampleInterval + 1.0)));
  float peak = 0.0F;
  for (auto i = static_cast<std::size_t>(first); i < end; ++i) {
    peak = std::max(peak, std::abs(samples[i]));
  }
  const double reach = 1.2 * plot().width() / static_cast<double>(g.traces.size());
  QPolygonF line;
  for (auto i = static_cast<std::size_t>(first); i < end && peak > 0.0F; ++i) {
    line << QPointF(xOf(trace) + reach * static_cast<double>(samples[i] / peak),
                    yOf(g.timeOf(static_cast<double>(i))));
  }
  painter.setPen(QPen(g.states[trace] == TraceState::Dead ? look_.grid : look_.ink, 0.8));
  painter.drawPolyline(line);
}

void RecordView::paintPicks(QPainter& painter) const {
  const auto& traces = scene_.survey->shots[static_cast<std::size_t>(scene_.selection.shot)].traces;
  const double half = 0.4 * plot().width() / static_cast<double>(traces.size());
  for (std::size_t t = 0; t < traces.size(); ++t) {
    if (!traces[t].pick) {
      continue;
    }
    const Pick& pick = *traces[t].pick;
    int layer = pick.layer;
    if (scene_.interpretation) {
      const int a = scene_.interpretation->arrivalOf(scene_.selection.shot, static_cast<int>(t));
      layer = a >= 0 ? scene_.interpretation->times.arrivals[static_cast<std::size_t>(a)].layer : layer;
    }
    painter.setPen(QPen(look_.layerColour(layer), pick.origin == PickOrigin::Hand ? 3.0 : 2.0));
    const double x = xOf(t), y = yOf(pick.time);
    painter.drawLine(QPointF(x - half, y), QPointF(x + half, y));
    painter.drawLine(QPointF(x, yOf(pick.time - pick.sigma)), QPointF(x, yOf(pick.time + pick.sigma)));
  }
}

void RecordView::paintEvent(QPaintEvent*) {
  QPainter painter(this);
  painter.fillRect(rect(), look_.paper);
  painter.setPen(look_.ink);
  const Gather* g = gather();
  if (g == nullptr || g->traces.empty()) {
    painter.drawText(rect(), Qt::AlignCenter, tr("No record. Open shot records from the File menu."));
    return;
  }
  painter.setRenderHint(QPainter::Antialiasing);
  const Units units{scene_.survey->settings.feet};
  painter.drawText(
      QRectF(0, 4, width(), 24), Qt::AlignCenter,
      tr("Shot %1 at %2").arg(scene_.selection.shot + 1).arg(QString::fromStdString(units.length(g->shot.x))));
  const double step = lastTime() > 0.2 ? 0.05 : lastTime() > 0.08 ? 0.02 : 0.01;
  for (double t = 0.0; t < lastTime(); t += step) {
    painter.setPen(look_.grid);
    painter.drawLine(QPointF(plot().left(), yOf(t)), QPointF(plot().right(), yOf(t)));
    painter.setPen(look_.ink);
    painter.drawText(QRectF(0, yOf(t) - 10, plot().left() - 6, 20), Qt::AlignRight | Qt::AlignVCenter,
                     QString::number(1e3 * t, 'f', 0));
  }
  painter.drawText(QRectF(0, 24, plot().left(), 18), Qt::AlignCenter, tr("ms"));
  const std::size_t every = g->traces.size() > 24 ? 6 : 3;
  for (std::size_t t = 0; t < g->traces.size(); ++t) {
    paintTrace(painter, *g, t);
    if (t % every == 0) {
      painter.setPen(look_.ink);
      painter.drawText(QRectF(xOf(t) - 30, plot().bottom() + 4, 60, 18), Qt::AlignCenter, QString::number(t + 1));
    }
  }
  painter.drawText(QRectF(0, plot().bottom() + 22, width(), 20), Qt::AlignCenter, tr("Trace"));
  paintPicks(painter);
}

void RecordView::propose(double y, bool free, Phase phase) {
  const int shot = scene_.selection.shot;
  const auto t = static_cast<std::size_t>(*dragged_);
  double time = timeAt(y);
  const Gather& g = *gather();
  if (!free) {
    if (const auto onset = snapOnset(g, t, time, 0.004)) {
      time = onset->time;
    }
  }
  const auto& before = atPress_->shots[static_cast<std::size_t>(shot)].traces[t].pick;
  Pick pick = before.value_or(Pick{});
  pick.time = time;
  pick.sigma = before ? before->sigma : sigmaAt(g, t, time);
  pick.origin = PickOrigin::Hand;
  const std::string text = (before ? "Move pick, shot " : "Set pick, shot ") + std::to_string(shot + 1) + ", trace " +
                           std::to_string(*dragged_ + 1);
  emit proposed(edits::setPick(*atPress_, shot, *dragged_, pick, text), phase);
}

void RecordView::mousePressEvent(QMouseEvent* event) {
  const Gather* g = gather();
  if (g == nullptr || event->button() != Qt::LeftButton || !plot().contains(event->position()) ||
      g->traces[static_cast<std::size_t>(traceAt(event->position().x()))].empty()) {
    return;
  }
  dragged_ = traceAt(event->position().x());
  atPress_ = scene_.survey;
  emit selectionWanted({scene_.selection.shot, *dragged_, 0});
}

void RecordView::mouseMoveEvent(QMouseEvent* event) {
  if (dragged_) {
    propose(event->position().y(), event->modifiers().testFlag(Qt::AltModifier), Phase::Live);
  }
}

void RecordView::mouseReleaseEvent(QMouseEvent* event) {
  if (dragged_) {
    propose(event->position().y(), event->modifiers().testFlag(Qt::AltModifier), Phase::Commit);
    dragged_.reset();
  }
}

void RecordView::keyPressEvent(QKeyEvent* event) {
  Selection s = scene_.selection;
  if (event->key() == Qt::Key_Escape && dragged_) {
    dragged_.reset();
    emit proposed({}, Phase::Abandon);
  } else if (event->key() == Qt::Key_PageUp && s.shot > 0) {
    emit selectionWanted({s.shot - 1, -1, 0});
  } else if (event->key() == Qt::Key_PageDown && s.shot + 1 < static_cast<int>(scene_.survey->shots.size())) {
    emit selectionWanted({s.shot + 1, -1, 0});
  } else if ((event->key() == Qt::Key_Delete || event->key() == Qt::Key_Backspace) && s.shot >= 0 && s.trace >= 0) {
    emit proposed(
        edits::setPick(*scene_.survey, s.shot, s.trace, std::nullopt,
                       "Delete pick, shot " + std::to_string(s.shot + 1) + ", trace " + std::to_string(s.trace + 1)),
        Phase::Commit);
  } else {
    View::keyPressEvent(event);
  }
}

}  // namespace strikeplate
