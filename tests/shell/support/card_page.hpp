#pragma once

#include <imgui.h>

#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/results/session.hpp"
#include "shell/painter/painter.hpp"
#include "shell/rooms/room.hpp"
#include "shell/ui.hpp"

namespace steelyard::testing {

struct CardOptions {
    int width = 420;
    int height = 420;
    bool dark = false;
};

/// One card of a room on a page of its own, with a decision that its edits change, and with whatever else a
/// room may be shown: an examination made by hand, somebody who answers, sealed answers.
class CardPage {
public:
    using Draw = std::function<void(Ui&, const RoomView&, Actions&, Box)>;

    CardPage(Decision decision, Draw draw, CardOptions options = {});
    ~CardPage();
    CardPage(const CardPage&) = delete;
    CardPage& operator=(const CardPage&) = delete;

    // What the card is shown; a test sets it.
    Id person;
    Answering answering = Answering::agreed;
    bool read_only = false;
    std::optional<Examination> examination;

    // What the card asked for.
    std::vector<std::string> copied;
    std::string message; ///< The last one said.
    std::optional<Actions::Destination> went;
    std::optional<Id> answers;  ///< Whom it leads to.
    Actions::Examined examined; ///< In the last frame.

    const Decision& decision() const { return session_.decision(); }
    const Results& results() { return session_.results(); }
    bool undo();

    void frame(int count = 1);
    void click(std::string_view label, std::string_view role = {});
    void click_at(ImVec2 place);
    void drag(ImVec2 from, ImVec2 to, int steps = 8);
    void key(ImGuiKey key, ImGuiKeyChord modifiers = 0);
    void type(std::string_view text);
    void wheel(float lines_down);

    const LedgerItem* find(std::string_view label, std::string_view role = {}) const;
    const LedgerItem& item(std::string_view label, std::string_view role = {}) const;
    /// True where some text or name, in sight or to be scrolled to, has this in it. Lines broken for lack of
    /// room count as one.
    bool says(const std::string& part) const;
    /// All texts, one after another.
    std::string texts() const;
    std::vector<std::string> faults() const;
    void save_png(const std::string& path) const;
    Ui& ui() { return ui_; }

private:
    void draw_frame();
    void hold_modifiers(ImGuiKeyChord modifiers, bool down);

    Draw draw_;
    CardOptions options_;
    Session session_;
    Ui ui_;
    ImGuiContext* context_;
    Painter painter_;
};

} // namespace steelyard::testing
