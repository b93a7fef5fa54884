#pragma once

#include <cstddef>
#include <span>
#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/record/record.h"

namespace strikeplate {

/// Reads a SEG-Y file, one record for each shot in it: revision 0, 1 and 2, both byte orders, sample formats 1, 2, 3,
/// 5, 6 and 8.
///
/// Coordinate, elevation and time scalars are applied and feet brought to metres. Recorder time of the first sample
/// is the delay recording time. Where there are no coordinates at all but offsets, geophones are placed by their
/// offset from a shot at 0. The sample interval is the trace header's, else the binary header's. Traces with
/// identification code 2 and those that are no seismic data are dead. Samples that are not numbers become 0. A file
/// that is cut off gives the traces that are whole, and the last one as far as it goes. All this is said in
/// `oddities`.
///
/// Fails, in one sentence with the name, when the file cannot be opened, is no SEG-Y file, has another sample format,
/// no sample interval, or no trace.
/// Sources: Barry, Cavers and Kneale, Geophysics 40 (1975) 344-352; SEG Technical Standards Committee, SEG-Y rev 1
/// (2002) and rev 2.0 (2017).
Result<std::vector<ShotRecord>> readSegy(const std::string& path);

/// The same from a file's content; `name` stands for the file in messages and in the records.
Result<std::vector<ShotRecord>> readSegyBytes(std::span<const std::byte> bytes, const std::string& name);

}  // namespace strikeplate
