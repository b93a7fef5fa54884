// The sheet's preview: what its choices come to, on the sheet and in the file.
#include "widgets/sheet_preview.h"

#include <algorithm>
#include <filesystem>

#include <QCheckBox>
#include <QComboBox>
#include <QLineEdit>
#include <QListWidget>
#include <QPlainTextEdit>
#include <QPrintPreviewWidget>
#include <QPushButton>
#include <QTest>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

class SheetPreviewTest : public ::testing::Test {
 protected:
  QComboBox* combo(const QString& item) {
    for (QComboBox* box : preview_.findChildren<QComboBox*>()) {
      if (box->findText(item) >= 0) {
        return box;
      }
    }
    return nullptr;
  }
  void choose(const QString& item) {
    QComboBox* box = combo(item);
    ASSERT_NE(box, nullptr);
    box->setCurrentIndex(box->findText(item));
  }
  QCheckBox* check(const QString& part) {
    for (QCheckBox* box : preview_.findChildren<QCheckBox*>()) {
      if (box->text().contains(part)) {
        return box;
      }
    }
    return nullptr;
  }
  QPlainTextEdit* answer() { return preview_.findChild<QPlainTextEdit*>(); }
  QPrintPreviewWidget* pages() { return preview_.findChild<QPrintPreviewWidget*>(); }
  QListWidget* list() { return preview_.findChild<QListWidget*>(); }

  testing::SheetSample sample_ = testing::sheetSample();
  SheetPreview preview_{sample_.survey, sample_.interpretation, {}};
};

TEST_F(SheetPreviewTest, ShowsTwoPagesUntilMoreAreAskedFor) {
  preview_.show();
  EXPECT_EQ(pages()->pageCount(), 2);
  check("record")->setChecked(true);
  EXPECT_EQ(pages()->pageCount(), 6) << "seven shots, two on a page";
  check("Places")->setChecked(true);
  EXPECT_EQ(pages()->pageCount(), 7);
  check("tables")->setChecked(true);
  EXPECT_GT(pages()->pageCount(), 7);
  EXPECT_TRUE(preview_.options().tables);
  EXPECT_TRUE(preview_.options().records);
  EXPECT_TRUE(preview_.options().places);
}

TEST_F(SheetPreviewTest, PaperAndColoursAreThoseChosen) {
  choose("Letter");
  EXPECT_EQ(preview_.paper(), QPageSize::Letter);
  preview_.setPaper(QPageSize::A4);
  EXPECT_EQ(preview_.paper(), QPageSize::A4);
  EXPECT_FALSE(preview_.options().blackAndWhite);
  choose("Black and white");
  EXPECT_TRUE(preview_.options().blackAndWhite);
}

TEST_F(SheetPreviewTest, TheDraftFollowsTheUnitUntilItIsEdited) {
  EXPECT_TRUE(answer()->toPlainText().contains(" m below the ground"));
  EXPECT_EQ(preview_.options().answer, "") << "the draft is no answer of the user's";
  choose("Feet");
  EXPECT_TRUE(preview_.inFeet());
  EXPECT_TRUE(answer()->toPlainText().contains(" ft below the ground")) << answer()->toPlainText().toStdString();
  answer()->selectAll();
  QTest::keyClicks(answer(), "Rock at 8 ft.");
  EXPECT_EQ(preview_.options().answer, "Rock at 8 ft.");
  choose("Metres");
  EXPECT_EQ(preview_.content().answer, "Rock at 8 ft.") << "the user's words stay as they are";
  for (QPushButton* button : preview_.findChildren<QPushButton*>()) {
    if (button->text().contains("drafted")) {
      button->click();
    }
  }
  EXPECT_EQ(preview_.options().answer, "");
  EXPECT_TRUE(answer()->toPlainText().contains(" m below the ground"));
}

