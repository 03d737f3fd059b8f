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
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float narrowest = 46; ///< A cell: "1/2.35" in small type and its marks.
constexpr float widest = 92;
constexpr float with_word = 62; ///< From this width on a word stands under the ratio.
constexpr float low = 30;
constexpr float high = 46;

struct Place {
    std::size_t row = 0;
    std::size_t column = 0;
    bool operator==(const Place&) const = default;
};

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
        measure(area);
        area.reach(origin_.y + head_height_ + cell_h_ * static_cast<float>(n()));
        area.reach_right(origin_.x + names_ + cell_w_ * static_cast<float>(n()));
        const auto now = chosen();
        if (now && state_.reveal) {
            scroll_into_sight(cell_box(*now), names_, head_height_);
            state_.reveal = false;
        }
        draw_cells(now);
        draw_row_names();
        draw_column_names();
        return picked_;
    }

private:
    std::size_t n() const { return pairs_.size(); }

    void measure(const ScrollArea& area) {
        origin_ = area.inner();
        sight_ = area_in_sight();
        const auto count = static_cast<float>(n());
        float longest = 0;
        for (const auto& name : pairs_.names()) longest = std::max(longest, text_size(Font::body, name).x);
        longest += 34; // Room for the number.
        names_ = std::floor(std::clamp(longest, 60.0F, std::max(84.0F, 0.32F * sight_.w)));
        cell_w_ = std::floor(std::clamp((sight_.w - names_) / count, narrowest, widest));
        head_height_ = 38;
        const float room = (sight_.h - head_height_) / count;
        roomy_ = cell_w_ >= with_word && room >= 40;
        cell_h_ = roomy_ ? std::clamp(std::floor(room), 42.0F, high) : low;
        numbered_ = std::any_of(pairs_.names().begin(), pairs_.names().end(), [&](const std::string& name) {
            const auto lines = gauge::two_lines(Font::small, name, cell_w_ - 6);
            return text_size(Font::small, lines[0]).x > cell_w_ - 6 ||
                   text_size(Font::small, lines[1]).x > cell_w_ - 6;
        });
    }

    std::optional<std::size_t> place_of(const Id& item) const {
        const auto found = std::find(entry_.items.begin(), entry_.items.end(), item);
        if (found == entry_.items.end()) return std::nullopt;
        return static_cast<std::size_t>(found - entry_.items.begin());
    }
    std::optional<Place> chosen() const {
        const auto row = place_of(state_.row);
        const auto column = place_of(state_.column);
        if (!row || !column || *row == *column) return std::nullopt;
        return Place{*row, *column};
    }
    void choose(const Place& to) {
        state_.row = pairs_.item(to.row);
        state_.column = pairs_.item(to.column);
        state_.reveal = true;
        const auto [first, second] = std::minmax(to.row, to.column);
        picked_ = ItemPair{pairs_.item(first), pairs_.item(second)};
    }

    Box cell_box(const Place& at) const {
        return {origin_.x + names_ + cell_w_ * static_cast<float>(at.column),
                origin_.y + head_height_ + cell_h_ * static_cast<float>(at.row), cell_w_, cell_h_};
    }
    Box body() const {
        return {sight_.x + names_, sight_.y + head_height_, sight_.w - names_, sight_.h - head_height_};
    }
    bool row_in_sight(std::size_t row) const {
        const Box box = cell_box({row, 0});
        return box.y < sight_.bottom() && box.bottom() > sight_.y + head_height_;
    }
    bool column_in_sight(std::size_t column) const {
        const Box box = cell_box({0, column});
        return box.x < sight_.right() && box.right() > sight_.x + names_;
    }
    static void clip(const Box& box) { ImGui::PushClipRect(box.at(), box.end(), true); }

    std::string cell_name(const Place& at) const {
        return pairs_.names()[at.row] + " against " + pairs_.names()[at.column];
    }
    std::string cell_id(const Place& at) const {
        return "cell/" + pairs_.item(at.row) + "/" + pairs_.item(at.column);
    }

    void draw_cells(const std::optional<Place>& now) {
        clip(body());
        if (now && state_.editing)
            draw_editor(*now);
        else
            state_.editing = false;
        const GridInput input = grid_input(ui_, "pair-grid", body(), state_.take_keyboard);
        state_.take_keyboard = false;
        state_.has_keyboard = input.focused || state_.editing;
        const auto under = input.hovered ? at(*input.hovered) : std::nullopt;
        for (std::size_t r = 0; r < n(); ++r) {
            if (!row_in_sight(r)) continue;
            for (std::size_t c = 0; c < n(); ++c) {
                if (!column_in_sight(c)) continue;
                const Place place{r, c};
                if (r == c)
                    draw_diagonal(cell_box(place));
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

    void draw_cell(const Place& place, bool is_chosen, bool hovered, bool focused) {
        const Box box = cell_box(place);
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

    void draw_cell_text(const Place& place, const Box& frame, bool upper, bool open, bool far) {
        const std::string text = pairs_.text(place.row, place.column);
        const std::string word = roomy_ && upper ? pairs_.word(place.row, place.column) : std::string{};
        const Font face = text_size(Font::body, text).x > frame.w - (roomy_ ? 8 : 12) || !upper
                              ? Font::small
                              : (far ? Font::strong : Font::body);
        const float line = font_size(face);
        const float word_h = word.empty() ? 0 : font_size(Font::small) - 1;
        const float y = frame.y + (frame.h - line - word_h) / 2;
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
    void draw_marks(const PairCell& cell, const Place& place, const Box& frame) const {
        const ImVec2 right_top{frame.right() - 6, frame.y + 6};
        const ImVec2 right_foot{frame.right() - 6, frame.bottom() - 6};
        const ImVec2 left_top{frame.x + 6, frame.y + 6};
        const ImVec2 left_foot{frame.x + 6, frame.bottom() - 6};
        const std::string word = roomy_ ? pairs_.word(place.row, place.column) : std::string{};
        if (cell.off == PairOff::far) draw_pair_mark(ui_, PairMark::far, right_top);
        if (cell.off == PairOff::little) draw_pair_mark(ui_, PairMark::little, right_top);
        // A word fills the lower corners; the circle then stands beside what is in the upper one.
        if (!cell.circles.empty())
            draw_pair_mark(ui_, PairMark::circle,
                           word.empty()                ? right_foot
                           : cell.off == PairOff::none ? right_top
                                                       : ImVec2{right_top.x - 12, right_top.y});
        if (!cell.ranges.empty())
            draw_pair_mark(ui_, PairMark::ranges,
                           word.empty() ? left_foot : ImVec2{left_top.x + 12, left_top.y});
        if (cell.mean())
            draw_pair_mark(ui_, PairMark::mean, left_top);
        else if (pairs_.marked_agreed(place.row, place.column))
            draw_pair_mark(ui_, PairMark::agreed, left_top);
    }

    void draw_row_names() {
        clip({sight_.x, sight_.y + head_height_, names_, sight_.h - head_height_});
        for (std::size_t r = 0; r < n(); ++r) {
            if (!row_in_sight(r)) continue;
            const Box box = cell_box({r, 0});
            const float y = box.y + (box.h - font_size(Font::body)) / 2;
            const float number = numbered_ ? 24.0F : 0.0F;
            const OnPaper paper(ui_, theme_.card);
            if (numbered_)
                draw_text(ui_, {sight_.x + 16, y + 2}, std::to_string(r + 1),
                          {.font = Font::small, .ink = theme_.quiet, .align = Align::right});
            draw_text(ui_, {sight_.x + number, y}, pairs_.names()[r], {.max_width = names_ - number - 6});
        }
        ImGui::PopClipRect();
    }

    void draw_column_names() {
        clip({sight_.x + names_, sight_.y, sight_.w - names_, head_height_});
        const float line = font_size(Font::small);
        for (std::size_t c = 0; c < n(); ++c) {
            if (!column_in_sight(c)) continue;
            const Box box{cell_box({0, c}).x, sight_.y, cell_w_, head_height_};
            const float x = box.x + box.w / 2;
            const TextLook look{
                .font = Font::small, .ink = theme_.quiet, .max_width = box.w - 6, .align = Align::centre};
            const std::string& name = pairs_.names()[c];
            const auto lines = numbered_ ? std::array<std::string, 2>{std::to_string(c + 1), name}
                                         : gauge::two_lines(Font::small, name, box.w - 6);
            const float y = box.y + (head_height_ - line * (lines[1].empty() ? 1 : 2)) / 2;
            draw_text(ui_, {x, y}, lines[0], look);
            draw_text(ui_, {x, y + line}, lines[1], look);
        }
        ImGui::PopClipRect();
    }

    void draw_editor(const Place& now) {
        const Box box = cell_box(now);
        // Narrow cells give the field more width than their own.
        const float width = std::max(box.w - 4, 64.0F);
        const float x = std::min(box.x + 2, std::max(body().x, body().right() - width));
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
        if (left == CellLeft::down || left == CellLeft::right) choose(next(now, 1));
        if (left == CellLeft::up || left == CellLeft::left) choose(next(now, -1));
    }

    /// Enters what was typed for the row against the column. Gives why it is refused.
    std::string enter(const Place& at, const std::string& typed) {
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

    void clear(const Place& at) {
        const std::string why_not = pairs_.why_not(at.row, at.column);
        const Id& a = pairs_.item(at.row);
        const Id& b = pairs_.item(at.column);
        if (!why_not.empty())
            actions_.say(why_not);
        else if (said_ratio(view_.decision, entry_.set, view_.person, a, b))
            actions_.edit(ClearJudgment{entry_.set, view_.person, a, b});
    }

    /// The next cell of the same half, row by row; the same one at the end.
    Place next(const Place& at, int step) const {
        const bool upper = at.row < at.column;
        const std::size_t all = n() * n();
        std::size_t i = at.row * n() + at.column;
        while (true) {
            if (step > 0 ? i + 1 >= all : i == 0) return at;
            i = step > 0 ? i + 1 : i - 1;
            const Place place{i / n(), i % n()};
            if (place.row != place.column && (place.row < place.column) == upper) return place;
        }
    }

    /// By arrow keys, over the diagonal; the same one at the edge.
    Place moved(const Place& at, int right, int down) const {
        const auto last = static_cast<int>(n()) - 1;
        const auto sign = [](int by) { return by > 0 ? 1 : by < 0 ? -1 : 0; };
        int row = std::clamp(static_cast<int>(at.row) + down, 0, last);
        int column = std::clamp(static_cast<int>(at.column) + right, 0, last);
        if (row == column && right != 0 && down != 0) {
            column += row == 0 ? 1 : -1; // Ctrl+Home and Ctrl+End.
        } else if (row == column) {
            const int r = row + sign(down);
            const int c = column + sign(right);
            const bool inside = r >= 0 && r <= last && c >= 0 && c <= last;
            row += inside ? sign(down) : -sign(down);
            column += inside ? sign(right) : -sign(right);
        }
        return {static_cast<std::size_t>(row), static_cast<std::size_t>(column)};
    }

    std::optional<Place> at(ImVec2 point) const {
        const float x = point.x - origin_.x - names_;
        const float y = point.y - origin_.y - head_height_;
        if (x < 0 || y < 0) return std::nullopt;
        const Place place{static_cast<std::size_t>(y / cell_h_), static_cast<std::size_t>(x / cell_w_)};
        if (place.row >= n() || place.column >= n() || place.row == place.column) return std::nullopt;
        return place;
    }

    void act(const GridInput& input, const std::optional<Place>& now) {
        if (input.pressed) {
            const auto pressed = at(*input.pressed);
            if (pressed && pressed == at(input.began)) {
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
            if (const Place to = moved(*now, input.right, input.down); to != *now) choose(to);
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

    void begin(const Place& now, const std::string& typed, bool by_keys) {
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
    Box origin_; ///< Where the table begins, scrolled.
    Box sight_;
    float names_ = 0;
    float cell_w_ = 0;
    float cell_h_ = 0;
    float head_height_ = 0;
    bool roomy_ = false;    ///< Words stand in the cells.
    bool numbered_ = false; ///< Some name is too long to stand whole above its column.
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
