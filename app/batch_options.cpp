#include "app/batch_options.h"

#include <array>
#include <optional>

#include "core/base/numbers.h"

namespace strikeplate {
namespace {

struct PathOption {
  const char* name;
  std::string BatchOptions::*path;
  const char* meaning;
};

constexpr std::array<PathOption, 13> kPathOptions = {{
    {"--geometry", &BatchOptions::geometry, "geometry table (CSV) laid over the headers"},
    {"--picks-in", &BatchOptions::picksIn, "first breaks (CSV) to use instead of automatic ones"},
    {"--survey", &BatchOptions::survey, "survey file to write (.splate)"},
    {"--picks", &BatchOptions::picks, "first breaks to write (CSV)"},
    {"--depths", &BatchOptions::depths, "depth to every layer at every station to write (CSV)"},
    {"--layers-out", &BatchOptions::layersOut, "layer velocities to write (CSV)"},
    {"--opinions", &BatchOptions::opinions, "depths by every other route to write (CSV)"},
    {"--doubts", &BatchOptions::doubts, "reasons to doubt the result to write (CSV)"},
    {"--sheet", &BatchOptions::sheet, "field interpretation sheet to write (PDF)"},
    {"--section-dxf", &BatchOptions::sectionDxf, "section to write (DXF)"},
    {"--xlsx", &BatchOptions::xlsx, "all tables to write as one spreadsheet (XLSX)"},
    {"--geojson", &BatchOptions::geojson, "stations and depths on the map to write (GeoJSON, WGS 84)"},
    {"--svg", &BatchOptions::svg,
     "section to draw (SVG, or PNG by its ending); travel times and residuals beside it"},
}};

struct SwitchOption {
  const char* name;
  bool BatchOptions::*on;
  const char* meaning;
};

constexpr std::array<SwitchOption, 6> kSwitchOptions = {{
    {"--feet", &BatchOptions::feet, "lengths of sheet and plots in feet"},
    {"--black-and-white", &BatchOptions::blackAndWhite, "sheet and plots without colours"},
    {"--records", &BatchOptions::recordPages, "further pages of the sheet: each record with its picks"},
    {"--tables", &BatchOptions::tablePages, "further pages of the sheet: all tables in full"},
    {"--version", &BatchOptions::version, "version of the program and of what it is built on"},
    {"--help", &BatchOptions::help, "this text"},
}};

const SwitchOption* findSwitch(const std::string& name) {
  for (const SwitchOption& option : kSwitchOptions) {
    if (name == option.name) {
      return &option;
    }
  }
  return nullptr;
}

const PathOption* findPathOption(const std::string& name) {
  for (const PathOption& option : kPathOptions) {
    if (name == option.name) {
      return &option;
    }
  }
  return nullptr;
}

std::optional<Failure> setOption(BatchOptions& options, const std::string& name, const std::string& value) {
  if (value.empty()) {
    return Failure{name + " needs a value after it; see strikeplate-batch --help."};
  }
  if (const PathOption* option = findPathOption(name)) {
    options.*(option->path) = value;
    return std::nullopt;
  }
  if (name == "--paper") {
    if (lowered(value) != "a4" && lowered(value) != "letter") {
      return Failure{"--paper takes a4 or letter, not \"" + value + "\"."};
    }
    options.letter = lowered(value) == "letter";
    return std::nullopt;
  }
  const auto layers = parseInteger(value);
  if (!layers || *layers < 2 || *layers > 6) {
    return Failure{"--layers takes a whole number from 2 to 6, not \"" + value + "\"."};
  }
  options.layers = static_cast<int>(*layers);
  return std::nullopt;
}

bool isOption(const std::string& name) {
  return name == "--layers" || name == "--paper" || findPathOption(name) != nullptr;
}

}  // namespace

Result<BatchOptions> parseBatchOptions(const std::vector<std::string>& arguments) {
  BatchOptions options;
  bool onlyFiles = false;
  for (std::size_t i = 0; i < arguments.size(); ++i) {
    std::string name = arguments[i];
    if (onlyFiles || name.empty() || name[0] != '-' || name == "-") {
      options.records.push_back(name);
      continue;
    }
    if (name == "--") {
      onlyFiles = true;
    } else if (name == "-h") {
      options.help = true;
    } else if (const SwitchOption* option = findSwitch(name)) {
      options.*(option->on) = true;
    } else {
      std::optional<std::string> value;
      if (const auto equals = name.find('='); equals != std::string::npos) {
        value = name.substr(equals + 1);
        name.erase(equals);
      }
      if (!isOption(name)) {
        return Failure{"Unknown option " + name + "; strikeplate-batch --help lists the options."};
      }
      if (!value) {
        value = i + 1 < arguments.size() ? arguments[++i] : std::string();
      }
      if (const auto failure = setOption(options, name, *value)) {
        return *failure;
      }
    }
  }
  if (options.records.empty() && !options.help && !options.version) {
    return Failure{"No record given: name at least one SEG-2, SEG-Y or survey file; see strikeplate-batch --help."};
  }
  return options;
}

std::string batchHelp() {
  std::string text =
      "Usage: strikeplate-batch RECORD... [options]\n\n"
      "Interprets the records of one refraction line. RECORD is a SEG-2 or SEG-Y file, a table of travel times\n"
      "(.csv with columns of shot, geophone and time) or a survey file (.splate);\n"
      "together they are one line. What is not given is found: blows at one shot point are stacked, first breaks "
      "are\n"
      "picked automatically, the number of layers follows the evidence. CSV files are in m and s.\n\n";
  for (const PathOption& option : kPathOptions) {
    std::string line = std::string("  ") + option.name + " FILE";
    line.resize(std::max<std::size_t>(line.size() + 2, 24), ' ');
    text += line + option.meaning + "\n";
  }
  text +=
      "  --layers N            number of layers, 2 to 6\n"
      "  --paper a4|letter     paper of the sheet; A4 when not given\n";
  for (const SwitchOption& option : kSwitchOptions) {
    std::string line = std::string("  ") + option.name;
    line.resize(24, ' ');
    text += line + option.meaning + "\n";
  }
  text +=
      "\nThe sheet's question, answer, signatory and further pages are those kept in the survey file.\n\n"
      "Exit status: 0 done; 1 done, but part of the input could not be used (said on standard error); 2 wrong "
      "usage;\n"
      "3 nothing could be read.\n";
  return text;
}

}  // namespace strikeplate
