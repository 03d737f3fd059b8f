#pragma once

#include <imgui.h>

#include <functional>
#include <memory>
#include <string>
#include <string_view>

#include "shell/app.hpp"
#include "shell/painter/painter.hpp"
#include "tests/shell/support/fake_platform.hpp"

namespace steelyard::testing {

struct HeadlessOptions {
    int width = 1366; ///< CSS pixels.
    int height = 768;
    float density = 1;
    bool dark = false;
    std::function<void(FakePlatform&)>
        prepare; ///< Called before the shell starts: what is kept, what goes wrong.
};

/// The whole shell without a window: one can click, type and look, as a person does. Every input is followed
/// by frames of 1/60 s, one input event in each, and then by as many as the shell asks for. What is not
/// found, and a shell that never comes to rest, throw std::runtime_error, which fails the test with its
/// words.
class Headless {
public:
    explicit Headless(HeadlessOptions options = {});
    ~Headless();
    Headless(const Headless&) = delete;
    Headless& operator=(const Headless&) = delete;

    App& app() { return *app_; }
    FakePlatform& platform() { return platform_; }
    const Ledger& ledger() const { return app_->ledger(); }
    const Painter& painter() const { return painter_; }

    void frame(int count = 1);
    /// Frames until nothing is pending.
    void settle();
    /// Frames for so long a time of the shell's clock.
    void wait(float seconds);
    void resize(int width, int height, float density);

    /// The first visible item with this label and, unless empty, this role; null if there is none.
    const LedgerItem* find(std::string_view label, std::string_view role = {}) const;
    /// The same, but it must be there.
    const LedgerItem& item(std::string_view label, std::string_view role = {}) const;
    const LedgerItem& item_of_id(std::string_view id) const;
    /// The middle of what is to be seen of an item.
    static ImVec2 middle(const LedgerItem& item);

    void click(std::string_view label, std::string_view role = {});
    void click_at(ImVec2 place, ImGuiMouseButton button = ImGuiMouseButton_Left);
    void double_click(std::string_view label, std::string_view role = {});
    void double_click_at(ImVec2 place);
    void move_to(ImVec2 place);
    /// Presses, moves in `steps` steps, lets go.
    void drag(ImVec2 from, ImVec2 to, int steps = 8);
    /// Presses and moves, and holds on until release().
    void drag_halfway(ImVec2 from, ImVec2 to, int steps = 8);
    void release();
    void wheel(ImVec2 place, float lines_down);
    /// A key with modifiers (ImGuiMod_Ctrl | ImGuiMod_Shift …).
    void key(ImGuiKey key, ImGuiKeyChord modifiers = 0);
    /// UTF-8 text, letter by letter, to where the keyboard's focus is.
    void type(std::string_view text);
    /// As the browser's paste: into the text field that is active, else to the shell.
    void paste(const std::string& text);

    /// False where pictures cannot be saved.
    bool save_png(const std::string& path) const;

private:
    void press(ImGuiMouseButton button, bool down);
    void hold_modifiers(ImGuiKeyChord modifiers, bool down);

    HeadlessOptions options_;
    FakePlatform platform_;
    ImGuiContext* context_;
    std::string clipboard_;
    Painter painter_;
    std::unique_ptr<App> app_;
};

} // namespace steelyard::testing
