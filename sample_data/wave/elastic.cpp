#include "sample_data/wave/elastic.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#ifdef __SSE2__
#include <xmmintrin.h>
#endif

namespace strikeplate::wave {

namespace {

constexpr float kNear = 9.0F / 8.0F;
constexpr float kWide = -1.0F / 24.0F;
constexpr double kCourant = 0.58;  // stable below 6/7 / sqrt(2) = 0.606 (Levander 1988)
constexpr int kAboveRows = 4;

/// Elastic constants of one cell, means over its height; all zero in the air.
struct Cell {
  double rho = 0.0;
  double modulus = 0.0;  // lambda + 2 mu
  double mu = 0.0;
};

/// The wave grid: cell (i, j) is centred at left + i h, top - j h; vertical velocities lie half a step below centres,
/// and the ground at every column is at such a half step.
class Field {
 public:
  Field(const Scene& scene, double step);

  void advanceVelocity();
  void advanceStress();
  void push(const Place& place, double force);
  [[nodiscard]] double vertical(const Place& place) const { return vz_[surfaceNode(place)]; }

 private:
  [[nodiscard]] std::size_t at(int i, int j) const {
    return static_cast<std::size_t>(j) * static_cast<std::size_t>(columns_) + static_cast<std::size_t>(i);
  }
  [[nodiscard]] std::size_t surfaceNode(const Place& p) const {
    return at(static_cast<int>(std::lround((p.x - left_) / h_)),
              static_cast<int>(std::lround((top_ - p.elevation) / h_ - 0.5)));
  }
  [[nodiscard]] Cell cellAt(int i, int j, double ground) const;
  void layOut();
  void fillMedium();
  void fillDamping();
  [[nodiscard]] float damping(double intoEdge) const;

