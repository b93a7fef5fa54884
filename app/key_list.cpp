#include "app/key_list.h"

#include <QDialogButtonBox>
#include <QHeaderView>
#include <QTreeWidget>
#include <QVBoxLayout>

#include "widgets/record_keys.h"

namespace strikeplate {

KeyList::KeyList(QWidget* parent) : QDialog(parent), list_(new QTreeWidget(this)) {
  setWindowTitle(tr("Keys and gestures"));
  resize(760, 640);
  list_->setColumnCount(2);
  list_->setHeaderHidden(true);
  list_->setRootIsDecorated(false);
  list_->setItemsExpandable(false);
  list_->setSelectionMode(QAbstractItemView::NoSelection);
  list_->setAccessibleName(tr("Keys and gestures"));
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Close, this);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  auto* layout = new QVBoxLayout(this);
  layout->addWidget(list_);
  layout->addWidget(buttons);

  addPane(tr("Everywhere"),
          {{tr("Escape"), tr("abandons the gesture")},
           {tr("F1, Shift+F1"), tr("the handbook, this list")},
           {tr("Ctrl+Z, Ctrl+Shift+Z"), tr("undo, redo")},
           {tr("Ctrl+Page up, Ctrl+Page down"), tr("the line before, the line after, of a job with several")},
           {tr("F5, Shift+F5"), tr("picks the line, or this shot, automatically")},
           {tr("Ctrl+G"), tr("puts the geometry right in a table")},
           {tr("Ctrl+P"), tr("prints the sheet")},
           {tr("Page up, Page down"), tr("shot before, next shot")}});
  QList<std::pair<QString, QString>> record = {
      {tr("Click"), tr("sets the first break at the onset nearby; Alt: exactly there")},
      {tr("Drag a pick"), tr("moves it")},
      {tr("Drag across traces"), tr("picks all that the stroke crosses, each at its onset; Alt: on the stroke")},
      {tr("Drag the end of a sigma bracket"), tr("sets how sure the pick is")},
      {tr("Wheel, Ctrl+wheel, middle drag"), tr("zooms time, zooms traces, moves")}};
  for (const RecordKey& key : recordKeys()) {
    record.append({key.keyText(), key.text()});
  }
  addPane(tr("Record"), record);
  addPane(tr("Travel times"),
          {{tr("Drag a ringed branch end"), tr("slides it along the curve and re-assigns what it passes")},
           {tr("Click a pick; Left, Right"), tr("selects it; goes along the curve")},
           {tr("Drag over empty ground, Ctrl+click, Shift+Left, Right"), tr("marks many picks")},
           {tr("1 to 6, 0"), tr("gives the marked picks to a layer; 0 leaves them to the program")},
           {tr("Alt+drag over empty ground"), tr("marks the picks inside the line drawn")},
           {tr("S, M, D"), tr("splits the branch at the selected pick, merges it with the next, dissolves it")},
           {tr("Alt+Left, Alt+Right"), tr("slides the far end of the selected pick's branch")},
           {tr("K, F"), tr("keeps the shot in view; forward or reverse curves stand out")},
           {tr("Right button, Menu key"), tr("what fits there; also critical distance and reflection time by hand")},
           {tr("Delete"), tr("deletes the marked picks")},
           {tr("Wheel, middle drag, +, -, Home"), tr("zooms and moves along the line; the whole line")}});
  addPane(tr("Line strip"), {{tr("Click; Left, Right"), tr("chooses a shot, or the trace at a geophone")},
                             {tr("Drag a shot"), tr("moves it; Alt: without steps")}});
  addPane(tr("Section"), {{tr("Click"), tr("chooses a layer or a shot")}, {tr("Drag"), tr("moves along the line")}});
  list_->expandAll();
  list_->header()->setSectionResizeMode(0, QHeaderView::ResizeToContents);
}

void KeyList::addPane(const QString& pane, const QList<std::pair<QString, QString>>& rows) {
  auto* top = new QTreeWidgetItem(list_, {pane});
  QFont bold = font();
  bold.setBold(true);
  top->setFont(0, bold);
  for (const auto& [keys, does] : rows) {
    new QTreeWidgetItem(top, {keys, does});
  }
}

}  // namespace strikeplate
