#pragma once

#include <vector>

#include <QColor>
#include <QPainter>
#include <QRectF>
#include <QString>
#include <QStringList>
#include <QTransform>

#include "widgets/look.h"

namespace strikeplate {

struct SheetText {
  double points = 7.0;
  bool bold = false;
  QColor colour = Qt::black;
  Qt::Alignment align = Qt::AlignLeft;
  int maxLines = 100;        ///< what is longer gets smaller letters, and ends in an ellipsis when that does not help
  double leastPoints = 5.0;  ///< how small
};

/// A text as it came to stand on the page, for a test to look at.
struct SheetMark {
  QRectF box;  ///< mm, around the letters' lines
  QString words;
  bool cut = false;  ///< ended in an ellipsis
};

/// A painter in millimetres from the page's upper left corner, whatever the device's resolution. Fonts are in points.
/// While `dry` nothing is drawn, and heights come out the same: a layout is measured by the code that paints it.
class SheetPaper {
 public:
  /// `perMillimetre` is device units; the painter's origin is the page's corner.
  SheetPaper(QPainter& painter, double perMillimetre);
  ~SheetPaper();
  SheetPaper(const SheetPaper&) = delete;
  SheetPaper& operator=(const SheetPaper&) = delete;

  void setDry(bool dry) { dry_ = dry; }
  [[nodiscard]] bool dry() const { return dry_; }
  [[nodiscard]] const Look& look() const { return look_; }

  /// Ink and greys only.
  void setBlackAndWhite();
  [[nodiscard]] bool blackAndWhite() const { return blackAndWhite_; }
  [[nodiscard]] QColor layerColour(int layer) const;
  /// Full in colour; in black and white each layer has its own dashes.
  [[nodiscard]] QPen layerPen(int layer, const QColor& colour, double width) const;

  /// Every text painted from now on is added to `marks`, which has to outlive the paper.
  void note(std::vector<SheetMark>* marks) { marks_ = marks; }

  /// What has no room on the page, such as "6 of Boreholes", is added to `words`, which has to outlive the paper.
  void noteLeftOut(QStringList* words) { leftOut_ = words; }
  void leaveOut(const QString& words);

  /// For lines and areas, in mm.
  [[nodiscard]] QPainter& painter() { return painter_; }

  /// Wraps the text into a box of this width; returns the height that it took, mm.
  double text(const QPointF& corner, double width, const QString& words, const SheetText& style);
  /// One line that stands on this point, at its left, middle or right as the style says.
  void label(const QPointF& base, const QString& words, const SheetText& style);
  /// One line from below upwards, its middle at this point.
  void uprightLabel(const QPointF& middle, const QString& words, const SheetText& style);
  /// Width of the text on one line, mm.
  [[nodiscard]] double width(const QString& words, const SheetText& style) const;

  void line(const QPointF& from, const QPointF& to, const QColor& colour, double width = 0.15);
  void fill(const QRectF& area, const QColor& colour);

 private:
  [[nodiscard]] QFont font(const SheetText& style) const;
  void addMark(const QRectF& box, const QString& words, bool cut);

  QPainter& painter_;
  double scale_;
  Look look_ = Look::of(LookKind::Light);
  bool dry_ = false;
  bool blackAndWhite_ = false;
  QTransform page_;  // from mm to the device
  std::vector<SheetMark>* marks_ = nullptr;
  QStringList* leftOut_ = nullptr;
};

}  // namespace strikeplate