TEST_F(SheetPreviewTest, AnAnswerKeepsWhatItWasWrittenTo) {
  answer()->selectAll();
  QTest::keyClicks(answer(), "Rock at 8 m.");
  const SheetOptions kept = preview_.options();
  EXPECT_EQ(kept.answerTo, sheetDraft(sample_.survey, sample_.interpretation));
  testing::SheetSample later = sample_;
  later.interpretation.section.velocities[0] = Estimate::normal(600.0, 10.0);
  SheetPreview again(later.survey, later.interpretation, kept);
  EXPECT_EQ(again.options().answer, "Rock at 8 m.");
  EXPECT_EQ(again.options().answerTo, kept.answerTo) << "not touched";
  EXPECT_EQ(again.content().warnings.size(), 1U);
  for (QPushButton* button : again.findChildren<QPushButton*>()) {
    if (button->text().contains("still stands")) {
      EXPECT_FALSE(button->isHidden());
      button->click();
      EXPECT_TRUE(button->isHidden());
    }
  }
  EXPECT_EQ(again.options().answerTo, sheetDraft(later.survey, later.interpretation));
  EXPECT_TRUE(again.content().warnings.empty());
}

TEST_F(SheetPreviewTest, DoubtsAreWordedInTheUnitOfTheSheet) {
  choose("Feet");
  const SheetContent sheet = preview_.content();
  ASSERT_FALSE(sheet.doubts.empty());
  for (const SheetDoubtKind& kind : sheet.doubts) {
    for (const SheetDoubt& doubt : kind.doubts) {
      EXPECT_EQ(doubt.says.find(" m "), std::string::npos) << doubt.says;
    }
  }
}

TEST_F(SheetPreviewTest, WhatIsMissingStandsFirstAndGoesWhenItIsGiven) {
  const auto naming = [&](const QString& part) {
    for (int i = 0; i < list()->count(); ++i) {
      if (list()->item(i)->text().contains(part)) {
        return list()->item(i)->text();
      }
    }
    return QString();
  };
  EXPECT_TRUE(naming("Responsible person").startsWith("○"));
  EXPECT_TRUE(list()->item(0)->text().startsWith("○"));
  EXPECT_TRUE(naming("Boreholes").startsWith("✓"));
  for (QLineEdit* line : preview_.findChildren<QLineEdit*>()) {
    line->setFocus();
    QTest::keyClicks(line, "A. Vance");
  }
  EXPECT_TRUE(QTest::qWaitFor([&] { return naming("Responsible person").startsWith("✓"); }, 20000))
      << "after the pause in typing";
  EXPECT_EQ(preview_.content().signatory, "A. Vance");
  EXPECT_EQ(preview_.content().question, "A. Vance.");
}

TEST(SheetPreviewOfALongLine, WhatTwoPagesLeaveOutIsListedBeforePrinting) {
  const auto sample = testing::fullSheetSample();
  const auto room = [&](bool tables) {
    SheetOptions options;
    options.tables = tables;
    return SheetPreview(sample.survey, sample.interpretation, options).checklist().back();
  };
  EXPECT_EQ(room(false).item, "Everything on the pages");
  for (const char* left : {" of boreholes", " of reciprocal times", " of shots", "35 of doubts", " of input files"}) {
    EXPECT_NE(room(false).missing.find(left), std::string::npos) << left << " in: " << room(false).missing;
  }
  EXPECT_EQ(room(true).missing, "") << "then they have pages of their own";
}

TEST_F(SheetPreviewTest, SavesWhatItShows) {
  const std::string path = (std::filesystem::path(::testing::TempDir()) / "sheet preview.pdf").string();
  check("record")->setChecked(true);
  EXPECT_TRUE(preview_.savePdf(QString::fromStdString(path)).ok());
  EXPECT_GT(std::filesystem::file_size(path), 10000U);
  std::filesystem::remove(path);
  EXPECT_FALSE(preview_.savePdf("/no/such/folder/sheet.pdf").ok());
}

}  // namespace
}  // namespace strikeplate
