#pragma once

namespace strikeplate {

enum class TraceStyle { Wiggle, Area, WiggleAndArea, Density };
/// What amplitude fills the room between two traces: each trace's own largest, or one for the whole shot.
enum class TraceScale { Trace, Shot };

/// How the record view shows a shot. For the eye only: samples and the picker are untouched.
struct RecordDisplay {
  TraceStyle style = TraceStyle::WiggleAndArea;
  TraceScale scale = TraceScale::Trace;
  bool timeUp = false;
  bool truePosition = false;      ///< traces stand at their geophone's position, not at their number
  double gain = 1.0;              ///< factor on every amplitude
  double clip = 1.0;              ///< swings are cut off at so many trace spacings; 0 leaves them whole
  double gainPower = 0.0;         ///< amplitudes grow as the time after the blow to this power; 0 is none
  double agcWindow = 0.0;         ///< s, automatic gain over this length; 0 is none
  double lowCut = 0.0;            ///< Hz, 0 is none
  double highCut = 0.0;           ///< Hz, 0 is none
  double hum = 0.0;               ///< Hz, 50 or 60; 0 leaves hum in
  double reducingVelocity = 0.0;  ///< m/s; times are shown less offset / this; 0 shows them as they are
  bool predicted = true;          ///< the section's times
  bool reciprocal = true;         ///< times read from the opposite shots
  bool magnifier = false;         ///< the onset under the pointer, enlarged
  bool operator==(const RecordDisplay&) const = default;
};

}  // namespace strikeplate
