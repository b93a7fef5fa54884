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

void layOut(QTextLayout& layout, double pixels, Qt::Alignment align) {
  // Absolute: a name written from right to left still stands beside its label.
  QTextOption option(align | Qt::AlignAbsolute);
  option.setWrapMode(QTextOption::WrapAtWordBoundaryOrAnywhere);
  layout.setTextOption(option);
  const double spacing = QFontMetricsF(layout.font()).lineSpacing();
  layout.beginLayout();
  double height = 0.0;
  for (QTextLine line = layout.createLine(); line.isValid(); line = layout.createLine()) {
    line.setLineWidth(pixels);
    line.setPosition({0.0, height});
    height += spacing;
  }
  layout.endLayout();
}

int linesOf(const QString& words, const QFont& face, double pixels) {
  QTextLayout layout(words, face);
  layOut(layout, pixels, Qt::AlignLeft);
  return layout.lineCount();
}

// A line may be broken behind a slash, but not within a unit such as m/s: there the number moves to the next line.
QString withWholeUnits(QString words, const QFont& face, double pixels) {
  static const QRegularExpression kOpenUnit(QStringLiteral("[0-9]\\x{00A0}(m|ft)/$"));
  for (int moved = 0; moved < 20; ++moved) {
    QTextLayout layout(words, face);
    layOut(layout, pixels, Qt::AlignLeft);
    qsizetype blank = -1;
    for (int i = 0; i + 1 < layout.lineCount() && blank < 0; ++i) {
      const QTextLine line = layout.lineAt(i);
      const QString shown = words.mid(line.textStart(), line.textLength());
      const qsizetype before = shown.lastIndexOf(QLatin1Char(' '));
      blank = kOpenUnit.match(shown).hasMatch() && before > 0 ? line.textStart() + before : -1;
    }
    if (blank < 0) {
      break;
    }
    words[blank] = QChar(QChar::LineSeparator);
  }
  return words;
}

QColor greyOf(const QColor& colour) {
  const int grey = qGray(colour.rgb());
  return {grey, grey, grey};
}

}  // namespace

SheetPaper::SheetPaper(QPainter& painter, double perMillimetre) : painter_(painter), scale_(perMillimetre) {
  painter_.save();
  painter_.scale(scale_, scale_);
  painter_.setRenderHint(QPainter::Antialiasing);
  page_ = painter_.transform();
}

SheetPaper::~SheetPaper() {
  painter_.restore();
}

void SheetPaper::setBlackAndWhite() {
  blackAndWhite_ = true;
  for (QColor* colour : {&look_.window, &look_.paper, &look_.ink, &look_.faint, &look_.grid}) {
    *colour = greyOf(*colour);
  }
  look_.accent = look_.warning = look_.ground = look_.ink;
}

QColor SheetPaper::layerColour(int layer) const {
  if (!blackAndWhite_) {
    return look_.layerColour(layer);
  }
  constexpr int kDarkest = 60, kStep = 40;  // symbols and dashes tell the layers apart, the greys only help
  const int grey = kDarkest + kStep * (std::max(0, layer) % 4);
  return {grey, grey, grey};
}

QPen SheetPaper::layerPen(int layer, const QColor& colour, double width) const {
  QPen pen(colour, width, Qt::SolidLine, Qt::FlatCap);
  if (blackAndWhite_ && layer > 2) {
    const QList<QList<qreal>> dashes = {{8, 2}, {4, 2}, {8, 2, 2, 2}, {2, 2}};
    pen.setDashPattern(dashes[(layer - 3) % dashes.size()]);
  }
  return pen;
}

void SheetPaper::addMark(const QRectF& box, const QString& words, bool cut) {
  if (marks_ != nullptr && !words.isEmpty()) {
    marks_->push_back({(painter_.transform() * page_.inverted()).mapRect(box), words, cut});
  }
}

void SheetPaper::leaveOut(const QString& words) {
  if (leftOut_ != nullptr && !dry_) {
    *leftOut_ << words;
  }
}

// In device units, which are fine enough for whole pixels; a font of a few millimetres' units would be rounded.
QFont SheetPaper::font(const SheetText& style) const {
  QFont font(QStringLiteral("Sans Serif"));
  font.setStyleHint(QFont::SansSerif);
  font.setPixelSize(std::max(1, qRound(style.points * kMillimetresPerPoint * scale_)));
  font.setBold(style.bold);
  font.setHintingPreference(QFont::PreferNoHinting);  // paper shows the letters' true widths
  // Any spacing keeps letters apart that would be drawn as one glyph: words can then be found and copied as typed.
  font.setLetterSpacing(QFont::AbsoluteSpacing, 0.0625);
  return font;
}

double SheetPaper::width(const QString& words, const SheetText& style) const {
  return QFontMetricsF(font(style)).horizontalAdvance(words) / scale_;
}

double SheetPaper::text(const QPointF& corner, double width, const QString& given, const SheetText& style) {
  const QString unbrokenWords = unbroken(given);
  const double pixels = width * scale_;
  SheetText fitted = style;
  while (fitted.points - 0.25 >= style.leastPoints && linesOf(unbrokenWords, font(fitted), pixels) > style.maxLines) {
    fitted.points -= 0.25;
  }
  const QFont face = font(fitted);
  const QFontMetricsF metrics(face);
  const QString words = withWholeUnits(unbrokenWords, face, pixels);
  QTextLayout layout(words, face);
  layOut(layout, pixels, style.align);
  const bool cut = layout.lineCount() > style.maxLines;
  if (cut) {
    const int start = layout.lineAt(style.maxLines - 1).textStart();
    layout.setText(words.left(start) + metrics.elidedText(words.mid(start), Qt::ElideRight, pixels));
    layOut(layout, pixels, style.align);
  }
  if (!dry_) {
    painter_.save();
    painter_.scale(1.0 / scale_, 1.0 / scale_);
    painter_.setPen(style.colour);
    layout.draw(&painter_, corner * scale_);
    painter_.restore();
    QRectF box;
    for (int i = 0; i < layout.lineCount(); ++i) {
      box |= layout.lineAt(i).naturalTextRect();
    }
    addMark({corner + box.topLeft() / scale_, box.size() / scale_}, given, cut);
  }
  return std::min(layout.lineCount(), style.maxLines) * metrics.lineSpacing() / scale_;
}

void SheetPaper::label(const QPointF& base, const QString& words, const SheetText& style) {
  if (dry_) {
    return;
  }
  const QFont face = font(style);
  const QFontMetricsF metrics(face);
  // Drawn by a layout, as texts are: a painter on a printer would take the printer's own, wider letters.
  QTextLayout layout(words, face);
  layout.setTextOption(QTextOption(Qt::AlignLeft | Qt::AlignAbsolute));
  layout.beginLayout();
  QTextLine only = layout.createLine();
  if (only.isValid()) {
    only.setNumColumns(static_cast<int>(words.size()));
    only.setPosition({0.0, 0.0});
  }
  layout.endLayout();
  const double advance = metrics.horizontalAdvance(words);
  const double shift = style.align.testFlag(Qt::AlignRight)     ? advance
                       : style.align.testFlag(Qt::AlignHCenter) ? advance / 2
                                                                : 0;
  painter_.save();
  painter_.scale(1.0 / scale_, 1.0 / scale_);
  painter_.setPen(style.colour);
  layout.draw(&painter_, base * scale_ - QPointF(shift, only.isValid() ? only.ascent() : 0.0));
  painter_.restore();
  addMark(
      {base.x() - shift / scale_, base.y() - metrics.ascent() / scale_, advance / scale_, metrics.height() / scale_},
      words, false);
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