  const Scene& scene_;
  double h_;
  double dt_;
  double left_ = 0.0;
  double top_ = 0.0;
  int columns_ = 0;
  int rows_ = 0;
  int plainRow_ = 0;  // from here down all stencils are clear of the air
  std::vector<float> vx_, vz_, sxx_, szz_, sxz_;
  std::vector<float> bx_, bz_, modulus_, lambda_, mu_;  // times dt / h
  std::vector<float> dampColumn_, dampRow_;
};

Field::Field(const Scene& scene, double step) : scene_(scene), h_(scene.step), dt_(step) {
  layOut();
  const auto n = static_cast<std::size_t>(columns_) * static_cast<std::size_t>(rows_);
  for (auto* field : {&vx_, &vz_, &sxx_, &szz_, &sxz_, &bx_, &bz_, &modulus_, &lambda_, &mu_})
    field->assign(n, 0.0F);
  fillMedium();
  fillDamping();
}

void Field::layOut() {
  double low = scene_.geophones.front().x;
  double high = low;
  for (const auto* places : {&scene_.geophones, &scene_.shots}) {
    for (const Place& p : *places)
      low = std::min(low, p.x), high = std::max(high, p.x);
  }
  left_ = low - std::ceil(scene_.margin / h_) * h_;
  columns_ = static_cast<int>(std::lround((high - low + 2.0 * scene_.margin) / h_)) + 1;
  double highest = scene_.ground.elevation.front();
  double lowest = highest;
  for (const double z : scene_.ground.elevation)
    highest = std::max(highest, z), lowest = std::min(lowest, z);
  top_ = (std::round(highest / h_) + kAboveRows + 0.5) * h_;
  rows_ = static_cast<int>(std::ceil((top_ - lowest + scene_.depth) / h_));
  plainRow_ = static_cast<int>(std::lround((top_ - lowest) / h_)) + 3;
}

Cell Field::cellAt(int i, int j, double ground) const {
  const double x = left_ + i * h_;
  const double z = top_ - j * h_;
  if (z > ground)
    return {};
  constexpr int kParts = 8;
  Cell mean;
  double softness = 0.0;
  double shearSoftness = 0.0;
  for (int k = 0; k < kParts; ++k) {
    const double part = z + h_ * ((k + 0.5) / kParts - 0.5);
    const auto [n, layerTop] = scene_.layerAt(x, part);
    const Layer& layer = scene_.layers[static_cast<std::size_t>(n)];
    const double vp = layer.vp + layer.gradient * std::max(0.0, layerTop - part);
    const double vs = layer.vs * vp / layer.vp;
    mean.rho += layer.rho / kParts;
    softness += 1.0 / (layer.rho * vp * vp) / kParts;
    shearSoftness += 1.0 / std::max(1.0, layer.rho * vs * vs) / kParts;
  }
  mean.modulus = 1.0 / softness;
  mean.mu = 1.0 / shearSoftness;
  return mean;
}

void Field::fillMedium() {
  const auto n = static_cast<std::size_t>(columns_) * static_cast<std::size_t>(rows_);
  std::vector<Cell> cells(n);
  for (int i = 0; i < columns_; ++i) {
    const double ground = std::round(scene_.ground.at(left_ + i * h_) / h_) * h_;
    for (int j = 0; j < rows_; ++j)
      cells[at(i, j)] = cellAt(i, j, ground);
  }
  const auto r = static_cast<float>(dt_ / h_);
  const auto lightness = [r](const Cell& a, const Cell& b) {
    const double rho = 0.5 * (a.rho + b.rho);
    return rho > 0.0 ? r / static_cast<float>(rho) : 0.0F;
  };
  for (int j = 0; j + 1 < rows_; ++j) {
    for (int i = 0; i + 1 < columns_; ++i) {
      const Cell& c = cells[at(i, j)];
      const Cell& right = cells[at(i + 1, j)];
      const Cell& below = cells[at(i, j + 1)];
      const Cell& corner = cells[at(i + 1, j + 1)];
      bx_[at(i, j)] = lightness(c, right);
      bz_[at(i, j)] = lightness(c, below);
      modulus_[at(i, j)] = r * static_cast<float>(c.modulus);
      lambda_[at(i, j)] = r * static_cast<float>(c.modulus - 2.0 * c.mu);
      if (c.mu > 0.0 && right.mu > 0.0 && below.mu > 0.0 && corner.mu > 0.0) {
        mu_[at(i, j)] =
            r * static_cast<float>(4.0 / (1.0 / c.mu + 1.0 / right.mu + 1.0 / below.mu + 1.0 / corner.mu));
      }
    }
  }
}

float Field::damping(double intoEdge) const {
  if (intoEdge <= 0.0)
    return 1.0F;
  constexpr double kReflected = 1e-3;
  constexpr double kSpeed = 1500.0;  // m/s, between soil's and rock's
  const double largest = 1.5 * kSpeed * std::log(1.0 / kReflected) / scene_.absorbing;
  const double share = intoEdge / scene_.absorbing;
  return static_cast<float>(std::exp(-largest * share * share * dt_));
}

void Field::fillDamping() {
  for (int i = 0; i < columns_; ++i) {
    const double edge = std::min(i, columns_ - 1 - i) * h_;
    dampColumn_.push_back(damping(scene_.absorbing - edge));
  }
  for (int j = 0; j < rows_; ++j)
    dampRow_.push_back(damping(scene_.absorbing - (rows_ - 1 - j) * h_));
}

void Field::advanceVelocity() {
  const std::ptrdiff_t w = columns_;
  for (int j = 2; j + 2 < rows_; ++j) {
    const float near = j < plainRow_ ? 1.0F : kNear;
    const float wide = j < plainRow_ ? 0.0F : kWide;
    const float down = dampRow_[static_cast<std::size_t>(j)];
    const std::size_t row = at(0, j);
    const float* sxx = sxx_.data() + row;
    const float* szz = szz_.data() + row;
    const float* sxz = sxz_.data() + row;
    const float* bx = bx_.data() + row;
    const float* bz = bz_.data() + row;
    float* __restrict vx = vx_.data() + row;
    float* __restrict vz = vz_.data() + row;
    const float* damp = dampColumn_.data();
    for (int i = 2; i + 2 < columns_; ++i) {
      const float d = down * damp[i];
      const float ax = near * (sxx[i + 1] - sxx[i] + sxz[i] - sxz[i - w]) +
                       wide * (sxx[i + 2] - sxx[i - 1] + sxz[i + w] - sxz[i - 2 * w]);
      const float az = near * (szz[i + w] - szz[i] + sxz[i] - sxz[i - 1]) +
                       wide * (szz[i + 2 * w] - szz[i - w] + sxz[i + 1] - sxz[i - 2]);
      vx[i] = d * (vx[i] + bx[i] * ax);
      vz[i] = d * (vz[i] + bz[i] * az);
    }
  }
}

void Field::advanceStress() {
  const std::ptrdiff_t w = columns_;
  for (int j = 2; j + 2 < rows_; ++j) {
    const float near = j < plainRow_ ? 1.0F : kNear;
    const float wide = j < plainRow_ ? 0.0F : kWide;
    const float down = dampRow_[static_cast<std::size_t>(j)];
    const std::size_t row = at(0, j);
    const float* vx = vx_.data() + row;
    const float* vz = vz_.data() + row;
    const float* modulus = modulus_.data() + row;
    const float* lambda = lambda_.data() + row;
    const float* mu = mu_.data() + row;
    float* __restrict sxx = sxx_.data() + row;
    float* __restrict szz = szz_.data() + row;
    float* __restrict sxz = sxz_.data() + row;
    const float* damp = dampColumn_.data();
    for (int i = 2; i + 2 < columns_; ++i) {
      const float d = down * damp[i];
      const float exx = near * (vx[i] - vx[i - 1]) + wide * (vx[i + 1] - vx[i - 2]);
      const float ezz = near * (vz[i] - vz[i - w]) + wide * (vz[i + w] - vz[i - 2 * w]);
      const float exz =
          near * (vx[i + w] - vx[i] + vz[i + 1] - vz[i]) + wide * (vx[i + 2 * w] - vx[i - w] + vz[i + 2] - vz[i - 1]);
      sxx[i] = d * (sxx[i] + modulus[i] * exx + lambda[i] * ezz);
      szz[i] = d * (szz[i] + modulus[i] * ezz + lambda[i] * exx);
      sxz[i] = d * (sxz[i] + mu[i] * exz);
    }
  }
}

void Field::push(const Place& place, double force) {
  const std::size_t node = surfaceNode(place);
  vz_[node] += bz_[node] * static_cast<float>(force / h_);
}

double fastest(const Scene& scene) {
  double v = 0.0;
  for (const Layer& l : scene.layers)
    v = std::max(v, l.vp + l.gradient * (scene.depth + 20.0));
  return v;
}

/// Ahead of the waves the fields hold numbers too small for a normal float: slow to work with, and without meaning.
/// While this lives they count as zero, where the processor can do that.
class TinyIsZero {
 public:
#ifdef __SSE2__
  TinyIsZero() {
    _mm_setcsr(before_ | 0x8040U);
  }
  ~TinyIsZero() {
    _mm_setcsr(before_);
  }
  TinyIsZero(const TinyIsZero&) = delete;
  TinyIsZero& operator=(const TinyIsZero&) = delete;

