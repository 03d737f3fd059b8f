#include "shell/next_step.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/sentences.hpp"

namespace steelyard {

NextStep next_step(const RoomView& view) {
    const Decision& d = view.decision;
    if (d.options.empty()) {
        return {"Begin", "Name the options to choose between.", "Go to it", RoomId::frame, {}};
    }
    if (d.criteria.is_leaf()) {
        return {"Begin", "Name the criteria that count.", "Go to it", RoomId::frame, d.criteria.id};
    }
    const auto over =
        std::find_if(view.results.sets.begin(), view.results.sets.end(),
                     [&](const SetResult& set) { return set.cr && *set.cr > d.settings.limit; });
    if (over != view.results.sets.end()) {
        return {"Contradiction", "Answers in " + node_name(d, over->set) + " contradict each other.",
                "Show them",     RoomId::weigh,
                over->set,       true};
    }
    if (!view.results.open.empty()) {
        const OpenItem& item = view.results.open.front();
        return {"Open", open_sentence(d, item), "Go to it", room_of(item), focus_of(item)};
    }
    return {"Done", "Nothing is open. See what the ranking rests on.", "Standing", RoomId::standing, {}};
}

int OpenCounts::of(RoomId room) const {
    if (room == RoomId::weigh) return weigh;
    return room == RoomId::gauge ? gauge : 0;
}

OpenCounts count_open(const RoomView& view) {
    OpenCounts counts;
    for (const auto& item : view.results.open) {
        if (room_of(item) == RoomId::weigh) ++counts.weigh;
        if (room_of(item) == RoomId::gauge) ++counts.gauge;
    }
    return counts;
}

} // namespace steelyard
