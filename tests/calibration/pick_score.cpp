// Picks SEG-2 files as one line and writes the picks as CSV, for a scorer that knows the truth.
//   strikeplate-pick-score OUT.csv FILE...
#include <algorithm>
#include <chrono>
#include <cmath>
#include <fstream>
#include <iostream>
#include <map>

#include "core/base/numbers.h"
#include "core/picking/line_picker.h"
#include "core/record/seg2_reader.h"

namespace strikeplate {
namespace {

struct Blow {
  std::string file;
  double lag = 0.0;
};

struct ShotPointBlows {
  Gather gather;
  std::vector<Blow> blows;
};

Gather gatherOf(const ShotRecord& record) {
  Gather gather;
  gather.shot.x = record.source ? record.source->x : 0.0;
  gather.sampleInterval = record.traces[0].sampleInterval;
  gather.start = record.traces[0].delay;
  for (const Trace& t : record.traces) {
    gather.geophones.push_back({t.receiver ? t.receiver->x : 0.0, 0.0});
    gather.traces.push_back(t.samples);
    gather.states.push_back(t.state);
  }
  return gather;
}

/// Lag of `other` behind `base` on one trace in a window about `centre`, samples; NaN when they are not alike.
double lagOf(const std::vector<float>& base, const std::vector<float>& other, int centre, int half, int most) {
  const int n = static_cast<int>(std::min(base.size(), other.size()));
  std::vector<double> r;
  for (int lag = -most; lag <= most; ++lag) {
    double ab = 0, aa = 0, bb = 0;
    for (int i = std::max(most, centre - half); i < std::min(n - most, centre + half); ++i) {
      const double a = base[static_cast<std::size_t>(i)], b = other[static_cast<std::size_t>(i + lag)];
      ab += a * b, aa += a * a, bb += b * b;
    }
    r.push_back(aa > 0 && bb > 0 ? ab / std::sqrt(aa * bb) : 0.0);
  }
  const auto top = std::max_element(r.begin(), r.end());
  if (*top < 0.6 || top == r.begin() || top + 1 == r.end())
    return NAN;
  return static_cast<double>(top - r.begin()) - most + 0.5 * (top[-1] - top[1]) / (top[-1] - 2 * top[0] + top[1]);
}

void addBlow(ShotPointBlows& shot, Gather blow, const LinePicks& guide) {
  const double dt = shot.gather.sampleInterval;
  std::vector<double> lags;
  for (std::size_t i = 0; i < blow.traces.size(); ++i) {
    const auto& onset = guide.onsets[0][i];
    if (!onset)
      continue;
    const double lag = lagOf(shot.gather.traces[i], blow.traces[i], int((onset->time - blow.start) / dt),
                             int(0.008 / dt), int(0.005 / dt));
    if (std::isfinite(lag))
      lags.push_back(lag);
  }
  std::sort(lags.begin(), lags.end());
  const double lag = lags.size() < 3 ? 0.0 : lags[lags.size() / 2];
  shot.blows.back().lag = lag * dt;
  const double weight = 1.0 / static_cast<double>(shot.blows.size());
  for (std::size_t i = 0; i < blow.traces.size(); ++i) {
    auto& stack = shot.gather.traces[i];
    for (std::size_t k = 0; k < stack.size(); ++k) {
      const double at = static_cast<double>(k) + lag;
      const auto j = static_cast<std::ptrdiff_t>(std::floor(at));
      const auto n = static_cast<std::ptrdiff_t>(blow.traces[i].size());
      const double u = at - std::floor(at);
      const double v = (1 - u) * blow.traces[i][static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(j, 0, n - 1))] +
                       u * blow.traces[i][static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(j + 1, 0, n - 1))];
      stack[k] = static_cast<float>((1 - weight) * stack[k] + weight * v);
    }
  }
}

std::vector<ShotPointBlows> readAll(const std::vector<std::string>& files) {
  std::map<double, ShotPointBlows> shots;
  for (const std::string& file : files) {
    const auto record = readSeg2(file);
    if (!record) {
      std::cerr << record.message() << "\n";
      continue;
    }
    Gather gather = gatherOf(*record);
    auto [at, added] = shots.try_emplace(gather.shot.x, ShotPointBlows{gather, {}});
    at->second.blows.push_back({file, 0.0});
    if (!added)
      addBlow(at->second, std::move(gather), pickLine({at->second.gather}));
  }
  std::vector<ShotPointBlows> all;
  for (auto& [x, shot] : shots)
    all.push_back(std::move(shot));
  return all;
}

void writePicks(std::ostream& out, const std::vector<ShotPointBlows>& shots, const LinePicks& picks) {
  out << "file,trace,shot_x_m,geophone_x_m,time_s,sigma_s\n";
  for (std::size_t g = 0; g < shots.size(); ++g) {
    for (const Blow& blow : shots[g].blows) {
      for (std::size_t i = 0; i < picks.onsets[g].size(); ++i) {
        const auto& onset = picks.onsets[g][i];
        out << blow.file << ',' << i + 1 << ',' << fullPrecision(shots[g].gather.shot.x) << ','
            << fullPrecision(shots[g].gather.geophones[i].x) << ','
            << (onset ? fullPrecision(onset->time + blow.lag) : "") << ','
            << (onset ? fullPrecision(onset->sigma) : "") << '\n';
      }
    }
  }
}

int run(const std::vector<std::string>& arguments) {
  if (arguments.size() < 2) {
    std::cerr << "usage: strikeplate-pick-score OUT.csv FILE...\n";
    return 2;
  }
  const auto shots = readAll({arguments.begin() + 1, arguments.end()});
  std::vector<Gather> gathers;
  for (const auto& shot : shots)
    gathers.push_back(shot.gather);
  const auto begin = std::chrono::steady_clock::now();
  const LinePicks picks = pickLine(gathers);
  const std::chrono::duration<double> took = std::chrono::steady_clock::now() - begin;
  std::cerr << gathers.size() << " gathers picked in " << took.count() << " s\n";
  std::ofstream out(arguments[0]);
  writePicks(out, shots, picks);
  return out ? 0 : 3;
}

}  // namespace
}  // namespace strikeplate

int main(int count, char** arguments) {
  return strikeplate::run({arguments + 1, arguments + count});
}
