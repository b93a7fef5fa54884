#include "core/survey/picks_in.h"

#include <cmath>
#include <map>
#include <optional>
#include <set>
#include <utility>

#include "core/base/csv.h"
#include "core/base/file_names.h"
#include "core/base/numbers.h"

namespace strikeplate {
namespace {

/// Where a trace of a file stands in the survey.
struct Place {
  int shot = 0, trace = 0;
  double lag = 0.0;
};

/// Finds traces by file and number. A file matches by its whole name first, then by its last part.
class Places {
 public:
  explicit Places(const Survey& survey) {
    for (std::size_t s = 0; s < survey.shots.size(); ++s) {
      for (const Blow& blow : survey.shots[s].blows) {
        const ShotRecord& record = *survey.records[static_cast<std::size_t>(blow.record)];
        for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t) {
          const Place place{static_cast<int>(s), static_cast<int>(t), blow.lag};
          const int number = record.firstTraceInFile + static_cast<int>(t);
          whole_.insert({{record.file, number}, place});
          last_.insert({{lastPart(record.file), number}, place});
        }
      }
    }
  }

  [[nodiscard]] std::optional<Place> find(const std::string& file, int trace) const {
    if (const auto found = whole_.find({file, trace}); found != whole_.end()) {
      return found->second;
    }
    const auto found = last_.find({lastPart(file), trace});
    return found == last_.end() ? std::nullopt : std::optional<Place>(found->second);
  }

 private:
  std::map<std::pair<std::string, int>, Place> whole_, last_;
};

struct Columns {
  std::size_t file = 0, trace = 0, time = 0;
  std::optional<std::size_t> sigma, layer, origin;
};

Result<Columns> columnsOf(const CsvTable& table) {
  Columns columns;
  for (const auto& [name, member] : {std::pair<const char*, std::size_t Columns::*>{"file", &Columns::file},
                                     {"trace", &Columns::trace},
                                     {"time_s", &Columns::time}}) {
    const auto found = table.neededColumn(name);
    if (!found) {
      return found.failure();
    }
    columns.*member = *found;
  }
  columns.sigma = table.column("sigma_s");
  columns.layer = table.column("layer");
  columns.origin = table.column("origin");
  return columns;
}

struct Gathered {
  double sum = 0.0, variance = 0.0;
  int count = 0, layer = 0;
  PickOrigin origin = PickOrigin::Imported;
};

PickOrigin originOf(const std::string& text) {
  const std::string word = lowered(trimmed(text));
  return word == "automatic" ? PickOrigin::Automatic : word == "hand" ? PickOrigin::Hand : PickOrigin::Imported;
}

/// One row into what is gathered; a sentence when it cannot be used.
std::optional<std::string> takeRow(const CsvTable& table, std::size_t row, const Columns& columns,
                                   const Places& places, std::map<std::pair<int, int>, Gathered>& picks) {
  constexpr double kUsualSigma = 1e-3;
  const auto& cells = table.rows[row];
  const std::string& file = cells[columns.file];
  const auto trace = parseInteger(cells[columns.trace]);
  const auto place = trace ? places.find(file, static_cast<int>(*trace)) : std::nullopt;
  if (!place) {
    return table.placeOf(row) + ": there is no trace " + cells[columns.trace] + " of a record \"" + file +
           "\" in this line; the row was passed over.";
  }
  Gathered& g = picks[{place->shot, place->trace}];
  if (trimmed(cells[columns.time]).empty()) {
    return std::nullopt;
  }
  const auto time = parseNumber(cells[columns.time]);
  const auto sigma = columns.sigma && !trimmed(cells[*columns.sigma]).empty() ? parseNumber(cells[*columns.sigma])
                                                                              : std::optional<double>(kUsualSigma);
  if (!time || !sigma || !(*sigma > 0.0)) {
    return table.placeOf(row) +
           ": the time or sigma is not a number of seconds, sigma above zero; the row was passed over.";
  }
  g.sum += *time - place->lag;
  g.variance += *sigma * *sigma;
  ++g.count;
  // An automatic assignment is the program's to make again; what a person assigned is kept.
  g.origin = columns.origin ? originOf(cells[*columns.origin]) : PickOrigin::Imported;
  const auto layer = columns.layer ? parseInteger(cells[*columns.layer]) : std::nullopt;
  g.layer = layer && *layer >= 1 && *layer <= 6 && g.origin != PickOrigin::Automatic ? static_cast<int>(*layer) : 0;
  return std::nullopt;
}

}  // namespace

Result<ImportedPicks> importPicksText(const Survey& survey, std::string_view csv, const std::string& name) {
  const auto table = parseCsv(csv, name);
  if (!table) {
    return table.failure();
  }
  const auto columns = columnsOf(*table);
  if (!columns) {
    return columns.failure();
  }
  const Places places(survey);
  std::map<std::pair<int, int>, Gathered> gathered;
  ImportedPicks out;
  for (std::size_t row = 0; row < table->rows.size(); ++row) {
    if (auto problem = takeRow(*table, row, *columns, places, gathered)) {
      out.problems.push_back(std::move(*problem));
    }
  }
  std::vector<PickChange> changes;
  for (const auto& [key, g] : gathered) {
    std::optional<Pick> pick;
    if (g.count > 0) {
      pick = Pick{g.sum / g.count, std::sqrt(g.variance / g.count), g.layer, g.origin};
      ++out.used;
    }
    changes.push_back({key.first, key.second, {}, pick});
  }
  out.edit = edits::setPicks(survey, changes, "Read picks from " + lastPart(name));
  return out;
}

Result<ImportedPicks> importPicks(const Survey& survey, const std::string& path) {
  const auto table = readCsv(path);
  if (!table) {
    return table.failure();
  }
  return importPicksText(survey, csvText(table->columns, table->rows), path);
}

}  // namespace strikeplate
