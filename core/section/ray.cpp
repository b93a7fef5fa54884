#include "core/section/ray.h"

#include <algorithm>
#include <cmath>
#include <cstdint>

#include <boost/math/tools/minima.hpp>

namespace strikeplate {
namespace {

constexpr double kTouching = 1e-9;  // m
// Times are stationary in the crossings, so these leave errors of their squares.
constexpr double kCloseEnough = 1e-4;  // of a segment, in Newton's method
constexpr double kStill = 4e-3;        // nodes, between sweeps over a leg

double distance(SectionPoint a, SectionPoint b) {
  return std::hypot(a.x - b.x, a.y - b.y);
}

double fastDistance(SectionPoint a, SectionPoint b) {
  const double dx = a.x - b.x;
  const double dy = a.y - b.y;
  return std::sqrt(dx * dx + dy * dy);
}

/// A point between two fixed ones, at slownesses ua before and ub behind it.
struct Crossing {
  SectionPoint a;
  SectionPoint b;
  double ua;
  double ub;
  const SectionModel* curved = nullptr;  ///< set when the piece from a runs through a first layer with a gradient
  [[nodiscard]] double time(SectionPoint p) const {
    const double length = fastDistance(a, p);
    return (curved != nullptr ? curved->firstLayer(a, p, length).time : ua * length) + ub * fastDistance(p, b);
  }
};

struct OnSegment {
  double t;  ///< 0 at the segment's start, 1 at its end
  double time;
};

/// Least time of a crossing whose first piece is curved: Brent's method on the segment, its ends looked at too.
OnSegment leastOnSegmentCurved(const Crossing& c, SectionPoint p0, SectionPoint p1) {
  const auto time = [&](double t) { return c.time({p0.x + t * (p1.x - p0.x), p0.y + t * (p1.y - p0.y)}); };
  constexpr int kBits = 16;
  std::uintmax_t steps = 24;
  const auto [t, least] = boost::math::tools::brent_find_minima(time, 0.0, 1.0, kBits, steps);
  OnSegment best{t, least};
  for (const double end : {0.0, 1.0}) {
    if (const double there = time(end); there <= best.time) {
      best = {end, there};
    }
  }
  return best;
}

/// Least time of a crossing on the segment from p0 to p1. It is convex there: Newton's method within the bracket that
/// the sign of the slope leaves, halving where Newton would leave it.
OnSegment leastOnSegment(const Crossing& c, SectionPoint p0, SectionPoint p1, double t) {
  if (c.curved != nullptr) {
    return leastOnSegmentCurved(c, p0, p1);
  }
  const SectionPoint d{p1.x - p0.x, p1.y - p0.y};
  const double dd = d.x * d.x + d.y * d.y;
  double low = 0.0;
  double high = 1.0;
  for (int step = 0; step < 20; ++step) {
    const SectionPoint p{p0.x + t * d.x, p0.y + t * d.y};
    const double ra = std::max(fastDistance(c.a, p), kTouching);
    const double rb = std::max(fastDistance(c.b, p), kTouching);
    const double ga = ((p.x - c.a.x) * d.x + (p.y - c.a.y) * d.y) / ra;
    // At an end of the segment that is the target itself the slope is the one just inside.
    const double gb = rb > kTouching ? ((p.x - c.b.x) * d.x + (p.y - c.b.y) * d.y) / rb
                                     : (t > 0.5 ? -std::sqrt(dd) : std::sqrt(dd));
    const double slope = c.ua * ga + c.ub * gb;
    const double curve = c.ua * (dd - ga * ga) / ra + c.ub * (dd - gb * gb) / rb;
    (slope > 0.0 ? high : low) = t;
    double next = curve > 0.0 ? t - slope / curve : (slope > 0.0 ? -1.0 : 2.0);
    if (next <= 0.0 && low == 0.0) {
      next = 0.0;
    } else if (next >= 1.0 && high == 1.0) {
      next = 1.0;
    } else if (!(next > low && next < high)) {
      next = 0.5 * (low + high);
    }
    const double move = std::abs(next - t);
    t = next;
    if (move < kCloseEnough) {
      break;
    }
  }
  return {t, c.time({p0.x + t * d.x, p0.y + t * d.y})};
}

/// Least time of a crossing on interface k near node coordinate c, walking over as many segments as it takes.
double leastOnInterface(const SectionModel& model, int k, double at, const Crossing& crossing) {
  const int last = model.grid->nodes - 2;
  int segment = std::clamp(static_cast<int>(at), 0, last);
  double t = std::clamp(at - segment, 0.0, 1.0);
  double best = at;
  double bestTime = std::numeric_limits<double>::infinity();
  for (int walk = 0; walk < 6; ++walk) {
    const OnSegment found =
        leastOnSegment(crossing, onInterface(model, k, segment), onInterface(model, k, segment + 1), t);
    if (found.time >= bestTime) {
      break;
    }
    best = segment + found.t;
    bestTime = found.time;
    if (found.t >= 1.0 && segment < last) {
      ++segment;
      t = 0.0;
    } else if (found.t <= 0.0 && segment > 0) {
      --segment;
      t = 1.0;
    } else {
      break;
    }
  }
  return best;
}

/// One leg of a head wave: from a station down to its lowest crossing, then on to `target` along the refractor.
struct Leg {
  SectionPoint station;
  SectionPoint target;
  int node;       ///< where the lowest crossing is over nodes
  int direction;  ///< +1 when the target lies at larger x
};

/// The model when the piece down to interface i is curved.
const SectionModel* curvedAbove(const SectionModel& model, int i) {
  return i == 1 && model.gradient > 0.0 ? &model : nullptr;
}

SectionPoint before(const SectionModel& model, const Leg& leg, const std::array<double, kMostLayers - 1>& c, int i) {
  return i == 1 ? leg.station : onInterface(model, i - 1, c[i - 2]);
}

/// Lowest crossing: on the near segment it looks straight at the target, on the far one past its node where that
/// sticks out of the refractor's shortest way. Returns true when that node has become a bend.
bool leastLowest(const SectionModel& model, const Leg& leg, int k, std::array<double, kMostLayers - 1>& c) {
  const SectionPoint above = before(model, leg, c, k);
  const SectionPoint node = onInterface(model, k, leg.node);
  const double ua = model.meanSlowness(k, above.x, node.x);
  const double ub = model.meanSlowness(k + 1, node.x, leg.target.x);
  const SectionModel* curved = curvedAbove(model, k);
  const int last = model.grid->nodes - 1;
  double bestTime = std::numeric_limits<double>::infinity();
  bool bend = false;
  const int near = std::clamp(leg.node + leg.direction, 0, last);
  const int far = std::clamp(leg.node - leg.direction, 0, last);
  if (near != leg.node) {
    const OnSegment s = leastOnSegment({above, leg.target, ua, ub, curved}, node, onInterface(model, k, near), 0.0);
    bestTime = s.time;
    c[k - 1] = leg.node + leg.direction * s.t;
    if (s.t > 0.0) {
      return false;
    }
  }
  if (far == leg.node) {
    return false;
  }
  const SectionPoint end = onInterface(model, k, far);
  const double chord = end.y + (leg.target.y - end.y) * (node.x - end.x) / (leg.target.x - end.x);
  const bool viaNode = node.y < chord - 1e-9;
  const OnSegment s = leastOnSegment({above, viaNode ? node : leg.target, ua, ub, curved}, node, end, 0.0);
  const double time = s.time + (viaNode ? ub * fastDistance(node, leg.target) : 0.0);
  if (time < bestTime - 1e-15) {
    c[k - 1] = leg.node - leg.direction * s.t;
    bend = viaNode && s.t > 0.0;
  }
  return bend;
}

bool refineLeg(const SectionModel& model, const Leg& leg, int k, std::array<double, kMostLayers - 1>& c) {
  bool bend = false;
  const int sweeps = k == 1 ? 1 : 12;
  for (int sweep = 0; sweep < sweeps; ++sweep) {
    const auto old = c;
    bend = leastLowest(model, leg, k, c);
    for (int i = k - 1; i >= 1; --i) {
      const SectionPoint a = before(model, leg, c, i);
      const SectionPoint b = onInterface(model, i + 1, c[i]);
      const double x = onInterface(model, i, c[i - 1]).x;
      c[i - 1] = leastOnInterface(
          model, i, c[i - 1],
          {a, b, model.meanSlowness(i, a.x, x), model.meanSlowness(i + 1, x, b.x), curvedAbove(model, i)});
    }
    double move = 0.0;
    for (int i = 0; i < k; ++i) {
      move = std::max(move, std::abs(c[i] - old[i]));
    }
    if (move < kStill) {
      break;
    }
  }
  return bend;
}

double legTime(const SectionModel& model, SectionPoint station, int k, const std::array<double, kMostLayers - 1>& c) {
  SectionPoint from = onInterface(model, 1, c[0]);
  double time = model.firstLayer(station, from, distance(station, from)).time;
  for (int i = 2; i <= k; ++i) {
    const SectionPoint to = onInterface(model, i, c[i - 1]);
    time += distance(from, to) * model.meanSlowness(i, from.x, to.x);
    from = to;
  }
  return time;
}

double refractorTime(const SectionModel& model, const HeadWave& wave) {
  const int k = wave.refractor;
  const SectionPoint entry = onInterface(model, k, wave.down[k - 1]);
  const SectionPoint exit = onInterface(model, k, wave.up[k - 1]);
  double length = 0.0;
  SectionPoint from = entry;
  for (const int node : wave.bends) {
    const SectionPoint to = onInterface(model, k, node);
    length += distance(from, to);
    from = to;
  }
  return (length + distance(from, exit)) * model.meanSlowness(k + 1, entry.x, exit.x);
}

}  // namespace

SectionPoint onInterface(const SectionModel& model, int k, double c) {
  const Eigen::VectorXd& z = model.z[k];
  const int j = std::min(static_cast<int>(c), model.grid->nodes - 2);
  return {model.grid->start + c * model.grid->nodeSpacing, z[j] + (c - j) * (z[j + 1] - z[j])};
}

void refineHeadWave(const SectionModel& model, const HullTable& hull, SectionPoint shot, SectionPoint geophone,
                    HeadWave& wave) {
  const int k = wave.refractor;
  const int entry = static_cast<int>(std::lround(wave.down[k - 1]));
  const int exit = static_cast<int>(std::lround(wave.up[k - 1]));
  hull.bends(entry, exit, wave.bends);
  if (entry != exit) {
    const int direction = entry < exit ? 1 : -1;
    // Without a bend in between the two ends look at each other, so each is moved again after the other.
    const int rounds = wave.bends.empty() ? 3 : 1;
    bool entryBends = false;
    bool exitBends = false;
    for (int round = 0; round < rounds; ++round) {
      const double before = wave.up[k - 1];
      const SectionPoint first = onInterface(model, k, wave.bends.empty() ? wave.up[k - 1] : wave.bends.front());
      entryBends = refineLeg(model, {shot, first, entry, direction}, k, wave.down);
      const SectionPoint last = onInterface(model, k, wave.bends.empty() ? wave.down[k - 1] : wave.bends.back());
      exitBends = refineLeg(model, {geophone, last, exit, -direction}, k, wave.up);
      if (round > 0 && std::abs(wave.up[k - 1] - before) < kStill) {
        break;
      }
    }
    if (entryBends) {
      wave.bends.insert(wave.bends.begin(), entry);
    }
    if (exitBends) {
      wave.bends.push_back(exit);
    }
  }
  wave.time = legTime(model, shot, k, wave.down) + refractorTime(model, wave) + legTime(model, geophone, k, wave.up);
}

}  // namespace strikeplate
