#include <algorithm>
#include <cmath>
#include <utility>

#include "core/base/file_names.h"
#include "core/report/sheet_parts.h"
#include "core/survey/doubts.h"

namespace strikeplate {
namespace {

// Residual over sigma of the pick that a doubt is about; 0 for a doubt about something else.
double misfitOf(const Interpretation& interpretation, const Doubt& doubt) {
  const int arrival = doubt.shot >= 0 && doubt.trace >= 0 ? interpretation.arrivalOf(doubt.shot, doubt.trace) : -1;
  const std::vector<double>& predicted = interpretation.section.predicted;
  if (arrival < 0 || static_cast<std::size_t>(arrival) >= predicted.size()) {
    return 0.0;
  }
  const Arrival& a = interpretation.times.arrivals[static_cast<std::size_t>(arrival)];
  const double misfit = std::abs(a.time - predicted[static_cast<std::size_t>(arrival)]) / a.sigma;
  return std::isfinite(misfit) ? misfit : 0.0;
}

// Folders are nobody's business but the user's.
std::string withoutFolders(std::string text, const Survey& survey) {
  for (const RecordPtr& record : survey.records) {
    const std::string name = lastPart(record->file);
    for (std::size_t at = text.find(record->file); name != record->file && at != std::string::npos;
         at = text.find(record->file, at + name.size())) {
      text.replace(at, record->file.size(), name);
    }
  }
  return sentence(std::move(text));
}

}  // namespace

std::vector<SheetDoubtKind> sheetDoubts(const SheetSource& source) {
  struct Ranked {
    double misfit = 0.0;
    SheetDoubt doubt;
  };
  std::vector<std::pair<std::string, std::vector<Ranked>>> kinds;
  for (const Doubt& doubt : source.interpretation.doubts) {
    auto kind = std::find_if(kinds.begin(), kinds.end(), [&](const auto& k) { return k.first == doubt.kind; });
    if (kind == kinds.end()) {
      kind = kinds.insert(kinds.end(), {doubt.kind, {}});
    }
    kind->second.push_back(
        {misfitOf(source.interpretation, doubt),
         {withoutFolders(doubt.says, source.survey), withoutFolders(doubt.restsOn, source.survey),
          withoutFolders(doubt.wouldSettle, source.survey), sentence(answerTo(source.survey, doubt))}});
  }
  std::vector<SheetDoubtKind> sorted;
  for (auto& [name, ranked] : kinds) {
    std::stable_sort(ranked.begin(), ranked.end(), [](const Ranked& a, const Ranked& b) {
      // What somebody answered is worth its line before the others of its kind.
      return std::pair(!a.doubt.answer.empty(), a.misfit) > std::pair(!b.doubt.answer.empty(), b.misfit);
    });
    sorted.push_back({name, {}});
    for (Ranked& one : ranked) {
      sorted.back().doubts.push_back(std::move(one.doubt));
    }
  }
  return sorted;
}

std::string noDoubts(const Section& section) {
  return section.determined ? "The program's checks found nothing to doubt."
                            : "There is no section whose doubts could be listed.";
}

SheetTable sheetDoubtTable(const std::vector<SheetDoubtKind>& kinds, const std::string& none) {
  SheetTable table;
  table.title = "Doubts";
  table.columns = {"Kind", "Doubt", "Rests on", "What would settle it"};
  const bool answered = std::any_of(kinds.begin(), kinds.end(), [](const SheetDoubtKind& kind) {
    return std::any_of(kind.doubts.begin(), kind.doubts.end(), [](const SheetDoubt& d) { return !d.answer.empty(); });
  });
  if (answered) {
    table.columns.push_back("Answered");
  }
  for (const SheetDoubtKind& kind : kinds) {
    for (const SheetDoubt& doubt : kind.doubts) {
      table.rows.push_back({kind.kind, doubt.says, doubt.restsOn, doubt.settles});
      if (answered) {
        table.rows.back().push_back(doubt.answer);
      }
    }
  }
  table.summary = table.rows.empty() ? none : "";
  return table;
}

std::vector<std::string> doubtLines(const SheetContent& sheet, int mostOfAKind, bool reasons) {
  std::vector<std::string> lines;
  for (const SheetDoubtKind& kind : sheet.doubts) {
    const std::size_t shown = std::min(kind.doubts.size(), static_cast<std::size_t>(std::max(1, mostOfAKind)));
    for (std::size_t i = 0; i < shown; ++i) {
      const SheetDoubt& doubt = kind.doubts[i];
      const bool said = i > 0 && doubt.settles == kind.doubts[i - 1].settles;
      lines.push_back(doubt.says + (reasons && !doubt.restsOn.empty() ? " " + doubt.restsOn : "") +
                      (said || doubt.settles.empty() ? "" : " To settle it: " + doubt.settles) +
                      (doubt.answer.empty() ? "" : " Answered: " + doubt.answer));
    }
    if (shown < kind.doubts.size()) {
      lines.push_back("And " + std::to_string(kind.doubts.size() - shown) + " more of this kind (" + kind.kind +
                      ").");
    }
  }
  if (lines.empty()) {
    lines.push_back(sheet.noDoubts);
  }
  return lines;
}

}  // namespace strikeplate
