#pragma once

#include <vector>

#include <QKeyEvent>
#include <QMouseEvent>
#include <QTest>
#include <QWheelEvent>

#include "tests/widgets/record_desk.h"
#include "tests/widgets/record_scene.h"

namespace strikeplate::testing {

/// A hand on mouse and keyboard, at the record view of a desk.
struct Hand {
  RecordDesk& desk;
  int gestures = 0;

  void drag(const std::vector<QPoint>& way, Qt::KeyboardModifiers modifiers = Qt::NoModifier, bool release = true) {
    ++gestures;
    QTest::mousePress(&desk.view, Qt::LeftButton, modifiers, way.front());
    for (std::size_t i = 1; i < way.size(); ++i) {
      move(way[i], modifiers);
    }
    if (release) {
      QTest::mouseRelease(&desk.view, Qt::LeftButton, modifiers, way.back());
    }
  }
  /// QTest::mouseMove holds no button.
  void move(const QPoint& to, Qt::KeyboardModifiers modifiers = Qt::NoModifier,
            Qt::MouseButton with = Qt::LeftButton) {
    QMouseEvent event(QEvent::MouseMove, to, desk.view.mapToGlobal(to), Qt::NoButton, with, modifiers);
    QApplication::sendEvent(&desk.view, &event);
  }
  void click(const QPoint& at, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    ++gestures;
    QTest::mouseClick(&desk.view, Qt::LeftButton, modifiers, at);
  }
  void key(Qt::Key key, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    QTest::keyClick(&desk.view, key, modifiers);
  }
  void wheel(const QPointF& at, const QPoint& turn, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    QWheelEvent event(at, desk.view.mapToGlobal(at), {}, turn, Qt::NoButton, modifiers, Qt::NoScrollPhase, false);
    QApplication::sendEvent(&desk.view, &event);
  }
};

/// When the wave arrives at a trace of the shot shown, s.
inline double onsetOf(const RecordDesk& desk, int t) {
  return onsetAt(desk.gather().offset(static_cast<std::size_t>(t)));
}

}  // namespace strikeplate::testing
