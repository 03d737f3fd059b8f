#include "shell/rooms/weigh_table.hpp"

#include <algorithm>
#include <cmath>
#include <string>
#include <vector>

#include "core/decision/lookup.hpp"
#include "shell/rooms/cell_ratio.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_matrix_text.hpp"
#include "shell/rooms/weigh_table_layout.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

class Table {
public:
    Table(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, const PairTable& pairs,
          PairGrid::TableState& state)
        : ui_(ui),
          view_(view),
          actions_(actions),
          entry_(entry),
          pairs_(pairs),
          state_(state),
          theme_(ui.look()) {}

    std::optional<ItemPair> draw(Box box) {
        ScrollArea area(ui_, "grid", box);
        at_ = lay_out(pairs_.names(), area.inner(), area_in_sight());
        const Box last = at_.cell({n(), n()});
        area.reach(last.y);
        area.reach_right(last.x);
        const auto now = chosen();
        if (now && state_.reveal) {
            // The page moves for who walks the grid, not for who answers at the arm.
            scroll_into_sight(at_.cell(*now), at_.names, at_.head, state_.has_keyboard);
            state_.reveal = false;
        }
        draw_cells(now);
        draw_row_names();
        draw_column_names();
        return picked_;
    }

private:
    std::size_t n() const { return pairs_.size(); }

    std::optional<std::size_t> place_of(const Id& item) const {
        const auto found = std::find(entry_.items.begin(), entry_.items.end(), item);
        if (found == entry_.items.end()) return std::nullopt;
        return static_cast<std::size_t>(found - entry_.items.begin());
    }
    std::optional<CellPlace> chosen() const {
        const auto row = place_of(state_.row);
        const auto column = place_of(state_.column);
        if (!row || !column || *row == *column) return std::nullopt;
        return CellPlace{*row, *column};
    }
    void choose(const CellPlace& to) {
        state_.row = pairs_.item(to.row);
        state_.column = pairs_.item(to.column);
        state_.reveal = true;
        const auto [first, second] = std::minmax(to.row, to.column);
        picked_ = ItemPair{pairs_.item(first), pairs_.item(second)};
    }

    static void clip(const Box& box) { ImGui::PushClipRect(box.at(), box.end(), true); }

    std::string cell_name(const CellPlace& at) const {
        return pairs_.names()[at.row] + " against " + pairs_.names()[at.column];
    }
    std::string cell_id(const CellPlace& at) const {
        return "cell/" + pairs_.item(at.row) + "/" + pairs_.item(at.column);
    }

    void draw_cells(const std::optional<CellPlace>& now) {
        clip(at_.body());
        if (now && state_.editing)
            draw_editor(*now);
        else
            state_.editing = false;
        const GridInput input = grid_input(ui_, "pair-grid", at_.body(), state_.take_keyboard);
        state_.take_keyboard = false;
        state_.has_keyboard = input.focused || state_.editing;
        const auto under = input.hovered ? at_.place(*input.hovered) : std::nullopt;
        for (std::size_t r = 0; r < n(); ++r) {
            if (!at_.row_in_sight(r)) continue;
            for (std::size_t c = 0; c < n(); ++c) {
                if (!at_.column_in_sight(c)) continue;
                const CellPlace place{r, c};
                if (r == c)
                    draw_diagonal(at_.cell(place));
                else
                    draw_cell(place, now == place, under == place, input.focused);
            }
        }
        act(input, now);
        ImGui::PopClipRect();
    }

    void draw_diagonal(const Box& box) const {
        const ImVec2 middle{box.x + box.w / 2, box.y + box.h / 2};
        ImGui::GetWindowDrawList()->AddLine({middle.x - 5, middle.y}, {middle.x + 5, middle.y}, theme_.line,
                                            2);
    }

