#include "core/survey/survey_file_json.h"

#include <array>
#include <cstddef>
#include <type_traits>
#include <utility>

#include "core/survey/survey_file_text.h"

namespace strikeplate {
namespace {

using nlohmann::json;

constexpr std::array<const char*, 4> kStates = {"live", "dead", "reversed", "noisy"};
constexpr std::array<const char*, 2> kMarks = {"criticalDistance", "reflectionTime"};
constexpr std::array<const char*, 3> kOrigins = {"automatic", "hand", "imported"};

// One table for writing and reading the free texts of SurveyInfo.
struct InfoField {
  const char* key;
  std::string SurveyInfo::*field;
};
constexpr std::array<InfoField, 13> kInfoFields = {{{"title", &SurveyInfo::title},
                                                    {"client", &SurveyInfo::client},
                                                    {"site", &SurveyInfo::site},
                                                    {"line", &SurveyInfo::line},
                                                    {"date", &SurveyInfo::date},
                                                    {"crew", &SurveyInfo::crew},
                                                    {"observer", &SurveyInfo::observer},
                                                    {"source", &SurveyInfo::source},
                                                    {"geophoneType", &SurveyInfo::geophoneType},
                                                    {"recorder", &SurveyInfo::recorder},
                                                    {"weather", &SurveyInfo::weather},
                                                    {"datum", &SurveyInfo::datum},
                                                    {"notes", &SurveyInfo::notes}}};

struct SheetText {
  const char* key;
  std::string SheetChoices::*text;
};
constexpr std::array<SheetText, 4> kSheetTexts = {{{"question", &SheetChoices::question},
                                                   {"answer", &SheetChoices::answer},
                                                   {"answerTo", &SheetChoices::answerTo},
                                                   {"signatory", &SheetChoices::signatory}}};

template <std::size_t Count>
int indexOf(const std::array<const char*, Count>& names, const std::string& name) {
  for (std::size_t i = 0; i < Count; ++i) {
    if (name == names[i]) {
      return static_cast<int>(i);
    }
  }
  throw json::other_error::create(501, "no such word: " + name, nullptr);
}

// Writes and reads every part; throws json::exception on reading what does not fit.
class Writer {
 public:
  explicit Writer(const RecordId& idOf) : idOf_(idOf) {}

  json operator()(const std::optional<Pick>& pick) const {
    return pick
               ? json::array({pick->time, pick->sigma, pick->layer, kOrigins[static_cast<std::size_t>(pick->origin)]})
               : json();
  }

  json operator()(const ShotTrace& trace) const {
    json row = {trace.geophone, kStates[static_cast<std::size_t>(trace.state)]};
    if (trace.pick || !trace.stateReason.empty()) {
      row.push_back(textToJson(trace.stateReason));
    }
    if (trace.pick) {
      row.push_back((*this)(trace.pick));
    }
    return row;
  }

  json operator()(const Blow& b) const {
    return {{"record", b.record}, {"lag", b.lag}, {"similarity", b.similarity}, {"used", b.used}};
  }

  json operator()(const ShotMark& m) const {
    return {{"kind", kMarks[static_cast<std::size_t>(m.kind)]}, {"value", m.value}, {"sigma", m.sigma}};
  }

  json operator()(const DoubtAnswer& a) const {
    return {{"kind", textToJson(a.kind)}, {"where", textToJson(a.where)}, {"note", textToJson(a.note)}};
  }

  json operator()(const Shot& shot) const {
    json object = {{"x", shot.point.x},
                   {"elevation", shot.point.elevation},
                   {"depth", shot.point.depth},
                   {"trigger", shot.triggerCorrection},
                   {"blows", (*this)(shot.blows)},
                   {"traces", (*this)(shot.traces)}};
    if (!shot.marks.empty()) {
      object["marks"] = (*this)(shot.marks);
    }
    return object;
  }

  json operator()(const Geophone& g) const { return {{"x", g.x}, {"elevation", g.elevation}}; }

  json operator()(const Borehole& b) const {
    return {{"x", b.x},         {"layer", b.layer}, {"depth", b.depth},
            {"sigma", b.sigma}, {"used", b.used},   {"name", textToJson(b.name)}};
  }

  json operator()(const SurveyInfo& info) const {
    json object = json::object();
    for (const InfoField& f : kInfoFields) {
      object[f.key] = textToJson(info.*f.field);
    }
    if (info.sheet != SheetChoices{}) {
      object["sheet"] = (*this)(info.sheet);
    }
    if (info.map) {
      object["map"] = json::array({(*this)(info.map->first), (*this)(info.map->second)});
    }
    if (!info.tables.empty()) {
      object["tables"] = (*this)(info.tables);
    }
    return object;
  }

  json operator()(const SheetChoices& sheet) const {
    json object = {{"records", sheet.records}, {"tables", sheet.tables}, {"places", sheet.places}};
    for (const SheetText& t : kSheetTexts) {
      object[t.key] = textToJson(sheet.*t.text);
    }
    return object;
  }

