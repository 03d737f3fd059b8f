#include "tests/shell/support/fake_platform.hpp"

#include <algorithm>
#include <chrono>
#include <cstdio>
#include <utility>

namespace steelyard::testing {
namespace {

template<class T>
T taken(std::deque<T>& scripted, T otherwise) {
    if (scripted.empty()) return otherwise;
    T first = std::move(scripted.front());
    scripted.pop_front();
    return first;
}

SaveOutcome outcome_of(std::string problem) {
    SaveOutcome outcome;
    outcome.saved = problem.empty();
    outcome.problem = std::move(problem);
    return outcome;
}

} // namespace

void FakePlatform::answer() {
    for (const auto& each : std::exchange(answers_, {})) each();
}

std::string FakePlatform::now() {
    // From half past nine on the first of December 2026; a test never lives to the end of the month.
    const int passed = 9 * 3600 + 30 * 60 + seconds_++;
    char text[64];
    std::snprintf(text, sizeof text, "2026-12-%02dT%02d:%02d:%02dZ", 1 + passed / 86400, passed / 3600 % 24,
                  passed / 60 % 60, passed % 60);
    return text;
}

double FakePlatform::milliseconds() {
    const auto since = std::chrono::steady_clock::now().time_since_epoch();
    return std::chrono::duration<double, std::milli>(since).count();
}

std::string FakePlatform::new_id() {
    char text[64];
    std::snprintf(text, sizeof text, "00000000-0000-4000-8000-%012d", ++ids_);
    return text;
}

void FakePlatform::save_file(const std::string& name, const std::string& media_type, const std::string& text,
                             std::function<void(SaveOutcome)> done) {
    const SaveOutcome outcome = taken(next_saves, outcome_of(""));
    if (outcome.saved) saved_files.push_back({name, text, media_type});
    answers_.emplace_back([outcome, done = std::move(done)] { done(outcome); });
}

void FakePlatform::pick_file() {
    if (next_picks.empty()) return;
    answers_.emplace_back([this, file = taken(next_picks, {})] {
        if (on_picked) on_picked(file);
    });
}

void FakePlatform::list_kept(std::function<void(std::vector<KeptDecision>, std::string problem)> done) {
    std::string problem = taken(next_list_problems, {});
    std::vector<KeptDecision> list;
    if (problem.empty()) {
        for (const StoredDecision& each : kept) list.push_back({each.id, each.title, each.saved_at});
        std::stable_sort(list.begin(), list.end(), [](const KeptDecision& a, const KeptDecision& b) {
            return a.saved_at > b.saved_at;
        });
    }
    answers_.emplace_back([list = std::move(list), problem = std::move(problem), done = std::move(done)] {
        done(list, problem);
    });
}

void FakePlatform::load_kept(const std::string& id,
                             std::function<void(std::optional<StoredDecision>, std::string problem)> done) {
    std::string problem = taken(next_load_problems, {});
    std::optional<StoredDecision> found;
    if (const StoredDecision* stored = find(id); stored != nullptr && problem.empty()) found = *stored;
    answers_.emplace_back([found = std::move(found), problem = std::move(problem), done = std::move(done)] {
        done(found, problem);
    });
}

void FakePlatform::store(const StoredDecision& decision, std::function<void(SaveOutcome)> done) {
    ++stores;
    std::string problem = taken(next_store_problems, {});
    StoredDecision* before = find(decision.id);
    if (problem.empty() && before != nullptr && before->revision >= decision.revision)
        problem = "A newer version of this decision is kept already.";
    if (problem.empty() && before != nullptr)
        *before = decision;
    else if (problem.empty())
        kept.push_back(decision);
    answers_.emplace_back([outcome = outcome_of(problem), done = std::move(done)] { done(outcome); });
}

void FakePlatform::forget(const std::string& id, std::function<void(SaveOutcome)> done) {
    const std::string problem = taken(next_forget_problems, {});
    if (problem.empty()) std::erase_if(kept, [&](const StoredDecision& each) { return each.id == id; });
    answers_.emplace_back([outcome = outcome_of(problem), done = std::move(done)] { done(outcome); });
}

void FakePlatform::claim(const std::string& id, bool take_over, std::function<void(Claim)> done) {
    if (take_over) ++take_overs;
    const Claim outcome = taken(next_claims, Claim::granted);
    claimed = outcome == Claim::granted ? id : "";
    answers_.emplace_back([outcome, done = std::move(done)] { done(outcome); });
}

StoredDecision* FakePlatform::find(const std::string& id) {
    const auto found =
        std::find_if(kept.begin(), kept.end(), [&](const StoredDecision& each) { return each.id == id; });
    return found == kept.end() ? nullptr : &*found;
}

} // namespace steelyard::testing
