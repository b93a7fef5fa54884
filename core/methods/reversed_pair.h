#pragma once

#include <string>
#include <vector>

#include "core/methods/overburden.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// A quantity that depends linearly on the picks of a reversed pair: its value and its derivative by each pick.
struct LinearInPicks {
  double value = 0.0;
  std::vector<double> weights;
};

/// A geophone that recorded one refractor from both shots.
struct ReversedStation {
  int geophone = 0;          ///< index into TravelTimes::geophones
  double x = 0.0;            ///< m
  std::size_t a = 0, b = 0;  ///< its picks in ReversedPair
  double plus = 0.0;         ///< s, t_A + t_B - t_AB
  double minus = 0.0;        ///< s, t_A - t_B
};

/// One refractor seen from shot A and, back, from shot B at larger x.
struct ReversedPair {
  bool determined = false;
  std::string reason;  ///< why not
  int shotA = 0, shotB = 0, layer = 2;
  double length = 0.0;              ///< m, from A to B
  std::vector<double> offset;       ///< m, of every pick, those of A's branch first
  std::vector<double> time, sigma;  ///< s
  std::size_t picksOfA = 0;
  std::vector<ReversedStation> stations;  ///< rising x
  LinearInPicks reciprocalTime;           ///< s, t_AB
  LinearInPicks minusSlowness;            ///< s/m, half the slope of the minus times
  LinearInPicks meanSlowness;             ///< s/m, mean of the two branches' slopes

  /// Covariance of two quantities, and one standard deviation of one.
  [[nodiscard]] double covariance(const LinearInPicks& p, const LinearInPicks& q) const;
  [[nodiscard]] double sigmaOf(const LinearInPicks& p) const;
};

/// The pair of a branch of A (side +1) and one of B (side -1) through the same layer. The reciprocal time is the mean
/// of both branches read at the other shot: on a line through the five picks nearest to it where they reach to within
/// a tenth of the distance, else on the whole branch. Not determined with fewer than three stations in common.
/// Source: Hagedoorn, Geophys. Prosp. 7 (1959) 158-182; reading of the reciprocal time: common practice, no source.
ReversedPair reversedPair(const TravelTimes& times, const Branch& fromA, const Branch& fromB);

/// Depth at a station from its plus time, D = plus/2, with a refractor slowness out of the same picks.
Estimate stationDepth(const ReversedPair& pair, const ReversedStation& station, const LinearInPicks& slowness,
                      const Overburden& above);

}  // namespace strikeplate
