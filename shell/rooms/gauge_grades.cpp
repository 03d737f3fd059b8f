#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/gauge_cards.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/icon_button.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

constexpr float line_height = 40;
constexpr float worth_width = 76;
constexpr float weight_width = 94;
constexpr float mark_size = 20;

/// Options whose agreed grade is this one, or on which somebody gave it while none is agreed. A person who
/// answers for himself sees his own only.
std::vector<std::size_t> options_at(const RoomView& view, const Id& leaf, const Id& grade) {
    std::vector<std::size_t> found;
    for (std::size_t o = 0; o < view.decision.options.size(); ++o) {
        const Id& option = view.decision.options[o].id;
        bool here = false;
        if (const GradeEntry* agreed = standing_grade(view.decision, leaf, option, {})) {
            here = agreed->grade == grade;
        } else if (!view.person.empty()) {
            const GradeEntry* own = standing_grade(view.decision, leaf, option, view.person);
            here = own != nullptr && own->grade == grade;
        } else {
            here = std::any_of(
                view.decision.people.begin(), view.decision.people.end(), [&](const Person& person) {
                    const GradeEntry* entry = standing_grade(view.decision, leaf, option, person.id);
                    return entry != nullptr && entry->grade == grade;
                });
        }
        if (here) found.push_back(o);
    }
    return found;
}

class GradesCard {
public:
    GradesCard(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf)
        : ui_(ui), view_(view), actions_(actions), leaf_(leaf) {}

    void draw(Box box) {
        const Card card(ui_, box);
        const Box inside =
            card_title(ui_, box, "What the grades are worth: " + node_name(view_.decision, leaf_.id));
        ScrollArea area(ui_, "gauge-grades", {inside.x - 4, inside.y - 4, inside.w + 8, inside.h + 8});
        const Box inner = area.inner();
        Box line{inner.x + 4, inner.y + 4, inner.w - 8, 32};
        for (std::size_t i = 0; i < leaf_.grades.size(); ++i) {
            draw_grade(i, line);
            line.y += line_height;
        }
        Form form(ui_, view_, actions_, {line.x, line.y, line.w, 0});
        if (form.press("grade-add", "Add a grade")) add();
        if (leaf_.worths == WorthsBy::pairs) {
            if (form.link("grades-in-weigh", "Weigh the grades in Weigh"))
                actions_.go(RoomId::weigh, leaf_.id);
            if (!view_.read_only && form.link("grades-typed", "Type their worths instead"))
                weigh_by(WorthsBy::given);
        } else if (leaf_.grades.size() >= 2 && !view_.read_only &&
                   form.link("grades-paired", "Weigh the grades in pairs instead")) {
            weigh_by(WorthsBy::pairs);
        }
        area.reach(form.bottom());
    }

private:
    void change(Node node) { actions_.edit(ChangeNode{std::move(node)}); }

    void weigh_by(WorthsBy by) {
        Node node = leaf_;
        node.worths = by;
        change(std::move(node));
    }

    void add() {
        Node node = leaf_;
        const auto taken = [&](const Id& id) { return find_grade(leaf_, id) != nullptr; };
        node.grades.push_back({.id = fresh_id("g1", taken), .name = "new grade"});
        ui_.focus_next = "grade-name/" + node.grades.back().id;
        change(std::move(node));
    }

    void draw_grade(std::size_t i, Box line) {
        const Grade& grade = leaf_.grades[i];
        const std::string shown = grade.name.empty() ? grade.id : grade.name;
        const auto here = options_at(view_, leaf_.id, grade.id);
        const Box remove = line.take_right(24, 8);
        Box worth = line.take_right(leaf_.worths == WorthsBy::pairs ? weight_width : worth_width, 10);
        const float marks = std::min(static_cast<float>(here.size()) * (mark_size + 3), 0.4F * line.w);
        Box place = line.take_right(marks, 8);
        if (view_.read_only) {
            draw_text(ui_, {line.x, line.y + 6}, shown, {.max_width = line.w});
        } else if (const auto name = text_field(ui_, "grade-name/" + grade.id, "Name of grade " + shown,
                                                grade.name, line)) {
            Node node = leaf_;
            node.grades[i].name = *name;
            change(std::move(node));
        }
        for (const std::size_t o : here) {
            if (place.w < mark_size) break;
            option_mark(ui_, {place.x, place.y + 6}, o, in_play(view_.results, view_.decision.options[o].id),
                        mark_size);
            place.take_left(mark_size, 3);
        }
        draw_worth(i, shown, worth);
        if (icon_button(ui_, "grade-remove/" + grade.id, "Remove grade " + shown,
                        {remove.x, remove.y + 4, 24, 24}, Icon::remove, !view_.read_only)) {
            Node node = leaf_;
            node.grades.erase(node.grades.begin() + static_cast<std::ptrdiff_t>(i));
            change(std::move(node));
        }
    }

