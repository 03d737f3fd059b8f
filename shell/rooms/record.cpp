#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/rooms/room.hpp"
#include "shell/rooms/told_ahead.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float gap = 12;
/// From this width on, the log stands beside the rest.
constexpr float two_columns = 820;
/// Entries of the log shown at first, and more with every press.
constexpr std::size_t log_step = 40;

const Told will_hold{
    {"Decision", "The option chosen, by whom and why, also where it is not the one in first place."},
    {"Record", "Pages to print or send: what was chosen, on which figures and whose judgments."},
    {"Challenge sheet", "One page of answers to what a review will ask."},
    {"Sign-off", "Who signed which state of the file, and whether it is still that one."},
};

/// Times are kept as typed; one in the program's own form is shown without its letters.
std::string time_text(const std::string& at) {
    // 2026-12-01T09:30:00Z
    if (at.size() == 20 && at[10] == 'T' && at[13] == ':' && at.back() == 'Z')
        return at.substr(0, 10) + " " + at.substr(11, 5) + " UTC";
    return at;
}

/// What the file holds that this room does not show yet; empty where there is nothing.
std::string kept_sentence(const Decision& decision) {
    std::string kept;
    if (decision.outcome) kept = "a decision for " + option_name(decision, decision.outcome->option);
    const std::size_t signatures = decision.signatures.size();
    if (signatures > 0) {
        kept += (kept.empty() ? "" : " and ") + std::to_string(signatures) +
                (signatures == 1 ? " signature" : " signatures");
    }
    return kept.empty() ? kept
                        : "This file holds " + kept + ". It is kept with the file, but not shown here yet.";
}

/// Shows the log and the file's hash; says what the room will hold beside them.
class RecordRoom : public Room {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, Box area) override {
        ScrollArea scroll(ui, "record", area);
        const Box inner = scroll.inner();
        const ImVec2 at = inner.at();
        const float width = cards_width(area, inner);
        const float top =
            at.y + draw_paragraph(ui, at, width, "Decide, sign, send", {.font = Font::large}) + gap;
        const bool beside = width >= two_columns;
        const float left_width = beside ? (width - gap) * 0.54f : width;
        float left = draw_ahead(ui, view, {at.x, top}, left_width);
        left = draw_hash(ui, view, actions, {at.x, left + gap}, left_width);
        const float log_x = beside ? at.x + left_width + gap : at.x;
        const float log_y = beside ? top : left + gap;
        const float log = draw_log(ui, view, {log_x, log_y}, beside ? width - left_width - gap : width);
        scroll.reach(std::max(left, log));
    }

    void reset() override { shown_ = log_step; }

private:
    float draw_ahead(Ui& ui, const RoomView& view, ImVec2 at, float width) {
        GrowingCard card(ui, at, width);
        float y = card.heading("Not in this version yet. This room will hold:");
        y = draw_told(ui, card, y + 4, will_hold) + 14;
        y += draw_paragraph(ui, {card.left(), y}, card.width(),
                            "Until then, the File menu above saves the decision and its results as files.");
        const std::string kept = kept_sentence(view.decision);
        if (!kept.empty()) y += 8 + draw_paragraph(ui, {card.left(), y + 8}, card.width(), kept);
        return card.end(y);
    }

    float draw_hash(Ui& ui, const RoomView& view, Actions& actions, ImVec2 at, float width) {
        GrowingCard card(ui, at, width);
        float y = card.heading("Hash of this decision (SHA-256)");
        const std::string hash = view.sha256();
        y += draw_paragraph(
                 ui, {card.left(), y}, card.width(),
                 "Taken over all of it but the signatures; the log counts too. Any change gives another one.",
                 {.ink = ui.look().quiet}) +
             8;
        y += draw_paragraph(ui, {card.left(), y}, card.width(), halves(hash, card.width())) + 10;
        const Box copy{card.left(), y, button_width("Copy"), 32};
        if (button(ui, "record/copy-hash", "Copy", copy)) {
            actions.copy(hash);
            actions.say("The hash is on the clipboard.");
        }
        return card.end(y + 32);
    }

    /// In one line where it fits, else in two equal ones.
    static std::string halves(const std::string& hash, float width) {
        if (text_size(Font::body, hash).x <= width) return hash;
        return hash.substr(0, hash.size() / 2) + "\n" + hash.substr(hash.size() / 2);
    }

    float draw_log(Ui& ui, const RoomView& view, ImVec2 at, float width) {
        const auto& log = view.decision.log;
        GrowingCard card(ui, at, width);
        float y = card.heading("Log, latest first");
        if (log.empty()) {
            y += draw_paragraph(ui, {card.left(), y}, card.width(), "Nothing was changed yet.");
            return card.end(y);
        }
        const std::size_t shown = std::min(shown_, log.size());
        for (std::size_t i = 0; i < shown; ++i) {
            if (i > 0) rule(ui, card.left(), y - 9, card.width());
            y = draw_entry(ui, view.decision, log[log.size() - 1 - i], card, y) + 16;
        }
        y -= 16;
        if (shown < log.size()) {
            const std::string label = "Show earlier ones (" + std::to_string(log.size() - shown) + ")";
            const Box box{card.left() - 4, y + 8, button_width(label, ButtonKind::link), 28};
            if (button(ui, "record/earlier", label, box, ButtonKind::link)) shown_ += log_step;
            y += 36;
        }
        return card.end(y);
    }

    static float draw_entry(Ui& ui, const Decision& decision, const LogEntry& entry, const GrowingCard& card,
                            float y) {
        const TextLook quiet{.font = Font::small, .ink = ui.look().quiet, .max_width = card.width()};
        std::string when = time_text(entry.at);
        if (!entry.by.empty()) when += (when.empty() ? "" : " \xC2\xB7 ") + person_name(decision, entry.by);
        if (!when.empty()) {
            draw_text(ui, {card.left(), y}, when, quiet);
            y += line_step(Font::small);
        }
        y += draw_paragraph(ui, {card.left(), y}, card.width(), entry.did);
        if (!entry.why.empty())
            y += draw_paragraph(ui, {card.left(), y}, card.width(), "Why: " + entry.why, quiet);
        return y;
    }

    std::size_t shown_ = log_step;
};

} // namespace

std::unique_ptr<Room> make_record_room() {
    return std::make_unique<RecordRoom>();
}

} // namespace steelyard
