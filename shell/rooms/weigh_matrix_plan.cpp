#include "shell/rooms/weigh_matrix_plan.hpp"

#include <cmath>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_pairs.hpp"

namespace steelyard {
namespace {

constexpr double same_within = 1e-12;

std::string count_or_none(std::size_t count) {
    return count == 0 ? "none" : std::to_string(count);
}
std::string answers(std::size_t count) {
    return std::to_string(count) + (count == 1 ? " answer" : " answers");
}

} // namespace

MatrixPlan plan_matrix(const RoomView& view, const SetResult& entry, std::string_view text, bool clear) {
    const Decision& d = view.decision;
    const PairTable table(view, entry);
    const ReadMatrix read = read_matrix(text, table.names());
    MatrixPlan plan;
    plan.problem = read.problem;
    if (!plan.problem.empty()) return plan;
    std::size_t means = 0;
    for (const auto& answer : read.answers) {
        const ItemPair pair{entry.items[answer.i], entry.items[answer.j]};
        if (table.pair(answer.i, answer.j).source == PairSource::abstained) {
            plan.problem = "Row \"" + table.names()[answer.i] + "\", column \"" + table.names()[answer.j] +
                           "\": " + table.why_not(answer.i, answer.j);
            plan.edits.clear();
            return plan;
        }
        means += table.pair(answer.i, answer.j).mean() ? 1 : 0;
        const auto before = said_ratio(d, entry.set, view.person, pair[0], pair[1]);
        if (before && std::abs(*before / answer.ratio - 1) < same_within) {
            ++plan.as_before;
            continue;
        }
        (before ? plan.replaced : plan.entered) += 1;
        plan.edits.emplace_back(
            Enter<Judgment>{judgment_of(view, entry.set, view.person, pair, answer.ratio)});
    }
    for (const auto& [i, j] : read.blank) {
        const ItemPair pair{entry.items[i], entry.items[j]};
        if (!said_ratio(d, entry.set, view.person, pair[0], pair[1])) continue;
        ++plan.left_blank;
        if (clear) plan.edits.emplace_back(ClearJudgment{entry.set, view.person, pair[0], pair[1]});
    }
    plan.words = (plan.entered > 0 ? "Enters " + answers(plan.entered) : std::string("Enters none")) +
                 ", replaces " + count_or_none(plan.replaced) + ", clears " +
                 count_or_none(clear ? plan.left_blank : 0) + ".";
    const auto note = [&](const std::string& more) { plan.notes += (plan.notes.empty() ? "" : " ") + more; };
    if (plan.as_before > 0)
        note(answers(plan.as_before) + (plan.as_before == 1 ? " is" : " are") + " as before.");
    if (means > 0)
        note("What is agreed in the room stands in place of what each judge said, on " +
             std::to_string(means) + (means == 1 ? " pair." : " pairs."));
    note(read.notes);
    while (!plan.notes.empty() && plan.notes.back() == ' ') plan.notes.pop_back();
    const std::size_t pasted = plan.entered + plan.replaced;
    plan.label = "Pasted " + answers(pasted) + " into \"" + node_name(d, entry.set) + "\"" +
                 (clear && plan.left_blank > 0 ? ", took back " + std::to_string(plan.left_blank) : "") +
                 (view.person.empty() ? "" : " (" + person_name(d, view.person) + ")");
    return plan;
}

} // namespace steelyard
