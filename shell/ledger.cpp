#include "shell/ledger.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/json_value.hpp"

namespace steelyard {

void Ledger::begin_frame(std::string room) {
    room_ = std::move(room);
    items_.clear();
    seen_.clear();
}

void Ledger::add(LedgerItem item) {
    const ImVec2 clip_min = ImGui::GetWindowDrawList()->GetClipRectMin();
    const ImVec2 clip_max = ImGui::GetWindowDrawList()->GetClipRectMax();
    item.clip_min = clip_min;
    item.clip_max = clip_max;
    item.room = room_;
    // Texts have no name of their own: the same words met again in a frame get a number.
    if (item.id.empty()) item.id = "text/" + item.label;
    const int times = ++seen_[item.id];
    if (times > 1) item.id += "/" + std::to_string(times);
    item.visible = item.at.x < clip_max.x && item.at.y < clip_max.y && item.at.x + item.size.x > clip_min.x &&
                   item.at.y + item.size.y > clip_min.y;
    items_.push_back(std::move(item));
}

const LedgerItem* Ledger::find(std::string_view label, std::string_view role) const {
    const auto found = std::find_if(items_.begin(), items_.end(), [&](const LedgerItem& item) {
        return item.visible && item.label == label && (role.empty() || item.role == role);
    });
    return found == items_.end() ? nullptr : &*found;
}

std::string ledger_json(const Ledger& ledger) {
    JsonValue list = JsonValue::array();
    for (const auto& item : ledger.items()) {
        JsonValue one = JsonValue::object();
        one.add("id", JsonValue::of(item.id)).add("room", JsonValue::of(item.room));
        one.add("label", JsonValue::of(item.label)).add("role", JsonValue::of(item.role));
        one.add("value", JsonValue::of(item.value));
        const auto number = [](float value) { return JsonValue::of(static_cast<double>(value)); };
        one.add("x", number(item.at.x)).add("y", number(item.at.y));
        one.add("w", number(item.size.x)).add("h", number(item.size.y));
        one.add("enabled", JsonValue::of(item.enabled)).add("focused", JsonValue::of(item.focused));
        one.add("visible", JsonValue::of(item.visible));
        list.items.push_back(std::move(one));
    }
    return write_json_compact(list);
}

} // namespace steelyard
