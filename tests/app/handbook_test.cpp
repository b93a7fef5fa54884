#include "app/handbook.h"

#include <QDir>
#include <QFile>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QRegularExpression>
#include <QTest>
#include <QTextBlock>
#include <QTextBrowser>
#include <gtest/gtest.h>

namespace strikeplate {
namespace {

QString textOf(const QString& path) {
  QFile file(path);
  EXPECT_TRUE(file.open(QIODevice::ReadOnly)) << path.toStdString();
  return QString::fromUtf8(file.readAll());
}

const QString kSources = QString(STRIKEPLATE_SAMPLE_DATA) + "/..";

TEST(Handbook, EveryKindOfDoubtIsExplained) {
  const QString handbook = textOf(kSources + "/resources/handbook.md");
  const QRegularExpression kind("(?:kind = |aboutLayer\\()\"([^\"]+)\"");
  int kinds = 0;
  const QDir folder(kSources + "/core/survey");
  for (const QString& name : folder.entryList({"doubts*.cpp"})) {
    auto found = kind.globalMatch(textOf(folder.filePath(name)));
    while (found.hasNext()) {
      const QString word = found.next().captured(1);
      EXPECT_TRUE(handbook.contains("| " + word + " |")) << word.toStdString();
      ++kinds;
    }
  }
  EXPECT_GE(kinds, 10);
}

TEST(Handbook, ASearchGoesToThePlaceAndSaysWhenThereIsNone) {
  Handbook handbook(textOf(kSources + "/resources/handbook.md"));
  handbook.show();
  auto* words = handbook.findChild<QLineEdit*>();
  auto* text = handbook.findChild<QTextBrowser*>();
  QTest::keyClicks(words, "hagedoorn");
  EXPECT_EQ(text->textCursor().selectedText().toLower(), "hagedoorn");
  const int first = text->textCursor().position();
  QTest::keyClick(words, Qt::Key_Return);
  EXPECT_EQ(text->textCursor().position(), first) << "the only place, found again from the start";
  words->clear();
  QTest::keyClicks(words, "no such word");
  EXPECT_EQ(handbook.findChild<QLabel*>()->text(), "Not found");
}

TEST(Handbook, AChapterIsShownFromItsHeading) {
  Handbook handbook(textOf(kSources + "/resources/handbook.md"));
  handbook.show();
  handbook.showChapter("Glossary");
  EXPECT_EQ(handbook.findChild<QTextBrowser*>()->textCursor().block().text(), "Glossary");
  EXPECT_GT(handbook.findChild<QListWidget*>()->count(), 15);
}

}  // namespace
}  // namespace strikeplate
