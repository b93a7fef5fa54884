#include "core/base/file_names.h"

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

TEST(FileNames, LastPartStandsBehindEitherKindOfSlash) {
  EXPECT_EQ(lastPart("line 1/day 2/7.dat"), "7.dat");
  EXPECT_EQ(lastPart("C:\\line\\7.dat"), "7.dat");
  EXPECT_EQ(lastPart("7.dat"), "7.dat");
  EXPECT_EQ(lastPart("line/"), "");
  EXPECT_EQ(lastPart(""), "");
}

}  // namespace
}  // namespace strikeplate
