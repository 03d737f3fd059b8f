#include "tests/shell/support/ledger_checks.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>

#include "shell/fonts.hpp"

namespace steelyard::testing {
namespace {

// Positions and sizes are sums of rounded floats; a tenth of a pixel is nothing to see.
constexpr float hair = 0.1F;

struct Area {
    float left;
    float top;
    float right;
    float bottom;
    float width() const { return right - left; }
    float height() const { return bottom - top; }
};

Area whole_of(const LedgerItem& item) {
    return {item.at.x, item.at.y, item.at.x + item.size.x, item.at.y + item.size.y};
}

Area common(const Area& a, const Area& b) {
    return {std::max(a.left, b.left), std::max(a.top, b.top), std::min(a.right, b.right),
            std::min(a.bottom, b.bottom)};
}

Area seen_of(const LedgerItem& item) {
    return common(whole_of(item), {item.clip_min.x, item.clip_min.y, item.clip_max.x, item.clip_max.y});
}

std::string named(const LedgerItem& item) {
    char place[96];
    std::snprintf(place, sizeof place, " at %.0f, %.0f (%.0f x %.0f)", static_cast<double>(item.at.x),
                  static_cast<double>(item.at.y), static_cast<double>(item.size.x),
                  static_cast<double>(item.size.y));
    return item.room + ": " + item.role + " \"" + item.label + "\" [" + item.id + "]" + place;
}

bool is_text(const LedgerItem& item) {
    return item.role == "text";
}

/// WCAG 2.2, definition of relative luminance.
double luminance(ImU32 colour) {
    const auto channel = [&](int shift) {
        const double value = ((colour >> shift) & 255) / 255.0;
        return value <= 0.04045 ? value / 12.92 : std::pow((value + 0.055) / 1.055, 2.4);
    };
    return 0.2126 * channel(IM_COL32_R_SHIFT) + 0.7152 * channel(IM_COL32_G_SHIFT) +
           0.0722 * channel(IM_COL32_B_SHIFT);
}

ImU32 laid_over(ImU32 ink, ImU32 paper) {
    const double alpha = (ink >> IM_COL32_A_SHIFT) / 255.0;
    ImU32 mixed = IM_COL32_A_MASK;
    for (const int shift : {IM_COL32_R_SHIFT, IM_COL32_G_SHIFT, IM_COL32_B_SHIFT}) {
        const double value = ((ink >> shift) & 255) * alpha + ((paper >> shift) & 255) * (1 - alpha);
        mixed |= static_cast<ImU32>(std::lround(value)) << shift;
    }
    return mixed;
}

void append(Faults& faults, Faults more) {
    faults.insert(faults.end(), std::make_move_iterator(more.begin()), std::make_move_iterator(more.end()));
}

} // namespace

bool is_interactive(const LedgerItem& item) {
    // WAI-ARIA 1.2's widget roles that the shell can draw.
    static constexpr std::array roles{
        "button",     "checkbox",         "combobox",      "gridcell", "link",      "listbox",   "menuitem",
        "option",     "menuitemcheckbox", "menuitemradio", "radio",    "scrollbar", "searchbox", "slider",
        "spinbutton", "switch",           "tab",           "textbox",  "treeitem"};
    return std::find(roles.begin(), roles.end(), item.role) != roles.end();
}

double contrast(ImU32 ink, ImU32 paper) {
    const double a = luminance(laid_over(ink, paper));
    const double b = luminance(paper);
    return (std::max(a, b) + 0.05) / (std::min(a, b) + 0.05);
}

Faults cut_texts(const LedgerItems& items) {
    Faults faults;
    for (const LedgerItem& item : items) {
        if (!item.visible || !is_text(item) || item.may_scroll) continue;
        const Area seen = seen_of(item);
        // What is shortened on purpose must at least show its shortened form.
        const ImVec2 needs = item.shortened ? item.size : item.needs;
        if (needs.x > seen.width() + hair || needs.y > seen.height() + hair)
            faults.push_back("cut off: " + named(item));
    }
    return faults;
}

Faults overlapping_texts(const LedgerItems& items) {
    Faults faults;
    for (std::size_t i = 0; i < items.size(); ++i) {
        if (!items[i].visible || !is_text(items[i])) continue;
        for (std::size_t j = i + 1; j < items.size(); ++j) {
            if (!items[j].visible || !is_text(items[j])) continue;
            const Area both = common(seen_of(items[i]), seen_of(items[j]));
            if (both.width() > 1 && both.height() > 1)
                faults.push_back("printed over each other: " + named(items[i]) + " and " + named(items[j]));
        }
    }
    return faults;
}

Faults small_targets(const LedgerItems& items) {
    constexpr float least = 24;
    Faults faults;
    for (const LedgerItem& item : items) {
        if (item.visible && is_interactive(item) &&
            (item.size.x < least - hair || item.size.y < least - hair))
            faults.push_back("too small to hit: " + named(item));
    }
    return faults;
}

Faults faint_texts(const LedgerItems& items) {
    constexpr float large = 24;
    Faults faults;
    for (const LedgerItem& item : items) {
        // Only items that say their colours can be judged.
        if (!item.visible || item.label.empty() || (item.ink == 0 && item.paper == 0)) continue;
        if (!is_text(item) && !item.enabled) continue;
        const double least = em_of(item.font_size) >= large ? 3.0 : 4.5;
        const double ratio = contrast(item.ink, item.paper);
        if (ratio < least) {
            char text[96];
            std::snprintf(text, sizeof text, "contrast %.2f, less than %.1f (ink %08X on %08X): ", ratio,
                          least, item.ink, item.paper);
            faults.push_back(text + named(item));
        }
    }
    return faults;
}

Faults outside_display(const LedgerItems& items, float width, float height) {
    Faults faults;
    for (const LedgerItem& item : items) {
        if (!item.visible || item.may_scroll) continue;
        const Area area = whole_of(item);
        if (area.left < -hair || area.top < -hair || area.right > width + hair || area.bottom > height + hair)
            faults.push_back("reaches beyond the display: " + named(item));
    }
    return faults;
}

Faults without_label(const LedgerItems& items) {
    Faults faults;
    for (const LedgerItem& item : items) {
        if (item.visible && is_interactive(item) && item.label.empty())
            faults.push_back("without a label: " + named(item));
    }
    return faults;
}

Faults all_faults(const LedgerItems& items, float width, float height) {
    Faults faults = cut_texts(items);
    append(faults, overlapping_texts(items));
    append(faults, small_targets(items));
    append(faults, faint_texts(items));
    append(faults, outside_display(items, width, height));
    append(faults, without_label(items));
    return faults;
}

} // namespace steelyard::testing
