#include "widgets/line_strip_content.h"

#include <algorithm>
#include <cmath>

#include <QCoreApplication>

#include "core/base/units.h"

namespace strikeplate {
namespace {

struct Words {
  Q_DECLARE_TR_FUNCTIONS(LineStrip)
};

QString length(const Scene& scene, double metres, int decimals = 1) {
  return QString::fromStdString(Units{scene.survey->settings.feet}.length(metres, decimals));
}

bool validShot(const Scene& scene, int shot) {
  return shot >= 0 && shot < static_cast<int>(scene.survey->shots.size());
}

}  // namespace

std::vector<StripShot> stripShots(const Scene& scene) {
  std::vector<StripShot> out;
  for (const Shot& shot : scene.survey->shots) {
    StripShot strip;
    strip.point = shot.point;
    for (const ShotTrace& trace : shot.traces) {
      if (trace.state != TraceState::Dead) {
        ++strip.traces;
        strip.picks += trace.pick ? 1 : 0;
      }
    }
    out.push_back(strip);
  }
  if (scene.interpretation) {
    for (const Doubt& doubt : scene.interpretation->doubts) {
      if (validShot(scene, doubt.shot)) {
        ++out[static_cast<std::size_t>(doubt.shot)].doubts;
      }
    }
  }
  return out;
}

QString shotWords(const Scene& scene, int shot) {
  if (!validShot(scene, shot)) {
    return {};
  }
  const StripShot strip = stripShots(scene)[static_cast<std::size_t>(shot)];
  QString text = Words::tr("Shot %1 at %2").arg(shot + 1).arg(length(scene, strip.point.x));
  if (strip.point.depth > 0.0) {
    text += Words::tr(", %1 deep").arg(length(scene, strip.point.depth));
  }
  text += Words::tr(": %1 of %2 traces picked").arg(strip.picks).arg(strip.traces);
  if (strip.doubts > 0) {
    text += strip.doubts == 1 ? Words::tr(", 1 doubt") : Words::tr(", %1 doubts").arg(strip.doubts);
  }
  return text;
}

QString geophoneWords(const Scene& scene, int geophone) {
  const Survey& survey = *scene.survey;
  const Geophone& place = survey.geophones[static_cast<std::size_t>(geophone)];
  QString text = Words::tr("Geophone %1 at %2, elevation %3")
                     .arg(geophone + 1)
                     .arg(length(scene, place.x), length(scene, place.elevation));
  const int trace = traceAt(survey, scene.selection.shot, geophone);
  if (trace >= 0) {
    const ShotTrace& of =
        survey.shots[static_cast<std::size_t>(scene.selection.shot)].traces[static_cast<std::size_t>(trace)];
    text += Words::tr(": trace %1 of shot %2, ").arg(trace + 1).arg(scene.selection.shot + 1);
    text += of.state == TraceState::Dead ? Words::tr("dead")
            : of.pick                    ? Words::tr("picked")
                                         : Words::tr("not picked");
  }
  return text;
}

int traceAt(const Survey& survey, int shot, int geophone) {
  if (shot < 0 || shot >= static_cast<int>(survey.shots.size())) {
    return -1;
  }
  const auto& traces = survey.shots[static_cast<std::size_t>(shot)].traces;
  const auto found =
      std::find_if(traces.begin(), traces.end(), [&](const ShotTrace& t) { return t.geophone == geophone; });
  return found == traces.end() ? -1 : static_cast<int>(found - traces.begin());
}

ShotPoint draggedPoint(const Survey& survey, int shot, double x, double reach, double step) {
  const ShotPoint& before = survey.shots[static_cast<std::size_t>(shot)].point;
  const Ground ground(survey.geophones, {});
  ShotPoint point = before;
  const Units units{survey.settings.feet};
  point.x = units.toMetres(std::round(units.fromMetres(x) / step) * step);
  double nearest = reach;
  for (const Geophone& geophone : survey.geophones) {
    if (std::abs(geophone.x - x) <= nearest) {
      nearest = std::abs(geophone.x - x);
      point.x = geophone.x;
    }
  }
  point.elevation = before.elevation + ground.at(point.x) - ground.at(before.x);
  return point;
}

int indexAfterMove(const Survey& survey, int shot, double x) {
  const auto left = [](const Shot& a, const Shot& b) { return a.point.x < b.point.x; };
  if (!std::is_sorted(survey.shots.begin(), survey.shots.end(), left)) {
    return shot;
  }
  int index = 0;
  for (int other = 0; other < static_cast<int>(survey.shots.size()); ++other) {
    const double at = survey.shots[static_cast<std::size_t>(other)].point.x;
    index += other != shot && (at < x || (at == x && other < shot)) ? 1 : 0;
  }
  return index;
}

}  // namespace strikeplate
