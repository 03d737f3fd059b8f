#include "shell/theme.hpp"

#include <array>

namespace steelyard {
namespace {

constexpr ImU32 rgb(unsigned hex, unsigned alpha = 255) {
    return IM_COL32((hex >> 16) & 255, (hex >> 8) & 255, hex & 255, alpha);
}

constexpr Theme light{
    .dark = false,
    .paper = rgb(0xF6F4EE),
    .card = rgb(0xFFFFFF),
    .rail = rgb(0xE9E5DA),
    .ink = rgb(0x1E2429),
    .quiet = rgb(0x545E66),
    .line = rgb(0xD5D1C6),
    .edge = rgb(0x8B887D),
    .steel = rgb(0x3C5A73),
    .on_steel = rgb(0xFFFFFF),
    .brass = rgb(0xA8721A),
    .brass_ink = rgb(0x85570C),
    .brass_wash = rgb(0xFFF7E6),
    .red = rgb(0x9B2C2C),
    .red_wash = rgb(0xFBEDED),
    .green = rgb(0x1B6B4F),
    .hover = rgb(0x3C5A73, 22),
    .focus = rgb(0x1E2429),
};

constexpr Theme dark{
    .dark = true,
    .paper = rgb(0x181C20),
    .card = rgb(0x22272C),
    .rail = rgb(0x2B3137),
    .ink = rgb(0xEDEAE3),
    .quiet = rgb(0xAAB3BA),
    .line = rgb(0x3B434A),
    .edge = rgb(0x7A848C),
    .steel = rgb(0x93B7D3),
    .on_steel = rgb(0x14181B),
    .brass = rgb(0xD3982F),
    .brass_ink = rgb(0xE3B25A),
    .brass_wash = rgb(0x3A3121),
    .red = rgb(0xF09C9C),
    .red_wash = rgb(0x402626),
    .green = rgb(0x7CCBA8),
    .hover = rgb(0x93B7D3, 30),
    .focus = rgb(0xEDEAE3),
};

// Told apart by people with any common colour blindness in this order; the letter mark always stands with
// them.
constexpr std::array option_light{rgb(0x14776F), rgb(0xA8471F), rgb(0x5A4A9C), rgb(0x7A6410), rgb(0x2C62A8),
                                  rgb(0x9A2F68), rgb(0x4B6B1C), rgb(0x6E4A34), rgb(0x4A5560), rgb(0x8A3FA0)};
constexpr std::array option_dark{rgb(0x55BDB2), rgb(0xE8936A), rgb(0xAFA2EA), rgb(0xCDB65C), rgb(0x86B4EE),
                                 rgb(0xE48FBC), rgb(0xA3C46C), rgb(0xC9A48D), rgb(0xA9B4BE), rgb(0xD1A0E0)};

struct FillHex {
    unsigned fill;
    unsigned ink;
};
constexpr std::array parts_light{FillHex{0x3C5A73, 0xFFFFFF}, FillHex{0x8FAFC0, 0x1E2429},
                                 FillHex{0xC9A15A, 0x1E2429}, FillHex{0xE0D2AE, 0x1E2429},
                                 FillHex{0x6B5B4B, 0xFFFFFF}, FillHex{0xB9C4A4, 0x1E2429}};
constexpr std::array parts_dark{FillHex{0x4E7492, 0xFFFFFF}, FillHex{0x9DBDCE, 0x14181B},
                                FillHex{0xD3AC66, 0x14181B}, FillHex{0xEADDBB, 0x14181B},
                                FillHex{0x77695A, 0xFFFFFF}, FillHex{0xC4CFB0, 0x14181B}};

ImVec4 vec(ImU32 colour) {
    return ImGui::ColorConvertU32ToFloat4(colour);
}

} // namespace

const Theme& light_theme() {
    return light;
}
const Theme& dark_theme() {
    return dark;
}

ImU32 option_colour(const Theme& theme, std::size_t index) {
    return theme.dark ? option_dark[index % option_dark.size()] : option_light[index % option_light.size()];
}

ImU32 option_letter_colour(const Theme& theme) {
    return theme.on_steel;
}

Fill part_fill(const Theme& theme, std::size_t index) {
    const auto& hex =
        theme.dark ? parts_dark[index % parts_dark.size()] : parts_light[index % parts_light.size()];
    return {rgb(hex.fill), rgb(hex.ink)};
}

void apply_theme(const Theme& theme) {
    ImGuiStyle& style = ImGui::GetStyle();
    style.WindowPadding = {0, 0};
    style.WindowBorderSize = 0;
    style.WindowRounding = 0;
    style.ChildBorderSize = 0;
    style.PopupRounding = 8;
    style.PopupBorderSize = 1;
    style.FramePadding = {10, 7};
    style.FrameRounding = 6;
    style.FrameBorderSize = 1;
    style.ItemSpacing = {0, 0};
    style.ScrollbarSize = 12;
    style.ScrollbarRounding = 6;
    style.AntiAliasedLinesUseTex = false;
    auto& colours = style.Colors;
    colours[ImGuiCol_Text] = vec(theme.ink);
    colours[ImGuiCol_TextDisabled] = vec(theme.quiet);
    colours[ImGuiCol_WindowBg] = vec(theme.paper);
    colours[ImGuiCol_ChildBg] = {0, 0, 0, 0};
    colours[ImGuiCol_PopupBg] = vec(theme.card);
    colours[ImGuiCol_Border] = vec(theme.edge);
    colours[ImGuiCol_FrameBg] = vec(theme.card);
    colours[ImGuiCol_FrameBgHovered] = vec(theme.card);
    colours[ImGuiCol_FrameBgActive] = vec(theme.card);
    colours[ImGuiCol_TextSelectedBg] = vec(theme.dark ? rgb(0x4E6B82) : rgb(0xC9DBE8));
    colours[ImGuiCol_ScrollbarBg] = {0, 0, 0, 0};
    colours[ImGuiCol_ScrollbarGrab] = vec(theme.line);
    colours[ImGuiCol_ScrollbarGrabHovered] = vec(theme.edge);
    colours[ImGuiCol_ScrollbarGrabActive] = vec(theme.edge);
    colours[ImGuiCol_NavHighlight] = {0, 0, 0, 0}; // The widgets draw their own two-colour ring.
    colours[ImGuiCol_NavWindowingHighlight] = {0, 0, 0, 0};
    colours[ImGuiCol_ModalWindowDimBg] = vec(theme.dark ? rgb(0x000000, 150) : rgb(0x1E2429, 90));
}

} // namespace steelyard
