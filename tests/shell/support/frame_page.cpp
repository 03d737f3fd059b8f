#include "tests/shell/support/frame_page.hpp"

#include <stdexcept>

#include "core/decision/read.hpp"

namespace steelyard::testing {

FramePage::FramePage(int width, int height) : Headless({.width = width, .height = height}) {
    click("Frame", "tab");
}

Decision FramePage::decision() {
    key(ImGuiKey_S, ImGuiMod_Ctrl);
    const auto read = read_decision(platform().saved_files.back().text);
    if (!read.decision) throw std::runtime_error("the file saved cannot be read");
    return *read.decision;
}

void FramePage::fill(const std::string& field, const std::string& text) {
    click(field, "textbox");
    key(ImGuiKey_A, ImGuiMod_Ctrl);
    if (text.empty())
        key(ImGuiKey_Delete);
    else
        type(text);
    key(ImGuiKey_Tab);
}

void FramePage::choose(const std::string& list, const std::string& label) {
    click(list, "combobox");
    click(label, "option");
}

} // namespace steelyard::testing
