#pragma once

#include <imgui.h>

#include <memory>
#include <vector>

namespace steelyard::testing {

/// A small made-up atlas: a white 2 x 2 square in its corner, as ImGui's, and other alphas elsewhere.
struct TestAtlas {
    static constexpr int width = 64;
    static constexpr int height = 32;
    std::vector<unsigned char> alpha;

    TestAtlas();
    static ImVec2 white() { return {1.0F / width, 1.0F / height}; }
};

/// Draw data made corner by corner, for the painter.
class DrawLists {
public:
    DrawLists(float width, float height, float density);

    /// What is added from here on is clipped to this.
    void clip(float left, float top, float right, float bottom);
    /// What is added from here on goes to another list, on top of the one before.
    void next_list();
    /// Indices count from the next corner on, as they do in lists of more than 65,536 corners.
    void offset_corners();
    void user_callback(ImDrawCallback callback);

    void rectangle(ImVec2 from, ImVec2 to, ImU32 colour);
    /// A rectangle that shows a part of the atlas, in texels.
    void picture(ImVec2 from, ImVec2 to, ImVec2 texel_from, ImVec2 texel_to, ImU32 colour);
    void triangle(const ImVec2 (&at)[3], const ImU32 (&colours)[3]);
    void textured_triangle(const ImVec2 (&at)[3], const ImVec2 (&texels)[3], const ImU32 (&colours)[3]);
    /// Triangles around the first corner.
    void fan(const std::vector<ImVec2>& corners, ImU32 colour);

    ImDrawData& data();

private:
    ImDrawList& list() { return *lists_.back(); }
    void open_command();
    ImDrawIdx corner(ImVec2 at, ImVec2 uv, ImU32 colour);
    void indices(std::initializer_list<int> list, ImDrawIdx first);

    std::vector<std::unique_ptr<ImDrawList>> lists_;
    ImDrawData data_;
    ImVec4 clip_;
    unsigned int corner_offset_ = 0;
};

} // namespace steelyard::testing
