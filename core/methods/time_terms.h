#pragma once

#include <string>
#include <vector>

#include <Eigen/Core>

#include "core/methods/overburden.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// Time terms of one refractor: t(shot, geophone) = a(shot) + b(geophone) + distance * slowness, by weighted least
/// squares over every pick of the layer.
struct TimeTerms {
  /// How source terms are told from receiver terms.
  enum class Sources {
    Own,   ///< each shot has a term of its own, shared only with a geophone at the very same place
    Tied,  ///< a shot between two geophones takes the value interpolated between their terms
  };

  bool determined = false;           ///< the times could be solved, up to the null space
  std::string reason;                ///< why not
  std::vector<int> geophones;        ///< whose terms were sought, indices into TravelTimes::geophones, rising
  std::vector<int> ownShots;         ///< shots with a term of their own
  int unknowns = 0, rank = 0;        ///< terms of geophones, of shots, and the slowness
  Eigen::MatrixXd nullSpace;         ///< unknowns x (unknowns - rank): what may be added without changing any time
  std::vector<std::string> freedom;  ///< the null space in words; empty when nothing is free
  Eigen::VectorXd solution;          ///< geophones (s), own shots (s), slowness (s/m); of least norm where free
  Eigen::MatrixXd covariance;        ///< of the determined part
  double rms = 0.0;                  ///< s, of the residuals

  /// Nothing can be added to this unknown without changing a time.
  [[nodiscard]] bool isFixed(Eigen::Index unknown) const;
  /// The delay below geophone number `i` of `geophones`. Meaningful only where it and the slowness are fixed.
  [[nodiscard]] Delay delay(std::size_t i) const;
};

/// Solves for the time terms of `layer`. The null space is reported, not hidden: shots and geophones that share no
/// place leave a constant free between them; shots on one side only leave velocity and trend free as well.
/// Not determined with fewer than three picks.
/// Source: Scheidegger and Willmore, Geophysics 22 (1957) 9-22; Willmore and Bancroft, Geophys. J. 3 (1960) 419-432.
TimeTerms timeTerms(const TravelTimes& times, int layer, TimeTerms::Sources sources);

}  // namespace strikeplate