    void draw_cell(const CellPlace& place, bool is_chosen, bool hovered, bool focused) {
        const Box box = at_.cell(place);
        const PairCell& cell = pairs_.pair(place.row, place.column);
        const bool upper = place.row < place.column;
        const bool answered = cell.ratio.has_value() || cell.mean();
        const bool far = upper && cell.off == PairOff::far;
        const Box frame{box.x + 2, box.y + 2, box.w - 4, box.h - 4};
        const bool edited = is_chosen && state_.editing; // Its field is drawn already.
        if (!edited) {
            ImDrawList* list = ImGui::GetWindowDrawList();
            const ImU32 ground = is_chosen           ? theme_.brass_wash
                                 : far               ? theme_.red_wash
                                 : upper && answered ? theme_.rail
                                                     : theme_.card;
            list->AddRectFilled(frame.at(), frame.end(), ground, 5);
            const bool open = upper && cell.source == PairSource::missing;
            if (open) list->AddRect(frame.at(), frame.end(), theme_.edge, 5);
            if (far) list->AddRect(frame.at(), frame.end(), theme_.red, 5, 0, 1.5F);
            if (is_chosen) list->AddRect(frame.at(), frame.end(), theme_.brass, 5, 0, 2.5F);
            if (hovered && !is_chosen) list->AddRectFilled(frame.at(), frame.end(), theme_.hover, 5);
            const OnPaper paper(ui_, ground);
            draw_cell_text(place, frame, upper, open, far);
            if (upper) draw_marks(cell, place, frame);
            if (is_chosen && focused && ui_.keyboard_used) cell_ring(ui_, frame);
        }
        LedgerItem item;
        item.id = cell_id(place);
        item.label = cell_name(place);
        item.role = "gridcell";
        item.value = pairs_.all_words(place.row, place.column);
        item.at = box.at();
        item.size = {box.w, box.h};
        item.enabled = pairs_.why_not(place.row, place.column).empty();
        item.focused = is_chosen && focused;
        item.may_scroll = true;
        ui_.ledger.add(std::move(item));
    }

    /// The ratio with as many decimals as there is room for.
    std::string fitting_text(const CellPlace& place, float width) const {
        std::string text = pairs_.text(place.row, place.column);
        const auto value = pairs_.ratio(place.row, place.column);
        for (int decimals = 1; value && decimals >= 0 && text_size(Font::small, text).x > width; --decimals) {
            text = *value < 1 ? "1/" + figure_text(1 / *value, decimals) : figure_text(*value, decimals);
        }
        return text;
    }

    void draw_cell_text(const CellPlace& place, const Box& frame, bool upper, bool open, bool far) {
        const std::string text = fitting_text(place, frame.w - 4);
        const std::string word = at_.roomy && upper ? pairs_.word(place.row, place.column) : std::string{};
        const Font large = far ? Font::strong : Font::body;
        const Font face =
            !upper || (!at_.roomy && text_size(large, text).x > frame.w - 16) ? Font::small : large;
        const float line = font_size(face);
        const float word_h = word.empty() ? 0 : font_size(Font::small) - 1;
        // In low cells the marks of the upper corners keep the line above to themselves.
        const float down = !at_.roomy && upper && !open ? 4.0F : 0.0F;
        const float y = frame.y + (frame.h - line - word_h) / 2 + down;
        const float x = frame.x + frame.w / 2;
        draw_text(ui_, {x, y}, text,
                  {.font = face,
                   .ink = open    ? theme_.brass_ink
                          : upper ? theme_.ink
                                  : theme_.quiet,
                   .max_width = frame.w - 2,
                   .align = Align::centre});
        draw_text(ui_, {x, y + line - 1}, word,
                  {.font = Font::small,
                   .ink = far ? theme_.red : theme_.quiet,
                   .max_width = frame.w - 4,
                   .align = Align::centre});
    }

