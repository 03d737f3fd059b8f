#pragma once

#include <string>
#include <vector>

#include "shell/ledger.hpp"

namespace steelyard::testing {

/// Faults that a person would see or stumble over, one sentence each, found from the items drawn in one
/// frame. Items out of sight count in none of them.
using Faults = std::vector<std::string>;
using LedgerItems = std::vector<LedgerItem>;

/// Texts cut off by their place or clip rectangle: neither in a scrolled area nor shortened on purpose.
Faults cut_texts(const LedgerItems& items);

/// Two texts printed over each other by more than a pixel both ways.
Faults overlapping_texts(const LedgerItems& items);

/// Things to click that are less than 24 CSS pixels wide or high (WCAG 2.2, 2.5.8), what is disabled too.
Faults small_targets(const LedgerItems& items);

/// Text under 4.5:1 against its paper, or 3:1 from 24 CSS pixels on (WCAG 2.2, 1.4.3; that criterion's
/// exception for bold text is not used: our fonts are not bold in its sense). Disabled items are exempt
/// there; text items tell of no disabling, so they are not.
Faults faint_texts(const LedgerItems& items);

/// Items that reach beyond the display, unless scrolling brings them in.
Faults outside_display(const LedgerItems& items, float width, float height);

/// Things to click or fill in without a label.
Faults without_label(const LedgerItems& items);

/// All of these, one after another.
Faults all_faults(const LedgerItems& items, float width, float height);

/// True for the roles a person can act on.
bool is_interactive(const LedgerItem& item);

/// WCAG 2.2's contrast ratio of two colours, 1 to 21; `ink` is first laid over `paper` with its alpha.
double contrast(ImU32 ink, ImU32 paper);

} // namespace steelyard::testing
