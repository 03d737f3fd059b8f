#include "shell/rooms/gauge_table.hpp"

#include <imgui.h>

#include <algorithm>
#include <cmath>

#include "core/decision/lookup.hpp"
#include "shell/rooms/gauge_answers.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard::gauge {
namespace {

constexpr float header_height = 44;
constexpr float section_height = 26;
constexpr float row_height = 50;
constexpr float narrowest_head = 190;
constexpr float widest_head = 330;
constexpr float narrowest_column = 124;
constexpr float padding = 16;

class Table {
public:
    Table(Ui& ui, const RoomView& view, Actions& actions, const Model& model, TableState& state)
        : ui_(ui), view_(view), actions_(actions), model_(model), state_(state), theme_(ui.look()) {}

    void draw(Box box) {
        const Card card(ui_, box);
        ScrollArea area(ui_, "gauge-table", box.inset(1));
        place(area);
        area.reach(origin_.y + tops_.back());
        area.reach_right(origin_.x + head_ + column_ * static_cast<float>(columns()));
        const auto now = chosen(model_, view_.decision, state_);
        if (now && state_.reveal) {
            scroll_into_sight(cell_box(*now), head_, header_height);
            state_.reveal = false;
        }
        draw_bands();
        draw_cells(now);
        draw_heads();
        draw_header();
    }

private:
    std::size_t columns() const { return view_.decision.options.size(); }

    void place(const ScrollArea& area) {
        origin_ = area.inner();
        sight_ = area_in_sight();
        head_ = std::floor(std::clamp(0.3F * sight_.w, narrowest_head, widest_head));
        const float room = (sight_.w - head_) / static_cast<float>(std::max<std::size_t>(columns(), 1));
        column_ = std::floor(std::max(narrowest_column, room));
        float y = header_height;
        for (const auto& row : model_.rows) {
            tops_.push_back(y);
            y += row.kind == RowKind::section ? section_height
                                              : row_height + (three_lines(row) ? third_line : 0);
        }
        tops_.push_back(y);
    }

    /// The width that texts of a cell may take.
    float text_width() const { return column_ - 6 - 11; }

    float head_text_width() const { return head_ - padding - 10; }

    bool three_lines(const Row& row) const {
        const bool long_answer =
            row.picked() && std::any_of(row.cells.begin(), row.cells.end(), [&](const Cell& cell) {
                return text_size(Font::strong, cell.main.text).x > text_width();
            });
        return row.has_ranges || long_answer || text_size(Font::body, row.title).x > head_text_width();
    }

    float top(std::size_t row) const { return origin_.y + tops_[row]; }
    float height(std::size_t row) const { return tops_[row + 1] - tops_[row]; }
    bool in_sight(std::size_t row) const {
        return top(row) < sight_.bottom() && top(row) + height(row) > sight_.y + header_height;
    }
    Box cell_box(const Place& at) const {
        return {origin_.x + head_ + column_ * static_cast<float>(at.option), top(at.row), column_,
                height(at.row)};
    }
    Box body() const {
        return {sight_.x + head_, sight_.y + header_height, sight_.w - head_, sight_.h - header_height};
    }

    static void clip(const Box& box) { ImGui::PushClipRect(box.at(), box.end(), true); }

    void draw_bands() {
        clip({sight_.x, sight_.y + header_height, sight_.w, sight_.h});
        for (std::size_t r = 0; r < model_.rows.size(); ++r) {
            if (!in_sight(r)) continue;
            const float y = top(r);
            if (model_.rows[r].kind == RowKind::section) {
                ImGui::GetWindowDrawList()->AddRectFilled({sight_.x, y}, {sight_.right(), y + section_height},
                                                          theme_.rail);
                const OnPaper paper(ui_, theme_.rail);
                draw_text(ui_, {sight_.x + padding, y + (section_height - font_size(Font::strong)) / 2},
                          model_.rows[r].title,
                          {.font = Font::strong, .ink = theme_.quiet, .max_width = sight_.w - 2 * padding});
            } else {
                rule(ui_, sight_.x, y + height(r) - 1, sight_.w);
            }
        }
        ImGui::PopClipRect();
    }

