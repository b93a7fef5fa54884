#pragma once

#include <QAbstractScrollArea>

#include "core/base/units.h"
#include "widgets/look.h"
#include "widgets/opinion_summary.h"

namespace strikeplate {

/// Depths by every route as dots with their 95 % bars on one axis, beside the section's band.
class OpinionsChart : public QAbstractScrollArea {
  Q_OBJECT
 public:
  explicit OpinionsChart(QWidget* parent = nullptr);
  /// `summary` points into an interpretation that has to live until the next call.
  void showSummary(const OpinionSummary& summary, const Units& units);
  void setLook(const Look& look);
  /// What a row says in full: route, depth, what it assumes, whether it disagrees.
  [[nodiscard]] QString rowWords(int row) const;
  [[nodiscard]] int rowCount() const;

 signals:
  void rowHovered(const QString& words);

 protected:
  bool viewportEvent(QEvent* event) override;
  void paintEvent(QPaintEvent* event) override;
  void resizeEvent(QResizeEvent* event) override;
  void mouseMoveEvent(QMouseEvent* event) override;

 private:
  [[nodiscard]] int rowHeight() const { return fontMetrics().height() + 4; }
  [[nodiscard]] int axisHeight() const { return fontMetrics().height() + 6; }
  [[nodiscard]] int rowAt(int y) const;
  [[nodiscard]] QRectF chart() const;
  [[nodiscard]] double pixel(double depth) const;
  [[nodiscard]] QString rowName(const OpinionRow& row) const;
  void setRange();
  void setScroll();
  void paintAxis(QPainter& painter) const;
  void paintRow(QPainter& painter, const OpinionRow& row, double y) const;
  void paintUndetermined(QPainter& painter, const Opinion& opinion, double y) const;

  OpinionSummary summary_;
  Units units_;
  Look look_ = Look::of(LookKind::Light);
  double low_ = 0.0, high_ = 10.0;  // m, ends of the axis
};

}  // namespace strikeplate
