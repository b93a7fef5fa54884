#include "widgets/geometry_dialog.h"

#include <QApplication>
#include <QClipboard>
#include <QComboBox>
#include <QDialogButtonBox>
#include <QLineEdit>
#include <QListWidget>
#include <QPushButton>
#include <QTest>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"
#include "widgets/place_table.h"
#include "widgets/typed_numbers.h"

namespace strikeplate {
namespace {

class GeometryDialogTest : public ::testing::Test {
 protected:
  GeometryDialogTest() : survey_(testing::sheetSample().survey), dialog_(survey_) { dialog_.show(); }

  [[nodiscard]] PlaceTable& geophones() const { return *dialog_.findChildren<PlaceTable*>()[0]; }
  [[nodiscard]] PlaceTable& shots() const { return *dialog_.findChildren<PlaceTable*>()[1]; }
  [[nodiscard]] QPushButton& ok() const {
    return *dialog_.findChild<QDialogButtonBox*>()->button(QDialogButtonBox::Ok);
  }
  [[nodiscard]] QPushButton& button(const QString& text) const {
    for (QPushButton* each : dialog_.findChildren<QPushButton*>()) {
      if (each->text().remove('&') == text) {
        return *each;
      }
    }
    ADD_FAILURE() << "no button " << text.toStdString();
    return ok();
  }
  [[nodiscard]] QString said() const {
    QStringList all;
    const auto* list = dialog_.findChild<QListWidget*>();
    for (int i = 0; i < list->count(); ++i) {
      all << list->item(i)->text();
    }
    return all.join("\n");
  }
  /// Types into a cell as a hand does: choose it, type, Return.
  static void type(PlaceTable& table, int row, int column, const QString& text) {
    table.setCurrentCell(row, column);
    table.editItem(table.item(row, column));
    auto* editor = table.findChild<QLineEdit*>();
    ASSERT_NE(editor, nullptr);
    editor->selectAll();
    QTest::keyClicks(editor, text);
    QTest::keyClick(editor, Qt::Key_Return);
    QApplication::processEvents();
    QApplication::sendPostedEvents(nullptr, QEvent::DeferredDelete);  // the editor is gone, as after any real key
  }

