#include "shell/rooms/gauge_answers.hpp"

#include <algorithm>
#include <array>

#include "core/decision/lookup.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

constexpr std::array states{CheckState::met, CheckState::failed, CheckState::asked, CheckState::unstated};

std::optional<double> standing_value(const RoomView& view, const Row& row, const Id& option) {
    if (row.kind == RowKind::figure) {
        const Figure* figure = standing_figure(view.decision, row.id, option);
        return figure != nullptr ? figure->value : std::nullopt;
    }
    const Check* check = standing_check(view.decision, row.id, option);
    return check != nullptr ? check->value : std::nullopt;
}

void enter_value(const RoomView& view, Actions& actions, const Row& row, const Id& option,
                 std::optional<double> value) {
    if (value == standing_value(view, row, option)) return;
    if (row.kind == RowKind::figure) {
        actions.edit(Enter<Figure>{typed_figure(view.decision, row.id, option, value)});
    } else {
        actions.edit(
            Enter<Check>{Check{.requirement = row.id, .option = option, .value = value, .by = view.person}});
    }
}

} // namespace

std::optional<std::string> enter_text(const RoomView& view, Actions& actions, const Row& row,
                                      const Id& option, const std::string& text) {
    if (text.find_first_not_of(" \t") == std::string::npos) {
        enter_value(view, actions, row, option, std::nullopt);
        return std::nullopt;
    }
    if (text == typed_text(view, row, option)) return std::nullopt; // Its last digits may not show.
    const auto number = read_number(text);
    if (!number)
        return "\xE2\x80\x9C" + text + "\xE2\x80\x9D is not a number. Type one like 61,500 or 61500 EUR.";
    enter_value(view, actions, row, option, number);
    return std::nullopt;
}

void clear_cell(const RoomView& view, Actions& actions, const Row& row, const Id& option) {
    if (row.typed()) {
        enter_value(view, actions, row, option, std::nullopt);
    } else if (row.picked()) {
        enter_answer(view, actions, row, option, answers_of(view, row, option).labels.size() - 1);
    }
}

Answers answers_of(const RoomView& view, const Row& row, const Id& option) {
    if (row.kind == RowKind::must_yes_no) {
        Answers answers{{"met", "failed", "asked", "not checked"}, std::nullopt};
        if (const Check* check = standing_check(view.decision, row.id, option)) {
            const auto at = std::find(states.begin(), states.end(), check->state);
            answers.standing = static_cast<std::size_t>(at - states.begin());
        }
        return answers;
    }
    Answers answers;
    const Node* leaf = find_node(view.decision.criteria, row.id);
    const GradeEntry* entry = standing_grade(view.decision, row.id, option, view.person);
    for (const auto& grade : leaf->grades) {
        if (entry != nullptr && entry->grade == grade.id) answers.standing = answers.labels.size();
        answers.labels.push_back(grade.name.empty() ? grade.id : grade.name);
    }
    answers.labels.push_back(view.person.empty() ? "no agreed grade" : "no grade");
    return answers;
}

void enter_answer(const RoomView& view, Actions& actions, const Row& row, const Id& option,
                  std::size_t answer) {
    const auto answers = answers_of(view, row, option);
    const std::size_t none = answers.labels.size() - 1;
    if (answer > none || answer == answers.standing.value_or(none)) return;
    if (row.kind == RowKind::must_yes_no) {
        Check check{.requirement = row.id, .option = option, .state = states[answer], .by = view.person};
        actions.edit(Enter<Check>{std::move(check)});
        return;
    }
    const Node* leaf = find_node(view.decision.criteria, row.id);
    GradeEntry entry{.criterion = row.id, .option = option, .by = view.person};
    if (answer < none) entry.grade = leaf->grades[answer].id;
    actions.edit(Enter<GradeEntry>{std::move(entry)});
}

std::string typed_text(const RoomView& view, const Row& row, const Id& option) {
    const auto value = standing_value(view, row, option);
    return value ? figure_text(*value) : std::string{};
}

} // namespace steelyard::gauge