  json operator()(const MapPoint& point) const { return {point.x, point.longitude, point.latitude}; }

  json operator()(const TableRead& table) const { return {textToJson(table.file), textToJson(table.checksum)}; }

  json operator()(const SurveySettings& s) const {
    return {{"layers", s.layers}, {"feet", s.feet}, {"solveTriggerDelays", s.solveTriggerDelays}};
  }

  json operator()(const std::string& text) const { return textToJson(text); }
  json operator()(const RecordPtr& record) const { return idOf_(record); }

  json operator()(int number) const { return number; }
  json operator()(const OtherLine& other) const { return (*this)(*other.line); }

  json operator()(const Survey& survey) const {
    json object = {{"info", (*this)(survey.info)},       {"settings", (*this)(survey.settings)},
                   {"records", (*this)(survey.records)}, {"geophones", (*this)(survey.geophones)},
                   {"shots", (*this)(survey.shots)},     {"boreholes", (*this)(survey.boreholes)},
                   {"remarks", (*this)(survey.remarks)}};
    if (!survey.doubtAnswers.empty()) {
      object["doubtAnswers"] = (*this)(survey.doubtAnswers);
    }
    if (!survey.otherLines.empty()) {
      object["otherLines"] = (*this)(survey.otherLines);
      object["lineAtHand"] = survey.lineAtHand;
    }
    return object;
  }

  template <class Item>
  json operator()(const std::vector<Item>& items) const {
    json array = json::array();
    for (const Item& item : items) {
      array.push_back((*this)(item));
    }
    return array;
  }

 private:
  const RecordId& idOf_;
};

class Reader {
 public:
  explicit Reader(const RecordOf& recordOf) : recordOf_(recordOf) {}

  void read(const json& from, std::optional<Pick>& pick) const {
    pick.reset();
    if (!from.is_null()) {
      pick = Pick{from.at(0).get<double>(), from.at(1).get<double>(), from.at(2).get<int>(),
                  static_cast<PickOrigin>(indexOf(kOrigins, from.at(3).get<std::string>()))};
    }
  }

  void read(const json& from, ShotTrace& trace) const {
    trace.geophone = from.at(0).get<int>();
    trace.state = static_cast<TraceState>(indexOf(kStates, from.at(1).get<std::string>()));
    trace.stateReason = from.size() > 2 ? textFromJson(from.at(2)) : "";
    read(from.size() > 3 ? from.at(3) : json(), trace.pick);
  }

  void read(const json& from, Blow& blow) const {
    blow = {from.at("record").get<int>(), from.at("lag").get<double>(), from.at("similarity").get<double>(),
            from.at("used").get<bool>()};
  }

  void read(const json& from, ShotMark& mark) const {
    mark = {static_cast<MarkKind>(indexOf(kMarks, from.at("kind").get<std::string>())),
            from.at("value").get<double>(), from.at("sigma").get<double>()};
  }

  void read(const json& from, DoubtAnswer& answer) const {
    answer = {textFromJson(from.at("kind")), textFromJson(from.at("where")), textFromJson(from.at("note"))};
  }

  void read(const json& from, Shot& shot) const {
    shot.point = {from.at("x").get<double>(), from.at("elevation").get<double>(), from.at("depth").get<double>()};
    shot.triggerCorrection = from.at("trigger").get<double>();
    read(from.at("blows"), shot.blows);
    read(from.at("traces"), shot.traces);
    read(from.contains("marks") ? from.at("marks") : json::array(), shot.marks);
  }

  void read(const json& from, Geophone& geophone) const {
    geophone = {from.at("x").get<double>(), from.at("elevation").get<double>()};
  }

  void read(const json& from, Borehole& b) const {
    b = {from.at("x").get<double>(),     from.at("layer").get<int>(), from.at("depth").get<double>(),
         from.at("sigma").get<double>(), from.at("used").get<bool>(), textFromJson(member(from, "name"))};
  }

  void read(const json& from, SurveyInfo& info) const {
    for (const InfoField& f : kInfoFields) {
      info.*f.field = textFromJson(member(from, f.key));
    }
    info.sheet = {};
    if (const json& sheet = member(from, "sheet"); !sheet.is_null()) {
      read(sheet, info.sheet);
    }
    info.map.reset();
    if (const json& map = member(from, "map"); !map.is_null()) {
      info.map.emplace();
      read(map.at(0), info.map->first);
      read(map.at(1), info.map->second);
    }
    info.tables.clear();
    if (const json& tables = member(from, "tables"); !tables.is_null()) {
      read(tables, info.tables);
    }
  }

  void read(const json& from, SheetChoices& sheet) const {
    for (const SheetText& t : kSheetTexts) {
      sheet.*t.text = textFromJson(member(from, t.key));
    }
    sheet.records = from.at("records").get<bool>();
    sheet.tables = from.at("tables").get<bool>();
    sheet.places = from.at("places").get<bool>();
  }

  void read(const json& from, MapPoint& point) const {
    point = {from.at(0).get<double>(), from.at(1).get<double>(), from.at(2).get<double>()};
  }