    void draw_worth(std::size_t i, const std::string& shown, const Box& box) {
        const Grade& grade = leaf_.grades[i];
        if (leaf_.worths == WorthsBy::pairs || view_.read_only) {
            const auto worth = leaf_.worths == WorthsBy::pairs ? weight_of(grade.id) : grade.worth;
            const std::string text = !worth                            ? "open"
                                     : leaf_.worths == WorthsBy::pairs ? "weighs " + worth_text(*worth)
                                                                       : worth_text(*worth);
            draw_text(ui_, {box.right(), box.y + 6}, text,
                      {.ink = worth ? ui_.look().ink : ui_.look().brass_ink,
                       .max_width = box.w,
                       .align = Align::right});
            return;
        }
        const auto typed = text_field(ui_, "grade-worth/" + grade.id, "Worth of grade " + shown,
                                      grade.worth ? figure_text(*grade.worth) : "", box, "open");
        if (!typed) return;
        Node node = leaf_;
        if (typed->find_first_not_of(" \t") == std::string::npos) {
            node.grades[i].worth.reset();
        } else {
            const auto number = read_number(*typed);
            if (!number || *number < 0 || *number > 1) {
                actions_.say("The worth of a grade lies between 0 and 1.");
                return;
            }
            node.grades[i].worth = number;
        }
        change(std::move(node));
    }

    /// What a grade weighs among the grades of its leaf.
    std::optional<double> weight_of(const Id& grade) const {
        for (const auto& set : view_.results.sets) {
            if (set.set != leaf_.id || !set.by.empty() || !set.weights) continue;
            const auto at = std::find(set.items.begin(), set.items.end(), grade);
            if (at != set.items.end())
                return (*set.weights)[static_cast<std::size_t>(at - set.items.begin())];
        }
        return std::nullopt;
    }

    Ui& ui_;
    const RoomView& view_;
    Actions& actions_;
    const Node& leaf_;
};

} // namespace

void draw_grades_card(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf, Box box) {
    GradesCard(ui, view, actions, leaf).draw(box);
}

void draw_pairs_card(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf, Box box) {
    const Card card(ui, box);
    const Box inside = card_title(ui, box, "Judged in pairs: " + node_name(view.decision, leaf.id));
    ScrollArea area(ui, "gauge-pairs", {inside.x - 4, inside.y - 4, inside.w + 8, inside.h + 8});
    const Box inner = area.inner();
    Box line{inner.x + 4, inner.y + 4, inner.w - 8, 24};
    for (std::size_t o = 0; o < view.decision.options.size(); ++o) {
        const Option& option = view.decision.options[o];
        const auto local = local_worth(view.results, leaf.id, option.id);
        option_mark(ui, {line.x, line.y + 1}, o, local.has_value());
        Box rest = line;
        rest.take_left(22, 8);
        const Box name = rest.take_left(std::min(140.0F, 0.4F * rest.w), 8);
        const Box number = rest.take_right(44, 8);
        draw_text(ui, {name.x, name.y + 3}, option_name(view.decision, option.id),
                  {.ink = local ? ui.look().ink : ui.look().quiet, .max_width = name.w});
        if (local && !local->stand_in) {
            bar(ui, {rest.x, rest.y + 8, rest.w, 8}, static_cast<float>(local->worth),
                option_colour(ui.look(), o));
            draw_text(ui, {number.right(), number.y + 3}, worth_text(local->worth), {.align = Align::right});
        } else {
            draw_text(ui, {number.right(), number.y + 3}, local ? "open" : "\xE2\x80\x93",
                      {.ink = local ? ui.look().brass_ink : ui.look().quiet, .align = Align::right});
        }
        line.y += 30;
    }
    Form form(ui, view, actions, {line.x, line.y + 4, line.w, 0});
    if (form.link("compare-in-weigh", "Compare the options in Weigh")) actions.go(RoomId::weigh, leaf.id);
    if (form.link("rate-in-frame", "Rate otherwise in Frame")) actions.go(RoomId::frame, leaf.id);
    area.reach(form.bottom());
}

} // namespace steelyard::gauge