    /// What contradicts at the right, where the answer comes from at the left.
    void draw_marks(const PairCell& cell, const CellPlace& place, const Box& frame) const {
        // All in the upper corners: the lower ones belong to the ratio, or to the word below it.
        ImVec2 right{frame.right() - 7, frame.y + 7};
        ImVec2 left{frame.x + 7, frame.y + 7};
        const auto at_right = [&](bool any, PairMark mark) {
            if (!any) return;
            draw_pair_mark(ui_, mark, right);
            right.x -= 12;
        };
        const auto at_left = [&](bool any, PairMark mark) {
            if (!any) return;
            draw_pair_mark(ui_, mark, left);
            left.x += 12;
        };
        at_right(cell.off == PairOff::far, PairMark::far);
        at_right(cell.off == PairOff::little, PairMark::little);
        at_right(!cell.circles.empty(), PairMark::circle);
        at_left(cell.mean(), PairMark::mean);
        at_left(pairs_.marked_agreed(place.row, place.column), PairMark::agreed);
        at_left(!cell.ranges.empty(), PairMark::ranges);
    }

    void draw_row_names() {
        clip({at_.sight.x, at_.sight.y + at_.head, at_.names, at_.sight.h - at_.head});
        for (std::size_t r = 0; r < n(); ++r) {
            if (!at_.row_in_sight(r)) continue;
            const Box box = at_.cell({r, 0});
            const float y = box.y + (box.h - font_size(Font::body)) / 2;
            const float number = at_.numbered ? 24.0F : 0.0F;
            const OnPaper paper(ui_, theme_.card);
            if (at_.numbered)
                draw_text(ui_, {at_.sight.x + 16, y + 2}, std::to_string(r + 1),
                          {.font = Font::small, .ink = theme_.quiet, .align = Align::right});
            draw_text(ui_, {at_.sight.x + number, y}, pairs_.names()[r],
                      {.max_width = at_.names - number - 6});
        }
        ImGui::PopClipRect();
    }

    void draw_column_names() {
        clip({at_.sight.x + at_.names, at_.sight.y, at_.sight.w - at_.names, at_.head});
        const float line = font_size(Font::small);
        for (std::size_t c = 0; c < n(); ++c) {
            if (!at_.column_in_sight(c)) continue;
            const Box box{at_.cell({0, c}).x, at_.sight.y, at_.cell_w, at_.head};
            const float x = box.x + box.w / 2;
            const TextLook look{
                .font = Font::small, .ink = theme_.quiet, .max_width = box.w - 6, .align = Align::centre};
            const std::string& name = pairs_.names()[c];
            const bool number_only = at_.numbered && at_.head < 2 * line;
            const auto lines =
                at_.numbered ? std::array<std::string, 2>{std::to_string(c + 1), number_only ? "" : name}
                             : gauge::two_lines(Font::small, name, box.w - 6);
            const float y = box.y + (at_.head - line * (lines[1].empty() ? 1 : 2)) / 2;
            draw_text(ui_, {x, y}, lines[0], look);
            draw_text(ui_, {x, y + line}, lines[1], look);
        }
        ImGui::PopClipRect();
    }

