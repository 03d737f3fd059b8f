#include "tests/shell/support/sample_screen.hpp"

#include <imgui.h>

#include "shell/context.hpp"
#include "shell/fonts.hpp"

namespace steelyard::testing {
namespace {

constexpr ImU32 ink = 0xFF29241E;
constexpr ImU32 quiet = 0xFF6C645A;
constexpr ImU32 card = 0xFFFFFFFF;
constexpr ImU32 line = 0xFFC6D1D5;
constexpr ImU32 steel = 0xFF735A3C;
constexpr ImU32 brass = 0xFF1A72A8;

void write(ImDrawList& list, ImVec2 at, Font which, ImU32 colour, const char* text) {
    list.AddText(font(which), font_size(which), at, colour, text);
}

void draw_card(ImDrawList& list, ImVec2 from, ImVec2 to) {
    list.AddRectFilled(from, to, card, 8);
    list.AddRect(from, to, line, 8);
}

void draw_rail(ImDrawList& list, float height) {
    list.AddRectFilled({0, 52}, {132, height - 44}, 0xFFDAE4E8);
    const char* const names[] = {"Question", "Weights", "Figures", "Ranking", "What if", "Report"};
    float y = 80;
    for (const char* name : names) {
        write(list, {24, y}, Font::body, ink, name);
        write(list, {24, y + 20}, Font::small, brass, "3 open");
        y += 58;
    }
}

void draw_bars(ImDrawList& list, ImVec2 at, int moved) {
    const ImU32 colours[] = {0xFF6F7714, 0xFF1F47A8, 0xFF9C4A5A};
    for (int i = 0; i < 3; ++i) {
        const float y = at.y + 64 * static_cast<float>(i);
        list.AddRectFilled({at.x, y}, {at.x + 22, y + 22}, colours[i], 4);
        write(list, {at.x + 7, y + 1}, Font::strong, card, i == 0 ? "A" : i == 1 ? "B" : "C");
        write(list, {at.x + 32, y + 1}, Font::strong, ink, "Option with a name");
        write(list, {at.x + 180, y + 1}, Font::strong, ink, i == 0 ? "74.2" : "65.5");
        list.AddRectFilled({at.x, y + 31}, {at.x + 214, y + 39}, 0xFFDAE4E8, 4);
        const float length = 100 + 40 * static_cast<float>(i) + static_cast<float>(i == 1 ? moved : 0);
        list.AddRectFilled({at.x, y + 31}, {at.x + length, y + 39}, colours[i], 4);
    }
}

void draw_balance(ImDrawList& list, ImVec2 middle) {
    list.AddLine({middle.x - 270, middle.y - 33}, {middle.x + 270, middle.y + 33}, steel, 8);
    list.AddTriangleFilled({middle.x, middle.y}, {middle.x + 26, middle.y + 74},
                           {middle.x - 26, middle.y + 74}, 0xFFDAE4E8);
    list.AddTriangle({middle.x, middle.y}, {middle.x + 26, middle.y + 74}, {middle.x - 26, middle.y + 74},
                     steel, 2);
    list.AddCircleFilled(middle, 9, card);
    list.AddCircle(middle, 9, steel, 0, 3);
    for (int i = -9; i <= 9; ++i) {
        const float x = middle.x + 28 * static_cast<float>(i);
        const float y = middle.y + 3.4F * static_cast<float>(i);
        list.AddLine({x, y + 6}, {x, y + 16}, steel, 2);
        write(list, {x - 8, y + 18}, Font::small, quiet, "×9");
    }
}

void draw_chart(ImDrawList& list, ImVec2 from, ImVec2 size) {
    for (int i = 0; i <= 8; ++i) {
        const float y = from.y + size.y * static_cast<float>(i) / 8;
        list.AddLine({from.x, y}, {from.x + size.x, y}, line);
    }
    const ImU32 colours[] = {0xFF6F7714, 0xFF1F47A8, 0xFF9C4A5A};
    for (int curve = 0; curve < 3; ++curve) {
        ImVec2 points[64];
        for (int i = 0; i < 64; ++i) {
            const float t = static_cast<float>(i) / 63;
            const float bend = t * (1 - t) * static_cast<float>(curve - 1);
            points[i] = {from.x + size.x * t, from.y + size.y * (0.2F + 0.5F * t + bend)};
        }
        list.AddPolyline(points, 64, colours[curve], 0, 2);
        list.AddRectFilled({from.x + 10, from.y + 10}, {from.x + size.x * 0.6F, from.y + size.y * 0.5F},
                           0x18735A3C);
    }
}

void draw_table(ImDrawList& list, ImVec2 from, int rows, int columns) {
    for (int row = 0; row < rows; ++row) {
        const float y = from.y + 26 * static_cast<float>(row);
        if (row % 2 == 1)
            list.AddRectFilled({from.x, y}, {from.x + 84 * static_cast<float>(columns), y + 26}, 0xFFEEF4F6);
        for (int column = 0; column < columns; ++column) {
            const float x = from.x + 84 * static_cast<float>(column) + 6;
            write(list, {x, y + 3}, Font::body, column % 3 == 0 ? quiet : ink,
                  column == 0 ? "Noise, dB" : "12,345.6");
        }
    }
}

} // namespace

SampleScreen::SampleScreen(int width, int height, float density)
    : context_(make_context(density)), width_(width), height_(height), density_(density) {}

SampleScreen::~SampleScreen() {
    ImGui::DestroyContext(context_);
}

const ImDrawData& SampleScreen::draw(int moved) {
    ImGuiIO& io = ImGui::GetIO();
    io.DisplaySize = {static_cast<float>(width_), static_cast<float>(height_)};
    io.DisplayFramebufferScale = {density_, density_};
    io.DeltaTime = 1.0F / 60;
    ImGui::NewFrame();
    ImDrawList& list = *ImGui::GetBackgroundDrawList();
    const float width = io.DisplaySize.x;
    const float height = io.DisplaySize.y;
    list.AddRectFilled({0, 0}, {width, 52}, card);
    list.AddRectFilled({0, height - 44}, {width, height}, card);
    write(list, {24, 14}, Font::heading, ink, "Parts washer for cell 7");
    write(list, {260, 18}, Font::small, quiet, "saved here 10:42 · file 09:15, changed since");
    write(list, {24, height - 32}, Font::strong, brass, "Contradiction");
    write(list, {151, height - 32}, Font::body, ink,
          "Two answers of this set contradict each other. ⏎ ↶ ↷ ✓ ≤ ≥ ▲ ▼");
    draw_rail(list, height);
    draw_card(list, {150, 68}, {width - 300, 364});
    write(list, {200, 84}, Font::heading, ink, "Noise counts 6 times as much as floor space.");
    draw_balance(list, {(width - 150) / 2, 236});
    draw_card(list, {150, 376}, {width - 660, height - 60});
    draw_table(list, {170, 392}, static_cast<int>((height - 460) / 26), static_cast<int>((width - 840) / 84));
    draw_card(list, {width - 640, 376}, {width - 300, height - 60});
    draw_chart(list, {width - 620, 400}, {300, height - 500});
    draw_bars(list, {width - 256, 106}, moved);
    for (int i = 0; i < 14; ++i)
        write(list, {width - 256, 320 + 22 * static_cast<float>(i)}, i % 4 == 0 ? Font::body : Font::small,
              i % 3 == 0 ? ink : quiet, "Breaks even at a price of 58,900");
    write(list, {width - 256, height - 100}, Font::huge, ink, "74.2");
    ImGui::Render();
    return *ImGui::GetDrawData();
}

void SampleScreen::give_atlas(Painter& painter) const {
    unsigned char* alpha = nullptr;
    int width = 0;
    int height = 0;
    ImGui::GetIO().Fonts->GetTexDataAsAlpha8(&alpha, &width, &height);
    painter.set_atlas(alpha, width, height);
}

int SampleScreen::device_width() const {
    return static_cast<int>(static_cast<float>(width_) * density_);
}
int SampleScreen::device_height() const {
    return static_cast<int>(static_cast<float>(height_) * density_);
}

} // namespace steelyard::testing
