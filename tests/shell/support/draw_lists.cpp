#include "tests/shell/support/draw_lists.hpp"

namespace steelyard::testing {

TestAtlas::TestAtlas() {
    for (int y = 0; y < height; ++y) {
        for (int x = 0; x < width; ++x)
            alpha.push_back(
                static_cast<unsigned char>(x < 2 && y < 2 ? 255 : (x * 37 + y * 91 + x * y * 5) % 256));
    }
}

DrawLists::DrawLists(float width, float height, float density) : clip_(0, 0, width, height) {
    data_.Valid = true;
    data_.DisplaySize = {width, height};
    data_.FramebufferScale = {density, density};
    next_list();
}

void DrawLists::next_list() {
    lists_.push_back(std::make_unique<ImDrawList>(nullptr));
    corner_offset_ = 0;
    open_command();
}

void DrawLists::open_command() {
    ImDrawCmd command;
    command.ClipRect = clip_;
    command.VtxOffset = corner_offset_;
    command.IdxOffset = static_cast<unsigned int>(list().IdxBuffer.Size);
    list().CmdBuffer.push_back(command);
}

void DrawLists::clip(float left, float top, float right, float bottom) {
    clip_ = {left, top, right, bottom};
    open_command();
}

void DrawLists::offset_corners() {
    corner_offset_ = static_cast<unsigned int>(list().VtxBuffer.Size);
    open_command();
}

void DrawLists::user_callback(ImDrawCallback callback) {
    open_command();
    list().CmdBuffer.back().UserCallback = callback;
    open_command();
}

ImDrawIdx DrawLists::corner(ImVec2 at, ImVec2 uv, ImU32 colour) {
    list().VtxBuffer.push_back({at, uv, colour});
    return static_cast<ImDrawIdx>(static_cast<unsigned int>(list().VtxBuffer.Size) - 1 - corner_offset_);
}

void DrawLists::indices(std::initializer_list<int> added, ImDrawIdx first) {
    for (const int index : added) list().IdxBuffer.push_back(static_cast<ImDrawIdx>(first + index));
    list().CmdBuffer.back().ElemCount += static_cast<unsigned int>(added.size());
}

void DrawLists::rectangle(ImVec2 from, ImVec2 to, ImU32 colour) {
    const ImVec2 uv = TestAtlas::white();
    const ImDrawIdx first = corner(from, uv, colour);
    corner({to.x, from.y}, uv, colour);
    corner(to, uv, colour);
    corner({from.x, to.y}, uv, colour);
    indices({0, 1, 2, 0, 2, 3}, first);
}

void DrawLists::picture(ImVec2 from, ImVec2 to, ImVec2 texel_from, ImVec2 texel_to, ImU32 colour) {
    const ImVec2 a{texel_from.x / TestAtlas::width, texel_from.y / TestAtlas::height};
    const ImVec2 c{texel_to.x / TestAtlas::width, texel_to.y / TestAtlas::height};
    const ImDrawIdx first = corner(from, a, colour);
    corner({to.x, from.y}, {c.x, a.y}, colour);
    corner(to, c, colour);
    corner({from.x, to.y}, {a.x, c.y}, colour);
    indices({0, 1, 2, 0, 2, 3}, first);
}

void DrawLists::triangle(const ImVec2 (&at)[3], const ImU32 (&colours)[3]) {
    const ImVec2 white = {TestAtlas::white().x * TestAtlas::width, TestAtlas::white().y * TestAtlas::height};
    textured_triangle(at, {white, white, white}, colours);
}

void DrawLists::textured_triangle(const ImVec2 (&at)[3], const ImVec2 (&texels)[3],
                                  const ImU32 (&colours)[3]) {
    const auto uv = [&](int i) {
        return ImVec2{texels[i].x / TestAtlas::width, texels[i].y / TestAtlas::height};
    };
    const ImDrawIdx first = corner(at[0], uv(0), colours[0]);
    corner(at[1], uv(1), colours[1]);
    corner(at[2], uv(2), colours[2]);
    indices({0, 1, 2}, first);
}

void DrawLists::fan(const std::vector<ImVec2>& corners, ImU32 colour) {
    const ImDrawIdx first = corner(corners[0], TestAtlas::white(), colour);
    for (std::size_t i = 1; i < corners.size(); ++i) corner(corners[i], TestAtlas::white(), colour);
    for (int i = 2; i < static_cast<int>(corners.size()); ++i) indices({0, i - 1, i}, first);
}

ImDrawData& DrawLists::data() {
    data_.CmdLists.clear();
    for (const auto& each : lists_) data_.CmdLists.push_back(each.get());
    data_.CmdListsCount = data_.CmdLists.Size;
    return data_;
}

} // namespace steelyard::testing
