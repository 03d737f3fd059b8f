#include "shell/fonts.hpp"

#include <array>
#include <cmath>

#include "shell/fonts/embedded.hpp"

namespace steelyard {
namespace {

struct Face {
    const EmbeddedFont* font;
    float line; // CSS pixels
};

const std::array<Face, font_count> faces{{
    {&text_regular, 19},
    {&text_regular, 16},
    {&text_medium, 19},
    {&text_medium, 23},
    {&text_medium, 33},
    {&text_medium, 47},
}};

/// ImGui takes whole sizes only.
float device_size(const Face& face, float density) {
    return std::round(face.line * density);
}

void add_font(const EmbeddedFont& font, float size, bool merge) {
    ImFontConfig config;
    config.FontDataOwnedByAtlas = false;
    config.OversampleH = 1;
    config.OversampleV = 1;
    config.PixelSnapH = true;
    config.MergeMode = merge;
    // ImGui does not write to data it does not own.
    auto* bytes = const_cast<unsigned char*>(font.bytes.data());
    ImGui::GetIO().Fonts->AddFontFromMemoryTTF(bytes, static_cast<int>(font.bytes.size()), size, &config,
                                               font.ranges);
}

/// Advances are rounded to whole pixels. A space rounded down lets words run together, which reads worse than
/// a wide one, so spaces are rounded up from 0.3 on.
void widen_spaces(ImFont& font) {
    constexpr float space = 508.0F / 2048; // of the em, in Roboto Regular; Medium has 510
    const float exact = space * em_of(font.FontSize);
    for (ImFontGlyph& glyph : font.Glyphs) {
        if (glyph.Codepoint == ' ' || glyph.Codepoint == 0xA0) glyph.AdvanceX = std::floor(exact + 0.7F);
    }
    font.BuildLookupTable();
}

} // namespace

ImFont* font(Font which) {
    return ImGui::GetIO().Fonts->Fonts[static_cast<int>(which)];
}

float font_size(Font which) {
    return font(which)->FontSize * ImGui::GetIO().FontGlobalScale;
}

void build_fonts(float density) {
    ImGuiIO& io = ImGui::GetIO();
    io.Fonts->Clear();
    io.Fonts->Flags = ImFontAtlasFlags_NoBakedLines | ImFontAtlasFlags_NoMouseCursors;
    for (const Face& face : faces) {
        add_font(*face.font, device_size(face, density), false);
        add_font(symbols, device_size(face, density), true);
    }
    io.Fonts->Build();
    for (ImFont* font : io.Fonts->Fonts) widen_spaces(*font);
    io.FontGlobalScale = 1 / density;
}

} // namespace steelyard