    void draw_cells(const std::optional<Place>& now) {
        clip(body());
        const bool choices_were_asked = state_.open_choices;
        if (now && state_.editing)
            draw_editor(*now);
        else
            state_.editing = false;
        if (now && model_.rows[now->row].picked())
            draw_choices(*now);
        else if (choices_were_asked)
            state_.open_choices = false;
        const GridInput input = grid_input(ui_, "gauge-grid", body(), state_.take_keyboard);
        state_.take_keyboard = false;
        const auto under = input.hovered ? at(*input.hovered) : std::nullopt;
        for (std::size_t r = 0; r < model_.rows.size(); ++r) {
            if (model_.rows[r].cells.empty() || !in_sight(r)) continue;
            for (std::size_t o = 0; o < columns(); ++o)
                draw_cell({r, o}, now && now->row == r && now->option == o,
                          under && under->row == r && under->option == o, input.focused);
        }
        act(input, now);
        ImGui::PopClipRect();
    }

    void draw_cell(const Place& where, bool is_chosen, bool hovered, bool focused) {
        const Box box = cell_box(where);
        if (box.right() < sight_.x + head_ || box.x > sight_.right()) return;
        const Row& row = model_.rows[where.row];
        const Cell& cell = row.cells[where.option];
        const Option& option = view_.decision.options[where.option];
        const Box frame{box.x + 3, box.y + 3, box.w - 6, box.h - 7};
        ImDrawList* list = ImGui::GetWindowDrawList();
        const ImU32 ground = is_chosen ? theme_.brass_wash : cell.open ? theme_.paper : theme_.card;
        const bool edited = is_chosen && state_.editing; // Its field is drawn already.
        if (!edited && (is_chosen || cell.open)) {
            list->AddRectFilled(frame.at(), frame.end(), ground, 5);
            list->AddRect(frame.at(), frame.end(), theme_.brass, 5, 0, is_chosen ? 2.0F : 1.0F);
        }
        if (hovered && !is_chosen) list->AddRectFilled(frame.at(), frame.end(), theme_.hover, 5);
        if (!edited) {
            const OnPaper paper(ui_, ground);
            draw_cell_text(ui_, cell,
                           {.frame = frame,
                            .width = text_width(),
                            .strong = is_chosen,
                            .greyed = !model_.columns[where.option].out.empty(),
                            .two_lines = row.picked()});
        }
        if (!edited && is_chosen && focused && ui_.keyboard_used) cell_ring(ui_, frame);

        LedgerItem item;
        item.id = cell_id(row, option.id);
        item.label = cell_name(row, view_.decision, option.id);
        item.role = "gridcell";
        item.value = cell.main.text;
        for (const std::string* more : {&cell.change, &cell.range, &cell.small.text}) {
            if (!more->empty()) item.value += ", " + *more;
        }
        item.at = box.at();
        item.size = {box.w, box.h};
        item.enabled = !view_.read_only;
        item.focused = is_chosen && focused;
        item.may_scroll = true;
        ui_.ledger.add(std::move(item));
    }

