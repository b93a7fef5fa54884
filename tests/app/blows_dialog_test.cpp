#include "app/blows_dialog.h"

#include <QDialogButtonBox>
#include <QPushButton>
#include <QTreeWidget>
#include <gtest/gtest.h>

#include "core/survey/load.h"

namespace strikeplate {
namespace {

/// The five blows at one shot point of the real line; tests/data/README.md says where it comes from.
Survey fiveBlows() {
  std::vector<std::string> files;
  for (const char* name : {"1_cut.dat", "2_cut.dat", "3_cut.dat", "4_cut.dat", "5_cut.dat"}) {
    files.push_back(std::string(STRIKEPLATE_TEST_DATA) + "/hammer_line/" + name);
  }
  return loadLine(files, "").survey;
}

TEST(BlowsDialog, NamesTheBlowOfTheRealLineWhoseTriggerCameLateAndLeavesItOut) {
  const Survey survey = fiveBlows();
  ASSERT_EQ(survey.shots.size(), 1U);
  BlowsDialog dialog(survey);
  auto* tree = dialog.findChild<QTreeWidget*>();
  ASSERT_NE(tree, nullptr);
  QTreeWidgetItem* first = tree->topLevelItem(0)->child(0);
  EXPECT_EQ(first->text(0), "1_cut.dat");
  EXPECT_TRUE(first->text(1).contains("its trigger came late")) << first->text(1).toStdString();
  EXPECT_TRUE(dialog.edit().changes.empty());
  first->setCheckState(0, Qt::Unchecked);
  const Survey after = applied(survey, dialog.edit());
  EXPECT_FALSE(after.shots[0].blows[0].used);
  EXPECT_TRUE(after.shots[0].blows[1].used);
}

TEST(BlowsDialog, OneBlowOfAShotHasToStay) {
  const Survey survey = fiveBlows();
  BlowsDialog dialog(survey);
  QTreeWidgetItem* shot = dialog.findChild<QTreeWidget*>()->topLevelItem(0);
  for (int blow = 0; blow < shot->childCount(); ++blow) {
    shot->child(blow)->setCheckState(0, Qt::Unchecked);
  }
  EXPECT_FALSE(dialog.findChild<QDialogButtonBox*>()->button(QDialogButtonBox::Ok)->isEnabled());
  shot->child(2)->setCheckState(0, Qt::Checked);
  EXPECT_TRUE(dialog.findChild<QDialogButtonBox*>()->button(QDialogButtonBox::Ok)->isEnabled());
}

}  // namespace
}  // namespace strikeplate
