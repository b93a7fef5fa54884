#include "widgets/travel_time_words.h"

#include <cmath>

#include <QCoreApplication>

#include "core/base/units.h"

namespace strikeplate {
namespace {

struct Words {
  Q_DECLARE_TR_FUNCTIONS(TravelTimePlot)
};

QString text(const std::string& words) {
  return QString::fromStdString(words);
}

QString sideName(int side) {
  return side > 0 ? Words::tr("forward") : Words::tr("reverse");
}

QString plusMinus(double value, double sigma, int decimals) {
  return QString("%1 \u00b1 %2").arg(value, 0, 'f', decimals).arg(kNormal95 * sigma, 0, 'f', decimals);
}

}  // namespace

QString arrivalWords(const Scene& scene, int arrival) {
  const Interpretation& interpretation = *scene.interpretation;
  const auto i = static_cast<std::size_t>(arrival);
  const Arrival& a = interpretation.times.arrivals[i];
  const Units units{scene.survey->settings.feet};
  QString words = Words::tr("Shot %1, trace %2 at %3: %4 \u00b1 %5")
                      .arg(a.shot + 1)
                      .arg(a.trace + 1)
                      .arg(text(units.length(interpretation.times.geophones[static_cast<std::size_t>(a.geophone)].x)))
                      .arg(1e3 * a.time, 0, 'f', 2)
                      .arg(text(milliseconds(kNormal95 * a.sigma, 2)));
  if (interpretation.section.determined && i < interpretation.section.predicted.size()) {
    const double predicted = interpretation.section.predicted[i];
    words += Words::tr(", section %1, difference %2")
                 .arg(text(milliseconds(predicted, 2)), text(milliseconds(a.time - predicted, 2)));
  }
  const QString by = a.layerByHand ? Words::tr("by hand") : Words::tr("by the program");
  return a.layer > 0 ? words + Words::tr(", layer %1 %2").arg(a.layer).arg(by) : words + Words::tr(", no layer");
}

QString branchWords(const Scene& scene, const Branch& branch) {
  const Units units{scene.survey->settings.feet};
  QString words =
      Words::tr("Layer %1 branch of shot %2, %3: ").arg(branch.layer).arg(branch.shot + 1).arg(sideName(branch.side));
  words += branch.velocity.determined
               ? plusMinus(units.fromMetres(branch.velocity.value), units.fromMetres(branch.velocity.sigma), 0) +
                     " " + text(units.velocityUnit())
               : text(branch.velocity.reason);
  words += branch.fit.throughOrigin
               ? Words::tr(", held to zero time at the shot")
               : Words::tr(", intercept time %1 ms")
                     .arg(plusMinus(1e3 * branch.fit.intercept, 1e3 * std::sqrt(branch.fit.varIntercept), 1));
  return words +
         Words::tr(", picks: %1, rms %2").arg(branch.arrivals.size()).arg(text(milliseconds(branch.fit.rms, 2)));
}

QString markWords(const Scene& scene, const BranchMark& mark) {
  const Units units{scene.survey->settings.feet};
  const QString distance =
      plusMinus(units.fromMetres(mark.offset), units.fromMetres(mark.sigma), 1) + " " + text(units.lengthUnit());
  switch (mark.kind) {
    case BranchMark::Kind::Crossover:
      return Words::tr("Crossover distance from layer %1 to %2, shot %3, %4: %5")
          .arg(mark.layer - 1)
          .arg(mark.layer)
          .arg(mark.shot + 1)
          .arg(sideName(mark.side), distance);
    case BranchMark::Kind::Critical:
      return Words::tr("Critical distance that the intercept time means, shot %1, %2: %3")
          .arg(mark.shot + 1)
          .arg(sideName(mark.side), distance);
    case BranchMark::Kind::CriticalByHand:
      return Words::tr("Critical distance by hand, shot %1: %2").arg(mark.shot + 1).arg(distance);
    case BranchMark::Kind::ReflectionByHand:
      break;
  }
  return Words::tr("Reflection time at zero offset by hand, shot %1: %2 ms")
      .arg(mark.shot + 1)
      .arg(plusMinus(1e3 * mark.time, 1e3 * mark.sigma, 1));
}

QString reciprocalWords(const ReciprocalPair& pair) {
  return Words::tr(
             "Shots %1 and %2: %3 and %4 at each other's place; the difference is %5, up to %6 is to be expected")
      .arg(pair.shotA + 1)
      .arg(pair.shotB + 1)
      .arg(text(milliseconds(pair.timeAB)), text(milliseconds(pair.timeBA)), text(milliseconds(pair.difference(), 2)),
           text(milliseconds(pair.tolerance, 2)));
}

}  // namespace strikeplate
