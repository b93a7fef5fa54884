// Reading records from a warm page cache, beside what cannot be beaten: read(2) for SEG-2, and the segyio library's
// own read-and-convert for SEG-Y in IBM floats. 48 traces of 16 000 samples.
#include <cmath>
#include <filesystem>
#include <fstream>
#include <memory>
#include <vector>

#include <benchmark/benchmark.h>
#include <fcntl.h>
#include <malloc.h>
#include <segyio/segy.h>
#include <sys/stat.h>
#include <unistd.h>

#include "core/record/seg2_reader.h"
#include "core/record/seg2_writer.h"
#include "core/record/segy_reader.h"

namespace {

using namespace strikeplate;

// Freed memory stays with the program, so that what is compared is the work and not the kernel's pages.
const bool kKeepMemory = mallopt(M_TRIM_THRESHOLD, 1 << 30) == 1 && mallopt(M_MMAP_THRESHOLD, 1 << 30) == 1;

constexpr int kTraces = 48;
constexpr int kSamples = 16000;

std::string folder() {
  return std::filesystem::temp_directory_path().string() + "/";
}

const std::string& seg2File() {
  static const std::string path = [] {
    ShotRecord record;
    record.file = "bench";
    record.source = HeaderPosition{};
    for (int t = 0; t < kTraces; ++t) {
      Trace trace;
      trace.sampleInterval = 0.000125;
      trace.receiver = HeaderPosition{2.0 * t, {}, {}};
      for (int i = 0; i < kSamples; ++i) {
        trace.samples.push_back(std::sin(0.01F * static_cast<float>(i * (t + 1))));
      }
      record.traces.push_back(std::move(trace));
    }
    const std::string file = folder() + "strikeplate_bench.sg2";
    writeSeg2(file, record, {});
    return file;
  }();
  return path;
}

const std::string& segyFile() {
  static const std::string path = [] {
    std::vector<float> row(kSamples);
    std::vector<char> header(3600);
    segy_set_bfield(header.data() + 3200, SEGY_BIN_FORMAT, SEGY_IBM_FLOAT_4_BYTE);
    segy_set_bfield(header.data() + 3200, SEGY_BIN_INTERVAL, 125);
    segy_set_bfield(header.data() + 3200, SEGY_BIN_SAMPLES, kSamples);
    const std::string file = folder() + "strikeplate_bench.sgy";
    std::ofstream out(file, std::ios::binary);
    out.write(header.data(), 3600);
    for (int t = 0; t < kTraces; ++t) {
      std::vector<char> traceHeader(240);
      segy_set_field(traceHeader.data(), SEGY_TR_SAMPLE_COUNT, kSamples);
      segy_set_field(traceHeader.data(), SEGY_TR_GROUP_X, t);
      for (int i = 0; i < kSamples; ++i) {
        row[static_cast<std::size_t>(i)] = std::sin(0.01F * static_cast<float>(i * (t + 1)));
      }
      segy_from_native(SEGY_IBM_FLOAT_4_BYTE, kSamples, row.data());
      out.write(traceHeader.data(), 240);
      out.write(reinterpret_cast<const char*>(row.data()), kSamples * 4);
    }
    return file;
  }();
  return path;
}

void countBytes(benchmark::State& state, const std::string& path) {
  state.SetBytesProcessed(state.iterations() * static_cast<std::int64_t>(std::filesystem::file_size(path)));
}

void readWithReadCall(benchmark::State& state) {
  const std::string& path = seg2File();
  for (auto step : state) {
    const int file = ::open(path.c_str(), O_RDONLY);
    struct stat about {};
    ::fstat(file, &about);
    const auto size = static_cast<std::size_t>(about.st_size);
    const std::unique_ptr<std::byte[]> bytes(new std::byte[size]);
    benchmark::DoNotOptimize(::read(file, bytes.get(), size));
    ::close(file);
    benchmark::DoNotOptimize(bytes.get());
  }
  countBytes(state, path);
}
BENCHMARK(readWithReadCall);

void readAsSeg2(benchmark::State& state) {
  for (auto step : state) {
    benchmark::DoNotOptimize(readSeg2(seg2File()));
  }
  countBytes(state, seg2File());
}
BENCHMARK(readAsSeg2);

// Sixteen records that are all kept, as when a line is opened: into memory that the kernel has to give first.
constexpr int kLine = 16;

template <class ReadOne>
void readLine(benchmark::State& state, ReadOne readOne) {
  for (auto step : state) {
    {
      std::vector<decltype(readOne())> line;
      for (int i = 0; i < kLine; ++i) {
        line.push_back(readOne());
      }
      benchmark::DoNotOptimize(line);
      state.PauseTiming();
    }
    malloc_trim(0);
    state.ResumeTiming();
  }
  state.SetBytesProcessed(kLine * state.iterations() *
                          static_cast<std::int64_t>(std::filesystem::file_size(seg2File())));
}

void readLineWithReadCall(benchmark::State& state) {
  readLine(state, [] {
    const int file = ::open(seg2File().c_str(), O_RDONLY);
    struct stat about {};
    ::fstat(file, &about);
    const auto size = static_cast<std::size_t>(about.st_size);
    std::unique_ptr<std::byte[]> bytes(new std::byte[size]);
    benchmark::DoNotOptimize(::read(file, bytes.get(), size));
    ::close(file);
    return bytes;
  });
}
BENCHMARK(readLineWithReadCall);

void readLineAsSeg2(benchmark::State& state) {
  readLine(state, [] { return readSeg2(seg2File()); });
}
BENCHMARK(readLineAsSeg2);

void readWithSegyio(benchmark::State& state) {
  const std::string& path = segyFile();
  for (auto step : state) {
    segy_file* file = segy_open(path.c_str(), "rb");
    std::vector<std::vector<float>> traces;
    for (int t = 0; t < kTraces; ++t) {
      traces.emplace_back(kSamples);
      segy_readtrace(file, t, traces.back().data(), 3600, kSamples * 4);
      segy_to_native(SEGY_IBM_FLOAT_4_BYTE, kSamples, traces.back().data());
    }
    segy_close(file);
    benchmark::DoNotOptimize(traces);
  }
  countBytes(state, path);
}
BENCHMARK(readWithSegyio);

void readAsSegy(benchmark::State& state) {
  for (auto step : state) {
    benchmark::DoNotOptimize(readSegy(segyFile()));
  }
  countBytes(state, segyFile());
}
BENCHMARK(readAsSegy);

}  // namespace
