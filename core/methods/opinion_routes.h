#pragma once

#include <map>
#include <optional>
#include <tuple>
#include <vector>

#include "core/methods/opinion.h"
#include "core/methods/overburden.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

/// The groups of routes that secondOpinions() puts together.
namespace strikeplate::opinion_routes {

/// What the routes work on.
struct Evidence {
  const TravelTimes& times;
  const std::vector<Branch>& branches;
};

/// Keeps the surest opinion of each place: determined before not, then the smaller sigma.
class Surest {
 public:
  void offer(Opinion opinion);
  void moveInto(std::vector<Opinion>& opinions);

 private:
  std::map<std::tuple<int, int, double>, Opinion> best_;
};

/// What lies above layer `layer` at x: velocities and thicknesses under the shots by intercept times, interpolated
/// between them. Built once for all places.
class OverburdenModel {
 public:
  explicit OverburdenModel(const Evidence& evidence);
  [[nodiscard]] std::optional<Overburden> above(int layer, double x) const;

 private:
  std::vector<std::map<double, Datum>> slowness_, thickness_;  // by layer - 1, then by x of the shot
};

/// Intercept time and crossover distance below each shot.
void addLevelLayers(const Evidence& evidence, std::vector<Opinion>& opinions);
/// Dipping layers below each shot that has a reversed partner.
void addDippingLayers(const Evidence& evidence, std::vector<Opinion>& opinions);
/// Plus-minus and reciprocal depths below each geophone that a refractor was recorded at from both sides.
void addStationDepths(const Evidence& evidence, const OverburdenModel& overburden, std::vector<Opinion>& opinions);

/// Depths by time terms below each geophone whose term the picks fix, shots between geophones taking their terms.
void addTimeTerms(const Evidence& evidence, const OverburdenModel& overburden, std::vector<Opinion>& opinions);

/// The fitted lines of one shot's side from the direct one to layer `deepest`, as far as they follow without a gap.
std::vector<LineFit> linesDownTo(const Evidence& evidence, int shot, int side, int deepest);

}  // namespace strikeplate::opinion_routes
