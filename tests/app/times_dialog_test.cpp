#include "app/times_dialog.h"

#include <QComboBox>
#include <QPushButton>
#include <QSettings>
#include <QStandardPaths>
#include <QTemporaryDir>
#include <QTest>
#include <gtest/gtest.h>

namespace strikeplate {
namespace {

class TimesDialogTest : public ::testing::Test {
 protected:
  void SetUp() override {
    ASSERT_TRUE(home.isValid());
    QSettings::setPath(QSettings::NativeFormat, QSettings::UserScope, home.path());
    QSettings().clear();
  }

  static QComboBox* box(const TimesDialog& dialog, const QString& name) {
    for (QComboBox* one : dialog.findChildren<QComboBox*>()) {
      if (one->accessibleName() == name) {
        return one;
      }
    }
    return nullptr;
  }
  static QPushButton* readButton(const TimesDialog& dialog) {
    for (QPushButton* one : dialog.findChildren<QPushButton*>()) {
      if (one->text().contains("Read")) {
        return one;
      }
    }
    return nullptr;
  }

  QTemporaryDir home;
  CsvTable table = *parseTimesTable("a,b,c\n0,2,5\n0,4,9\n", "book.csv");
};

TEST_F(TimesDialogTest, ATableWithoutTellingNamesIsReadOnceItsColumnsAreChosen) {
  TimesDialog dialog(table);
  ASSERT_NE(readButton(dialog), nullptr);
  EXPECT_FALSE(readButton(dialog)->isEnabled());
  for (const auto& [column, field] : {std::pair<QString, TimesField>{"a", TimesField::ShotX},
                                      {"b", TimesField::GeophoneX},
                                      {"c", TimesField::Time}}) {
    QComboBox* chosen = box(dialog, "Column " + column + " holds");
    ASSERT_NE(chosen, nullptr);
    chosen->setCurrentIndex(chosen->findData(static_cast<int>(field)));
  }
  EXPECT_TRUE(readButton(dialog)->isEnabled());
  ASSERT_TRUE(dialog.survey().ok());
  EXPECT_EQ(dialog.survey()->geophones.size(), 2U);
}

TEST_F(TimesDialogTest, TheChoiceIsRememberedForTablesWithTheSameColumns) {
  {
    TimesDialog dialog(table);
    for (const auto& [column, field] : {std::pair<QString, TimesField>{"a", TimesField::Time},
                                        {"b", TimesField::ShotX},
                                        {"c", TimesField::Offset}}) {
      QComboBox* chosen = box(dialog, "Column " + column + " holds");
      chosen->setCurrentIndex(chosen->findData(static_cast<int>(field)));
    }
    dialog.accept();
  }
  const TimesDialog again(table);
  EXPECT_EQ(again.columns().of(TimesField::Offset), std::optional<std::size_t>(2));
  EXPECT_TRUE(readButton(again)->isEnabled());
  const CsvTable other = *parseTimesTable("a,b\n0,2\n", "other.csv");
  EXPECT_FALSE(TimesDialog(other).survey().ok());
}

}  // namespace
}  // namespace strikeplate
