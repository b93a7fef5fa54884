#pragma once

#include <utility>
#include <vector>

#include "widgets/view.h"

// Everything a view has asked for, as the window would get it. The view must not outlive the log.
namespace strikeplate::testing {

struct ViewLog {
  struct Proposal {
    Edit edit;
    Phase phase;
  };

  explicit ViewLog(View& view) {
    QObject::connect(&view, &View::proposed, &view, [this](const Edit& e, Phase p) { proposals.push_back({e, p}); });
    QObject::connect(&view, &View::selectionWanted, &view, [this](const Selection& s) { selections.push_back(s); });
    QObject::connect(&view, &View::plumbLineWanted, &view, [this](double x) { plumbLines.push_back(x); });
    QObject::connect(&view, &View::positionRangeWanted, &view,
                     [this](double left, double right) { ranges.emplace_back(left, right); });
    QObject::connect(&view, &View::hint, &view, [this](const QString& text) { hints.push_back(text); });
  }

  std::vector<Proposal> proposals;
  std::vector<Selection> selections;
  std::vector<double> plumbLines;
  std::vector<std::pair<double, double>> ranges;
  std::vector<QString> hints;
};

}  // namespace strikeplate::testing
