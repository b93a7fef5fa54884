#include "widgets/record_display_menu.h"

#include <initializer_list>

#include <QActionGroup>
#include <QCoreApplication>
#include <QMenu>

#include "core/base/units.h"
#include "widgets/record_view.h"
#include "widgets/record_words.h"

namespace strikeplate {
namespace {

QString tr(const char* text) {
  return QCoreApplication::translate("RecordView", text);
}

/// Sets one member of the view's display to one value, and is checked while it has it.
template <class Value>
QAction* addChoice(QMenu& menu, RecordView& view, const QString& text, Value RecordDisplay::*member, Value value) {
  QAction* action = menu.addAction(text);
  action->setCheckable(true);
  QObject::connect(action, &QAction::triggered, &view, [&view, member, value] {
    RecordDisplay display = view.display();
    display.*member = value;
    view.changeDisplay(display);
  });
  QObject::connect(&menu, &QMenu::aboutToShow, action,
                   [&view, action, member, value] { action->setChecked(view.display().*member == value); });
  return action;
}

template <class Value>
struct Choice {
  QString text;
  Value value;
};

template <class Value>
void addChoices(QMenu& menu, RecordView& view, const QString& title, Value RecordDisplay::*member,
                std::initializer_list<Choice<Value>> choices) {
  QMenu* sub = menu.addMenu(title);
  auto* group = new QActionGroup(sub);
  for (const Choice<Value>& choice : choices) {
    group->addAction(addChoice(*sub, view, choice.text, member, choice.value));
  }
}

void addSwitch(QMenu& menu, RecordView& view, const QString& text, bool RecordDisplay::*member) {
  QAction* action = menu.addAction(text);
  action->setCheckable(true);
  QObject::connect(action, &QAction::triggered, &view, [&view, member](bool on) {
    RecordDisplay display = view.display();
    display.*member = on;
    view.changeDisplay(display);
  });
  QObject::connect(&menu, &QMenu::aboutToShow, action,
                   [&view, action, member] { action->setChecked(view.display().*member); });
}

/// A corner of the filter, with what it does to a first break that is read off the filtered trace.
Choice<double> corner(double PassBand::*which, double value) {
  if (value <= 0.0) {
    return {tr("None"), value};
  }
  PassBand band;
  band.*which = value;
  return {tr("%1 Hz (%2)").arg(value).arg(onsetWords(band)), value};
}

}  // namespace

void fillDisplayMenu(QMenu& menu, RecordView& view) {
  addChoices<TraceStyle>(menu, view, tr("Traces"), &RecordDisplay::style,
                         {{tr("Wiggle"), TraceStyle::Wiggle},
                          {tr("Area"), TraceStyle::Area},
                          {tr("Wiggle and area"), TraceStyle::WiggleAndArea},
                          {tr("Density"), TraceStyle::Density}});
  addChoices<TraceScale>(
      menu, view, tr("Amplitudes"), &RecordDisplay::scale,
      {{tr("Each trace to its own largest"), TraceScale::Trace}, {tr("One scale for the shot"), TraceScale::Shot}});
  addChoices<double>(menu, view, tr("Clip"), &RecordDisplay::clip,
                     {{tr("None"), 0.0},
                      {tr("At half a trace spacing"), 0.5},
                      {tr("At one trace spacing"), 1.0},
                      {tr("At two trace spacings"), 2.0}});
  addChoices<double>(menu, view, tr("Gain with time"), &RecordDisplay::gainPower,
                     {{tr("None"), 0.0}, {tr("Time"), 1.0}, {tr("Time squared"), 2.0}});
  addChoices<double>(
      menu, view, tr("Automatic gain"), &RecordDisplay::agcWindow,
      {{tr("None"), 0.0}, {tr("Over 20 ms"), 0.02}, {tr("Over 50 ms"), 0.05}, {tr("Over 200 ms"), 0.2}});
  menu.addSeparator();
  addChoices<double>(menu, view, tr("Low cut"), &RecordDisplay::lowCut,
                     {corner(&PassBand::low, 0), corner(&PassBand::low, 5), corner(&PassBand::low, 10),
                      corner(&PassBand::low, 20), corner(&PassBand::low, 40)});
  addChoices<double>(menu, view, tr("High cut"), &RecordDisplay::highCut,
                     {corner(&PassBand::high, 0), corner(&PassBand::high, 400), corner(&PassBand::high, 200),
                      corner(&PassBand::high, 100), corner(&PassBand::high, 60)});
  addChoices<double>(menu, view, tr("Mains hum"), &RecordDisplay::hum,
                     {{tr("Left in"), 0.0}, {tr("50 Hz taken out"), 50.0}, {tr("60 Hz taken out"), 60.0}});
  menu.addSeparator();
  QMenu* reduced = menu.addMenu(tr("Reduced time"));
  auto* group = new QActionGroup(reduced);
  for (const double velocity : {0.0, 500.0, 1000.0, 1500.0, 2000.0, 3000.0, 5000.0}) {
    QAction* action = addChoice(*reduced, view, tr("None"), &RecordDisplay::reducingVelocity, velocity);
    group->addAction(action);
    if (velocity > 0.0) {
      // The unit may have changed since the menu was last open.
      QObject::connect(reduced, &QMenu::aboutToShow, action, [action, &view, velocity] {
        action->setText(tr("At %1").arg(QString::fromStdString(Units{view.inFeet()}.velocity(velocity))));
      });
    }
  }
  addSwitch(menu, view, tr("Time upwards"), &RecordDisplay::timeUp);
  addSwitch(menu, view, tr("Traces at true position"), &RecordDisplay::truePosition);
  menu.addSeparator();
  addSwitch(menu, view, tr("Times that the section predicts"), &RecordDisplay::predicted);
  addSwitch(menu, view, tr("Reciprocal times"), &RecordDisplay::reciprocal);
  addSwitch(menu, view, tr("Magnifier"), &RecordDisplay::magnifier);
}

}  // namespace strikeplate
