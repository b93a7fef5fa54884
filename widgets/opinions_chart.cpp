#include "widgets/opinions_chart.h"

#include <algorithm>
#include <cmath>

#include <QHelpEvent>
#include <QMouseEvent>
#include <QPainter>
#include <QScrollBar>
#include <QToolTip>

#include "widgets/position_range.h"
#include "widgets/section_content.h"

namespace strikeplate {

OpinionsChart::OpinionsChart(QWidget* parent) : QAbstractScrollArea(parent) {
  setFrameShape(QFrame::NoFrame);
  setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
  setAccessibleName(tr("Second opinions"));
  viewport()->setMouseTracking(true);
}

void OpinionsChart::showSummary(const OpinionSummary& summary, const Units& units) {
  summary_ = summary;
  units_ = units;
  QStringList all;
  for (int row = 0; row < rowCount(); ++row) {
    all << rowWords(row);
  }
  setAccessibleDescription(all.join("\n"));
  setRange();
  setScroll();
  viewport()->update();
}

void OpinionsChart::setLook(const Look& look) {
  look_ = look;
  viewport()->update();
}

int OpinionsChart::rowCount() const {
  return static_cast<int>(summary_.rows.size() + summary_.undetermined.size());
}

// All depths, the section's band and the usual bar; longer bars run out of the picture rather than make the rest
// small.
void OpinionsChart::setRange() {
  double low = summary_.section.determined ? summary_.section.low95 : 1e9;
  double high =
      summary_.section.determined && std::isfinite(summary_.section.high95) ? summary_.section.high95 : -1e9;
  double lowest = low, highest = high;
  std::vector<double> bars;
  for (const OpinionRow& row : summary_.rows) {
    const Estimate& depth = row.opinion->depth;
    low = std::min(low, depth.value);
    high = std::max(high, depth.value);
    bars.push_back(kNormal95 * depth.sigma);
    lowest = std::min(lowest, depth.low95);
    highest = std::max(highest, depth.high95);
  }
  if (!(low <= high)) {
    low_ = 0.0;
    high_ = 10.0;
    return;
  }
  const double span = std::max(high - low, 0.5);
  std::sort(bars.begin(), bars.end());
  const double room = std::max(0.5 * span, bars.empty() ? 0.0 : 1.2 * bars[bars.size() / 2]);
  low_ = std::max(std::max(lowest, low - room) - 0.08 * span, 0.0);
  high_ = std::min(highest, high + room) + 0.08 * span;
}

void OpinionsChart::setScroll() {
  const int room = viewport()->height() - axisHeight();
  verticalScrollBar()->setRange(0, std::max(0, rowCount() * rowHeight() - room));
  verticalScrollBar()->setPageStep(std::max(room, 1));
  verticalScrollBar()->setSingleStep(rowHeight());
}

void OpinionsChart::resizeEvent(QResizeEvent* event) {
  QAbstractScrollArea::resizeEvent(event);
  setScroll();
}

QRectF OpinionsChart::chart() const {
  const double left = std::clamp(0.42 * viewport()->width(), 140.0, 330.0);
  return {left, 0.0, std::max(20.0, viewport()->width() - left - 16.0),
          static_cast<double>(viewport()->height() - axisHeight())};
}

double OpinionsChart::pixel(double depth) const {
  return chart().left() + (depth - low_) / (high_ - low_) * chart().width();
}

int OpinionsChart::rowAt(int y) const {
  if (y >= viewport()->height() - axisHeight()) {
    return -1;
  }
  const int row = (y + verticalScrollBar()->value()) / rowHeight();
  return row < rowCount() ? row : -1;
}

QString OpinionsChart::rowName(const OpinionRow& row) const {
  QString name = QString::fromStdString(row.opinion->route);
  if (row.opinion->shot >= 0) {
    name += tr(", shot %1").arg(row.opinion->shot + 1);
  }
  return std::abs(row.opinion->x - summary_.x) > 0.05
             ? tr("%1, at %2").arg(name, QString::fromStdString(units_.length(row.opinion->x)))
             : name;
}

QString OpinionsChart::rowWords(int index) const {
  const auto at = static_cast<std::size_t>(index);
  if (at >= summary_.rows.size()) {
    const Opinion& opinion = *summary_.undetermined[at - summary_.rows.size()];
    return tr("%1: not determined; %2")
        .arg(QString::fromStdString(opinion.route), QString::fromStdString(opinion.depth.reason));
  }
  const OpinionRow& row = summary_.rows[at];
  QString words = tr("%1: %2 at %3")
                      .arg(QString::fromStdString(row.opinion->route), depthWords(units_, row.opinion->depth),
                           QString::fromStdString(units_.length(row.opinion->x)));
  if (row.section.determined) {
    words += tr("; the section has %1 there").arg(depthWords(units_, row.section));
  }
  if (row.disagrees) {
    words += tr("; they differ beyond both errors");
  }
  return row.opinion->assumes.empty()
             ? words
             : tr("%1. Assumes: %2").arg(words, QString::fromStdString(row.opinion->assumes));
}

bool OpinionsChart::viewportEvent(QEvent* event) {
  if (event->type() == QEvent::ToolTip) {
    const auto* help = dynamic_cast<QHelpEvent*>(event);
    const int row = rowAt(help->pos().y());
    QToolTip::showText(help->globalPos(), row < 0 ? QString() : rowWords(row), viewport());
    return true;
  }
  if (event->type() == QEvent::Leave) {
    emit rowHovered(QString());
  }
  return QAbstractScrollArea::viewportEvent(event);
}

void OpinionsChart::mouseMoveEvent(QMouseEvent* event) {
  const int row = rowAt(event->position().toPoint().y());
  emit rowHovered(row < 0 ? QString() : rowWords(row));
}

void OpinionsChart::paintEvent(QPaintEvent*) {
  QPainter painter(viewport());
  painter.setRenderHint(QPainter::Antialiasing);
  painter.fillRect(viewport()->rect(), look_.paper);
  paintAxis(painter);
  painter.setClipRect(QRectF(0, 0, viewport()->width(), chart().bottom()));
  double y = 0.5 * rowHeight() - verticalScrollBar()->value();
  for (const OpinionRow& row : summary_.rows) {
    paintRow(painter, row, y);
    y += rowHeight();
  }
  for (const Opinion* opinion : summary_.undetermined) {
    paintUndetermined(painter, *opinion, y);
    y += rowHeight();
  }
}

void OpinionsChart::paintAxis(QPainter& painter) const {
  const QRectF area = chart();
  if (summary_.section.determined) {
    QColor band = look_.layerColour(summary_.layer);
    band.setAlpha(60);
    const double left = std::max(pixel(summary_.section.low95), area.left());
    const double right = std::isfinite(summary_.section.high95)
                             ? std::min(pixel(summary_.section.high95), area.right())
                             : area.right();
    painter.fillRect(QRectF(left, 0, right - left, area.height()), band);
    painter.setPen(QPen(look_.layerColour(summary_.layer), look_.lineWidth));
    painter.drawLine(QPointF(pixel(summary_.section.value), 0),
                     QPointF(pixel(summary_.section.value), area.bottom()));
  }
  painter.setPen(look_.faint);
  painter.drawLine(area.bottomLeft(), area.bottomRight());
  const double shown = units_.fromMetres(high_ - low_);
  const double step = niceStep(shown * (fontMetrics().horizontalAdvance("000.0") + 16) / area.width());
  const double first = std::ceil(units_.fromMetres(low_) / step - 1e-9) * step;
  for (double value = first; value <= units_.fromMetres(high_) + 1e-9; value += step) {
    const double x = pixel(units_.toMetres(value));
    painter.setPen(look_.grid);
    painter.drawLine(QPointF(x, 0), QPointF(x, area.bottom()));
    painter.setPen(look_.ink);
    painter.drawText(QRectF(x - 30, area.bottom() + 2, 60, axisHeight() - 2), Qt::AlignHCenter | Qt::AlignTop,
                     QString::number(value, 'f', step < 1.0 ? 1 : 0));
  }
  painter.setPen(look_.faint);
  painter.drawText(QRectF(8, area.bottom() + 2, area.left() - 24, axisHeight() - 2), Qt::AlignRight | Qt::AlignTop,
                   tr("Depth (%1)").arg(QString::fromStdString(units_.lengthUnit())));
}

void OpinionsChart::paintRow(QPainter& painter, const OpinionRow& row, double y) const {
  const QRectF area = chart();
  const QRectF words(22, y - 0.5 * rowHeight(), area.left() - 36, rowHeight());
  painter.setPen(look_.ink);
  painter.drawText(words, Qt::AlignLeft | Qt::AlignVCenter,
                   fontMetrics().elidedText(rowName(row), Qt::ElideRight, static_cast<int>(words.width())));
  const QColor colour = row.disagrees ? look_.warning : look_.ink;
  if (row.disagrees) {
    painter.setPen(Qt::NoPen);
    painter.setBrush(look_.warning);
    painter.drawPolygon(QPolygonF({QPointF(12, y - 5), QPointF(17, y + 4), QPointF(7, y + 4)}));
  }
  painter.save();
  painter.setClipRect(QRectF(area.left() - 6, 0, area.width() + 12, area.height()), Qt::IntersectClip);
  const Estimate& depth = row.opinion->depth;
  const double left = pixel(depth.low95);
  const double right = std::isfinite(depth.high95) ? pixel(depth.high95) : area.right() + 10.0;
  painter.setPen(QPen(colour, 1.4 * look_.lineWidth));
  painter.setBrush(colour);
  painter.drawLine(QPointF(left, y), QPointF(right, y));
  for (const double end : {left, right}) {
    painter.drawLine(QPointF(end, y - 3), QPointF(end, y + 3));
  }
  painter.drawEllipse(QPointF(pixel(depth.value), y), 3.2, 3.2);
  // Where the route speaks of another place, what the section has there.
  if (row.section.determined && std::abs(row.opinion->x - summary_.x) > 0.05) {
    painter.setPen(QPen(look_.layerColour(summary_.layer), 1.4 * look_.lineWidth));
    painter.setBrush(look_.paper);
    paintLayerSymbol(painter, 4, {pixel(row.section.value), y}, 6.0);
  }
  painter.restore();
}

void OpinionsChart::paintUndetermined(QPainter& painter, const Opinion& opinion, double y) const {
  const QRectF words(22, y - 0.5 * rowHeight(), viewport()->width() - 30.0, rowHeight());
  const QString text = tr("%1: not determined; %2")
                           .arg(QString::fromStdString(opinion.route), QString::fromStdString(opinion.depth.reason));
  painter.setPen(look_.faint);
  painter.drawText(words, Qt::AlignLeft | Qt::AlignVCenter,
                   fontMetrics().elidedText(text, Qt::ElideRight, static_cast<int>(words.width())));
}

}  // namespace strikeplate
