#include "core/survey/times_table.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

#include "core/base/file_names.h"
#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/survey/assemble.h"

namespace strikeplate {
namespace {

constexpr double kUsualSigma = 1e-3;        // s
constexpr std::size_t kMostSentences = 20;  // about rows

struct Place {
  double x = 0.0, elevation = 0.0, depth = 0.0;
  bool elevationGiven = false;
};

/// Several times for one trace.
struct Times {
  double sum = 0.0, variance = 0.0;
  int count = 0, layer = 0;
  PickOrigin origin = PickOrigin::Imported;
};

/// The places of one kind met so far, told apart by position and depth.
class Places {
 public:
  std::size_t indexOf(const Place& place) {
    for (std::size_t i = 0; i < places_.size(); ++i) {
      if (std::abs(places_[i].x - place.x) < kSamePlace && std::abs(places_[i].depth - place.depth) < kSamePlace) {
        if (place.elevationGiven && !places_[i].elevationGiven) {
          places_[i].elevation = place.elevation;
          places_[i].elevationGiven = true;
        }
        return i;
      }
    }
    places_.push_back(place);
    return places_.size() - 1;
  }

  /// For each place its rank by rising x.
  [[nodiscard]] std::vector<std::size_t> ranks() const {
    std::vector<std::size_t> order(places_.size());
    for (std::size_t i = 0; i < order.size(); ++i) {
      order[i] = i;
    }
    std::stable_sort(order.begin(), order.end(),
                     [this](std::size_t a, std::size_t b) { return places_[a].x < places_[b].x; });
    std::vector<std::size_t> ranks(places_.size());
    for (std::size_t rank = 0; rank < order.size(); ++rank) {
      ranks[order[rank]] = rank;
    }
    return ranks;
  }

  [[nodiscard]] const std::vector<Place>& all() const { return places_; }

 private:
  std::vector<Place> places_;
};

class Reading {
 public:
  Reading(const CsvTable& table, const TimesColumns& columns) : table_(table), columns_(columns) {}

  Result<Survey> survey() {
    if (const auto lack = whatIsMissing()) {
      return *lack;
    }
    for (std::size_t row = 0; row < table_.rows.size(); ++row) {
      if (const std::string problem = take(row); !problem.empty()) {
        ++passedOver_;
        remark(table_.placeOf(row) + ": " + problem + "; the row was passed over.");
      }
    }
    if (times_.empty()) {
      return Failure{table_.name +
                     ": no row holds a shot, a geophone and a time that are numbers; choose the columns "
                     "and units again" +
                     (remarks_.empty() ? "." : " (" + remarks_.front() + ")")};
    }
    return made();
  }

 private:
  [[nodiscard]] std::optional<Failure> whatIsMissing() const {
    const std::string choose = "; name the columns of shot, geophone (or offset) and time";
    for (const auto& field : columns_.fields) {
      if (field && std::count(columns_.fields.begin(), columns_.fields.end(), field) > 1) {
        return Failure{table_.name + ": two columns are said to hold the same" + choose + "."};
      }
    }
    const bool hasGeophone = columns_.of(TimesField::GeophoneX) || columns_.of(TimesField::Offset);
    const bool hasShot = columns_.of(TimesField::ShotX) || oneShot();
    if (hasShot && columns_.of(TimesField::Time) && hasGeophone) {
      return std::nullopt;
    }
    std::string there;
    for (const std::string& column : table_.columns) {
      there += (there.empty() ? "" : ", ") + column;
    }
    return Failure{table_.name + " does not say which columns hold the times" + choose + ". There are: " + there +
                   "."};
  }

  /// Offsets without shots are of one shot, which is put at 0 m.
  [[nodiscard]] bool oneShot() const {
    return columns_.of(TimesField::Offset) && !columns_.of(TimesField::ShotX) && !columns_.of(TimesField::GeophoneX);
  }

  /// The number in a column; nothing when the column is not named or the cell is empty.
  std::optional<double> number(std::size_t row, TimesField field, std::string& problem) const {
    const auto column = columns_.of(field);
    if (!column || trimmed(table_.rows[row][*column]).empty()) {
      return std::nullopt;
    }
    const std::string& cell = table_.rows[row][*column];
    auto value = parseNumber(cell);
    if (!value && std::count(cell.begin(), cell.end(), ',') == 1) {
      std::string point = cell;  // a spreadsheet of a country that writes a decimal comma
      std::replace(point.begin(), point.end(), ',', '.');
      value = parseNumber(point);
    }
    if (!value) {
      problem = "\"" + cell + "\" under " + table_.columns[*column] + " is no number";
    }
    return value;
  }

  [[nodiscard]] PickOrigin origin(std::size_t row) const {
    const auto column = columns_.of(TimesField::Origin);
    const std::string word = column ? lowered(trimmed(table_.rows[row][*column])) : "";
    return word == "automatic" ? PickOrigin::Automatic : word == "hand" ? PickOrigin::Hand : PickOrigin::Imported;
  }

  [[nodiscard]] double length(double value) const { return columns_.feet ? value * Units::kMetresPerFoot : value; }
  [[nodiscard]] double seconds(double value) const { return columns_.milliseconds ? value * 1e-3 : value; }

