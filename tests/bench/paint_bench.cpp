// What a frame costs: painted whole, with one small part changed, and unchanged. Prints milliseconds (the
// best of several rounds) and ratios to the whole frame.

#include <algorithm>
#include <chrono>
#include <cstdio>
#include <string>

#include "shell/fonts.hpp"
#include "tests/shell/support/sample_screen.hpp"
#include "tests/shell/support/save_png.hpp"

namespace steelyard {
namespace {

using testing::SampleScreen;

template<class Work>
double best_milliseconds(int rounds, const Work& work) {
    double best = 1e9;
    for (int i = 0; i < rounds; ++i) {
        const auto begin = std::chrono::steady_clock::now();
        work(i);
        const std::chrono::duration<double, std::milli> passed = std::chrono::steady_clock::now() - begin;
        best = std::min(best, passed.count());
    }
    return best;
}

void measure(int width, int height, float density, const std::string& picture) {
    SampleScreen screen(width, height, density);
    const double fonts = best_milliseconds(3, [&](int) { build_fonts(density); });
    Painter painter;
    screen.give_atlas(painter);
    const int device_width = screen.device_width();
    const int device_height = screen.device_height();
    const auto paint = [&](int moved) {
        painter.paint(screen.draw(moved), device_width, device_height, SampleScreen::background);
    };
    const double drawing = best_milliseconds(20, [&](int) { screen.draw(); });
    // A new height makes everything new.
    const double whole = best_milliseconds(20, [&](int i) {
        painter.paint(*ImGui::GetDrawData(), device_width, device_height - i % 2, SampleScreen::background);
    });
    paint(0);
    const double part = best_milliseconds(20, [&](int i) { paint(i % 2); }) - drawing;
    const double none = best_milliseconds(20, [&](int) { paint(1); }) - drawing;
    if (!picture.empty()) testing::save_png(picture, painter.pixels(), device_width, device_height);
    std::printf("%5d x %4d | %6.2f | %6.2f (%4.2f) | %6.2f (%4.2f) | %7.1f | %4d x %4d\n", device_width,
                device_height, whole, part, part / whole, none, none / whole, fonts,
                ImGui::GetIO().Fonts->TexWidth, ImGui::GetIO().Fonts->TexHeight);
}

} // namespace
} // namespace steelyard

int main(int count, char** arguments) {
    const std::string picture = count > 1 ? arguments[1] : "";
    std::printf("       pixels |  whole |   small part  |   unchanged   | fonts ms | atlas\n");
    steelyard::measure(1366, 768, 1, picture.empty() ? "" : picture + "1.png");
    steelyard::measure(1366, 768, 1.25F, picture.empty() ? "" : picture + "1.25.png");
    steelyard::measure(1366, 768, 2, picture.empty() ? "" : picture + "2.png");
}
