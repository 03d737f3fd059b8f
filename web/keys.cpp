#include "web/keys.hpp"

#include <array>
#include <utility>

namespace steelyard {

namespace {

using Entry = std::pair<std::string_view, ImGuiKey>;

// Names of KeyboardEvent.code: W3C, UI Events KeyboardEvent code Values, section 3.
constexpr std::array places = {
    Entry{"Tab", ImGuiKey_Tab},
    Entry{"ArrowLeft", ImGuiKey_LeftArrow},
    Entry{"ArrowRight", ImGuiKey_RightArrow},
    Entry{"ArrowUp", ImGuiKey_UpArrow},
    Entry{"ArrowDown", ImGuiKey_DownArrow},
    Entry{"PageUp", ImGuiKey_PageUp},
    Entry{"PageDown", ImGuiKey_PageDown},
    Entry{"Home", ImGuiKey_Home},
    Entry{"End", ImGuiKey_End},
    Entry{"Insert", ImGuiKey_Insert},
    Entry{"Delete", ImGuiKey_Delete},
    Entry{"Backspace", ImGuiKey_Backspace},
    Entry{"Space", ImGuiKey_Space},
    Entry{"Enter", ImGuiKey_Enter},
    Entry{"Escape", ImGuiKey_Escape},
    Entry{"ControlLeft", ImGuiKey_LeftCtrl},
    Entry{"ShiftLeft", ImGuiKey_LeftShift},
    Entry{"AltLeft", ImGuiKey_LeftAlt},
    Entry{"MetaLeft", ImGuiKey_LeftSuper},
    Entry{"ControlRight", ImGuiKey_RightCtrl},
    Entry{"ShiftRight", ImGuiKey_RightShift},
    Entry{"AltRight", ImGuiKey_RightAlt},
    Entry{"MetaRight", ImGuiKey_RightSuper},
    Entry{"F2", ImGuiKey_F2},
    Entry{"Quote", ImGuiKey_Apostrophe},
    Entry{"Comma", ImGuiKey_Comma},
    Entry{"Minus", ImGuiKey_Minus},
    Entry{"Period", ImGuiKey_Period},
    Entry{"Slash", ImGuiKey_Slash},
    Entry{"Semicolon", ImGuiKey_Semicolon},
    Entry{"Equal", ImGuiKey_Equal},
    Entry{"BracketLeft", ImGuiKey_LeftBracket},
    Entry{"Backslash", ImGuiKey_Backslash},
    Entry{"BracketRight", ImGuiKey_RightBracket},
    Entry{"Backquote", ImGuiKey_GraveAccent},
    Entry{"NumpadDecimal", ImGuiKey_KeypadDecimal},
    Entry{"NumpadDivide", ImGuiKey_KeypadDivide},
    Entry{"NumpadMultiply", ImGuiKey_KeypadMultiply},
    Entry{"NumpadSubtract", ImGuiKey_KeypadSubtract},
    Entry{"NumpadAdd", ImGuiKey_KeypadAdd},
    Entry{"NumpadEnter", ImGuiKey_KeypadEnter},
};

// Signs that layouts move about and that people type by what is printed.
constexpr std::array signs = {
    Entry{"+", ImGuiKey_Equal}, Entry{"=", ImGuiKey_Equal},  Entry{"-", ImGuiKey_Minus},
    Entry{",", ImGuiKey_Comma}, Entry{".", ImGuiKey_Period}, Entry{"/", ImGuiKey_Slash},
    Entry{" ", ImGuiKey_Space},
};

// Where `code` is empty (virtual keyboards, remote desktops) the name of the key must do.
constexpr std::array names = {Entry{"Control", ImGuiKey_LeftCtrl}, Entry{"Shift", ImGuiKey_LeftShift},
                              Entry{"Alt", ImGuiKey_LeftAlt}, Entry{"Meta", ImGuiKey_LeftSuper}};

template<std::size_t n>
ImGuiKey look_up(const std::array<Entry, n>& entries, std::string_view name) {
    for (const auto& [known, key] : entries)
        if (known == name) return key;
    return ImGuiKey_None;
}

ImGuiKey letter_or_digit(char c) {
    if (c >= 'a' && c <= 'z') return static_cast<ImGuiKey>(ImGuiKey_A + (c - 'a'));
    if (c >= 'A' && c <= 'Z') return static_cast<ImGuiKey>(ImGuiKey_A + (c - 'A'));
    if (c >= '0' && c <= '9') return static_cast<ImGuiKey>(ImGuiKey_0 + (c - '0'));
    return ImGuiKey_None;
}

} // namespace

ImGuiKey key_of(std::string_view code, std::string_view key) {
    const bool on_keypad = code.starts_with("Numpad");
    if (on_keypad && key.size() == 1 && key[0] >= '0' && key[0] <= '9')
        return static_cast<ImGuiKey>(ImGuiKey_Keypad0 + (key[0] - '0'));
    if (key.size() == 1 && !on_keypad) {
        if (const ImGuiKey found = letter_or_digit(key[0]); found != ImGuiKey_None) return found;
        if (const ImGuiKey found = look_up(signs, key); found != ImGuiKey_None) return found;
    }
    if (code.size() == 4 && code.starts_with("Key")) return letter_or_digit(code[3]);
    if (code.size() == 6 && code.starts_with("Digit")) return letter_or_digit(code[5]);
    // With NumLock off the keypad's digits are arrows and the like: those names say what is meant.
    if (const ImGuiKey found = look_up(places, on_keypad && key.size() > 1 && key != "Enter" ? key : code);
        found != ImGuiKey_None)
        return found;
    if (const ImGuiKey found = look_up(places, key); found != ImGuiKey_None) return found;
    return look_up(names, key);
}

} // namespace steelyard