  void read(const json& from, TableRead& table) const {
    table = {textFromJson(from.at(0)), textFromJson(from.at(1))};
  }

  void read(const json& from, SurveySettings& s) const {
    s = {from.at("layers").get<int>(), from.at("feet").get<bool>(), from.at("solveTriggerDelays").get<bool>()};
  }

  void read(const json& from, std::string& text) const { text = textFromJson(from); }

  void read(const json& from, RecordPtr& record) const {
    record = recordOf_(from.get<long long>());
    if (!record) {
      throw json::other_error::create(501, "no such record", nullptr);
    }
  }

  void read(const json& from, Survey& survey) const {
    read(from.at("info"), survey.info);
    read(from.at("settings"), survey.settings);
    read(from.at("records"), survey.records);
    read(from.at("geophones"), survey.geophones);
    read(from.at("shots"), survey.shots);
    read(from.at("boreholes"), survey.boreholes);
    read(from.at("remarks"), survey.remarks);
    read(from.contains("doubtAnswers") ? from.at("doubtAnswers") : json::array(), survey.doubtAnswers);
    if (from.contains("otherLines")) {
      read(from.at("otherLines"), survey.otherLines);
      read(from.at("lineAtHand"), survey.lineAtHand);
    }
  }

  void read(const json& from, OtherLine& other) const {
    auto line = std::make_shared<Survey>();
    if (from.contains("otherLines")) {
      throw json::other_error::create(501, "lines within a line", nullptr);
    }
    read(from, *line);
    other.line = std::move(line);
  }

  void read(const json& from, int& number) const { number = from.get<int>(); }

  template <class Item>
  void read(const json& from, std::vector<Item>& items) const {
    items.clear();
    for (const json& one : from) {
      read(one, items.emplace_back());
    }
  }

 private:
  const RecordOf& recordOf_;
};

// Names of the kinds of change, in the order of the variant.
constexpr std::array<const char*, 9> kKinds = {"pick",      "shot",    "geophones", "info",        "settings",
                                               "boreholes", "content", "line",      "doubtAnswers"};
static_assert(std::variant_size_v<Change> == kKinds.size());

template <class T>
constexpr bool kNamesShot = std::is_same_v<T, PickChange> || std::is_same_v<T, ShotChange>;

json changeToJson(const Change& change, const Writer& write) {
  json object = {{"kind", kKinds[change.index()]}};
  std::visit(
      [&](const auto& one) {
        using Kind = std::decay_t<decltype(one)>;
        if constexpr (kNamesShot<Kind>) {
          object["shot"] = one.shot;
        }
        if constexpr (std::is_same_v<Kind, PickChange>) {
          object["trace"] = one.trace;
        }
        object["before"] = write(one.before);
        object["after"] = write(one.after);
      },
      change);
  return object;
}

template <class Kind>
Change readChange(const json& from, const Reader& reader) {
  Kind change;
  if constexpr (kNamesShot<Kind>) {
    change.shot = from.at("shot").get<int>();
  }
  if constexpr (std::is_same_v<Kind, PickChange>) {
    change.trace = from.at("trace").get<int>();
  }
  reader.read(from.at("before"), change.before);
  reader.read(from.at("after"), change.after);
  return change;
}

template <std::size_t... Index>
Change changeFromJson(const json& from, const Reader& reader, std::index_sequence<Index...> /*kinds*/) {
  using ReadOne = Change (*)(const json&, const Reader&);
  constexpr std::array<ReadOne, sizeof...(Index)> kRead = {&readChange<std::variant_alternative_t<Index, Change>>...};
  const int kind = indexOf(kKinds, from.at("kind").get<std::string>());
  return kRead[static_cast<std::size_t>(kind)](from, reader);
}

// The one place where what the JSON library throws becomes a Failure.
template <class Value, class Read>
Result<Value> guarded(const std::string& text, const Read& read) {
  try {
    Value value;
    read(json::parse(text), value);
    return value;
  } catch (const json::exception& error) {
    return Failure{error.what()};
  }
}

}  // namespace

std::string surveyToJson(const Survey& survey, const RecordId& idOf) {
  return Writer(idOf)(survey).dump();
}

Result<Survey> surveyFromJson(const std::string& text, const RecordOf& recordOf) {
  return guarded<Survey>(text, [&](const json& from, Survey& survey) { Reader(recordOf).read(from, survey); });
}

std::string changesToJson(const std::vector<Change>& changes, const RecordId& idOf) {
  const Writer write(idOf);
  json array = json::array();
  for (const Change& change : changes) {
    array.push_back(changeToJson(change, write));
  }
  return array.dump();
}

Result<std::vector<Change>> changesFromJson(const std::string& text, const RecordOf& recordOf) {
  const Reader reader(recordOf);
  return guarded<std::vector<Change>>(text, [&](const json& from, std::vector<Change>& changes) {
    for (const json& one : from) {
      changes.push_back(changeFromJson(one, reader, std::make_index_sequence<kKinds.size()>()));
    }
  });
}

}  // namespace strikeplate