    void draw_heads() {
        clip({sight_.x, sight_.y + header_height, head_, sight_.h});
        ImGui::PushTabStop(false); // The table is one stop for Tab, and the arrow keys reach every row.
        for (std::size_t r = 0; r < model_.rows.size(); ++r) {
            const Row& row = model_.rows[r];
            if (row.kind == RowKind::section || !in_sight(r)) continue;
            const Box box{sight_.x, top(r), head_, height(r)};
            if (press_area(ui_, (row.is_must() ? "must-row/" : "row/") + row.id, row.title,
                           {box.x + 3, box.y + 3, box.w - 6, box.h - 7}, "rowheader", row.detail.text)) {
                choose_row(model_, view_.decision, state_, row.id, row.is_must());
            }
            const float width = head_text_width();
            const float line = font_size(Font::body);
            const auto lines = two_lines(Font::body, row.title, width);
            float y = box.y + (box.h - line - third_line - (lines[1].empty() ? 0 : line)) / 2 - 1;
            for (const auto& text : lines) {
                draw_text(ui_, {box.x + padding, y}, text, {.max_width = width});
                y += text.empty() ? 0 : line;
            }
            draw_text(ui_, {box.x + padding, y + 1}, row.detail.text,
                      {.font = Font::small, .ink = ink_of(theme_, row.detail.tone), .max_width = width});
        }
        ImGui::PopTabStop();
        ImGui::PopClipRect();
    }

    void draw_header() {
        clip({sight_.x + head_, sight_.y, sight_.w - head_, header_height});
        for (std::size_t o = 0; o < columns(); ++o) {
            const Box box{origin_.x + head_ + column_ * static_cast<float>(o), sight_.y, column_,
                          header_height};
            if (box.right() < sight_.x + head_ || box.x > sight_.right()) continue;
            const std::string& out = model_.columns[o].out;
            option_mark(ui_, {box.x + 12, box.y + 12}, o, out.empty());
            const float x = box.x + 12 + 22 + 8;
            const float width = box.right() - x - 4;
            const float y = out.empty() ? box.y + 13 : box.y + 6;
            draw_text(
                ui_, {x, y}, option_name(view_.decision, view_.decision.options[o].id),
                {.font = Font::strong, .ink = out.empty() ? theme_.ink : theme_.quiet, .max_width = width});
            draw_text(ui_, {x, y + font_size(Font::strong)}, out,
                      {.font = Font::small, .ink = theme_.quiet, .max_width = width});
        }
        ImGui::PopClipRect();
        rule(ui_, sight_.x, sight_.y + header_height - 1, sight_.w);
    }

    void draw_editor(const Place& now) {
        const Row& row = model_.rows[now.row];
        const Box box = cell_box(now);
        const CellLeft left = cell_editor(ui_, state_.edit, cell_name(row, view_.decision, state_.option),
                                          {box.x + 3, box.y + 3, box.w - 6, box.h - 7});
        if (left == CellLeft::not_yet) return;
        if (left != CellLeft::cancelled) {
            const auto problem = enter_text(view_, actions_, row, state_.option, state_.edit.text);
            if (problem) {
                actions_.say(*problem);
                // Left by the pointer, it is dropped: the press meant something else.
                if (left != CellLeft::away) {
                    state_.edit.wrong = true;
                    state_.edit.caret_at_end = true;
                    begin_cell_edit(state_.edit);
                    return;
                }
            }
        }
        state_.editing = false;
        state_.take_keyboard = left != CellLeft::away;
        if (left == CellLeft::down || left == CellLeft::up)
            choose_cell(moved(model_, now, 0, left == CellLeft::down ? 1 : -1));
        if (left == CellLeft::right || left == CellLeft::left)
            choose_cell(moved_on(model_, now, left == CellLeft::right ? 1 : -1));
    }

    void draw_choices(const Place& now) {
        const Row& row = model_.rows[now.row];
        const Answers answers = answers_of(view_, row, state_.option);
        const auto picked = cell_choices(ui_, "answers/" + cell_id(row, state_.option), answers.labels,
                                         answers.standing, cell_box(now), state_.open_choices);
        if (picked) {
            enter_answer(view_, actions_, row, state_.option, *picked);
            state_.take_keyboard = true;
        }
    }

    std::optional<Place> at(ImVec2 point) const {
        const float x = point.x - origin_.x - head_;
        if (x < 0 || columns() == 0) return std::nullopt;
        const auto option = static_cast<std::size_t>(x / column_);
        for (std::size_t r = 0; r < model_.rows.size(); ++r) {
            if (model_.rows[r].cells.empty() || point.y < top(r) || point.y >= top(r) + height(r)) continue;
            return option < columns() ? std::optional<Place>({r, option}) : std::nullopt;
        }
        return std::nullopt;
    }

