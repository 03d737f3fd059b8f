#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/gauge_answers.hpp"
#include "shell/rooms/gauge_cards.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/rooms/gauge_table.hpp"
#include "shell/rooms/room.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

using namespace gauge;

constexpr float heading_height = 30;
constexpr float gap = 12;
/// Below this the room as a whole is scrolled, so that neither table nor cards become slits.
constexpr float lowest_room = 470;
constexpr float narrowest_side_by_side = 640;
constexpr float lowest_table = 260;
constexpr float slit = 160;
constexpr float lowest_cards = 216;
constexpr float highest_cards = 340;

class GaugeRoom : public Room {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, Box area) override {
        update(view);
        Box inside = area;
        const bool stacked = inside.w < narrowest_side_by_side;
        if (inside.h >= lowest_room && !stacked) {
            draw_heading(ui, view, inside.take_top(heading_height, 8));
            const Box cards =
                inside.take_bottom(std::clamp(0.38F * inside.h, lowest_cards, highest_cards), gap);
            draw_main(ui, view, actions, inside, cards);
            return;
        }
        ScrollArea scroll(ui, "gauge-room", area);
        const Box inner = scroll.inner();
        Box page{inner.x, inner.y, inner.w, 1e5F};
        draw_heading(ui, view, page.take_top(heading_height, 8));
        const Box table = page.take_top(table_height(area.h), gap);
        const Box cards = page.take_top(stacked ? 2 * lowest_cards + gap : lowest_cards, gap);
        draw_main(ui, view, actions, table, cards);
        scroll.reach(page.y);
    }

    void show(const Id& id) override { wanted_ = id; }

    /// A single value onto the chosen cell.
    bool paste(const std::string& text, const RoomView& view, Actions& actions) override {
        update(view);
        const auto now = chosen(model_, view.decision, table_);
        if (!now || view.read_only || !model_.rows[now->row].typed()) return false;
        std::string value = text;
        while (!value.empty() && (value.back() == '\n' || value.back() == '\r')) value.pop_back();
        if (value.empty() || value.find_first_of("\n\t") != std::string::npos) return false;
        if (const auto problem = enter_text(view, actions, model_.rows[now->row], table_.option, value))
            actions.say(*problem);
        return true;
    }

    void reset() override { *this = GaugeRoom(); }

private:
    /// On a low page the whole table at most, so that its head stays in sight with the rows.
    static float table_height(float page) {
        return std::min(std::max(lowest_table, 0.7F * page), std::max(slit, page));
    }

    void update(const RoomView& view) {
        if (model_of_ != view.revision || person_ != view.person) {
            model_ = make_model(view);
            model_of_ = view.revision;
            person_ = view.person;
        }
        if (!wanted_.empty()) {
            show_now(view.decision, wanted_);
            wanted_.clear();
        }
        if (!chosen(model_, view.decision, table_)) choose_something(view.decision);
    }

    void show_now(const Decision& decision, const Id& id) {
        if (decision.options.empty()) return;
        if (find_option(decision, id) != nullptr) {
            table_.option = id;
            table_.reveal = true;
        } else if (!choose_row(model_, decision, table_, id, false)) {
            choose_row(model_, decision, table_, id, true);
        }
    }

    /// The first open cell, or the first of all, so that the cards below have something to show.
    void choose_something(const Decision& decision) {
        if (decision.options.empty()) return;
        const auto first = [&](auto fits) {
            return std::find_if(model_.rows.begin(), model_.rows.end(),
                                [&](const Row& row) { return !row.cells.empty() && fits(row); });
        };
        auto row = first([](const Row& r) {
            return std::any_of(r.cells.begin(), r.cells.end(), [](const Cell& cell) { return cell.open; });
        });
        if (row == model_.rows.end()) row = first([](const Row&) { return true; });
        if (row == model_.rows.end()) return;
        choose_row(model_, decision, table_, row->id, row->is_must());
        table_.take_keyboard = false;
        table_.reveal = false; // What one comes upon is the top of the table.
    }

    static void draw_heading(Ui& ui, const RoomView& view, const Box& line) {
        const auto title = draw_text(ui, {line.x + 4, line.y + 4}, "Quotes, figures, grades and musts",
                                     {.font = Font::heading, .max_width = line.w - 8});
        std::string hint = "Type a number onto a cell; Enter or Tab goes on";
        if (view.read_only) {
            hint = "Open for reading only";
        } else if (!view.person.empty()) {
            hint = "Grades go in as " + person_name(view.decision, view.person) + "'s";
        }
        const float room = line.w - title.x - 32;
        if (text_size(Font::small, hint).x <= room)
            draw_text(ui, {line.right() - 4, line.y + 10}, hint,
                      {.font = Font::small, .ink = ui.look().quiet, .align = Align::right});
    }

    void draw_main(Ui& ui, const RoomView& view, Actions& actions, const Box& table, Box cards) {
        const auto now = chosen(model_, view.decision, table_);
        if (!now) {
            draw_nothing(ui, view, actions, {table.x, table.y, table.w, cards.bottom() - table.y});
            return;
        }
        // By value: the table may move the choice, and the cards are to show the one it was drawn with.
        const Place shown = *now;
        draw_table(ui, view, actions, model_, table_, table);
        const bool stacked = cards.w < narrowest_side_by_side;
        const Box left =
            stacked ? cards.take_top((cards.h - gap) / 2, gap) : cards.take_left(0.56F * cards.w, gap);
        const Row& row = model_.rows[shown.row];
        draw_left(ui, view, actions, row, view.decision.options[shown.option].id, left);
        draw_detail_card(ui, view, actions, row, shown.option, cards);
    }

    static void draw_left(Ui& ui, const RoomView& view, Actions& actions, const Row& row, const Id& option,
                          Box box) {
        if (row.is_must()) {
            draw_must_card(ui, view, actions, *find_requirement(view.decision, row.id), option, box);
            return;
        }
        const Node& leaf = *find_node(view.decision.criteria, row.id);
        if (row.kind == RowKind::grade) {
            draw_grades_card(ui, view, actions, leaf, box);
        } else if (row.kind == RowKind::pairs) {
            draw_pairs_card(ui, view, actions, leaf, box);
        } else {
            draw_curve_card(ui, view, actions, leaf, option, box);
        }
    }

    static void draw_nothing(Ui& ui, const RoomView& view, Actions& actions, const Box& box) {
        const Card card(ui, box);
        const Box inside = box.inset(20);
        const bool options = !view.decision.options.empty();
        const float height =
            draw_paragraph(ui, inside.at(), inside.w,
                           options ? "There is no criterion yet on which the options could be rated."
                                   : "There are no options yet whose figures could be entered.",
                           {.ink = ui.look().quiet});
        Form form(ui, view, actions, {inside.x, inside.y + height + 8, inside.w, 0});
        if (form.link("to-frame", options ? "Add criteria in Frame" : "Add options in Frame"))
            actions.go(RoomId::frame);
    }

    Model model_;
    std::uint64_t model_of_ = 0; ///< The revision the model was made of; none yet.
    Id person_;
    TableState table_;
    Id wanted_;
};

} // namespace

std::unique_ptr<Room> make_gauge_room() {
    return std::make_unique<GaugeRoom>();
}

} // namespace steelyard
