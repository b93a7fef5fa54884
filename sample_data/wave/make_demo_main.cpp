// Makes shot records with known truth from a scene file: see sample_data/README.md.
#include <algorithm>
#include <atomic>
#include <cmath>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <limits>
#include <numbers>
#include <string>
#include <thread>

#include "core/base/numbers.h"
#include "core/record/seg2_writer.h"
#include "sample_data/wave/recording.h"
#include "sample_data/wave/truth.h"

namespace strikeplate::wave {
namespace {

struct Options {
  std::string scene;
  std::filesystem::path out;
  std::string noise = "clean";
  long long seed = 1;
  int threads = 2;
};

/// One shot as computed: noise-free traces and truth.
struct Shot {
  Traces traces;
  double interval = 0.0;
  ShotTruth truth;
};

constexpr double kFarShare = 0.6;  // share of the largest offset beyond which traces set the noise level

Shot compute(const Scene& scene, std::size_t s) {
  Shot shot;
  const Motion motion = strike(scene, scene.shots[s], scene.length + 0.006);
  shot.interval = motion.interval;
  shot.traces = geophoneTraces(scene, scene.shots[s], motion);
  shot.truth = trueTimes(scene, scene.shots[s]);
  return shot;
}

std::vector<Shot> computeAll(const Scene& scene, int threads) {
  std::vector<Shot> shots(scene.shots.size());
  std::atomic<std::size_t> next{0};
  const auto work = [&] {
    for (std::size_t s = next++; s < shots.size(); s = next++) {
      shots[s] = compute(scene, s);
      std::printf("shot %zu of %zu\n", s + 1, shots.size());
      std::fflush(stdout);
    }
  };
  std::vector<std::jthread> pool;
  for (int t = 1; t < threads; ++t)
    pool.emplace_back(work);
  work();
  return shots;
}

double peak(const Shot& shot, std::size_t g) {
  return firstPeak(shot.traces[g], shot.interval, shot.truth.time[g]);
}

/// rms so that the median of first peak over noise beyond 60 % of the largest offset is `ratio`.
double noiseLevel(const Scene& scene, const std::vector<Shot>& shots, double ratio) {
  double largest = 0.0;
  const auto offset = [&](std::size_t s, std::size_t g) { return std::abs(scene.geophones[g].x - scene.shots[s].x); };
  for (std::size_t s = 0; s < shots.size(); ++s) {
    for (std::size_t g = 0; g < scene.geophones.size(); ++g)
      largest = std::max(largest, offset(s, g));
  }
  std::vector<double> peaks;
  for (std::size_t s = 0; s < shots.size(); ++s) {
    for (std::size_t g = 0; g < scene.geophones.size(); ++g) {
      if (offset(s, g) > kFarShare * largest)
        peaks.push_back(peak(shots[s], g));
    }
  }
  std::nth_element(peaks.begin(), peaks.begin() + static_cast<std::ptrdiff_t>(peaks.size() / 2), peaks.end());
  return peaks[peaks.size() / 2] / ratio;
}

class Writer {
 public:
  Writer(const Scene& scene, const Options& options, const std::vector<Shot>& shots)
      : scene_(scene),
        options_(options),
        shots_(shots),
        faults_(options.noise == "faults"),
        noise_(static_cast<std::uint64_t>(options.seed)) {
    if (options.noise != "clean")
      level_ = noiseLevel(scene, shots, options.noise == "heavy" ? 1.75 : 5.0);
  }

  Outcome run() {
    for (std::size_t s = 0; s < shots_.size(); ++s) {
      const bool repeated = faults_ && static_cast<int>(s) + 1 == scene_.faults.repeatedShot;
      for (int blow = 0; blow < (repeated ? scene_.faults.blows : 1); ++blow) {
        if (const Outcome done = writeOne(s, blow); !done)
          return done;
      }
    }
    return writeTruth();
  }

 private:
  Outcome writeOne(std::size_t s, int blow) {
    const int number = 1001 + static_cast<int>(files_.size());
    const std::string name = std::to_string(number) + ".sg2";
    WrittenFile file{options_.out.filename().string() + "/" + name, static_cast<int>(s), blow, 0.0, {}};
    if (faults_ && static_cast<int>(s) + 1 == scene_.faults.lateShot)
      file.clockError = scene_.faults.clockError;
    const int samples = static_cast<int>(std::lround(scene_.length / scene_.interval)) + 1;
    const Traces ambient = noise_.record(scene_.geophones, samples, scene_.interval);
    const double humPhase = 2.0 * std::numbers::pi * noise_.uniform();
    Traces rows;
    for (std::size_t g = 0; g < scene_.geophones.size(); ++g) {
      const bool dead = faults_ && static_cast<int>(g) + 1 == scene_.faults.deadTrace;
      const double rms = level_ > 0.0 ? level_ : 0.005 * peak(shots_[s], g);
      rows.push_back(row(s, g, file.clockError, ambient[g], rms, humPhase));
      // A dead channel is the recorder's own hiss.
      if (dead)
        std::transform(ambient[g].begin(), ambient[g].end(), rows.back().begin(),
                       [&](double n) { return 1e-3 * rms * n; });
      file.signalToNoise.push_back(dead ? std::numeric_limits<double>::quiet_NaN() : peak(shots_[s], g) / rms);
    }
    files_.push_back(file);
    Seg2WriteOptions layout;
    layout.formatCode = scene_.code;
    return writeSeg2((options_.out / name).string(), record(s, name, number, rows), layout);
  }