  Survey survey_;
  GeometryDialog dialog_;
};

TEST_F(GeometryDialogTest, OpensWithTheLineAsItIsAndChangesNothing) {
  EXPECT_EQ(geophones().rowCount(), 48);
  EXPECT_EQ(shots().rowCount(), 7);
  EXPECT_EQ(geophones().item(3, 0)->text(), "6");
  EXPECT_EQ(shots().item(0, 3)->text(), "line7_1.dat, line7_2.dat") << "the records of the shot's two blows";
  EXPECT_EQ(said(), "Nothing looks wrong.");
  QTest::mouseClick(&ok(), Qt::LeftButton);
  EXPECT_EQ(dialog_.result(), QDialog::Accepted);
  EXPECT_TRUE(dialog_.edit().changes.empty());
}

TEST_F(GeometryDialogTest, ATypedPositionIsTakenWithPointOrComma) {
  type(shots(), 2, 0, "31,5");
  EXPECT_TRUE(dialog_.isVisible()) << "Return in a cell does not close the dialog";
  QTest::mouseClick(&ok(), Qt::LeftButton);
  const Survey after = applied(survey_, dialog_.edit());
  EXPECT_DOUBLE_EQ(after.shots[2].point.x, 31.5);
  EXPECT_EQ(after.shots[2].traces, survey_.shots[2].traces);
  EXPECT_EQ(after.geophones, survey_.geophones);
}

TEST_F(GeometryDialogTest, ACellThatIsNoNumberIsSaidAndStopsIt) {
  type(geophones(), 4, 0, "eight");
  EXPECT_EQ(said(), "Geophone 5: \"eight\" is no number.");
  EXPECT_FALSE(ok().isEnabled());
  type(geophones(), 4, 0, "8");
  EXPECT_TRUE(ok().isEnabled());
}

TEST_F(GeometryDialogTest, DoublePlacesStopItAndASpikeIsOnlySaid) {
  type(geophones(), 4, 0, "12");
  EXPECT_TRUE(said().contains("both stand at 12.00 m")) << said().toStdString();
  EXPECT_FALSE(ok().isEnabled());
  type(geophones(), 4, 0, "8");
  type(geophones(), 10, 1, "140");
  EXPECT_TRUE(said().contains("above the line between its neighbours")) << said().toStdString();
  EXPECT_TRUE(ok().isEnabled());
}

TEST_F(GeometryDialogTest, SpreadsheetCellsArePasted) {
  QApplication::clipboard()->setText("x\tz\n0,5\t101,2\n2,5\t101,3\n");
  geophones().setFocus();
  geophones().setCurrentCell(0, 0);
  QTest::keyClick(&geophones(), Qt::Key_V, Qt::ControlModifier);
  EXPECT_DOUBLE_EQ(geophones().value(0, 0), 0.5);
  EXPECT_DOUBLE_EQ(geophones().value(1, 1), 101.3);
  EXPECT_DOUBLE_EQ(geophones().value(2, 0), 4.0) << "the rest stays";
}

TEST_F(GeometryDialogTest, TheRuleFillsAColumn) {
  const auto fields = dialog_.findChildren<QLineEdit*>();
  for (QLineEdit* field : fields) {
    if (field->text() == "0") {
      field->setText("10");
    } else if (field->text() == "1" && qobject_cast<QAbstractSpinBox*>(field->parentWidget()) == nullptr) {
      field->setText("2.5");
    }
  }
  QTest::mouseClick(&button("Fill in"), Qt::LeftButton);
  EXPECT_DOUBLE_EQ(geophones().value(0, 0), 10.0);
  EXPECT_DOUBLE_EQ(geophones().value(47, 0), 10.0 + 47 * 2.5);
  EXPECT_DOUBLE_EQ(geophones().value(47, 1), survey_.geophones[47].elevation);
}

TEST_F(GeometryDialogTest, TheLineIsReversedInOneStep) {
  QTest::mouseClick(&button("Reverse line"), Qt::LeftButton);
  EXPECT_TRUE(said().contains("will be numbered anew")) << said().toStdString();
  QTest::mouseClick(&ok(), Qt::LeftButton);
  const Survey after = applied(survey_, dialog_.edit());
  EXPECT_DOUBLE_EQ(after.geophones.front().elevation, survey_.geophones.back().elevation);
  EXPECT_DOUBLE_EQ(after.boreholes[0].x, 94.0 - survey_.boreholes[0].x);
}

TEST_F(GeometryDialogTest, FeetAreShownWithoutRoundingTheMetres) {
  auto* unit = dialog_.findChildren<QComboBox*>().last();
  ASSERT_EQ(unit->currentText(), "metres");
  unit->setCurrentIndex(1);
  EXPECT_EQ(geophones().item(3, 0)->text(), "19.685") << "6 m";
  type(geophones(), 3, 0, "20");
  QTest::mouseClick(&ok(), Qt::LeftButton);
  const Survey after = applied(survey_, dialog_.edit());
  EXPECT_DOUBLE_EQ(after.geophones[3].x, 6.096);
  EXPECT_EQ(after.geophones[4], survey_.geophones[4]) << "exactly";
}

TEST(TypedNumbers, CommaAndPointAreUnderstood) {
  EXPECT_EQ(typedNumber(" 1,5 "), 1.5);
  EXPECT_EQ(typedNumber("-2.25"), -2.25);
  EXPECT_EQ(typedNumber("\u22123"), -3.0) << "a typographic minus";
  EXPECT_FALSE(typedNumber("1.000,5").has_value());
  EXPECT_FALSE(typedNumber("").has_value());
  EXPECT_EQ(shortNumber(2.500, 3), "2.5");
  EXPECT_EQ(shortNumber(-0.00001, 3), "0");
}

TEST(TypedNumbers, PastedTextIsCutIntoCells) {
  EXPECT_EQ(pastedCells("a\tb\r\n1,5\t2\r\n\r\n"), (std::vector<QStringList>{{"1,5", "2"}}));
  EXPECT_EQ(pastedCells("1.5,2\n3.5,4"), (std::vector<QStringList>{{"1.5", "2"}, {"3.5", "4"}}));
  EXPECT_EQ(pastedCells("1,5;2"), (std::vector<QStringList>{{"1,5", "2"}}));
  EXPECT_EQ(pastedCells("1,5\n2,5"), (std::vector<QStringList>{{"1,5"}, {"2,5"}})) << "decimal commas";
  EXPECT_TRUE(pastedCells("\n\n").empty());
}

}  // namespace
}  // namespace strikeplate
