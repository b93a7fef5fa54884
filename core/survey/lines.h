#pragma once

#include <string>
#include <vector>

#include "core/survey/edit.h"

namespace strikeplate {

/// A survey file may hold several lines of one job. One of them is at hand: a Survey is that line, and carries the
/// others along in Survey::otherLines, so that everything which works on a line works on the one at hand.

/// Lines of the job, at least 1.
int lineCount(const Survey& survey);

/// The job's line at this index (0 to lineCount() - 1) as the one at hand, the others carried along.
Survey withLineAtHand(Survey survey, int index);

/// All lines of the job in their order, each at hand.
std::vector<Survey> allLines(const Survey& survey);

/// What a line is called: its own name, or "Line 2" where none was given. Needs 0 <= index < lineCount().
std::string lineName(const Survey& survey, int index);

namespace edits {
/// Puts `line` behind the job's lines and at hand. Particulars that it lacks (client, site, crew ...) and the
/// settings are those of the line that was at hand. Needs a `line` without other lines.
Edit addLine(const Survey& survey, Survey line);
/// Needs 0 <= index < lineCount().
Edit showLine(const Survey& survey, int index);
/// Takes the line at hand out of the job; the one before it, or else the first, comes to hand. Needs two lines.
Edit removeLine(const Survey& survey);
}  // namespace edits

}  // namespace strikeplate
