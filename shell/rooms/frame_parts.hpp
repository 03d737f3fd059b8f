#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "shell/rooms/outline.hpp"
#include "shell/rooms/room.hpp"
#include "shell/widgets/controls.hpp"

/// The cards of the room Frame and what they share.
namespace steelyard::frame {

/// What the room remembers: which item of each list is opened, and a list being pasted.
struct State {
    Id option;
    Id person;
    Id must;
    Id node;
    bool settings_open = false;

    /// The criterion whose opened panel is to be scrolled into sight, and in how many frames: what is opened
    /// and closed moves the rest first.
    Id reveal;
    int reveal_in = 0;

    struct Paste {
        bool open = false;
        std::string text;
        Id parent;
        LineEnds ends = LineEnds::weights;
        Id added; ///< The first criterion of the list asked for; the panel closes when it is there.
    };
    Paste paste;
};

/// What a card is drawn with.
struct Desk {
    Ui& ui;
    const RoomView& view;
    Actions& actions;
    State& state;

    const Decision& decision() const { return view.decision; }
    bool may_edit() const { return !view.read_only; }
    const Theme& look() const { return ui.look(); }
};

/// Places for one thing below the other.
struct Column {
    float x = 0;
    float y = 0;
    float w = 0;

    Box next(float height, float gap = 8);
};

inline constexpr float field_height = 34;
inline constexpr float button_height = 32;

/// The name of a field, small, above it.
void caption(const Desk& desk, Column& column, std::string_view text);

/// A sentence in second place, broken into lines.
void remark(const Desk& desk, Column& column, std::string_view text, ImU32 ink = 0);

/// As text_field, but only the text itself where nothing may be edited.
std::optional<std::string> line_field(const Desk& desk, std::string_view id, std::string_view name,
                                      const std::string& value, const Box& box, std::string_view hint = {});

/// A field of as many lines as its text needs, two at least and `most` at most.
std::optional<std::string> lines_field(const Desk& desk, Column& column, std::string_view id,
                                       std::string_view name, const std::string& value, int most = 6);

/// The same with its name above it.
std::optional<std::string> captioned_line(const Desk& desk, Column& column, std::string_view id,
                                          std::string_view name, const std::string& value,
                                          std::string_view hint = {});
std::optional<std::string> captioned_lines(const Desk& desk, Column& column, std::string_view id,
                                           std::string_view name, const std::string& value, int most = 6);

/// A name that may be a whole sentence: all of it is shown.
std::optional<std::string> name_field(const Desk& desk, Column& column, std::string_view id,
                                      std::string_view name, const std::string& value);

/// A number typed: none in `value` where the field was emptied.
struct Typed {
    bool changed = false;
    std::optional<double> value;
};
/// What is no number is refused with a message and stays as it was.
Typed number_field(const Desk& desk, std::string_view id, std::string_view name,
                   const std::optional<double>& value, const Box& box, std::string_view hint = {});

/// As choice and drop_down, but only the words of what is chosen where nothing may be edited.
std::optional<std::size_t> pick(const Desk& desk, std::string_view id, std::string_view name,
                                const std::vector<std::string>& labels, std::size_t chosen, const Box& box);
std::optional<std::size_t> pick_from_list(const Desk& desk, std::string_view id, std::string_view name,
                                          const std::vector<std::string>& labels, std::size_t chosen,
                                          const Box& box);
std::optional<bool> tick(const Desk& desk, std::string_view id, std::string_view label, bool ticked,
                         const Box& box);

/// Buttons side by side, going on in the next line where they do not fit.
class ButtonRow {
public:
    ButtonRow(const Desk& desk, Column& column) : desk_(desk), column_(column), x_(column.x) {}
    ~ButtonRow();
    ButtonRow(const ButtonRow&) = delete;
    ButtonRow& operator=(const ButtonRow&) = delete;

    /// Disabled where nothing may be edited.
    bool button(std::string_view id, std::string_view label, bool enabled = true,
                ButtonKind kind = ButtonKind::plain);
    /// Leads elsewhere and edits nothing.
    bool link(std::string_view id, std::string_view label);
    /// Up and down, together.
    bool up(std::string_view id, std::string_view label, bool enabled);
    bool down(std::string_view id, std::string_view label, bool enabled);
    bool left(std::string_view id, std::string_view label, bool enabled);
    bool right(std::string_view id, std::string_view label, bool enabled);

private:
    Box place(float width, float gap);

    const Desk& desk_;
    Column& column_;
    float x_;
};

/// The small button at the end of an item's row that opens and closes what more there is to it.
void more_button(const Desk& desk, std::string_view id, const std::string& item, const Box& box, Id& opened,
                 const Id& own);

/// Names of criteria, for lists to pick from.
std::vector<std::string> names_of(const std::vector<const Node*>& nodes);
std::vector<const Node*> figure_leaves(const Decision& decision);

/// The cards. Each is drawn at a place in a width, as tall as it needs, and gives its bottom.
float question_card(const Desk& desk, ImVec2 at, float width);
float notes_card(const Desk& desk, ImVec2 at, float width);
float options_card(const Desk& desk, ImVec2 at, float width);
float people_card(const Desk& desk, ImVec2 at, float width);
float criteria_card(const Desk& desk, ImVec2 at, float width);
float musts_card(const Desk& desk, ImVec2 at, float width);
float settings_card(const Desk& desk, ImVec2 at, float width);

/// What stands below the row of the opened criterion.
void node_panel(const Desk& desk, Column& column, const Node& node);

/// The id of a criterion's row, for the keyboard to go to.
std::string row_id(const Id& node);

/// Adds a criterion under another one, opens it and puts the keyboard into its name.
void add_criterion(const Desk& desk, const Id& parent, std::size_t at = at_end);

/// A pasted list with what would be made of it. Takes the whole room while it is open.
void open_paste(State& state, const Decision& decision, const std::string& text);
/// Closes the panel once what it asked for was carried out. It stays where the person kept things as they
/// are.
void close_added_paste(const Desk& desk);
void paste_panel(const Desk& desk, const Box& area);

} // namespace steelyard::frame
