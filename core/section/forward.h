#pragma once

#include <vector>

#include "core/section/ray.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// A pick as the inversion sees it.
struct SectionPick {
  int shot = 0;      ///< index into SectionPicks::shots
  int geophone = 0;  ///< index into SectionPicks::geophones
  double time = 0.0;
  double sigma = 0.0;
  int heldLayer = 0;  ///< > 0 when the user says which layer it belongs to
};

/// All picks with their places, and the length of the direct wave's way, which depends on the ground alone.
struct SectionPicks {
  std::vector<SectionPoint> shots;
  std::vector<SectionPoint> geophones;
  std::vector<SectionPick> picks;
  std::vector<double> directLength;  ///< m, for each pick

  [[nodiscard]] int count() const { return static_cast<int>(picks.size()); }
};

SectionPicks makeSectionPicks(const TravelTimes& times);

/// First arrivals through a section: the direct wave, and a head wave along each interface.
///
/// The direct wave keeps to the shortest way under the ground surface. A head wave takes the least time over all
/// ways from shot to geophone that touch its interface (Fermat's principle): first over nodes, then with the
/// crossings moved to their exact places (ray.h). Rays are straight within a layer; where velocity varies along the
/// line a leg takes the mean slowness over its x range. Keeps a reference to the picks.
class SectionForward {
 public:
  SectionForward(SectionModel model, const SectionPicks& picks);

  /// s, time of pick i through layer 1, 2, ...
  [[nodiscard]] double time(int pick, int layer) const {
    return layer == 1 ? direct_[pick] : waves_[layer - 2][pick].time;
  }
  /// The ray of pick i through layer 2, 3, ...
  [[nodiscard]] const HeadWave& wave(int pick, int layer) const { return waves_[layer - 2][pick]; }
  /// Layer through which pick i comes first.
  [[nodiscard]] int earliest(int pick) const;
  [[nodiscard]] const SectionModel& model() const { return model_; }
  [[nodiscard]] const SectionPicks& picks() const { return *picks_; }

 private:
  SectionModel model_;
  const SectionPicks* picks_;
  std::vector<double> direct_;
  std::vector<std::vector<HeadWave>> waves_;
};

}  // namespace strikeplate
