#pragma once

#include <array>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "shell/rooms/gauge_model.hpp"

namespace steelyard::gauge {

ImU32 ink_of(const Theme& theme, Tone tone);

/// What a line that comes third in a row of the table adds to its height.
inline constexpr float third_line = 15;

/// A text that is too long for one line, broken between two words.
std::array<std::string, 2> two_lines(Font font, const std::string& text, float width);

/// The texts of a cell in its frame. Each takes `width` at most; an answer that was picked may take two
/// lines.
struct CellLook {
    Box frame;
    float width = 0;
    bool strong = false; ///< The chosen cell.
    bool greyed = false; ///< Its option takes no part.
    bool two_lines = false;
};
void draw_cell_text(Ui& ui, const Cell& cell, const CellLook& look);

/// Fields under their labels, flowing down a card. Where the decision can only be read, their values stand as
/// text.
class Form {
public:
    Form(Ui& ui, const RoomView& view, Actions& actions, const Box& box)
        : ui_(ui), view_(view), actions_(actions), box_(box), y_(box.y) {}

    /// The new text once it is finished. `part` of `parts` side by side; the last one ends the line.
    std::optional<std::string> text(std::string_view id, std::string_view label, std::string_view name,
                                    const std::string& value, int part = 0, int parts = 1);

    /// A number that may be absent: the outer value is there once something new was finished. What is no
    /// number is refused with a sentence.
    std::optional<std::optional<double>> number(std::string_view id, std::string_view label,
                                                std::string_view name, std::optional<double> value,
                                                int part = 0, int parts = 1);

    std::optional<std::size_t> pick(std::string_view id, std::string_view label, std::string_view name,
                                    const std::vector<std::string>& labels, std::size_t chosen, int part = 0,
                                    int parts = 1);

    /// A name and what it is, at the two ends of a line; the second one takes a line of its own where both do
    /// not fit.
    void fact(std::string_view name, std::string_view value, Tone tone = Tone::plain);
    void sentence(std::string_view text, Tone tone = Tone::quiet);
    bool link(std::string_view id, std::string_view label);
    bool press(std::string_view id, std::string_view label);
    void space(float height) { y_ += height; }

    Box rest() const { return {box_.x, y_, box_.w, box_.bottom() - y_}; }
    float bottom() const { return y_; }

private:
    Box place(std::string_view label, int part, int parts);

    Ui& ui_;
    const RoomView& view_;
    Actions& actions_;
    Box box_;
    float y_;
};

/// What stands in the line of a card's title beside it.
struct TitleLook {
    std::optional<std::size_t> mark; ///< An option's, before the title.
    bool in_play = true;             ///< That option takes part.
    Words right;                     ///< At the right end.
};

/// The title of a card. Gives what is left of the card below.
Box card_title(Ui& ui, Box card, std::string_view title, const TitleLook& look = {});

} // namespace steelyard::gauge
