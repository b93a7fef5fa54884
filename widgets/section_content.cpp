#include "widgets/section_content.h"

#include <algorithm>
#include <cmath>
#include <limits>

#include <QCoreApplication>

#include "core/base/numbers.h"
#include "core/methods/blind_zone.h"
#include "widgets/position_range.h"

namespace strikeplate {
namespace {

struct Words {
  Q_DECLARE_TR_FUNCTIONS(Section)
};

QString text(const std::string& words) {
  return QString::fromStdString(words);
}

bool anyPick(const Survey& survey) {
  return std::any_of(survey.shots.begin(), survey.shots.end(), [](const Shot& shot) {
    return std::any_of(shot.traces.begin(), shot.traces.end(), [](const ShotTrace& t) { return t.pick.has_value(); });
  });
}

// Velocities to 10 above 1000, as Units::velocity has them, without the unit.
QString rounded(const Units& units, double velocity) {
  const double value = units.fromMetres(velocity);
  const double step = value >= 1000.0 ? 10.0 : 1.0;
  return text(fixed(std::round(value / step) * step, 0));
}

}  // namespace

Ground groundOf(const Survey& survey) {
  std::vector<ShotPoint> shots;
  for (const Shot& shot : survey.shots) {
    shots.push_back(shot.point);
  }
  return {survey.geophones, shots};
}

ElevationRange elevationRange(const Scene& scene) {
  const double infinite = std::numeric_limits<double>::infinity();
  double highest = -infinite, lowest = infinite, outer = infinite;
  for (const Geophone& geophone : scene.survey->geophones) {
    highest = std::max(highest, geophone.elevation);
    lowest = std::min(lowest, geophone.elevation);
  }
  for (const Shot& shot : scene.survey->shots) {
    highest = std::max(highest, shot.point.elevation);
    lowest = std::min(lowest, shot.point.elevation - shot.point.depth);
  }
  const Ground ground = groundOf(*scene.survey);
  for (const Borehole& hole : scene.survey->boreholes) {
    lowest = std::min(lowest, ground.at(hole.x) - hole.depth);
  }
  if (scene.interpretation && scene.interpretation->section.determined) {
    const Section& section = scene.interpretation->section;
    const auto allowances = hiddenAllowances(section);
    for (std::size_t n = 0; n < section.interfaces.size(); ++n) {
      for (std::size_t i = 0; i < section.x.size(); ++i) {
        const Estimate& depth = section.interfaces[n].depth[i];
        if (depth.determined) {
          lowest = std::min(lowest, section.ground[i] - depth.value);
          outer = std::min(outer, section.ground[i] - depth.high95);
          outer = std::min(outer, section.ground[i] - std::max(depth.value, allowances[n].depth[i]));
        }
      }
    }
  }
  if (!(lowest <= highest)) {
    return {};
  }
  lowest = std::min(lowest, highest - 2.0);
  const double span = highest - lowest;
  lowest = std::max(std::min(outer, lowest), lowest - 0.5 * span) - 0.04 * span;
  const Units units{scene.survey->settings.feet};
  const double step = niceStep(units.fromMetres(0.05 * span));
  return {units.toMetres(std::floor(units.fromMetres(lowest) / step) * step), highest};
}

std::vector<HiddenAllowance> hiddenAllowances(const Section& section) {
  std::vector<HiddenAllowance> out;
  for (std::size_t n = 0; n < section.interfaces.size(); ++n) {
    HiddenAllowance allowance{section.interfaces[n].layer, std::vector<double>(section.x.size(), Estimate::kNaN)};
    // The worst case grows in proportion to the thickness above the interface.
    const auto worst = worstHiddenLayer(section.velocities[n].value, section.velocities[n + 1].value, 1.0);
    for (std::size_t i = 0; worst && i < section.x.size(); ++i) {
      const double top = n > 0 ? section.interfaces[n - 1].depth[i].value : 0.0;
      const double thickness = section.interfaces[n].depth[i].value - top;
      allowance.depth[i] = thickness > 0.0 ? top + worst->deepest * thickness : Estimate::kNaN;
    }
    out.push_back(std::move(allowance));
  }
  return out;
}

QString emptyWords(const Scene& scene) {
  if (scene.survey->shots.empty()) {
    return Words::tr("Drop shot records on this window, or open them from the File menu.");
  }
  if (!anyPick(*scene.survey)) {
    return Words::tr("No first breaks yet. Pick them in the record, or let the program pick the line.");
  }
  if (!scene.interpretation) {
    return Words::tr("Interpreting...");
  }
  const Section& section = scene.interpretation->section;
  return section.determined ? QString() : Words::tr("No depth is determined: %1").arg(text(section.reason));
}

int layerAt(const Section& section, double x, double depth) {
  if (!section.determined || depth < 0.0) {
    return 0;
  }
  int layer = 1;
  for (const SectionInterface& interface : section.interfaces) {
    const Estimate top = section.depthAt(interface.layer, x);
    if (!top.determined) {
      return 0;
    }
    layer = depth >= top.value ? interface.layer : layer;
  }
  return layer;
}

QString depthWords(const Units& units, const Estimate& depth) {
  return depth.determined ? Words::tr("%1 (%2)").arg(text(units.length(depth.value)),
                                                     text(units.lengthRange(depth.low95, depth.high95)))
                          : Words::tr("not determined");
}

QString velocityWords(const Units& units, const Estimate& velocity) {
  return velocity.determined
             ? Words::tr("%1 (%2 to %3)")
                   .arg(text(units.velocity(velocity.value)), rounded(units, velocity.low95),
                        std::isfinite(velocity.high95) ? rounded(units, velocity.high95) : Words::tr("no limit"))
             : Words::tr("not determined");
}

QString velocityShort(const Units& units, const Estimate& velocity) {
  return velocity.determined && std::isfinite(velocity.high95)
             ? rounded(units, velocity.value) + QString::fromUtf8(" \u00b1 ") +
                   text(fixed(units.fromMetres(0.5 * (velocity.high95 - velocity.low95)), 0)) + " " +
                   text(units.velocityUnit())
             : velocityWords(units, velocity);
}

QString sectionWords(const Scene& scene, double x, double elevation, double reach) {
  const Units units{scene.survey->settings.feet};
  const Ground ground = groundOf(*scene.survey);
  const double depth = ground.at(x) - elevation;
  QString words = Words::tr("%1, elevation %2").arg(text(units.length(x)), text(units.length(elevation)));
  if (!scene.interpretation || !scene.interpretation->section.determined) {
    return words;
  }
  const Section& section = scene.interpretation->section;
  for (const SectionInterface& interface : section.interfaces) {
    const Estimate top = section.depthAt(interface.layer, x);
    if (top.determined && std::abs(top.value - depth) <= reach) {
      return Words::tr("Top of layer %1 under %2: %3, 95 %")
          .arg(interface.layer)
          .arg(text(units.length(x)), depthWords(units, top));
    }
  }
  if (const int layer = layerAt(section, x, depth)) {
    words += Words::tr(", %1 deep: layer %2, %3")
                 .arg(text(units.length(depth)))
                 .arg(layer)
                 .arg(velocityWords(units, section.velocities[static_cast<std::size_t>(layer - 1)]));
  }
  return words;
}

QString boreholeWords(const Scene& scene, const Borehole& hole) {
  const Units units{scene.survey->settings.feet};
  QString words = Words::tr("Borehole %1 at %2: top of layer %3 met at %4")
                      .arg(text(hole.name), text(units.length(hole.x)))
                      .arg(hole.layer)
                      .arg(text(units.length(hole.depth)));
  if (scene.interpretation) {
    const Estimate depth = scene.interpretation->section.depthAt(hole.layer, hole.x);
    words += Words::tr("; the section has %1").arg(depthWords(units, depth));
  }
  return words + (hole.used ? Words::tr("; it is used") : QString());
}

}  // namespace strikeplate
