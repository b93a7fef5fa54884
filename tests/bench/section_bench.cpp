// How long the section takes, by size of survey. Wanted on one core: live 4 / 16 / 60 ms, full 0.1 / 0.5 / 4 s.
// Each line prints the time as a share of what is wanted.

#include <cmath>
#include <string>

#include <benchmark/benchmark.h>
#include <malloc.h>

#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace {

using namespace strikeplate;
using namespace strikeplate::testing;

struct Size {
  const char* name;
  int layers;
  Spread spread;
  double liveWanted;  ///< s
  double fullWanted;  ///< s
};

std::vector<double> evenShots(int count, double from, double to) {
  std::vector<double> x;
  for (int i = 0; i < count; ++i) {
    x.push_back(from + (to - from) * i / (count - 1));
  }
  return x;
}

std::vector<Size> sizes() {
  return {{"24 geophones x 7 shots, two layers", 2, evenSpread(24, 2.0, evenShots(7, -15.0, 61.0)), 0.004, 0.1},
          {"48 geophones x 7 shots, three layers", 3, evenSpread(48, 2.0, evenShots(7, -31.0, 125.0)), 0.016, 0.5},
          {"96 geophones x 31 shots, two layers", 2, evenSpread(96, 2.0, evenShots(31, -1.0, 191.0)), 0.06, 4.0}};
}

TravelTimes timesOf(const Size& size) {
  Scene scene = size.layers == 2 ? planeScene({450.0, 1800.0}, {5.0}, {0.0})
                                 : planeScene({450.0, 1400.0, 3200.0}, {4.0, 14.0}, {0.0, -0.02});
  scene.interfaces[0] = [](double x) {
    const double q = (x - 30.0) / 8.0;
    return -5.0 - 1.5 * std::exp(-0.5 * q * q);
  };
  std::mt19937 random(3);
  return withNoise(networkTimes(scene, size.spread, 0.5, 0.7e-3).times, random);
}

void full(benchmark::State& state, const Size& size) {
  const TravelTimes times = timesOf(size);
  for (auto _ : state) {
    benchmark::DoNotOptimize(solveSection(times, {}));
  }
  // Iterations at the wanted pace over the time they took, upside down: 1 is just as wanted, less is faster.
  state.counters["of_wanted"] = benchmark::Counter(
      size.fullWanted, benchmark::Counter::kIsIterationInvariantRate | benchmark::Counter::kInvert);
}

void live(benchmark::State& state, const Size& size) {
  TravelTimes times = timesOf(size);
  const Section section = solveSection(times, {});
  const double picked = times.arrivals[40].time;
  int moves = 0;
  for (auto _ : state) {
    times.arrivals[40].time = picked + 1e-4 * (++moves % 10);
    benchmark::DoNotOptimize(resolveSection(times, {}, section.memory));
  }
  // Iterations at the wanted pace over the time they took, upside down: 1 is just as wanted, less is faster.
  state.counters["of_wanted"] = benchmark::Counter(
      size.liveWanted, benchmark::Counter::kIsIterationInvariantRate | benchmark::Counter::kInvert);
}

}  // namespace

int main(int argc, char** argv) {
  // Freed memory is kept: otherwise a third of the time goes into getting the same pages back from the system.
  mallopt(M_TRIM_THRESHOLD, 256 << 20);
  mallopt(M_MMAP_THRESHOLD, 64 << 20);
  for (const Size& size : sizes()) {
    benchmark::RegisterBenchmark((std::string("live: ") + size.name).c_str(), live, size)
        ->Unit(benchmark::kMillisecond);
    benchmark::RegisterBenchmark((std::string("full: ") + size.name).c_str(), full, size)
        ->Unit(benchmark::kMillisecond);
  }
  benchmark::Initialize(&argc, argv);
  benchmark::RunSpecifiedBenchmarks();
  return 0;
}
