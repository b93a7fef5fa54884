#pragma once

#include <string>

namespace strikeplate {

/// Metres or feet, as the user chose, for words on screen and paper. Inside the program everything is SI.
struct Units {
  bool feet = false;

  static constexpr double kMetresPerFoot = 0.3048;

  /// m to the chosen unit of length; the same factor turns m/s into ft/s.
  [[nodiscard]] double fromMetres(double metres) const { return feet ? metres / kMetresPerFoot : metres; }
  [[nodiscard]] double toMetres(double value) const { return feet ? value * kMetresPerFoot : value; }
  [[nodiscard]] std::string lengthUnit() const { return feet ? "ft" : "m"; }
  [[nodiscard]] std::string velocityUnit() const { return feet ? "ft/s" : "m/s"; }

  /// "5.8 m"; "n/d" when not finite.
  [[nodiscard]] std::string length(double metres, int decimals = 1) const;
  /// "5.5 to 6.2 m".
  [[nodiscard]] std::string lengthRange(double low, double high, int decimals = 1) const;
  /// "1480 m/s", rounded to 10 above 1000.
  [[nodiscard]] std::string velocity(double metresPerSecond) const;
};

/// "3.2 ms" from s.
std::string milliseconds(double seconds, int decimals = 1);

}  // namespace strikeplate
