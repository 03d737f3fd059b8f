#include <imgui.h>

#include <algorithm>
#include <cmath>

#include "core/decision/lookup.hpp"
#include "core/decision/words.hpp"
#include "core/measure/by_place.hpp"
#include "core/measure/cost_sheet.hpp"
#include "shell/rooms/gauge_answers.hpp"
#include "shell/rooms/gauge_cards.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

/// Takes a finished number into an entry. True if it changed.
bool take(const std::optional<std::optional<double>>& typed, std::optional<double>& into) {
    if (!typed || *typed == into) return false;
    into = *typed;
    return true;
}

bool take(const std::optional<std::string>& typed, std::string& into) {
    if (!typed || *typed == into) return false;
    into = *typed;
    return true;
}

std::string cost_words(const Cost& cost, const std::string& unit) {
    std::string text = figure_text(*cost.value) + " " + (cost.currency.empty() ? unit : cost.currency);
    switch (cost.kind) {
    case CostKind::once: return text + " once";
    case CostKind::per_year: return text + " a year";
    case CostKind::per_part: return text + " a part";
    case CostKind::in_year: break;
    }
    return text + " in year " + std::to_string(cost.year.value_or(0));
}

std::string sheet_words(const CostSheet& sheet) {
    std::string text = std::to_string(sheet.years) + (sheet.years == 1 ? " year" : " years") + " at " +
                       figure_text(100 * sheet.discount) + " %";
    if (sheet.volume) text += ", " + figure_text(*sheet.volume) + " parts a year";
    return text;
}

std::string result_words(CostResult result) {
    return result == CostResult::total      ? "Present value"
           : result == CostResult::per_year ? "A year, at equal rates"
                                            : "A part, at equal rates";
}

/// A long unit stands at the row of the table only.
std::string value_label(const std::string& unit) {
    constexpr std::size_t longest = 7;
    return unit.empty() || unit.size() > longest ? "Value" : "Value, " + unit;
}

class DetailCard {
public:
    DetailCard(Ui& ui, const RoomView& view, Actions& actions, const Row& row, std::size_t option)
        : ui_(ui),
          view_(view),
          actions_(actions),
          row_(row),
          at_(option),
          option_(view.decision.options[option].id),
          name_(cell_name(row, view.decision, option_)) {}

    void draw(Box box) {
        const Card card(ui_, box);
        const auto local = row_.is_must() ? std::nullopt : local_worth(view_.results, row_.id, option_);
        std::string worth;
        if (local && !local->nobody_known)
            worth = (local->stand_in ? "counts as " : "worth ") + worth_text(local->worth);
        const Box inside =
            card_title(ui_, box, option_name(view_.decision, option_) + " \xC2\xB7 " + row_.title,
                       {.mark = at_,
                        .in_play = in_play(view_.results, option_),
                        .right = {worth, local && local->stand_in ? Tone::open : Tone::plain}});
        ScrollArea area(ui_, "gauge-detail", {inside.x - 4, inside.y - 4, inside.w + 8, inside.h + 8});
        const Box inner = area.inner();
        Form form(ui_, view_, actions_, {inner.x + 4, inner.y + 4, inner.w - 8, inside.h});
        // So that a text half typed for one cell never ends up in another.
        ImGui::PushID(name_.data(), name_.data() + name_.size());
        switch (row_.kind) {
        case RowKind::figure: figure(form); break;
        case RowKind::sheet: sheet(form); break;
        case RowKind::grade: grade(form); break;
        case RowKind::pairs: pairs(form); break;
        case RowKind::must_limit: must_limit(form); break;
        case RowKind::must_yes_no: must_yes_no(form); break;
        case RowKind::must_read: must_read(form); break;
        case RowKind::must_node: must_node(form); break;
        case RowKind::section: break;
        }
        ImGui::PopID();
        if (local && local->stand_in) form.sentence(stand_in_words(*local), Tone::open);
        area.reach(form.bottom());
    }

private:
    std::string stand_in_words(const LocalWorth& local) const {
        if (local.nobody_known) return "As long as no option has a worth here, all of them count alike.";
        return "Until its worth is known, " + option_name(view_.decision, option_) + " counts here as " +
               worth_text(local.worth) + ", the mean of the others.";
    }

    std::string name(const char* what) const { return std::string(what) + " of " + name_; }

    bool refused(const std::optional<double>& low, const std::optional<double>& value,
                 const std::optional<double>& high) {
        const std::string problem = range_problem(low, value, high);
        if (!problem.empty()) actions_.say(problem);
        return !problem.empty();
    }

