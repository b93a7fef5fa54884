#pragma once

#include <vector>

#include <QString>

#include "core/base/units.h"
#include "widgets/scene.h"

namespace strikeplate {

/// The ground of a survey, as the section has it.
Ground groundOf(const Survey& survey);

/// Elevations that the section plot shows, m.
struct ElevationRange {
  double bottom = -10.0, top = 1.0;
};

/// From the highest ground to below the deepest interface, with its 95 % band and hidden-layer allowance as far as
/// these do not make the section itself small (half of its height at most). The bottom lies on a round number, so
/// that it stays while a pick is dragged.
ElevationRange elevationRange(const Scene& scene);

/// How deep the top of a layer could lie if the thickest layer that never arrives first hid above it.
struct HiddenAllowance {
  int layer = 2;
  std::vector<double> depth;  ///< m below the ground, for each of Section::x; NaN where there is none
};

/// The worst case over hidden velocities, for every interface (see worstHiddenLayer); mean layer velocities are used.
std::vector<HiddenAllowance> hiddenAllowances(const Section& section);

/// Why there is no section, and what to do; empty when there is one.
QString emptyWords(const Scene& scene);

/// The layer at a depth (m below the ground) under x, or 0 where that is not determined.
int layerAt(const Section& section, double x, double depth);

/// "5.8 m (5.5 to 6.2 m)", or "not determined".
QString depthWords(const Units& units, const Estimate& depth);
/// "1620 m/s (1590 to 1650)", or "not determined".
QString velocityWords(const Units& units, const Estimate& velocity);
/// "430 ± 12 m/s", half the width of the 95 % interval.
QString velocityShort(const Units& units, const Estimate& velocity);

/// What is at a point of the section: x and elevation in m; `reach` (m, of elevation) is how near an interface has to
/// be to be meant.
QString sectionWords(const Scene& scene, double x, double elevation, double reach);
/// "Borehole BH1 at 46.0 m: top of layer 2 met at 6.0 m; the section has 5.8 m (5.5 to 6.2 m)".
QString boreholeWords(const Scene& scene, const Borehole& hole);

}  // namespace strikeplate
