#pragma once

#include <cstddef>
#include <span>
#include <string>

#include "core/base/result.h"
#include "core/record/record.h"

namespace strikeplate {

/// Reads a SEG-2 file, tolerantly: all five sample formats, both byte orders, any terminators, wrong counts.
///
/// Recorder time of a trace's first sample is DELAY + SKEW (s). RECEIVER_LOCATION and SOURCE_LOCATION are brought to
/// metres from UNITS FEET, INCHES or CENTIMETERS; the record's source is that of the first trace that names one.
/// POLARITY -1 gives TraceState::Reversed; TRACE_TYPE DEAD and traces that are no seismic data (uphole, pilot, test)
/// give TraceState::Dead. Samples that are not numbers become 0. A trace that cannot be read but has readable ones
/// behind it stands as a dead trace of a single zero, so that trace numbers stay true; traces missing at the end are
/// left out. Everything of this kind is said in `oddities`, once each. No more memory is taken than about four times
/// the file's size, whatever its counts say.
///
/// Fails, in one sentence with the name, when the file cannot be opened, is no SEG-2 file, or holds no readable
/// trace. Source of the layout: Pullan, Geophysics 55 (1990) 1260-1271; tolerances from recorders' files.
Result<ShotRecord> readSeg2(const std::string& path);

/// The same from a file's content; `name` stands for the file in messages and in the record.
Result<ShotRecord> readSeg2Bytes(std::span<const std::byte> bytes, const std::string& name);

}  // namespace strikeplate
