#pragma once

#include <QColor>
#include <QPointF>

class QPainter;

namespace strikeplate {

enum class LookKind { Light, Dark, Sun };

/// The colours and line weights of one look. Quiet surfaces, one accent; the data are the brightest thing.
struct Look {
  LookKind kind = LookKind::Light;
  QColor window;  ///< around the panes
  QColor paper;   ///< behind data
  QColor ink;     ///< text, axes, traces
  QColor faint;   ///< secondary text, ticks
  QColor grid;
  QColor accent;           ///< selection, plumb line
  QColor warning;          ///< doubts
  QColor ground;           ///< ground surface
  double lineWidth = 1.0;  ///< px at scale 1, for data lines

  static Look of(LookKind kind);
  /// Colour of a layer (1 to 6; 0 not assigned), colour-blind safe: Okabe and Ito (2008), Color Universal Design.
  [[nodiscard]] QColor layerColour(int layer) const;
};

/// Paints the symbol of a layer (0 cross, 1 circle, 2 square, 3 triangle, 4 diamond, 5 triangle on its tip, 6 star of
/// three strokes), about `size` px across, with the painter's pen and brush. Layers can be told apart by it alone.
void paintLayerSymbol(QPainter& painter, int layer, const QPointF& centre, double size);

}  // namespace strikeplate
