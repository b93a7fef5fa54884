// Picks SEG-2 files as one line and writes the picks as CSV, for a scorer that knows the truth.
//   strikeplate-pick-score OUT.csv FILE...
#include <chrono>
#include <fstream>
#include <iostream>
#include <map>

#include "core/base/numbers.h"
#include "core/picking/line_picker.h"
#include "core/record/seg2_reader.h"
#include "core/record/stack.h"

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

std::vector<ShotPointBlows> readAll(const std::vector<std::string>& files) {
  std::map<double, std::vector<std::pair<std::string, ShotRecord>>> shots;
  for (const std::string& file : files) {
    auto record = readSeg2(file);
    if (!record) {
      std::cerr << record.message() << "\n";
      continue;
    }
    shots[record->source ? record->source->x : 0.0].emplace_back(file, std::move(record).value());
  }
  std::vector<ShotPointBlows> all;
  for (const auto& [x, records] : shots) {
    std::vector<const ShotRecord*> blows;
    for (const auto& [file, record] : records)
      blows.push_back(&record);
    const BlowAlignment alignment = alignBlows(blows);
    std::vector<double> lags;
    for (const BlowLag& blow : alignment.blows)
      lags.push_back(blow.lag);
    ShotPointBlows shot{gatherOf(records[0].second), {}};
    auto stack = stackBlows(blows, lags);
    if (!stack) {
      std::cerr << stack.message() << "\n";
      continue;
    }
    shot.gather.sampleInterval = stack->sampleInterval;
    shot.gather.start = stack->start;
    shot.gather.traces.assign(stack->traces.begin(), stack->traces.end());
    for (std::size_t i = 0; i < records.size(); ++i)
      shot.blows.push_back({records[i].first, lags[i]});
    all.push_back(std::move(shot));
  }
  return all;
}

void writePicks(std::ostream& out, const std::vector<ShotPointBlows>& shots, const LinePicks& picks) {
  out << "file,trace,shot_x_m,geophone_x_m,time_s,sigma_s,sureness\n";
  for (std::size_t g = 0; g < shots.size(); ++g) {
    for (const Blow& blow : shots[g].blows) {
      for (std::size_t i = 0; i < picks.onsets[g].size(); ++i) {
        const auto& onset = picks.onsets[g][i];
        out << blow.file << ',' << i + 1 << ',' << fullPrecision(shots[g].gather.shot.x) << ','
            << fullPrecision(shots[g].gather.geophones[i].x) << ','
            << (onset ? fullPrecision(onset->time + blow.lag) : "") << ','
            << (onset ? fullPrecision(onset->sigma) : "") << ','
            << fullPrecision(picks.sureness[g][i]) << '\n';
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
