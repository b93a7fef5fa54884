#include "core/traveltime/line_fit.h"

#include <random>
#include <vector>

#include <gsl/gsl_fit.h>
#include <gtest/gtest.h>

namespace strikeplate {
namespace {

struct Sample {
  std::vector<double> x, w, t;
  std::vector<FitPoint> points;
};

Sample sample(unsigned seed) {
  std::mt19937 random(seed);
  std::uniform_real_distribution<double> offset(2.0, 120.0), spread(0.2e-3, 3e-3);
  std::normal_distribution<double> unit(0.0, 1.0);
  Sample s;
  for (int i = 0; i < 15; ++i) {
    const double x = offset(random), sigma = spread(random), t = 0.012 + x / 1800.0 + sigma * unit(random);
    s.x.push_back(x);
    s.w.push_back(1.0 / (sigma * sigma));
    s.t.push_back(t);
    s.points.push_back({x, t, sigma});
  }
  return s;
}

// Against the GNU Scientific Library, gsl_fit_wlinear.
TEST(LineFit, AgreesWithTheGnuScientificLibrary) {
  for (unsigned seed = 1; seed <= 20; ++seed) {
    const Sample s = sample(seed);
    double c0 = 0, c1 = 0, v00 = 0, v01 = 0, v11 = 0, chi = 0;
    gsl_fit_wlinear(s.x.data(), 1, s.w.data(), 1, s.t.data(), 1, s.x.size(), &c0, &c1, &v00, &v01, &v11, &chi);
    const LineFit fit = fitLine(s.points);
    ASSERT_TRUE(fit.determined);
    EXPECT_NEAR(fit.intercept, c0, 1e-12);
    EXPECT_NEAR(fit.slope, c1, 1e-14);
    EXPECT_NEAR(fit.varIntercept / v00, 1.0, 1e-9);
    EXPECT_NEAR(fit.varSlope / v11, 1.0, 1e-9);
    EXPECT_NEAR(fit.covariance / v01, 1.0, 1e-9);
    double at = 0, error = 0;
    gsl_fit_linear_est(77.0, c0, c1, v00, v01, v11, &at, &error);
    EXPECT_NEAR(fit.at(77.0), at, 1e-12);
    EXPECT_NEAR(varianceAt(fit, 77.0) / (error * error), 1.0, 1e-8);
  }
}

// Against gsl_fit_wmul.
TEST(LineFit, ThroughTheOriginAgreesWithTheGnuScientificLibrary) {
  const Sample s = sample(3);
  double c1 = 0, v11 = 0, chi = 0;
  gsl_fit_wmul(s.x.data(), 1, s.w.data(), 1, s.t.data(), 1, s.x.size(), &c1, &v11, &chi);
  const LineFit fit = fitLineThroughOrigin(s.points);
  ASSERT_TRUE(fit.determined);
  EXPECT_TRUE(fit.throughOrigin);
  EXPECT_NEAR(fit.slope, c1, 1e-14);
  EXPECT_NEAR(fit.varSlope / v11, 1.0, 1e-9);
  EXPECT_EQ(fit.intercept, 0.0);
}

TEST(LineFit, WrongInputGivesAReasonAndNoLine) {
  const std::vector<FitPoint> one = {{10, 0.02, 1e-3}};
  EXPECT_EQ(fitLine(one).reason, "a line needs two picks at different offsets");
  const std::vector<FitPoint> same = {{10, 0.02, 1e-3}, {10, 0.03, 1e-3}};
  EXPECT_FALSE(fitLine(same).determined);
  const std::vector<FitPoint> noSigma = {{10, 0.02, 1e-3}, {20, 0.03, 0.0}};
  EXPECT_EQ(fitLine(noSigma).reason, "a pick has no usable time or sigma");
  EXPECT_FALSE(fitLineThroughOrigin(noSigma).determined);
  EXPECT_FALSE(fitLineThroughOrigin({}).determined);
}

}  // namespace
}  // namespace strikeplate
