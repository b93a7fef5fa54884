#pragma once

#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/look.h"
#include "widgets/scene.h"
#include "widgets/section_content.h"

namespace strikeplate {

/// Metres along the line and of elevation to pixels of a plot whose axes are in the chosen unit.
struct SectionFrame {
  const QCPAxis* xAxis = nullptr;
  const QCPAxis* yAxis = nullptr;
  Units units;
  [[nodiscard]] QRectF area() const { return xAxis->axisRect()->rect(); }
  [[nodiscard]] double x(double metres) const { return xAxis->coordToPixel(units.fromMetres(metres)); }
  [[nodiscard]] double y(double metres) const { return yAxis->coordToPixel(units.fromMetres(metres)); }
  [[nodiscard]] QPointF at(double along, double elevation) const { return {x(along), y(elevation)}; }
  /// How many times longer a metre is drawn upwards than along the line.
  [[nodiscard]] double exaggeration() const;
};

/// The section as one drawing: bands, interfaces, ground, geophones, shots, boreholes, layer names, and the words
/// that stand in for it when there is none.
class SectionDrawing : public QCPAbstractItem {
 public:
  explicit SectionDrawing(QCustomPlot* plot);
  void show(const Scene& scene, const Look& look);
  [[nodiscard]] SectionFrame frame() const;
  /// Where the layer names begin, px from the left: what else is written keeps to the left of it.
  [[nodiscard]] double namesBegin() const { return namesBegin_; }
  double selectTest(const QPointF&, bool, QVariant*) const override { return -1.0; }

 protected:
  void draw(QCPPainter* painter) override;

 private:
  void drawAllowance(QPainter& painter, const Section& section, std::size_t index) const;
  void drawBand(QPainter& painter, const Section& section, std::size_t index) const;
  void drawInterface(QPainter& painter, const Section& section, std::size_t index) const;
  void drawGround(QPainter& painter) const;
  void drawShots(QPainter& painter) const;
  void drawBorehole(QPainter& painter, const Borehole& hole) const;
  void drawLayerNames(QPainter& painter, const Section& section) const;
  void drawLegend(QPainter& painter, bool section) const;
  void drawReason(QPainter& painter, const QString& words) const;

  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  Ground ground_;
  mutable double namesBegin_ = 1e9;
  std::vector<HiddenAllowance> allowances_;
};

/// Words on the paper's colour, so that they stay legible over lines; `place` is their box without the margin.
void drawWordsOnPaper(QPainter& painter, const Look& look, const QRectF& place, const QString& words,
                      const QColor& colour);

/// Moves boxes of one height apart, downwards first, that stand at these tops and want to lie within `area`.
void spreadApart(std::vector<double>& tops, double height, const QRectF& area);

}  // namespace strikeplate
