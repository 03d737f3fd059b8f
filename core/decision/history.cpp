#include "core/decision/history.hpp"

#include <utility>

namespace steelyard {
namespace {

/// Steps kept. A whole decision is kept for each; unchanged ones of a large decision take about a megabyte.
constexpr std::size_t most_steps = 200;

void write_log(Decision& decision, const Stamp& stamp, std::string did) {
    decision.log.push_back({stamp.at, stamp.by, std::move(did), stamp.why, {}});
}

} // namespace

History::History(Decision decision) : now_(std::make_shared<const Decision>(std::move(decision))) {}

History::Outcome History::apply(const std::vector<Edit>& edits, const Stamp& stamp, std::string label) {
    Outcome outcome;
    Applied applied = steelyard::apply(*now_, edits);
    outcome.problems = std::move(applied.problems);
    if (!outcome.problems.empty() || applied.decision == *now_) return outcome;
    outcome.losses = applied.losses;
    outcome.changed = true;
    if (label.empty()) label = describe(edits.front(), *now_);
    write_log(applied.decision, stamp, label);
    undo_.push_back({now_, std::move(label)});
    if (undo_.size() > most_steps) undo_.pop_front();
    redo_.clear();
    now_ = std::make_shared<const Decision>(std::move(applied.decision));
    ++revision_;
    return outcome;
}

bool History::undo(const Stamp& stamp) {
    return step(undo_, redo_, stamp, "Undid: ");
}
bool History::redo(const Stamp& stamp) {
    return step(redo_, undo_, stamp, "Redid: ");
}

bool History::step(std::deque<Step>& from, std::deque<Step>& to, const Stamp& stamp, const char* verb) {
    if (from.empty()) return false;
    Step taken = std::move(from.back());
    from.pop_back();
    Decision next = *taken.other;
    next.log = now_->log;
    write_log(next, stamp, verb + taken.label);
    to.push_back({now_, std::move(taken.label)});
    now_ = std::make_shared<const Decision>(std::move(next));
    ++revision_;
    return true;
}

} // namespace steelyard
