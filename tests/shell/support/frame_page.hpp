#pragma once

#include <string>

#include "core/decision/decision.hpp"
#include "tests/shell/support/headless.hpp"

namespace steelyard::testing {

/// The example, opened in the room Frame on a page so tall that nothing has to be scrolled.
class FramePage : public Headless {
public:
    explicit FramePage(int width = 1366, int height = 2400);

    /// The decision as a file saved now would hold it.
    Decision decision();

    /// Puts a text into a field in place of what it holds, and Enter.
    void fill(const std::string& field, const std::string& text);

    /// Chooses from a list that drops down.
    void choose(const std::string& list, const std::string& label);
    void undo() { key(ImGuiKey_Z, ImGuiMod_Ctrl); }
};

} // namespace steelyard::testing