    void draw_editor(const CellPlace& now) {
        const Box box = at_.cell(now);
        // Narrow cells give the field more width than their own.
        const float width = std::max(box.w - 4, 64.0F);
        const float x = std::min(box.x + 2, std::max(at_.body().x, at_.body().right() - width));
        const CellLeft left = cell_editor(ui_, state_.edit, cell_name(now), {x, box.y + 2, width, box.h - 4});
        if (left == CellLeft::not_yet) return;
        if (left != CellLeft::cancelled) {
            const std::string problem = enter(now, state_.edit.text);
            if (!problem.empty()) {
                actions_.say(problem);
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
        if (left == CellLeft::down || left == CellLeft::right) choose(next_cell(n(), now, 1));
        if (left == CellLeft::up || left == CellLeft::left) choose(next_cell(n(), now, -1));
    }

    /// Enters what was typed for the row against the column. Gives why it is refused.
    std::string enter(const CellPlace& at, const std::string& typed) {
        if (is_blank_cell(typed)) {
            clear(at);
            return {};
        }
        const auto given = read_cell_ratio(typed);
        if (!given || !(given->value >= 0.01) || given->value > 100)
            return "\"" + typed + "\" is no ratio from 1/100 to 100; type 3, 2.5 or 1/3.";
        const ItemPair pair{pairs_.item(at.row), pairs_.item(at.column)};
        const auto before = said_ratio(view_.decision, entry_.set, view_.person, pair[0], pair[1]);
        if (before && exact_ratio(*before) == exact_ratio(given->value)) return {};
        actions_.edit(Enter<Judgment>{judgment_of(view_, entry_.set, view_.person, pair, given->value)});
        return {};
    }

    void clear(const CellPlace& at) {
        const std::string why_not = pairs_.why_not(at.row, at.column);
        const Id& a = pairs_.item(at.row);
        const Id& b = pairs_.item(at.column);
        if (!why_not.empty())
            actions_.say(why_not);
        else if (said_ratio(view_.decision, entry_.set, view_.person, a, b))
            actions_.edit(ClearJudgment{entry_.set, view_.person, a, b});
    }

    void act(const GridInput& input, const std::optional<CellPlace>& now) {
        if (input.pressed) {
            const auto pressed = at_.place(*input.pressed);
            if (pressed && pressed == at_.place(input.began)) {
                // The press that brings the keyboard back to the table opens nothing.
                const bool again = now == pressed && state_.had_keyboard;
                choose(*pressed);
                if (again && !state_.editing) begin(*pressed, {}, false);
            }
            return;
        }
        if (!ImGui::IsMouseDown(ImGuiMouseButton_Left)) state_.had_keyboard = input.focused;
        if (!input.focused || state_.editing) return;
        if (input.copy) copy_matrix(actions_, pairs_);
        if (!now) return;
        if (input.right != 0 || input.down != 0) {
            if (const CellPlace to = moved_cell(n(), *now, input.right, input.down); to != *now) choose(to);
        } else if (input.edit) {
            begin(*now, {}, true);
        } else if (input.clear) {
            clear(*now);
        } else if (!input.typed.empty() &&
                   std::string_view("0123456789.,").find(input.typed[0]) != std::string_view::npos) {
            begin(*now, input.typed, true);
            state_.edit.echo = input.echo_due ? input.typed : std::string{};
        }
    }

    void begin(const CellPlace& now, const std::string& typed, bool by_keys) {
        if (const std::string why_not = pairs_.why_not(now.row, now.column); !why_not.empty()) {
            actions_.say(why_not);
            return;
        }
        const auto own = said_ratio(view_.decision, entry_.set, view_.person, pairs_.item(now.row),
                                    pairs_.item(now.column));
        state_.editing = true;
        state_.edit = {};
        state_.edit.id = "edit/" + cell_id(now);
        state_.edit.text = !typed.empty() ? typed : own ? exact_ratio(*own) : std::string{};
        state_.edit.caret_at_end = by_keys;
        begin_cell_edit(state_.edit);
    }

    Ui& ui_;
    const RoomView& view_;
    Actions& actions_;
    const SetResult& entry_;
    const PairTable& pairs_;
    PairGrid::TableState& state_;
    const Theme& theme_;
    TableLayout at_;
    std::optional<ItemPair> picked_;
};

} // namespace

void copy_matrix(Actions& actions, const PairTable& table) {
    actions.copy(matrix_text(table.names(), [&](std::size_t i, std::size_t j) { return table.ratio(i, j); }));
    actions.say("Copied as a matrix, to be pasted into a spreadsheet.");
}

std::optional<ItemPair> draw_pair_table(Ui& ui, const RoomView& view, Actions& actions,
                                        const SetResult& entry, const PairTable& table,
                                        PairGrid::TableState& state, Box box) {
    return Table(ui, view, actions, entry, table, state).draw(box);
}

} // namespace steelyard
