#include "widgets/mark_dialog.h"

#include <algorithm>

#include <QDialogButtonBox>
#include <QFormLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>

#include "core/base/estimate.h"
#include "core/base/units.h"
#include "widgets/typed_numbers.h"

namespace strikeplate {
namespace {

/// From the unit on the screen to m or s.
double unitOf(const Survey& survey, MarkKind kind) {
  return kind == MarkKind::CriticalDistance ? Units{survey.settings.feet}.toMetres(1.0) : 1e-3;
}

/// To begin with: half a geophone spacing, or 1 ms.
double usualSigma(const Survey& survey, MarkKind kind) {
  if (kind == MarkKind::ReflectionTime || survey.geophones.size() < 2) {
    return 1e-3 * (kind == MarkKind::ReflectionTime ? 1.0 : 1000.0);
  }
  const double length = survey.geophones.back().x - survey.geophones.front().x;
  return 0.5 * length / static_cast<double>(survey.geophones.size() - 1);
}

}  // namespace

MarkDialog::MarkDialog(const Survey& survey, int shot, MarkKind kind, double proposed, QWidget* parent)
    : QDialog(parent),
      survey_(survey),
      shot_(shot),
      kind_(kind),
      value_(new QLineEdit(this)),
      sigma_(new QLineEdit(this)),
      lack_(new QLabel(this)) {
  const bool distance = kind == MarkKind::CriticalDistance;
  setWindowTitle(distance ? tr("Critical distance of shot %1").arg(shot + 1)
                          : tr("Reflection time of shot %1").arg(shot + 1));
  ShotMark start{kind, proposed, usualSigma(survey, kind)};
  for (const ShotMark& mark : survey.shots[static_cast<std::size_t>(shot)].marks) {
    if (mark.kind == kind) {
      start = proposed > 0.0 ? ShotMark{kind, proposed, mark.sigma} : mark;
    }
  }
  const double unit = unitOf(survey, kind);
  value_->setText(start.value > 0.0 ? shortNumber(start.value / unit, 2) : QString());
  sigma_->setText(shortNumber(kNormal95 * start.sigma / unit, 2));
  auto* text = new QLabel(distance ? tr("The offset from which the head wave of layer 2 exists, often where the "
                                        "reflection and the head wave meet. It gives a second opinion of the depth.")
                                   : tr("The two-way time of the reflection from the top of layer 2, carried back to "
                                        "zero offset. It gives a second opinion of the depth."),
                          this);
  text->setWordWrap(true);
  const QString name = distance ? QString::fromStdString(Units{survey.settings.feet}.lengthUnit()) : tr("ms");
  auto* form = new QFormLayout(this);
  form->addRow(text);
  form->addRow(distance ? tr("&Distance (%1)").arg(name) : tr("&Time (%1)").arg(name), value_);
  form->addRow(tr("&Half of its 95 % interval (%1)").arg(name), sigma_);
  lack_->setWordWrap(true);
  form->addRow(lack_);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  ok_ = buttons->button(QDialogButtonBox::Ok);
  form->addRow(buttons);
  connect(value_, &QLineEdit::textChanged, this, &MarkDialog::check);
  connect(sigma_, &QLineEdit::textChanged, this, &MarkDialog::check);
  connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  check();
}

std::optional<ShotMark> MarkDialog::mark() const {
  const auto value = typedNumber(value_->text()), half = typedNumber(sigma_->text());
  if (!value || !half || *value <= 0.0 || *half <= 0.0) {
    return std::nullopt;
  }
  const double unit = unitOf(survey_, kind_);
  return ShotMark{kind_, unit * *value, unit * *half / kNormal95};
}

void MarkDialog::check() {
  ok_->setEnabled(mark().has_value());
  lack_->setText(mark() ? QString() : tr("Both have to be numbers above zero, such as 12.5."));
}

Edit MarkDialog::edit() const {
  const auto settled = mark();
  return settled ? edits::setMark(survey_, shot_, *settled) : Edit{};
}

}  // namespace strikeplate