    void figure(Form& form) {
        const Node* leaf = find_node(view_.decision.criteria, row_.id);
        Figure entry = figure_to_change(view_.decision, row_.id, option_);
        const auto value =
            form.number("figure-value", value_label(leaf->unit), name("Value"), entry.value, 0, 3);
        const auto low = form.number("figure-low", "Low", name("Low end"), entry.low, 1, 3);
        const auto high = form.number("figure-high", "High", name("High end"), entry.high, 2, 3);
        static const std::vector<std::string> statuses{"not said", "budget",    "quoted",
                                                       "spoken",   "confirmed", "measured"};
        const auto round = form.number("figure-round", "Round", name("Round"), entry.round, 0, 3);
        const auto status = form.pick("figure-status", "Status", name("Status"), statuses,
                                      static_cast<std::size_t>(entry.status), 1, 3);
        const auto until =
            form.text("figure-until", "Valid until", name("Valid until"), entry.valid_until, 2, 3);
        const auto source = form.text("figure-source", "Source", name("Source"), entry.source);
        const auto note = form.text("figure-note", "Note", name("Note"), entry.note);
        if (value && *value != entry.value &&
            (!*value || !entry.low || !entry.high || **value < *entry.low || **value > *entry.high)) {
            // Another quote: what was said of the one before does not hold for it.
            actions_.edit(Enter<Figure>{typed_figure(view_.decision, row_.id, option_, *value)});
        } else {
            bool changed = take(value, entry.value);
            changed = take(low, entry.low) || changed;
            changed = take(high, entry.high) || changed;
            changed = take(until, entry.valid_until) || changed;
            changed = take(source, entry.source) || changed;
            changed = take(note, entry.note) || changed;
            if (status) {
                entry.status = static_cast<QuoteStatus>(*status);
                changed = true;
            }
            if (round) changed = take_round(*round, entry) || changed;
            if (changed && !refused(entry.low, entry.value, entry.high))
                actions_.edit(Enter<Figure>{std::move(entry)});
        }
        history(form);
    }

    bool take_round(std::optional<double> typed, Figure& entry) {
        if (typed && (*typed < 1 || *typed > 1e6 || *typed != std::floor(*typed))) {
            actions_.say("A round is a whole number from 1.");
            return false;
        }
        const auto round = typed ? std::optional(static_cast<int>(*typed)) : std::nullopt;
        const bool changed = round != entry.round;
        entry.round = round;
        return changed;
    }

    void history(Form& form) {
        const Figure* now = standing_figure(view_.decision, row_.id, option_);
        const std::string& by = view_.decision.decide_by;
        if (now != nullptr && !now->valid_until.empty() && !by.empty() && now->valid_until < by)
            form.sentence("Runs out before the day of the decision, " + by + ".", Tone::open);
        for (const Figure* before : superseded(view_.decision, row_.id, option_)) {
            std::string when = before->round ? "Round " + std::to_string(*before->round) : "Earlier";
            if (before->status != QuoteStatus::unstated) when += ", " + std::string(word(before->status));
            form.fact(when, figure_text(*before->value) + " (superseded)");
        }
    }

    void sheet(Form& form) {
        const Node* leaf = find_node(view_.decision.criteria, row_.id);
        form.sentence(sheet_words(*leaf->cost_sheet));
        const ByPlace<Cost> costs(view_.decision.costs);
        const auto lines = standing_costs(costs.at(row_.id, option_));
        for (const Cost* line : lines) form.fact(line->line, cost_words(*line, leaf->unit));
        if (const auto total = figure_of(view_, *leaf, option_)) {
            form.space(4);
            form.fact(result_words(leaf->cost_sheet->result),
                      figure_text(*total, std::abs(*total) >= 1000 ? 0 : 2) + " " + leaf->unit);
        } else {
            form.sentence("The sheet gives no figure yet.", Tone::open);
        }
    }

    void grade(Form& form) {
        const Answers answers = answers_of(view_, row_, option_);
        const std::string who =
            view_.person.empty() ? "Agreed grade" : "Grade by " + person_name(view_.decision, view_.person);
        const std::size_t none = answers.labels.size() - 1;
        if (const auto answer = form.pick("grade-pick", who, who + ": " + name_, answers.labels,
                                          answers.standing.value_or(none)))
            enter_answer(view_, actions_, row_, option_, *answer);
        if (answers.standing) {
            GradeEntry entry = grade_to_change(view_.decision, row_.id, option_, view_.person);
            bool changed =
                take(form.text("grade-source", "Source", name("Source"), entry.source), entry.source);
            changed =
                take(form.text("grade-note", "Reason", name("Reason"), entry.note), entry.note) || changed;
            if (changed) actions_.edit(Enter<GradeEntry>{std::move(entry)});
        }
        if (!view_.person.empty()) return;
        const Node* leaf = find_node(view_.decision.criteria, row_.id);
        for (const auto& person : view_.decision.people) {
            const GradeEntry* entry = standing_grade(view_.decision, row_.id, option_, person.id);
            if (entry == nullptr) continue;
            const Grade* given = find_grade(*leaf, entry->grade);
            form.fact(person_name(view_.decision, person.id), given->name.empty() ? given->id : given->name);
            if (!entry->note.empty()) form.sentence(entry->note);
        }
    }

