#include "shell/context.hpp"

#include <imgui.h>
#include <imgui_internal.h>

#include <algorithm>

#include "shell/fonts.hpp"

namespace steelyard {

ImGuiContext* make_context(float density) {
    ImGuiContext* context = ImGui::CreateContext();
    ImGui::SetCurrentContext(context);
    // No window switcher: there is one window, and the keys are the browser's.
    context->ConfigNavWindowingKeyNext = ImGuiKey_None;
    context->ConfigNavWindowingKeyPrev = ImGuiKey_None;

    ImGuiIO& io = ImGui::GetIO();
    io.IniFilename = nullptr;
    io.LogFilename = nullptr;
    io.ConfigFlags |= ImGuiConfigFlags_NavEnableKeyboard;
    io.ConfigWindowsMoveFromTitleBarOnly = true;
    io.ConfigInputTextCursorBlink = true;
    io.MouseDrawCursor = false;
    // The painter takes lists of more than 65,536 corners.
    io.BackendFlags |= ImGuiBackendFlags_RendererHasVtxOffset;
    set_density(density);
    return context;
}

void set_density(float density) {
    density = std::clamp(density, 0.5F, 8.0F);
    const ImGuiIO& io = ImGui::GetIO();
    if (io.Fonts->IsBuilt() && io.FontGlobalScale == 1 / density) return;
    build_fonts(density);
    // Curves are broken into pieces whose error is counted in CSS pixels: keep it the same in device pixels.
    const ImGuiStyle defaults;
    ImGuiStyle& style = ImGui::GetStyle();
    style.CurveTessellationTol = defaults.CurveTessellationTol / density;
    style.CircleTessellationMaxError = defaults.CircleTessellationMaxError / density;
}

void sharpen_edges() {
    // No public setting in this version of ImGui; every Begin resets it.
    ImGui::GetWindowDrawList()->_FringeScale = 1 / ImGui::GetIO().DisplayFramebufferScale.x;
}

} // namespace steelyard
