#include "widgets/sheet_paper.h"

#include <algorithm>

#include <QFont>
#include <QFontMetricsF>
#include <QRegularExpression>
#include <QTextLayout>
#include <QTextOption>

namespace strikeplate {
namespace {

constexpr double kMillimetresPerPoint = 25.4 / 72.0;

// A number and its unit stay on one line.
QString unbroken(QString words) {
  static const QRegularExpression kUnit(QStringLiteral("(?<=[0-9]) (?=(m|ft|ms|m/s|ft/s|%)(?![A-Za-z/]))"));
  return words.replace(kUnit, QString(QChar::Nbsp));
}

}  // namespace

SheetPaper::SheetPaper(QPainter& painter, double perMillimetre) : painter_(painter), scale_(perMillimetre) {
  painter_.save();
  painter_.scale(scale_, scale_);
  painter_.setRenderHint(QPainter::Antialiasing);
}

SheetPaper::~SheetPaper() {
  painter_.restore();
}

// In device units, which are fine enough for whole pixels; a font of a few millimetres' units would be rounded.
QFont SheetPaper::font(const SheetText& style) const {
  QFont font(QStringLiteral("Sans Serif"));
  font.setStyleHint(QFont::SansSerif);
  font.setPixelSize(std::max(1, qRound(style.points * kMillimetresPerPoint * scale_)));
  font.setBold(style.bold);
  // Any spacing keeps letters apart that would be drawn as one glyph: words can then be found and copied as typed.
  font.setLetterSpacing(QFont::AbsoluteSpacing, 0.0625);
  return font;
}

double SheetPaper::width(const QString& words, const SheetText& style) const {
  return QFontMetricsF(font(style)).horizontalAdvance(words) / scale_;
}

double SheetPaper::text(const QPointF& corner, double width, const QString& given, const SheetText& style) {
  const QString words = unbroken(given);
  const QFont face = font(style);
  const QFontMetricsF metrics(face);
  const double pixels = width * scale_;
  QTextOption option(style.align);
  option.setWrapMode(QTextOption::WrapAtWordBoundaryOrAnywhere);
  const auto layOut = [&](QTextLayout& layout) {
    layout.setTextOption(option);
    layout.beginLayout();
    double height = 0.0;
    for (QTextLine line = layout.createLine(); line.isValid(); line = layout.createLine()) {
      line.setLineWidth(pixels);
      line.setPosition({0.0, height});
      height += metrics.lineSpacing();
    }
    layout.endLayout();
  };
  QTextLayout layout(words, face);
  layOut(layout);
  QString fitting = words;
  if (layout.lineCount() > style.maxLines) {
    const int start = layout.lineAt(style.maxLines - 1).textStart();
    fitting = words.left(start) + metrics.elidedText(words.mid(start), Qt::ElideRight, pixels);
  }
  QTextLayout final(fitting, face);
  layOut(final);
  if (!dry_) {
    painter_.save();
    painter_.scale(1.0 / scale_, 1.0 / scale_);
    painter_.setPen(style.colour);
    final.draw(&painter_, corner * scale_);
    painter_.restore();
  }
  return std::min(final.lineCount(), style.maxLines) * metrics.lineSpacing() / scale_;
}

void SheetPaper::label(const QPointF& base, const QString& words, const SheetText& style) {
  if (dry_) {
    return;
  }
  const QFont face = font(style);
  const double advance = QFontMetricsF(face).horizontalAdvance(words);
  const double shift = style.align.testFlag(Qt::AlignRight)     ? advance
                       : style.align.testFlag(Qt::AlignHCenter) ? advance / 2
                                                                : 0;
  painter_.save();
  painter_.scale(1.0 / scale_, 1.0 / scale_);
  painter_.setPen(style.colour);
  painter_.setFont(face);
  painter_.drawText(base * scale_ - QPointF(shift, 0.0), words);
  painter_.restore();
}

void SheetPaper::uprightLabel(const QPointF& middle, const QString& words, const SheetText& style) {
  painter_.save();
  painter_.translate(middle);
  painter_.rotate(-90.0);
  SheetText centred = style;
  centred.align = Qt::AlignHCenter;
  label({0.0, 0.0}, words, centred);
  painter_.restore();
}

void SheetPaper::line(const QPointF& from, const QPointF& to, const QColor& colour, double width) {
  if (!dry_) {
    painter_.setPen(QPen(colour, width, Qt::SolidLine, Qt::FlatCap));
    painter_.drawLine(from, to);
  }
}

void SheetPaper::fill(const QRectF& area, const QColor& colour) {
  if (!dry_) {
    painter_.fillRect(area, colour);
  }
}

}  // namespace strikeplate