    void pairs(Form& form) {
        form.sentence(in_play(view_.results, option_)
                          ? "Its worth follows from the comparisons with the other options."
                          : "It takes no part in the comparisons.");
        if (form.link("detail-weigh", "Compare in Weigh")) actions_.go(RoomId::weigh, row_.id);
    }

    void state(Form& form) {
        const auto found =
            std::find_if(view_.results.musts.begin(), view_.results.musts.end(), [&](const MustResult& r) {
                return r.requirement == row_.id && r.option == option_;
            });
        if (found == view_.results.musts.end()) return;
        const bool out =
            std::any_of(view_.results.excluded.begin(), view_.results.excluded.end(),
                        [&](const Exclusion& e) { return e.requirement == row_.id && e.option == option_; });
        form.fact("Stands as", must_words(found->state) + (out ? ", excluded by it" : ""),
                  must_tone(found->state));
        if (found->state == MustState::undecided)
            form.sentence("The range reaches over the limit.", Tone::open);
    }

    void must_limit(Form& form) {
        const Requirement* must = find_requirement(view_.decision, row_.id);
        state(form);
        Check entry = check_to_change(view_.decision, row_.id, option_, view_.person);
        const auto value =
            form.number("check-value", value_label(must->unit), name("Value"), entry.value, 0, 3);
        const auto low = form.number("check-low", "Low", name("Low end"), entry.low, 1, 3);
        const auto high = form.number("check-high", "High", name("High end"), entry.high, 2, 3);
        const auto source = form.text("check-source", "Source", name("Source"), entry.source);
        bool changed = take(value, entry.value);
        changed = take(low, entry.low) || changed;
        changed = take(high, entry.high) || changed;
        changed = take(source, entry.source) || changed;
        if (changed && !refused(entry.low, entry.value, entry.high))
            actions_.edit(Enter<Check>{std::move(entry)});
        checked_by(form);
    }

    void must_yes_no(Form& form) {
        const Answers answers = answers_of(view_, row_, option_);
        const std::size_t none = answers.labels.size() - 1;
        if (const auto answer = form.pick("check-state", "State", name("State"), answers.labels,
                                          answers.standing.value_or(none)))
            enter_answer(view_, actions_, row_, option_, *answer);
        Check entry = check_to_change(view_.decision, row_.id, option_, view_.person);
        bool changed =
            take(form.text("check-source", "Evidence", name("Evidence"), entry.source), entry.source);
        changed = take(form.text("check-note", "Note", name("Note"), entry.note), entry.note) || changed;
        if (changed) actions_.edit(Enter<Check>{std::move(entry)});
        state(form);
        checked_by(form);
    }

    void checked_by(Form& form) {
        const Check* check = standing_check(view_.decision, row_.id, option_);
        if (check != nullptr && !check->by.empty())
            form.fact("Entered by", person_name(view_.decision, check->by));
    }

    void must_read(Form& form) {
        const Requirement* must = find_requirement(view_.decision, row_.id);
        state(form);
        form.sentence("Read from the figures of " + node_name(view_.decision, must->criterion) + ".");
        if (form.link("must-figure", "Go to that figure")) actions_.go(RoomId::gauge, must->criterion);
    }

    void must_node(Form& form) {
        const Requirement* must = find_requirement(view_.decision, row_.id);
        state(form);
        form.sentence("Checked against the worth of " + node_name(view_.decision, must->node) +
                      ", from 0 to 1, among the options that meet all other musts.");
    }

    Ui& ui_;
    const RoomView& view_;
    Actions& actions_;
    const Row& row_;
    std::size_t at_;
    const Id& option_;
    std::string name_;
};

} // namespace

void draw_detail_card(Ui& ui, const RoomView& view, Actions& actions, const Row& row, std::size_t option,
                      Box box) {
    DetailCard(ui, view, actions, row, option).draw(box);
}

} // namespace steelyard::gauge
