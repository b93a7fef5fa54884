#pragma once

class QMenu;

namespace strikeplate {

class RecordView;

/// Fills a menu with every choice of how records are shown; its marks follow the view whenever it opens.
void fillDisplayMenu(QMenu& menu, RecordView& view);

}  // namespace strikeplate
