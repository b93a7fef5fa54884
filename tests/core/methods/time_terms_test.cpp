#include "core/methods/time_terms.h"

#include <cmath>
#include <random>
#include <vector>

#include <gsl/gsl_blas.h>
#include <gsl/gsl_linalg.h>
#include <gtest/gtest.h>

namespace strikeplate {
namespace {

/// 23 geophones 5 m apart from 0 m over a refractor of 2000 m/s with terms that vary; every time through layer 2.
TravelTimes line(const std::vector<double>& shots, double noise = 0.0) {
  std::mt19937 random(5);
  std::normal_distribution<double> unit(0.0, 1.0);
  const auto term = [](double x) { return 5e-3 + 1e-3 * std::sin(x / 15.0); };
  TravelTimes times;
  for (int g = 0; g < 23; ++g) {
    times.geophones.push_back({5.0 * g, 0.0});
  }
  for (const double x : shots) {
    const int shot = static_cast<int>(times.shots.size());
    times.shots.push_back({x, 0.0, 0.0});
    for (int g = 0; g < 23; ++g) {
      const double at = 5.0 * g;
      if (at != x) {
        Arrival a;
        a.shot = shot;
        a.trace = a.geophone = g;
        a.layer = 2;
        a.sigma = 0.5e-3 * (1.0 + 0.1 * (g % 4));
        a.time = term(x) + term(at) + std::abs(at - x) / 2000.0 + noise * unit(random);
        times.arrivals.push_back(a);
      }
    }
  }
  return times;
}

struct Geometry {
  std::vector<double> shots;
  int unknowns, rank;
};

// Own ranks (reference 1.9), 23 geophones.
TEST(TimeTerms, RankAndNullSpaceOfEachGeometry) {
  for (const Geometry& g : {Geometry{{-7.0, -12.0}, 26, 24}, Geometry{{-12.0, -7.0, 117.0, 122.0}, 28, 27},
                            Geometry{{-7.0, 52.5, 117.0}, 27, 26}, Geometry{{0.0, 110.0}, 24, 24},
                            Geometry{{0.0, 55.0, 110.0}, 24, 24}}) {
    const TravelTimes times = line(g.shots);
    const TimeTerms terms = timeTerms(times, 2, TimeTerms::Sources::Own);
    ASSERT_TRUE(terms.determined);
    EXPECT_EQ(terms.unknowns, g.unknowns);
    EXPECT_EQ(terms.rank, g.rank);
    EXPECT_EQ(static_cast<int>(terms.freedom.size()), g.unknowns - g.rank);
    EXPECT_NEAR(terms.rms, 0.0, 1e-9);
  }
}

TEST(TimeTerms, ReversedShotsFixTheVelocityButNotTheConstant) {
  const TimeTerms terms = timeTerms(line({-7.0, 117.0}), 2, TimeTerms::Sources::Own);
  EXPECT_TRUE(terms.isFixed(terms.unknowns - 1));
  EXPECT_FALSE(terms.isFixed(0));
  EXPECT_NEAR(1.0 / terms.solution(terms.unknowns - 1), 2000.0, 1e-3);
  ASSERT_EQ(terms.freedom.size(), 1U);
  EXPECT_EQ(terms.freedom[0], "a constant between the terms of shots and of geophones that share no place");
}

TEST(TimeTerms, AShotBetweenGeophonesMayTakeTheirTerms) {
  const TimeTerms terms = timeTerms(line({-7.0, 52.5, 117.0}), 2, TimeTerms::Sources::Tied);
  EXPECT_EQ(terms.unknowns, terms.rank);
  EXPECT_TRUE(terms.isFixed(3));
  EXPECT_NEAR(terms.delay(3).time.value, 5e-3 + 1e-3 * std::sin(1.0), 2e-5);
}

// Against the singular value decomposition of the GNU Scientific Library.
TEST(TimeTerms, AgreeWithTheGnuScientificLibrary) {
  const TravelTimes times = line({0.0, 55.0, 110.0}, 0.5e-3);
  const TimeTerms terms = timeTerms(times, 2, TimeTerms::Sources::Own);
  const std::size_t rows = times.arrivals.size();
  gsl_matrix* u = gsl_matrix_calloc(rows, 24);
  gsl_matrix* v = gsl_matrix_alloc(24, 24);
  gsl_vector *s = gsl_vector_alloc(24), *work = gsl_vector_alloc(24), *b = gsl_vector_alloc(rows),
             *x = gsl_vector_alloc(24);
  for (std::size_t i = 0; i < rows; ++i) {
    const Arrival& a = times.arrivals[i];
    const auto shot = static_cast<std::size_t>(times.shots[static_cast<std::size_t>(a.shot)].x / 5.0);
    gsl_matrix_set(u, i, static_cast<std::size_t>(a.geophone), 1.0 / a.sigma);
    gsl_matrix_set(u, i, shot, 1.0 / a.sigma);
    gsl_matrix_set(u, i, 23, times.offset(a) / 100.0 / a.sigma);
    gsl_vector_set(b, i, a.time / a.sigma);
  }
  gsl_linalg_SV_decomp(u, v, s, work);
  gsl_linalg_SV_solve(u, v, s, b, x);
  for (std::size_t i = 0; i < 23; ++i) {
    EXPECT_NEAR(terms.solution(static_cast<Eigen::Index>(i)), gsl_vector_get(x, i), 1e-12);
    double variance = 0.0;
    for (std::size_t k = 0; k < 24; ++k) {
      variance += std::pow(gsl_matrix_get(v, i, k) / gsl_vector_get(s, k), 2);
    }
    EXPECT_NEAR(terms.delay(i).time.sigma / std::sqrt(variance), 1.0, 1e-7);
  }
  EXPECT_NEAR(terms.solution(23), gsl_vector_get(x, 23) / 100.0, 1e-14);
  gsl_matrix_free(u);
  gsl_matrix_free(v);
  for (gsl_vector* each : {s, work, b, x}) {
    gsl_vector_free(each);
  }
}

TEST(TimeTerms, TooFewPicksGiveAReason) {
  const TimeTerms terms = timeTerms({}, 2, TimeTerms::Sources::Own);
  EXPECT_FALSE(terms.determined);
  EXPECT_EQ(terms.reason, "fewer than three picks through this layer");
}

}  // namespace
}  // namespace strikeplate
