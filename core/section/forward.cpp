#include "core/section/forward.h"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/section/descent.h"

namespace strikeplate {
namespace {

/// Length of the shortest way under the ground from one point to another, both on or under it.
double lengthUnderGround(const Ground& ground, SectionPoint a, SectionPoint b) {
  if (a.x > b.x) {
    std::swap(a, b);
  }
  std::vector<SectionPoint> hull{a};
  const auto add = [&hull](SectionPoint p) {
    while (hull.size() >= 2) {
      const SectionPoint& q = hull.back();
      const SectionPoint& o = hull[hull.size() - 2];
      if ((q.x - o.x) * (p.y - o.y) - (q.y - o.y) * (p.x - o.x) > 0.0) {
        break;
      }
      hull.pop_back();
    }
    hull.push_back(p);
  };
  for (const Geophone& g : ground.points()) {
    if (g.x > a.x && g.x < b.x) {
      add({g.x, g.elevation});
    }
  }
  add(b);
  double length = 0.0;
  for (std::size_t i = 1; i < hull.size(); ++i) {
    length += std::hypot(hull[i].x - hull[i - 1].x, hull[i].y - hull[i - 1].y);
  }
  return length;
}

/// Best way over nodes of each pick along interface k.
class NodeSearch {
 public:
  NodeSearch(const SectionModel& model, int k, Eigen::MatrixXd lengths) : model_(model), along_(std::move(lengths)) {
    const int n = model.grid->nodes;
    if (!model.layout.varies(k + 1)) {
      along_ *= model.slowness[k][0];
      return;
    }
    const Eigen::VectorXd& u = model.cumulative[k];
    for (int b = 0; b < n; ++b) {
      for (int a = 0; a < n; ++a) {
        along_(a, b) *= a == b ? 0.0 : (u[b] - u[a]) / ((b - a) * model.grid->nodeSpacing);
      }
    }
  }

  /// For every node: least time from the shot into the refractor and along it, and where it enters.
  void fromShot(const Descent::Window& shot) {
    const auto count = static_cast<Eigen::Index>(shot.time.size());
    const Eigen::Map<const Eigen::VectorXd> arriving(shot.time.data(), count);
    const int n = model_.grid->nodes;
    arrival_.resize(n);
    entry_.resize(n);
    for (int b = 0; b < n; ++b) {
      Eigen::Index best = 0;
      arrival_[b] = (arriving + along_.col(b).segment(shot.first, count)).minCoeff(&best);
      entry_[b] = shot.first + static_cast<int>(best);
    }
  }

  struct Ends {
    int entry;
    int exit;
  };
  [[nodiscard]] Ends toGeophone(const Descent::Window& geophone) const {
    const auto count = static_cast<Eigen::Index>(geophone.time.size());
    const Eigen::Map<const Eigen::VectorXd> leaving(geophone.time.data(), count);
    Eigen::Index best = 0;
    (leaving + arrival_.segment(geophone.first, count)).minCoeff(&best);
    const int exit = geophone.first + static_cast<int>(best);
    return {entry_[exit], exit};
  }

 private:
  const SectionModel& model_;
  Eigen::MatrixXd along_;  // s, between nodes
  Eigen::VectorXd arrival_;
  std::vector<int> entry_;
};

std::vector<HeadWave> headWaves(const SectionModel& model, int k, const SectionPicks& picks,
                                const std::vector<Descent>& shots, const std::vector<Descent>& geophones) {
  HullTable hull(model.z[k], model.grid->nodeSpacing);
  NodeSearch search(model, k, hull.takeLengths());
  std::vector<HeadWave> out(picks.picks.size());
  int shot = -1;
  for (int i = 0; i < picks.count(); ++i) {
    const SectionPick& p = picks.picks[i];
    if (p.shot != shot) {
      shot = p.shot;
      search.fromShot(shots[k - 1].windows[shot]);
    }
    const NodeSearch::Ends ends = search.toGeophone(geophones[k - 1].windows[p.geophone]);
    HeadWave& wave = out[i];
    wave.refractor = k;
    wave.down = crossings(shots, k, shot, ends.entry);
    wave.up = crossings(geophones, k, p.geophone, ends.exit);
    refineHeadWave(model, hull, picks.shots[shot], picks.geophones[p.geophone], wave);
  }
  return out;
}

}  // namespace

SectionPicks makeSectionPicks(const TravelTimes& times) {
  SectionPicks out;
  for (const ShotPoint& s : times.shots) {
    out.shots.push_back({s.x, s.elevation - s.depth});
  }
  for (const Geophone& g : times.geophones) {
    out.geophones.push_back({g.x, g.elevation});
  }
  for (const Arrival& a : times.arrivals) {
    out.picks.push_back({a.shot, a.geophone, a.time, a.sigma, a.layerByHand ? a.layer : 0});
    out.directLength.push_back(lengthUnderGround(times.ground, out.shots[a.shot], out.geophones[a.geophone]));
  }
  return out;
}

SectionForward::SectionForward(SectionModel model, const SectionPicks& picks)
    : model_(std::move(model)), picks_(&picks) {
  direct_.reserve(picks.picks.size());
  for (int i = 0; i < picks.count(); ++i) {
    const SectionPick& p = picks.picks[i];
    direct_.push_back(
        model_.firstLayer(picks.shots[p.shot], picks.geophones[p.geophone], picks.directLength[i]).time);
  }
  if (model_.layout.interfaces() == 0) {
    return;
  }
  const std::vector<Descent> shots = descend(model_, picks.shots);
  const std::vector<Descent> geophones = descend(model_, picks.geophones);
  for (int k = 1; k <= model_.layout.interfaces(); ++k) {
    waves_.push_back(headWaves(model_, k, picks, shots, geophones));
  }
}

int SectionForward::earliest(int pick) const {
  int best = 1;
  for (int layer = 2; layer <= model_.layout.layers; ++layer) {
    if (time(pick, layer) < time(pick, best)) {
      best = layer;
    }
  }
  return best;
}

}  // namespace strikeplate