  std::vector<double> row(std::size_t s, std::size_t g, double clockError, const std::vector<double>& ambient,
                          double rms, double humPhase) {
    const Faults& f = scene_.faults;
    const Shot& shot = shots_[s];
    const double offset = std::abs(scene_.geophones[g].x - scene_.shots[s].x);
    std::vector<double> out;
    for (std::size_t k = 0; k < ambient.size(); ++k) {
      const double clock = (faults_ ? f.delay : 0.0) + static_cast<double>(k) * scene_.interval;
      const double t = clock - clockError;
      double v = valueAt(shot.traces[g], shot.interval, t) + rms * ambient[k];
      if (faults_ && f.humHz > 0.0) {
        v += 2.0 * std::numbers::sqrt2 * rms * std::sin(2.0 * std::numbers::pi * f.humHz * clock + humPhase);
      }
      if (faults_ && f.airVelocity > 0.0)
        v += airWave(t - offset / f.airVelocity, offset, rms);
      const bool reversed = faults_ && static_cast<int>(g) + 1 == f.reversedTrace;
      out.push_back(reversed ? -v : v);
    }
    return out;
  }

  /// Sound of the blow: a short 200 Hz burst that falls off with distance (invented shape).
  static double airWave(double late, double offset, double rms) {
    if (late <= 0.0)
      return 0.0;
    const double envelope = late / 0.004 * std::exp(1.0 - late / 0.004);
    return 400.0 * rms / std::max(2.0, offset) * envelope * std::sin(2.0 * std::numbers::pi * 200.0 * late);
  }

  [[nodiscard]] ShotRecord record(std::size_t s, const std::string& name, int number, const Traces& rows) const {
    ShotRecord r;
    r.file = name;
    const Place& source = scene_.shots[s];
    r.source = HeaderPosition{source.x, 0.0, source.elevation};
    for (const auto& [key, value] : scene_.header)
      r.header.push_back({key, value});
    double largest = 0.0;
    for (const auto& row : rows) {
      for (const double v : row)
        largest = std::max(largest, std::abs(v));
    }
    const double descaling = largest / 8388607.0;  // a recorder of 24 bits
    for (std::size_t g = 0; g < rows.size(); ++g) {
      Trace t;
      for (const double v : rows[g])
        t.samples.push_back(static_cast<float>(std::round(v / descaling)));
      t.sampleInterval = scene_.interval;
      t.delay = faults_ ? scene_.faults.delay : 0.0;
      t.receiver = HeaderPosition{scene_.geophones[g].x, 0.0, scene_.geophones[g].elevation};
      t.descaling = descaling;
      t.header = {{"CHANNEL_NUMBER", std::to_string(g + 1)},
                  {"RAW_RECORD", std::to_string(number)},
                  {"RECEIVER", "VERTICAL_GEOPHONE 10 HZ"},
                  {"SHOT_SEQUENCE_NUMBER", std::to_string(number)},
                  {"SOURCE", "HAMMER"}};
      r.traces.push_back(std::move(t));
    }
    return r;
  }

  Outcome writeTruth() {
    std::vector<ShotTruth> truths;
    for (const Shot& s : shots_)
      truths.push_back(s.truth);
    nlohmann::ordered_json j = truthJson(scene_, truths);
    nlohmann::ordered_json variant = variantJson(scene_, truths, files_, faults_);
    variant["noise_rms_mV"] = level_;
    variant["seed"] = options_.seed;
    j["variants"][options_.noise] = std::move(variant);
    std::ofstream out(options_.out / "truth.json");
    out << j.dump(1) << "\n";
    if (!out)
      return Failure{(options_.out / "truth.json").string() + " cannot be written."};
    return Done{};
  }

  const Scene& scene_;
  const Options& options_;
  const std::vector<Shot>& shots_;
  bool faults_;
  GroundNoise noise_;
  double level_ = 0.0;  // mV; 0 for half a percent of each trace's first peak
  std::vector<WrittenFile> files_;
};

Result<Options> optionsFrom(const std::vector<std::string>& words) {
  Options o;
  std::vector<std::string> places;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (words[i].rfind("--", 0) != 0) {
      places.push_back(words[i]);
      continue;
    }
    if (i + 1 >= words.size())
      return Failure{words[i] + " needs a value."};
    const std::string& value = words[++i];
    const auto number = parseInteger(value);
    if (words[i - 1] == "--noise" &&
        (value == "clean" || value == "moderate" || value == "heavy" || value == "faults")) {
      o.noise = value;
    } else if (words[i - 1] == "--seed" && number) {
      o.seed = *number;
    } else if (words[i - 1] == "--threads" && number && *number >= 1 && *number <= 64) {
      o.threads = static_cast<int>(*number);
    } else {
      return Failure{words[i - 1] + " " + value + " is not understood."};
    }
  }
  if (places.size() != 2)
    return Failure{"a scene file and a folder are needed."};
  o.scene = places[0];
  o.out = std::filesystem::path(places[1]).lexically_normal();
  if (!o.out.has_filename())
    o.out = o.out.parent_path();
  return o;
}

int run(const std::vector<std::string>& words) {
  const Result<Options> options = optionsFrom(words);
  if (!options) {
    std::fprintf(stderr,
                 "%s\nusage: strikeplate-make-demo SCENE.json OUT_DIR [--noise clean|moderate|heavy|faults] "
                 "[--seed N] [--threads N]\n",
                 options.message().c_str());
    return 2;
  }
  const Result<Scene> scene = readScene(options->scene);
  std::error_code error;
  std::filesystem::create_directories(options->out, error);
  const Outcome done =
      !scene ? Outcome(scene.failure()) : Writer(*scene, *options, computeAll(*scene, options->threads)).run();
  if (done)
    return 0;
  std::fprintf(stderr, "%s\n", done.message().c_str());
  return 1;
}

}  // namespace
}  // namespace strikeplate::wave

int main(int argc, char** argv) {
  return strikeplate::wave::run({argv + 1, argv + argc});
}
