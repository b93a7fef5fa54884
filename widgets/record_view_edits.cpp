// The edits that the record view proposes at a key or menu entry.
#include <algorithm>
#include <cmath>

#include "widgets/record_pick.h"
#include "widgets/record_view.h"

namespace strikeplate {
namespace {

bool changesNothing(const Edit& edit) {
  return std::all_of(edit.changes.begin(), edit.changes.end(), [](const Change& change) {
    const auto* pick = std::get_if<PickChange>(&change);
    return pick != nullptr && pick->before == pick->after;
  });
}

}  // namespace

void RecordView::commit(const std::optional<Edit>& edit) {
  if (edit && !changesNothing(*edit)) {
    emit proposed(*edit, Phase::Commit);
  }
}

void RecordView::nudge(int samples) {
  if (!hasTrace()) {
    return;
  }
  const Selection& s = scene_.selection;
  if (!shot().traces[static_cast<std::size_t>(s.trace)].pick) {
    emit hint(tr("Trace %1 has no pick to move; a click or Space sets one.").arg(s.trace + 1));
    return;
  }
  if (!nudge_ || nudge_->trace != s.trace) {
    finishNudge();
    nudge_ = Nudge{scene_.survey, s.shot, s.trace, 0};
  }
  nudge_->samples += samples;
  const auto edit = nudgedPick(*nudge_->survey, *gather(), nudge_->shot, nudge_->trace, nudge_->samples);
  emit proposed(edit.value_or(Edit{}), Phase::Live);
  sayTrace();
}

void RecordView::finishNudge() {
  if (!nudge_ || gather() == nullptr) {
    return;
  }
  const Nudge done = *nudge_;
  nudge_.reset();
  const Gather& of = (*scene_.gathers)[static_cast<std::size_t>(done.shot)];
  const auto edit = nudgedPick(*done.survey, of, done.shot, done.trace, done.samples);
  emit proposed(edit.value_or(Edit{}), edit ? Phase::Commit : Phase::Abandon);
}

std::vector<int> RecordView::tracesMeant() const {
  std::vector<int> traces;
  if (marked_.first >= 0) {
    for (int t = marked_.first; t <= marked_.second; ++t) {
      traces.push_back(t);
    }
  } else if (hasTrace()) {
    traces.push_back(scene_.selection.trace);
  }
  return traces;
}

void RecordView::deletePicks() {
  const std::vector<int> traces = tracesMeant();
  if (!traces.empty()) {
    commit(deletedPicks(*scene_.survey, scene_.selection.shot, traces.front(), traces.back()));
  }
}

void RecordView::assignLayer(int layer) {
  const std::vector<int> traces = tracesMeant();
  if (!traces.empty()) {
    commit(edits::assignLayer(*scene_.survey, scene_.selection.shot, traces, layer));
  }
}

void RecordView::pickBySignal() {
  if (!hasTrace()) {
    return;
  }
  const Selection& s = scene_.selection;
  const double predicted = picture().predictedOf(s.trace);
  const auto edit = signalPick(*scene_.survey, *gather(), s.shot, s.trace,
                               std::isfinite(predicted) ? std::optional(predicted) : std::nullopt);
  if (edit) {
    commit(edit);
  } else {
    emit hint(tr("Trace %1 shows no clear onset; set its pick by hand or leave it without.").arg(s.trace + 1));
  }
}

}  // namespace strikeplate
