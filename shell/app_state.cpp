#include "shell/app_state.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/decision/read.hpp"
#include "core/results/write_results.hpp"
#include "shell/example.hpp"
#include "shell/sealed_results.hpp"

namespace steelyard {
namespace {

const Id& example_id() {
    static const Id id = read_decision(example_decision()).decision->id;
    return id;
}

/// Rooms have no clock: an entry gets its time when it is carried out.
void set_time(Edit& edit, const std::string& now) {
    std::visit(
        [&](auto& e) {
            if constexpr (requires { e.entry.at; }) {
                if (e.entry.at.empty()) e.entry.at = now;
            }
        },
        edit);
}

} // namespace

bool App::State::is_example() const {
    return session.decision().id == example_id();
}

RoomView App::State::view() {
    if (!person.empty() && find_person(session.decision(), person) == nullptr) person.clear();
    if (!handing_to.empty() && find_person(session.decision(), handing_to) == nullptr) handing_to.clear();
    // What is sealed: the others, and the standing. One's own contradictions are one's own.
    const bool open = answering != Answering::alone;
    const bool examined = examination && examined_revision == session.revision() &&
                          (open || (!person.empty() && examination->found().by == person));
    const bool differed = open && differing && differing_revision == session.revision();
    return {.decision = session.decision(),
            .results = seen_results(),
            .person = person,
            .read_only = keeper.read_only(),
            .answering = answering,
            .disagreements = differed ? &differing->found() : nullptr,
            .disagreement_progress = !differed       ? 0
                                     : all_differing ? 1
                                                     : std::min(differing->progress(), 0.99),
            .examination = examined ? &examination->found() : nullptr,
            .revision = session.revision(),
            .sha256 = [this] { return session.sha256(); }};
}

const Results& App::State::seen_results() {
    if (answering != Answering::alone) return session.results();
    if (sealed_revision != session.revision() || sealed_for != person) {
        sealed = sealed_results(session.results(), session.decision(), person);
        sealed_revision = session.revision();
        sealed_for = person;
    }
    return sealed;
}

void App::State::open(Decision decision, const std::string& key, std::uint64_t stored_revision,
                      const std::string& stored_at) {
    session.open(std::move(decision));
    change_answering(Answering::agreed);
    asked.reset();
    for (auto& r : rooms) r->reset();
    ui.drafts.clear();
    keeper.opened(key, session.revision(), stored_revision, stored_at);
    platform.set_title(session.decision().title);
    fresh_frames = 2;
}

void App::State::open_file(const std::string& name, const std::string& text) {
    fresh_frames = 2;
    ReadResult read = read_decision(text);
    if (!read.decision) {
        Refusal refused{name, {}};
        for (const auto& problem : read.problems) refused.reasons.push_back(sentence(problem));
        refusal = std::move(refused);
        return;
    }
    keeper.flush(session);
    const std::string key = read.decision->id.empty() ? platform.new_id() : read.decision->id;
    ++waiting;
    platform.load_kept(key, [this, key, text, name, decision = std::move(*read.decision)](
                                std::optional<StoredDecision> held, const std::string& problem) {
        --waiting;
        const std::uint64_t revision = held ? held->revision : 0;
        open(decision, key, revision, {});
        message = problem.empty() ? "Opened " + name + "." : problem;
        if (!held || held->text == text) return;
        // The browser held another state of the same decision. It stays, under a key of its own.
        StoredDecision other = *held;
        other.id = platform.new_id();
        other.title += " (kept here before a file was opened)";
        other.revision = 1;
        ++waiting;
        platform.store(other, [this](SaveOutcome outcome) {
            --waiting;
            message += outcome.saved
                           ? " The state this browser held before is kept beside it."
                           : " The state this browser held before could not be kept: " + outcome.problem;
        });
    });
}

void App::State::start_empty() {
    keeper.flush(session);
    Decision empty;
    empty.id = platform.new_id();
    empty.title = "Untitled decision";
    empty.criteria.id = "goal";
    empty.criteria.name = "Goal";
    const Id key = empty.id;
    open(std::move(empty), key, 0, {});
    room = RoomId::frame;
    message = "A new decision. The one before is kept in this browser.";
}

void App::State::open_kept(const std::string& id) {
    keeper.flush(session);
    ++waiting;
    platform.load_kept(id, [this](std::optional<StoredDecision> held, const std::string& problem) {
        --waiting;
        fresh_frames = 2;
        started = true;
        if (!held) {
            message = problem.empty() ? "This decision is no longer kept here." : problem;
            if (session.decision().criteria.id.empty()) start_empty();
            return;
        }
        // What comes from the store is as untrusted as a file.
        ReadResult read = read_decision(held->text);
        if (!read.decision) {
            Refusal refused{held->title, {}};
            for (const auto& p : read.problems) refused.reasons.push_back(sentence(p));
            refusal = std::move(refused);
            if (session.decision().criteria.id.empty()) start_empty();
            return;
        }
        open(std::move(*read.decision), held->id, held->revision, held->saved_at);
    });
}

void App::State::show_kept() {
    keeper.flush(session);
    ++waiting;
    platform.list_kept([this](std::vector<KeptDecision> list, const std::string& problem) {
        --waiting;
        fresh_frames = 2;
        if (!problem.empty()) message = problem;
        kept = std::move(list);
        kept_open = true;
    });
}

void App::State::save_file() {
    keeper.save_file(session, [this](const SaveOutcome& outcome) {
        fresh_frames = 2;
        if (outcome.saved) message = "Saved to a file.";
        if (!outcome.saved && !outcome.cancelled) message = "Not saved to a file: " + outcome.problem;
    });
}

void App::State::save_results() {
    const std::string name = steelyard::file_name(session.decision().title, platform.now(), ".results.json");
    ++waiting;
    platform.save_file(name, "application/json", write_results(session.decision(), session.results()),
                       [this](const SaveOutcome& outcome) {
                           --waiting;
                           fresh_frames = 2;
                           if (outcome.saved) message = "The results file is saved.";
                           if (!outcome.saved && !outcome.cancelled) {
                               message = "The results file is not saved: " + outcome.problem;
                           }
                       });
}

void App::State::carry_out(Actions& actions) {
    if (!actions.message.empty()) message = std::move(actions.message);
    if (actions.answering && *actions.answering != answering) {
        if (answering == Answering::alone) {
            opening = *actions.answering;
            handing_to.clear();
        } else {
            change_answering(*actions.answering);
        }
        fresh_frames = 2;
    }
    if (actions.answers.wanted) {
        // Leaving the seat is no question; taking it is.
        if (actions.answers.person.empty())
            seat({});
        else if (actions.answers.person != person)
            handing_to = actions.answers.person;
        opening.reset();
        fresh_frames = 2;
    }
    if (!actions.to_copy.empty()) platform.copy_text(actions.to_copy);
    for (auto& step : actions.steps) apply(std::move(step));
    if (actions.go_to.wanted) {
        room = actions.go_to.room;
        if (!actions.go_to.focus.empty()) rooms[static_cast<std::size_t>(room)]->show(actions.go_to.focus);
        fresh_frames = 2;
    }
    examine(actions.to_examine);
    weigh_disagreements(actions.disagreements_wanted);
}

void App::State::seat(Id next) {
    person = std::move(next);
    handing_to.clear();
    own_steps = own_undone = 0;
    message.clear();
    ui.drafts.clear();
    fresh_frames = 2;
}

void App::State::change_answering(Answering way) {
    sealed_revision = 0;
    answering = way;
    opening.reset();
    seat({});
}

void App::State::examine(const Actions::Examined& wish) {
    if (!wish.wanted) {
        examination.reset();
        return;
    }
    const bool same = examination && examined_revision == session.revision() &&
                      examination->found().set == wish.set && examination->found().by == wish.by;
    if (!same) {
        examination.emplace(session.decision(), session.results(), wish.set, wish.by);
        examined_revision = session.revision();
    }
    // A frame has 16 ms; drawing takes less than half of it.
    constexpr double budget = 6;
    const double begun = platform.milliseconds();
    while (!examination->found().finished && platform.milliseconds() - begun < budget) examination->step();
    if (!examination->found().finished) fresh_frames = 2;
    if (!same) fresh_frames = 2;
}

void App::State::weigh_disagreements(bool wanted) {
    if (!wanted) {
        differing.reset();
        return;
    }
    const bool same = differing && differing_revision == session.revision();
    if (!same) {
        differing.emplace(session.decision(), session.results(), session.cache());
        differing_revision = session.revision();
        all_differing = false;
    }
    if (all_differing) return;
    constexpr double budget = 6; // As for examine().
    const double begun = platform.milliseconds();
    while (!all_differing && platform.milliseconds() - begun < budget) all_differing = !differing->step();
    fresh_frames = 2;
}

void App::State::apply(Actions::Step step) {
    if (keeper.read_only()) return;
    fresh_frames = 2;
    const Applied applied = steelyard::apply(session.decision(), step.edits);
    if (applied.problems.empty() && applied.losses.any() && !asked) {
        asked = AskedStep{std::move(step), sentence(applied.losses)};
        return;
    }
    Stamp when = stamp();
    when.why = std::move(step.why);
    for (auto& edit : step.edits) set_time(edit, when.at);
    const auto outcome = session.apply(step.edits, when, std::move(step.label));
    if (!outcome.problems.empty()) message = sentence(outcome.problems.front());
    if (outcome.changed) {
        ++own_steps;
        own_undone = 0;
        message.clear();
        platform.set_title(session.decision().title);
    }
}

void App::State::undo() {
    if (keeper.read_only()) return;
    fresh_frames = 2;
    const std::string label = session.history().undo_label();
    if (answering == Answering::alone && own_steps == 0) {
        if (!label.empty())
            message = "What was done before the hand-over is not undone while answers are sealed.";
        return;
    }
    if (!session.undo(stamp())) return;
    message = "Undone: " + label;
    --own_steps;
    ++own_undone;
}

void App::State::redo() {
    if (keeper.read_only()) return;
    fresh_frames = 2;
    if (answering == Answering::alone && own_undone == 0) return;
    const std::string label = session.history().redo_label();
    if (!session.redo(stamp())) return;
    message = "Done again: " + label;
    ++own_steps;
    --own_undone;
}

} // namespace steelyard
