#include "shell/context.hpp"

#include <imgui.h>
#include <imgui_internal.h>

#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>

#include "shell/fonts.hpp"

namespace steelyard {
namespace {

constexpr Font all_fonts[] = {Font::body, Font::small, Font::strong, Font::heading, Font::large, Font::huge};

class Context {
public:
    explicit Context(float density) : context_(make_context(density)) {}
    ~Context() { ImGui::DestroyContext(context_); }
    Context(const Context&) = delete;
    Context& operator=(const Context&) = delete;
    ImGuiContext& operator*() const { return *context_; }

private:
    ImGuiContext* context_;
};

/// The characters of `text` that a font lacks.
std::string missing(ImFont& face, const std::string& text) {
    ImVector<ImWchar> codes;
    codes.resize(static_cast<int>(text.size()) + 1);
    const int count = ImTextStrFromUtf8(codes.Data, codes.Size, text.c_str(), nullptr);
    std::string lacking;
    for (int i = 0; i < count; ++i) {
        if (face.FindGlyphNoFallback(codes[i]) == nullptr) lacking += "U+" + std::to_string(codes[i]) + " ";
    }
    return lacking;
}

TEST_CASE("every font holds every character the shell writes and its documents are likely to hold") {
    const Context context(1);
    const std::string symbols =
        "←→↑↓↔↕▲▼▾▸◂▴↶↷⏎⇧⌫⌘✓✗×÷−+≤≥≈≠±²³µ°…–—•·Ω½⅓¼⅔¾€£$¥«»„“”‘’‚‹›§¶№‰′″∞√∑⌀○●□■◆★☆☐☑⚠";
    const std::string words = "ÄÖÜäöüßẞ ÀÉÎÕÇñåøæœŁłŻżČčŠšŘřĞğİıŐőŰűȘșȚț ΑΒΓαβγλμσωΩ АБВГДЖЯабвгджяёіїєґ";
    std::string ascii;
    for (char c = 0x20; c < 0x7F; ++c) ascii += c;
    for (const Font which : all_fonts) {
        INFO("font " << static_cast<int>(which));
        CHECK(missing(*font(which), symbols) == "");
        CHECK(missing(*font(which), words) == "");
        CHECK(missing(*font(which), ascii) == "");
    }
}

TEST_CASE("a character no font holds shows as a mark, and so do marks of direction and of no width") {
    const Context context(1);
    for (const Font which : all_fonts) {
        ImFont& face = *font(which);
        CHECK(face.FallbackChar == 0xFFFD);
        for (const int code : {0x4E2D, 0x200B, 0x200E, 0x202E, 0x2066, 0xFEFF}) {
            const ImFontGlyph& glyph = *face.FindGlyph(static_cast<ImWchar>(code));
            CHECK(glyph.Codepoint == 0xFFFD);
            CHECK(glyph.Visible);
            CHECK(glyph.X1 - glyph.X0 > 4);
        }
        CHECK(face.EllipsisCharCount == 1);
        CHECK(face.EllipsisChar == 0x2026);
    }
}

TEST_CASE("digits are as wide as each other at every density, and the figure space as they") {
    const float density = GENERATE(1.0F, 1.25F, 1.5F, 2.0F);
    const Context context(density);
    for (const Font which : all_fonts) {
        const ImFont& face = *font(which);
        for (char digit = '0'; digit <= '9'; ++digit)
            CHECK(face.GetCharAdvance(static_cast<ImWchar>(digit)) == face.GetCharAdvance('0'));
        CHECK(std::abs(face.GetCharAdvance(0x2007) - face.GetCharAdvance('0')) <= 1);
    }
}

TEST_CASE("sizes are in CSS pixels, whatever the density") {
    const float em[] = {16, 13.5F, 16, 20, 28, 40};
    for (const float density : {1.0F, 1.25F, 2.0F, 3.0F}) {
        const Context context(density);
        ImGui::GetIO().DisplaySize = {800, 600};
        ImGui::NewFrame();
        for (const Font which : all_fonts) {
            INFO("font " << static_cast<int>(which) << " density " << density);
            const float size = font_size(which);
            CHECK(std::abs(em_of(size) - em[static_cast<int>(which)]) < 0.5F);
            CHECK(std::abs(size * density - std::round(size * density)) < 0.001F);
            ImGui::PushFont(font(which));
            CHECK(std::abs(ImGui::GetFontSize() - size) < 0.001F);
            // Advances are rounded to device pixels: by half a pixel for each of 20 letters at most. ImGui
            // rounds the whole up.
            const float width = ImGui::CalcTextSize("00000000000000000000").x;
            const float digit = which == Font::body || which == Font::small ? 1151 : 1164;
            CHECK(std::abs(width - 20 * em_of(size) * digit / 2048) <= 20 * 0.5F / density + 1);
            ImGui::PopFont();
        }
        ImGui::EndFrame();
    }
}

TEST_CASE("spaces never fall below a quarter of the em by more than rounding allows") {
    const Context context(1);
    for (const Font which : all_fonts) {
        const float exact = em_of(font_size(which)) * 508 / 2048;
        CHECK(font(which)->GetCharAdvance(' ') >= exact - 0.3F);
        CHECK(font(which)->GetCharAdvance(' ') <= exact + 0.7F);
        CHECK(font(which)->FindGlyph(' ')->AdvanceX == font(which)->GetCharAdvance(' '));
    }
}

TEST_CASE("another density makes the fonts anew, in the same order") {
    const Context context(1);
    const float before = font(Font::huge)->FontSize;
    set_density(2);
    CHECK(font(Font::huge)->FontSize == 2 * before);
    CHECK(ImGui::GetIO().FontGlobalScale == 0.5F);
    CHECK(ImGui::GetIO().Fonts->Fonts.Size == font_count);
    CHECK(ImGui::GetIO().Fonts->IsBuilt());
    set_density(1);
    CHECK(font(Font::huge)->FontSize == before);
    // The density it has costs nothing.
    const unsigned char* atlas = ImGui::GetIO().Fonts->TexPixelsAlpha8;
    set_density(1);
    CHECK(ImGui::GetIO().Fonts->TexPixelsAlpha8 == atlas);
}

TEST_CASE("the context keeps no files, walks by keyboard and leaves window switching alone") {
    const Context context(1);
    const ImGuiIO& io = ImGui::GetIO();
    CHECK(io.IniFilename == nullptr);
    CHECK(io.LogFilename == nullptr);
    CHECK((io.ConfigFlags & ImGuiConfigFlags_NavEnableKeyboard) != 0);
    CHECK((*context).ConfigNavWindowingKeyNext == 0);
    CHECK((*context).ConfigNavWindowingKeyPrev == 0);
    CHECK_FALSE((*context).TestEngineHookItems);
    // Baked lines would be textured triangles, slow to paint, and a cursor in the atlas would never be used.
    CHECK((io.Fonts->Flags & ImFontAtlasFlags_NoBakedLines) != 0);
}

TEST_CASE("edges can be made one device pixel soft") {
    const Context context(2);
    ImGuiIO& io = ImGui::GetIO();
    io.DisplaySize = {800, 600};
    io.DisplayFramebufferScale = {2, 2};
    ImGui::NewFrame();
    ImGui::Begin("window");
    CHECK(ImGui::GetWindowDrawList()->_FringeScale == 1);
    sharpen_edges();
    CHECK(ImGui::GetWindowDrawList()->_FringeScale == 0.5F);
    ImGui::End();
    ImGui::EndFrame();
}

} // namespace
} // namespace steelyard
