#include "shell/next_step.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/sentences.hpp"

namespace steelyard {

namespace {

/// While answers are sealed: what the one at the seat has still to do, and nothing of the others.
NextStep sealed_step(const RoomView& view) {
    if (view.person.empty())
        return {"Sealed", "Hand over to the one who answers next.", "Go to it", RoomId::weigh, {}};
    const std::string name = person_name(view.decision, view.person);
    for (const auto& entry : view.results.sets) {
        if (!entry.by.empty()) continue;
        const Progress progress = progress_of(view.decision, entry, view.person);
        if (progress.done()) continue;
        return {"Sealed",
                name + ": " + node_name(view.decision, entry.set) + ", " + progress_words(progress) + ".",
                "Go to it", RoomId::weigh, entry.set};
    }
    return {"Sealed",
            name + " has done with all sets. Hand over to the next one.",
            "Go to it",
            RoomId::weigh,
            {}};
}

} // namespace

NextStep next_step(const RoomView& view) {
    const Decision& d = view.decision;
    if (view.sealed()) return sealed_step(view);
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
    if (view.sealed()) {
        for (const auto& entry : view.results.sets) {
            if (!entry.by.empty() || view.person.empty()) continue;
            const Progress progress = progress_of(view.decision, entry, view.person);
            if (!progress.done())
                counts.weigh += progress.points ? 1 : static_cast<int>(progress.left.size());
        }
    }
    for (const auto& item : view.results.open) {
        if (room_of(item) == RoomId::weigh && !view.sealed()) ++counts.weigh;
        if (room_of(item) == RoomId::gauge) ++counts.gauge;
    }
    return counts;
}

} // namespace steelyard
