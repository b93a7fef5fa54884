#pragma once

#include <QPainter>
#include <QPolygonF>
#include <QWidget>

namespace strikeplate {

/// The line of a lasso over a widget that it covers; the pointer goes through it.
class LassoLine : public QWidget {
 public:
  explicit LassoLine(QWidget* over) : QWidget(over) {
    setAttribute(Qt::WA_TransparentForMouseEvents);
    hide();
  }
  void show(const QPolygonF& line) {
    line_ = line;
    setGeometry(parentWidget()->rect());
    setVisible(true);
    update();
  }

 protected:
  void paintEvent(QPaintEvent* /*event*/) override {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    QColor inside = palette().highlight().color();
    painter.setPen(QPen(inside, 1.5));
    inside.setAlpha(35);
    painter.setBrush(inside);
    painter.drawPolygon(line_);
  }

 private:
  QPolygonF line_;
};

}  // namespace strikeplate
