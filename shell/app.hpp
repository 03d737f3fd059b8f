#pragma once

#include <memory>
#include <string>

#include "shell/ledger.hpp"
#include "shell/platform.hpp"

namespace steelyard {

/// The whole shell: rail, rooms, standing, the line below, with the open decision behind it. Draws into the
/// current ImGui context; knows no browser.
class App {
public:
    explicit App(Platform& platform);
    ~App();

    /// Loads what was kept, or shows the example on a first start. Call once, before the first frame.
    void start();

    /// Draws one frame, between ImGui::NewFrame and ImGui::Render.
    void draw();

    /// A file was picked, dropped or handed in. A bad file is refused with its reasons and changes nothing.
    void open_text(const std::string& file_name, const std::string& text);

    /// Text pasted while no text field had the focus.
    void paste_text(const std::string& text);

    /// The page is being hidden or left: store what is not stored yet, at once.
    void flush();

    /// The operating system's theme changed.
    void set_dark(bool dark);

    /// True when nothing is pending: no change unsaved, no call unanswered, no animation.
    bool idle() const;

    /// True while the next frame has to be drawn even without input (a half-second throttle, an animation).
    bool wants_frame() const;

    const Ledger& ledger() const;
    std::string results_file();

    struct State; ///< In shell/app_state.hpp, for the parts of the frame.

private:
    std::unique_ptr<State> state_;
};

} // namespace steelyard
