#include "core/section/sensitivity.h"

#include <algorithm>
#include <cmath>

#include "core/section/hats.h"

namespace strikeplate {
namespace {

// Below this an upper interface is not felt by a lower one.
constexpr double kChainFelt = 1e-9;

class Derivative {
 public:
  Derivative(const SectionModel& model, RowGatherer& gatherer) : model_(model), gatherer_(gatherer) {}

  void node(int k, int j, double perMetre) {
    const SectionGrid& grid = *model_.grid;
    const SectionGrid::Weights& t = grid.toKnots[j];
    for (int l = 1; l <= k; ++l) {
      const double felt = model_.chain[k][l][j] * perMetre;
      if (std::abs(model_.chain[k][l][j]) < kChainFelt) {
        continue;
      }
      const int first = model_.layout.elevation(l) + t.first;
      for (int i = 0; i < 4; ++i) {
        if (t.w[i] != 0.0) {
          gatherer_.add(first + i, felt * t.w[i]);
        }
      }
    }
  }

  void interface(int k, double c, double perMetre) {
    const int j = std::min(static_cast<int>(c), model_.grid->nodes - 2);
    node(k, j, perMetre * (j + 1 - c));
    node(k, j + 1, perMetre * (c - j));
  }

  /// Time spent in a layer between two positions answers to its log velocity with minus itself.
  void velocity(int layer, double xa, double xb, double time) {
    gatherer_.add(model_.layout.logVelocity(layer), -time);
    if (model_.layout.varies(layer)) {
      const int first = model_.layout.deviation(layer);
      meanOfHats(*model_.grid, xa, xb, -time,
                 [this, first](int knot, double value) { gatherer_.add(first + knot, value); });
    }
  }

  /// A straight piece of ray from p to q; `atP` and `atQ` take the derivative by their elevation.
  template <class AtP, class AtQ>
  double piece(SectionPoint p, SectionPoint q, double slowness, AtP&& atP, AtQ&& atQ) {
    const double length = std::hypot(q.x - p.x, q.y - p.y);
    if (length > 0.0) {
      const double rise = slowness * (q.y - p.y) / length;
      atP(-rise);
      atQ(rise);
    }
    return length * slowness;
  }

  /// Through the first layer; `atB` takes the derivative by b's elevation.
  template <class AtB>
  void first(SectionPoint a, SectionPoint b, double length, AtB&& atB) {
    const SectionModel::FirstLayerTime t = model_.firstLayer(a, b, length);
    velocity(1, a.x, b.x, -t.perLogVelocity);
    atB(t.perRise);
    if (model_.layout.gradient) {
      gatherer_.add(model_.layout.gradientIndex(), t.perGradient * model_.gradientSlope);
    }
  }

  void leg(SectionPoint station, int k, const std::array<double, kMostLayers - 1>& c) {
    SectionPoint from = onInterface(model_, 1, c[0]);
    first(station, from, std::hypot(from.x - station.x, from.y - station.y),
          [&](double d) { interface(1, c[0], d); });
    for (int i = 2; i <= k; ++i) {
      const SectionPoint to = onInterface(model_, i, c[i - 1]);
      const double time = piece(
          from, to, model_.meanSlowness(i, from.x, to.x), [&](double d) { interface(i - 1, c[i - 2], d); },
          [&](double d) { interface(i, c[i - 1], d); });
      velocity(i, from.x, to.x, time);
      from = to;
    }
  }

  void alongRefractor(const HeadWave& wave) {
    const int k = wave.refractor;
    std::vector<double> c{wave.down[k - 1]};
    c.insert(c.end(), wave.bends.begin(), wave.bends.end());
    c.push_back(wave.up[k - 1]);
    const double xa = onInterface(model_, k, c.front()).x;
    const double xb = onInterface(model_, k, c.back()).x;
    const double u = model_.meanSlowness(k + 1, xa, xb);
    double time = 0.0;
    for (std::size_t i = 1; i < c.size(); ++i) {
      time += piece(
          onInterface(model_, k, c[i - 1]), onInterface(model_, k, c[i]), u,
          [&](double d) { interface(k, c[i - 1], d); }, [&](double d) { interface(k, c[i], d); });
    }
    velocity(k + 1, xa, xb, time);
  }

 private:
  const SectionModel& model_;
  RowGatherer& gatherer_;
};

}  // namespace

double SparseRow::dot(const Eigen::VectorXd& v) const {
  double sum = 0.0;
  for (std::size_t i = 0; i < index.size(); ++i) {
    sum += value[i] * v[index[i]];
  }
  return sum;
}

double SparseRow::quadratic(const Eigen::MatrixXd& m) const {
  double sum = 0.0;
  for (std::size_t i = 0; i < index.size(); ++i) {
    double inner = 0.5 * value[i] * m(index[i], index[i]);
    for (std::size_t j = 0; j < i; ++j) {
      inner += value[j] * m(index[j], index[i]);
    }
    sum += 2.0 * value[i] * inner;
  }
  return sum;
}

void RowGatherer::add(int index, double value) {
  if (!touched_[index]) {
    touched_[index] = true;
    order_.push_back(index);
  }
  dense_[index] += value;
}

void RowGatherer::add(const SparseRow& row, double factor) {
  for (std::size_t i = 0; i < row.index.size(); ++i) {
    add(row.index[i], factor * row.value[i]);
  }
}

SparseRow RowGatherer::take() {
  SparseRow row;
  row.index = std::move(order_);
  order_.clear();
  row.value.reserve(row.index.size());
  for (const int i : row.index) {
    row.value.push_back(dense_[i]);
    dense_[i] = 0.0;
    touched_[i] = false;
  }
  return row;
}

SparseRow timeDerivative(const SectionForward& forward, int pick, int layer, RowGatherer& gatherer) {
  const SectionModel& model = forward.model();
  const SectionPicks& picks = forward.picks();
  const SectionPick& p = picks.picks[pick];
  const SectionPoint shot = picks.shots[p.shot];
  const SectionPoint geophone = picks.geophones[p.geophone];
  Derivative derivative(model, gatherer);
  if (layer == 1) {
    derivative.first(shot, geophone, picks.directLength[pick], [](double) {});
  } else {
    const HeadWave& wave = forward.wave(pick, layer);
    derivative.leg(shot, wave.refractor, wave.down);
    derivative.alongRefractor(wave);
    derivative.leg(geophone, wave.refractor, wave.up);
  }
  if (model.layout.delays > 0) {
    gatherer.add(model.layout.delay(p.shot), 1.0);
  }
  return gatherer.take();
}

SparseRow elevationDerivative(const SectionModel& model, int k, double x, RowGatherer& gatherer) {
  const double c = std::clamp(model.grid->coordinate(x), 0.0, model.grid->nodes - 1.0);
  Derivative(model, gatherer).interface(k, c, 1.0);
  return gatherer.take();
}

}  // namespace strikeplate
