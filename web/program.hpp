#pragma once

#include <map>
#include <string>
#include <vector>

#include "shell/app.hpp"
#include "shell/painter/painter.hpp"
#include "web/browser_platform.hpp"

namespace steelyard {

/// The shell running in a page: its ImGui context, its frames, and the person's input on the way to them.
/// Input is queued and takes effect with the next steps. Times are milliseconds since some fixed moment, as
/// requestAnimationFrame gives.
class Program {
public:
    /// `mac`: shortcuts and text editing as on that system.
    Program(double now, bool mac);

    void start() { app_.start(); }

    /// The picture's size in device pixels, and device pixels per CSS pixel.
    void resize(int pixel_width, int pixel_height, float density);

    /// Lays out one frame; takes queued input. Paints nothing. `finish_editing`: as if the person had left
    /// the field he is in.
    void step(double now, bool finish_editing = false);

    /// As many steps as the queued input needs, and what follows from it (a field that gets the focus) takes.
    void settle(double now);

    /// Paints the frame last laid out.
    void paint();

    /// What the last paint changed, in device pixels.
    const std::vector<PixelRect>& changes() const { return changes_; }

    /// Milliseconds until a frame is due without input: 0 at once, negative for never.
    double next_frame_in() const;

    void pointer(float x, float y, int source);
    void pointer_gone();
    /// What is queued is taken first: a drag's last place still counts, and a press finds the pointer where
    /// it is.
    void button(int button, bool down, int source, double now);
    void wheel(float x, float y);
    void modifiers(bool ctrl, bool shift, bool alt, bool meta);
    void key(const std::string& code, const std::string& key, bool down);
    void text(const std::string& text);
    void focus(bool gained);

    /// What the shell puts on the clipboard when asked to copy or cut, if anything.
    const std::optional<std::string>& copy(bool cut, double now);
    void paste(const std::string& text, double now);

    /// Stores what is not stored yet, the last key included; `leaving`: a half-typed field or a drag counts
    /// as finished.
    void flush(bool leaving, double now);

    void reduce_motion(bool on);

    App& app() { return app_; }
    BrowserPlatform& platform() { return platform_; }
    const Painter& painter() const { return painter_; }
    unsigned frames() const { return frames_; }
    bool idle() const;

    /// Texts handed to the page stay valid until the next one is.
    const char* hand_out(std::string text);

private:
    void take_queue(double now);
    void shortcut(ImGuiKey key, double now);
    void release_keys();

    BrowserPlatform platform_;
    Painter painter_;
    std::vector<PixelRect> changes_;
    App app_;
    int pixel_width_ = 0;
    int pixel_height_ = 0;
    float density_ = 0;
    double last_step_ = 0;
    unsigned frames_ = 0;
    std::map<std::string, ImGuiKey> held_; ///< Keys that are down, by their place on the keyboard.
    std::string pasted_;
    std::string handed_out_;
};

} // namespace steelyard