 private:
  unsigned before_ = _mm_getcsr();
#endif
};

}  // namespace

double pulseForce(Pulse pulse, double tau, double t) {
  if (t <= 0.0)
    return 0.0;
  const double u = t / tau;
  switch (pulse) {
    case Pulse::SquareExponential:
      return u * u * std::exp(2.0 * (1.0 - u));
    case Pulse::LinearExponential:
      return u * std::exp(1.0 - u);
    case Pulse::RaisedCosine:
      return u < 2.0 ? 0.5 * (1.0 - std::cos(std::numbers::pi * u)) : 0.0;
  }
  return 0.0;
}

Motion strike(const Scene& scene, const Place& shot, double seconds) {
  const double parts = std::ceil(scene.interval * fastest(scene) / (kCourant * scene.step));
  Motion motion;
  motion.interval = scene.interval / parts;
  motion.velocity.resize(scene.geophones.size());
  Field field(scene, motion.interval);
  [[maybe_unused]] const TinyIsZero tiny;
  const int steps = static_cast<int>(std::ceil(seconds / motion.interval));
  for (auto& trace : motion.velocity)
    trace.push_back(0.0);
  for (int n = 0; n < steps; ++n) {
    field.advanceStress();
    field.advanceVelocity();
    field.push(shot, pulseForce(scene.pulse, scene.tau, (n + 0.5) * motion.interval));
    for (std::size_t g = 0; g < scene.geophones.size(); ++g) {
      motion.velocity[g].push_back(field.vertical(scene.geophones[g]));
    }
  }
  return motion;
}

}  // namespace strikeplate::wave
