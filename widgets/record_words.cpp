#include "widgets/record_words.h"

#include <algorithm>
#include <cmath>

#include <QCoreApplication>
#include <QStringList>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/record/onset_shift.h"

namespace strikeplate {
namespace {

QString tr(const char* text) {
  return QCoreApplication::translate("RecordView", text);
}

QString ms(double seconds, int decimals = 1) {
  return QString::fromStdString(milliseconds(seconds, decimals));
}

QString originWord(PickOrigin origin) {
  return origin == PickOrigin::Hand       ? tr("by hand")
         : origin == PickOrigin::Imported ? tr("from a table")
                                          : tr("automatic");
}

QString stateWord(TraceState state) {
  return state == TraceState::Dead       ? tr("dead")
         : state == TraceState::Reversed ? tr("reversed and shown turned over")
                                         : tr("noisy");
}

}  // namespace

QString onsetWords(const PassBand& band) {
  const double shift = onsetShift(band);
  const QString size = ms(std::abs(shift), 2);
  return shift < 0.0 ? tr("first breaks seem %1 early").arg(size) : tr("first breaks seem %1 late").arg(size);
}

QString hoverWords(const RecordPicture& picture, int trace, double recorderTime) {
  const auto t = static_cast<std::size_t>(trace);
  const Units units{picture.scene.survey->settings.feet};
  const double correction = picture.shot.triggerCorrection;
  const ShotTrace& of = picture.shot.traces[t];
  QStringList words;
  words << tr("Shot %1, trace %2 at %3 (offset %4)")
               .arg(picture.shotIndex() + 1)
               .arg(trace + 1)
               .arg(QString::fromStdString(units.length(picture.gather.geophones[t].x)))
               .arg(QString::fromStdString(units.length(picture.gather.offset(t))));
  if (std::isfinite(recorderTime)) {
    words << ms(recorderTime + correction);
  }
  if (of.state != TraceState::Live) {
    words << (of.stateReason.empty()
                  ? tr("trace is %1").arg(stateWord(of.state))
                  : tr("trace is %1: %2").arg(stateWord(of.state), QString::fromStdString(of.stateReason)));
  }
  const double predicted = picture.predictedOf(trace);
  if (of.pick) {
    words << QString::fromUtf8("%1 %2 \u00b1 %3 (%4)")
                 .arg(tr("pick"), QString::fromStdString(fixed(1e3 * (of.pick->time + correction), 2)),
                      ms(of.pick->sigma, 2), originWord(of.pick->origin));
  }
  if (std::isfinite(predicted)) {
    words << tr("predicted %1").arg(ms(predicted + correction, 2));
    if (of.pick) {
      const double residual = of.pick->time - predicted;
      words << tr("residual %1%2").arg(residual >= 0.0 ? "+" : "", ms(residual, 2));
    }
  }
  if (picture.scene.interpretation) {
    const auto& doubts = picture.scene.interpretation->doubts;
    const auto doubt = std::find_if(doubts.begin(), doubts.end(), [&](const Doubt& each) {
      return each.shot == picture.shotIndex() && each.trace == trace;
    });
    if (doubt != doubts.end()) {
      words << QString::fromStdString(doubt->says);
    }
  }
  return words.join("; ");
}

}  // namespace strikeplate
