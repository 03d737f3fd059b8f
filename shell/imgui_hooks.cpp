#include <imgui.h>
#include <imgui_internal.h>

// ImGui is compiled with its test hooks on, which makes these four a part of linking. Nothing calls them
// while TestEngineHookItems is off: the shell's widgets report themselves to the ledger.

void ImGuiTestEngineHook_ItemAdd(ImGuiContext*, ImGuiID, const ImRect&, const ImGuiLastItemData*) {}
void ImGuiTestEngineHook_ItemInfo(ImGuiContext*, ImGuiID, const char*, ImGuiItemStatusFlags) {}
void ImGuiTestEngineHook_Log(ImGuiContext*, const char*, ...) {}
const char* ImGuiTestEngine_FindItemDebugLabel(ImGuiContext*, ImGuiID) {
    return nullptr;
}