    void act(const GridInput& input, const std::optional<Place>& now) {
        if (input.pressed) {
            const auto pressed = at(*input.pressed);
            const auto began = at(input.began);
            if (pressed && pressed == began) {
                // The press that brings the keyboard back to the table opens nothing.
                const bool again = now == pressed && state_.had_keyboard;
                choose_cell(*pressed);
                if (again && !state_.editing) begin(*pressed, {}, false);
            }
            return;
        }
        if (!ImGui::IsMouseDown(ImGuiMouseButton_Left)) state_.had_keyboard = input.focused;
        if (!input.focused || state_.editing) return;
        if (!now) {
            if (const auto row = first_row(model_);
                row && (input.right != 0 || input.down != 0 || input.edit))
                choose_cell({*row, 0});
            return;
        }
        if (input.right != 0 || input.down != 0) {
            choose_cell(moved(model_, *now, input.right, input.down));
        } else if (input.copy) {
            const Row& row = model_.rows[now->row];
            actions_.copy(row.typed() ? typed_text(view_, row, state_.option)
                                      : row.cells[now->option].main.text);
        } else if (input.edit) {
            begin(*now, {}, true);
        } else if (input.clear && !view_.read_only) {
            clear_cell(view_, actions_, model_.rows[now->row], state_.option);
        } else if (!input.typed.empty()) {
            type(*now, input);
        }
    }

    void type(const Place& now, const GridInput& input) {
        const Row& row = model_.rows[now.row];
        if (row.typed()) {
            begin(now, input.typed, true);
            state_.edit.echo = input.echo_due ? input.typed : std::string{};
        } else if (row.picked() && !view_.read_only && input.typed[0] >= '1' && input.typed[0] <= '9') {
            const auto answer = static_cast<std::size_t>(input.typed[0] - '1');
            if (answer + 1 < answers_of(view_, row, state_.option).labels.size())
                enter_answer(view_, actions_, row, state_.option, answer);
        }
    }

    /// Opens a cell: its field, its list of answers, or the place its value comes from. `text`: typed onto
    /// it.
    void begin(const Place& now, const std::string& text, bool by_keys) {
        const Row& row = model_.rows[now.row];
        if (row.kind == RowKind::pairs) {
            actions_.go(RoomId::weigh, row.id);
        } else if (row.kind == RowKind::must_read) {
            const Requirement* must = find_requirement(view_.decision, row.id);
            choose_row(model_, view_.decision, state_, must->criterion, false);
        } else if (view_.read_only) {
            return;
        } else if (row.typed()) {
            state_.editing = true;
            state_.edit = {};
            state_.edit.id = "edit/" + cell_id(row, state_.option);
            state_.edit.text = text.empty() ? typed_text(view_, row, state_.option) : text;
            state_.edit.caret_at_end = by_keys;
            begin_cell_edit(state_.edit);
        } else if (row.picked()) {
            state_.open_choices = true;
        }
    }

    void choose_cell(const Place& to) { choose(model_, view_.decision, state_, to); }

    static std::string cell_id(const Row& row, const Id& option) {
        return (row.is_must() ? "must/" : "cell/") + row.id + "/" + option;
    }

    Ui& ui_;
    const RoomView& view_;
    Actions& actions_;
    const Model& model_;
    TableState& state_;
    const Theme& theme_;
    Box origin_; ///< Where the table begins, scrolled.
    Box sight_;
    float head_ = 0;
    float column_ = 0;
    std::vector<float> tops_; ///< Of the rows, and where the last one ends.
};

} // namespace

void draw_table(Ui& ui, const RoomView& view, Actions& actions, const Model& model, TableState& state,
                Box box) {
    Table(ui, view, actions, model, state).draw(box);
}

} // namespace steelyard::gauge
