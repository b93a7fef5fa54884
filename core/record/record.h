#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

namespace strikeplate {

/// What a trace is good for. Set from the headers, found automatically, or set by hand.
enum class TraceState { Live, Dead, Reversed, Noisy };

/// A position as a header gives it, in metres; y and z as far as they were given.
struct HeaderPosition {
  double x = 0.0;
  std::optional<double> y;
  std::optional<double> z;
};

/// One keyword or header word of a file, as it was read, for the user to look at.
struct HeaderEntry {
  std::string key;
  std::string value;
};

/// One geophone's recording of one blow. The samples are the file's own numbers and are never changed.
struct Trace {
  std::vector<float> samples;              ///< in the recorder's units; times `descaling` gives the physical unit
  double sampleInterval = 0.0;             ///< s, > 0
  double delay = 0.0;                      ///< s, recorder time of the first sample; negative before the blow
  std::optional<HeaderPosition> receiver;  ///< as the header says, m
  double descaling = 1.0;                  ///< factor to the physical unit (SEG-2 DESCALING_FACTOR)
  int stack = 1;                           ///< number of blows already summed in the file
  TraceState state = TraceState::Live;     ///< as the header says
  std::vector<HeaderEntry> header;         ///< keywords of this trace

  /// Recorder time of sample i, s.
  [[nodiscard]] double timeOf(double i) const { return delay + i * sampleInterval; }
};

/// One blow as recorded by the spread: a SEG-2 file, or one shot of a SEG-Y file.
struct ShotRecord {
  std::string file;                      ///< as named by the user
  int firstTraceInFile = 1;              ///< number in the file, from 1, of traces[0]
  std::string format;                    ///< "SEG-2" or "SEG-Y", with revision
  std::optional<HeaderPosition> source;  ///< as the header says, m
  std::optional<double> sourceDepth;  ///< m below the ground where known for certain; source->z is then an elevation
  std::vector<HeaderEntry> header;    ///< keywords of the file
  std::vector<Trace> traces;          ///< at least one
  std::vector<std::string> oddities;  ///< what is odd about the file, one sentence each
  std::string checksum;               ///< of the whole file when it was read, see fileChecksum(); empty when unknown
  std::vector<std::string> losses;    ///< those of them by which part of the file could not be read; not kept on disk
};

/// Records are large and never change once read, so surveys share them.
using RecordPtr = std::shared_ptr<const ShotRecord>;

}  // namespace strikeplate
