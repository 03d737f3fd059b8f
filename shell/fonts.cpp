#include "shell/fonts.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "shell/fonts/embedded.hpp"

namespace steelyard {
namespace {

struct Face {
    const EmbeddedFont* font;
    float line; // CSS pixels; whole, so that lines stay on whole pixels
};

const std::array<Face, font_count> faces{{
    {&text_regular, 19},
    {&text_regular, 16},
    {&text_medium, 19},
    {&text_medium, 23},
    {&text_medium, 33},
    {&text_medium, 47},
}};

const Face& face(Font which) {
    return faces[static_cast<std::size_t>(which)];
}

void add_font(const EmbeddedFont& font, float device_size, bool merge) {
    ImFontConfig config;
    config.FontDataOwnedByAtlas = false;
    config.OversampleH = 1;
    config.OversampleV = 1;
    config.PixelSnapH = true;
    config.MergeMode = merge;
    // ImGui does not write to data it does not own.
    auto* bytes = const_cast<unsigned char*>(font.bytes.data());
    ImGui::GetIO().Fonts->AddFontFromMemoryTTF(bytes, static_cast<int>(font.bytes.size()), device_size,
                                               &config, font.ranges);
}

/// Advances are rounded to whole pixels. A space rounded down lets words run together, which reads worse than
/// a wide one, so spaces are rounded up from 0.3 on.
void widen_spaces(ImFont& font, const Face& face, float density) {
    constexpr float space = 508.0F / 2048; // of the em, in Roboto Regular; Medium has 510
    const float exact = space * em_of(face.line) * density;
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
    return face(which).line;
}

void build_fonts(float density) {
    density = std::clamp(density, 0.5F, 8.0F);
    ImGuiIO& io = ImGui::GetIO();
    io.Fonts->Clear();
    io.Fonts->Flags = ImFontAtlasFlags_NoBakedLines | ImFontAtlasFlags_NoMouseCursors;
    for (const Face& face : faces) {
        add_font(*face.font, face.line * density, false);
        add_font(symbols, face.line * density, true);
    }
    io.Fonts->Build();
    for (int i = 0; i < font_count; ++i)
        widen_spaces(*io.Fonts->Fonts[i], faces[static_cast<std::size_t>(i)], density);
    io.FontGlobalScale = 1 / density;
}

} // namespace steelyard
