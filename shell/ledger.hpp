#pragma once

#include <imgui.h>

#include <map>
#include <string>
#include <string_view>
#include <vector>

namespace steelyard {

/// One drawn item as a person, a test or a screen reader would name it. Rectangles in CSS pixels of the page.
struct LedgerItem {
    std::string id;    ///< Stable from frame to frame: room, place, kind.
    std::string room;  ///< The room drawn, or "frame" for what surrounds it.
    std::string label; ///< What the item is called: the text shown, or the name of a field.
    std::string role;  ///< A WAI-ARIA role name, or "text".
    std::string value; ///< What a field holds, a number shown, "true" or "false" for a box.
    ImVec2 at{0, 0};
    ImVec2 size{0, 0};
    bool enabled = true;
    bool focused = false;
    bool visible = true; ///< At least partly inside its clip rectangle.

    ImVec2 clip_min{0, 0}; ///< The clip rectangle it was drawn in.
    ImVec2 clip_max{0, 0};
    ImVec2 needs{0, 0};      ///< For text: the size it would take in full.
    bool may_scroll = false; ///< Stands in a scrolled area, where being cut at the edge is no fault.
    bool shortened = false;  ///< The text was cut with an ellipsis on purpose; its label holds the whole.
    ImU32 ink = 0;           ///< For text: its colour, and the colour it stands on.
    ImU32 paper = 0;
    float font_size = 0;
};

/// The items drawn in the last whole frame. Widgets report themselves; the shell's tests check sizes,
/// clipping, overlap and contrast from here, and find things to click by label.
class Ledger {
public:
    void begin_frame(std::string room);
    void set_room(std::string room) { room_ = std::move(room); }

    /// Fills in room, clip rectangle and visibility.
    void add(LedgerItem item);

    const std::vector<LedgerItem>& items() const { return items_; }

    /// The first visible item with this label and, unless empty, this role.
    const LedgerItem* find(std::string_view label, std::string_view role = {}) const;

private:
    std::string room_;
    std::vector<LedgerItem> items_;
    std::map<std::string, int> seen_; ///< How often an id was met in this frame.
};

/// The items as a JSON array, with the members window.steelyard.items() promises.
std::string ledger_json(const Ledger& ledger);

} // namespace steelyard