  /// Empty, or why the row cannot be used.
  std::string take(std::size_t row) {
    std::string problem;
    const auto shotX = oneShot() ? std::optional<double>(0.0) : number(row, TimesField::ShotX, problem);
    const auto geophoneX = number(row, TimesField::GeophoneX, problem);
    const auto offset = number(row, TimesField::Offset, problem);
    const auto time = number(row, TimesField::Time, problem);
    const auto sigma = number(row, TimesField::Sigma, problem);
    const auto layer = number(row, TimesField::Layer, problem);
    const auto shotElevation = number(row, TimesField::ShotElevation, problem);
    const auto elevation = number(row, TimesField::GeophoneElevation, problem);
    const auto depth = number(row, TimesField::ShotDepth, problem);
    const auto trigger = number(row, TimesField::TriggerCorrection, problem);
    if (!problem.empty()) {
      return problem;
    }
    if (!shotX || (!geophoneX && !offset)) {
      return "the place of the shot or of the geophone is missing";
    }
    if (sigma && !(*sigma > 0.0)) {
      return "sigma is not above zero";
    }
    const double shotAt = length(*shotX);
    const double at = geophoneX ? length(*geophoneX) : shotAt + length(*offset);
    const std::size_t shot = shots_.indexOf(
        {shotAt, length(shotElevation.value_or(0.0)), length(depth.value_or(0.0)), shotElevation.has_value()});
    const std::size_t geophone =
        geophones_.indexOf({at, length(elevation.value_or(0.0)), 0.0, elevation.has_value()});
    triggers_.resize(shots_.all().size(), 0.0);
    if (trigger) {
      triggers_[shot] = seconds(*trigger);
    }
    Times& times = times_[{shot, geophone}];
    if (time) {
      const double s = sigma ? seconds(*sigma) : kUsualSigma;
      times.sum += seconds(*time);
      times.variance += s * s;
      ++times.count;
      times.origin = origin(row);
      // An automatic assignment is the program's to make again; what a person assigned is kept.
      const bool kept = layer && *layer >= 1.0 && *layer <= 6.0 && times.origin != PickOrigin::Automatic;
      times.layer = kept ? static_cast<int>(std::lround(*layer)) : 0;
    }
    return "";
  }

  Survey made() {
    Survey survey;
    const std::vector<std::size_t> geophoneRank = geophones_.ranks();
    const std::vector<std::size_t> shotRank = shots_.ranks();
    survey.geophones.resize(geophoneRank.size());
    for (std::size_t i = 0; i < geophoneRank.size(); ++i) {
      survey.geophones[geophoneRank[i]] = {geophones_.all()[i].x, geophones_.all()[i].elevation};
    }
    survey.shots.resize(shotRank.size());
    for (std::size_t i = 0; i < shotRank.size(); ++i) {
      const Place& place = shots_.all()[i];
      Shot& shot = survey.shots[shotRank[i]];
      shot.point = {place.x, place.elevation, place.depth};
      shot.triggerCorrection = triggers_[i];
      levelWithNeighbours(place, survey.geophones, shot.point);
    }
    addTraces(survey, shotRank, geophoneRank);
    survey.settings.feet = columns_.feet;
    finishRemarks();
    survey.remarks = std::move(remarks_);
    return survey;
  }

  // A shot whose elevation is not given stands on the ground between the geophones.
  static void levelWithNeighbours(const Place& place, const std::vector<Geophone>& geophones, ShotPoint& point) {
    if (!place.elevationGiven) {
      point.elevation = Ground(geophones, {}).at(place.x);
    }
  }

  void addTraces(Survey& survey, const std::vector<std::size_t>& shotRank,
                 const std::vector<std::size_t>& geophoneRank) {
    int averaged = 0;
    for (const auto& [key, times] : times_) {
      ShotTrace trace;
      trace.geophone = static_cast<int>(geophoneRank[key.second]);
      if (times.count > 0) {
        trace.pick =
            Pick{times.sum / times.count, std::sqrt(times.variance / times.count), times.layer, times.origin};
        averaged += times.count > 1 ? 1 : 0;
      }
      survey.shots[shotRank[key.first]].traces.push_back(std::move(trace));
    }
    for (Shot& shot : survey.shots) {
      std::sort(shot.traces.begin(), shot.traces.end(),
                [](const ShotTrace& a, const ShotTrace& b) { return a.geophone < b.geophone; });
    }
    if (averaged > 0) {
      remarks_.push_back(table_.name + ": " + std::to_string(averaged) +
                         (averaged == 1 ? " trace has" : " traces have") + " several times; their mean is used.");
    }
  }

  void remark(std::string sentence) {
    if (remarks_.size() < kMostSentences) {
      remarks_.push_back(std::move(sentence));
    }
  }

  void finishRemarks() {
    if (passedOver_ > static_cast<int>(kMostSentences)) {
      remarks_.push_back(table_.name + ": " + std::to_string(passedOver_) + " rows in all were passed over.");
    }
    if (oneShot()) {
      remarks_.push_back(table_.name + " names no shot; its offsets are taken from one shot at 0 m.");
    }
    remarks_.push_back("The times came from " + lastPart(table_.name) +
                       ", without records; they cannot be looked at again here.");
  }

  const CsvTable& table_;
  const TimesColumns& columns_;
  Places shots_, geophones_;
  std::map<std::pair<std::size_t, std::size_t>, Times> times_;  // by shot and geophone as they were met
  std::vector<double> triggers_;
  std::vector<std::string> remarks_;
  int passedOver_ = 0;
};

}  // namespace

std::optional<std::size_t> TimesColumns::of(TimesField field) const {
  const auto found = std::find(fields.begin(), fields.end(), std::optional<TimesField>(field));
  return found == fields.end() ? std::nullopt : std::optional<std::size_t>(found - fields.begin());
}

Result<Survey> surveyFromTimes(const CsvTable& table, const TimesColumns& columns) {
  return Reading(table, columns).survey();
}

}  // namespace strikeplate
