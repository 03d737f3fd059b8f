#include <algorithm>
#include <string>
#include <utility>

#include "shell/rooms/frame_edits.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

/// The cards that are plain lists: options and people, with the question above them.
namespace steelyard::frame {
namespace {

Column inside(GrowingCard& card, std::string_view heading) {
    const float y = card.heading(heading);
    return {card.left(), y, card.width()};
}

void set_heading(const Desk& desk, Heading which, std::optional<std::string> text) {
    if (text) desk.actions.edit(SetHeading{which, std::move(*text)});
}

/// The end of an opened item: a little air, and a rule where another item follows.
void close_item(const Desk& desk, Column& column, bool last) {
    if (last) return;
    rule(desk.ui, column.x, column.y, column.w);
    column.y += 9;
}

void option_details(const Desk& desk, Column& column, std::size_t index) {
    const Option& option = desk.decision().options[index];
    const std::string letter = option_letter(index);
    if (auto note = captioned_lines(desk, column, "option-note/" + option.id, "Note on option " + letter,
                                    option.note)) {
        Option changed = option;
        changed.note = std::move(*note);
        desk.actions.edit(Change<Option>{std::move(changed)});
    }
    ButtonRow row(desk, column);
    if (row.up("option-up/" + option.id, "Move option " + letter + " up", index > 0))
        desk.actions.edit(Move<Option>{option.id, index - 1});
    if (row.down("option-down/" + option.id, "Move option " + letter + " down",
                 index + 1 < desk.decision().options.size()))
        desk.actions.edit(Move<Option>{option.id, index + 1});
    if (row.button("option-withdraw/" + option.id,
                   option.withdrawn ? "Bring back option" : "Withdraw option")) {
        Option changed = option;
        changed.withdrawn = !option.withdrawn;
        desk.actions.edit(std::vector<Edit>{Change<Option>{std::move(changed)}},
                          (option.withdrawn ? "Brought back option \"" : "Withdrew option \"") + option.name +
                              "\"");
    }
    if (row.button("option-delete/" + option.id, "Delete option")) {
        desk.actions.edit(Remove<Option>{option.id});
        desk.state.option.clear();
    }
}

void option_row(const Desk& desk, Column& column, std::size_t index) {
    const Option& option = desk.decision().options[index];
    const std::string letter = option_letter(index);
    const bool opened = desk.state.option == option.id;
    Box row = column.next(field_height, option.withdrawn ? 2.0f : 8.0f);
    option_mark(desk.ui, {row.x, row.y + 6}, index, !option.withdrawn);
    row.take_left(30);
    const Box more = row.take_right(30, 4);
    if (auto name = line_field(desk, "option-name/" + option.id, "Name of option " + letter, option.name, row,
                               "Name")) {
        Option changed = option;
        changed.name = std::move(*name);
        desk.actions.edit(Change<Option>{std::move(changed)});
    }
    more_button(desk, "option-more/" + option.id, "option " + letter, more, desk.state.option, option.id);
    if (option.withdrawn) {
        Column indented{row.x, column.y, row.w};
        remark(desk, indented, "withdrawn: takes no part");
        column.y = indented.y;
    }
    if (opened) {
        option_details(desk, column, index);
        close_item(desk, column, index + 1 == desk.decision().options.size());
    }
}

void abstentions(const Desk& desk, Column& column, const Person& person) {
    if (desk.decision().options.empty()) return;
    caption(desk, column, "Takes no part where these are judged or graded");
    for (const auto& option : desk.decision().options) {
        const auto listed = std::find(person.abstains.begin(), person.abstains.end(), option.id);
        const bool abstains = listed != person.abstains.end();
        const auto now = tick(desk, "person-abstains/" + person.id + "/" + option.id,
                              option.name.empty() ? option.id : option.name, abstains, column.next(28, 2));
        if (!now) continue;
        Person changed = person;
        if (*now)
            changed.abstains.push_back(option.id);
        else
            std::erase(changed.abstains, option.id);
        desk.actions.edit(Change<Person>{std::move(changed)});
    }
    column.y += 6;
}

void person_details(const Desk& desk, Column& column, std::size_t index) {
    const Person& person = desk.decision().people[index];
    Person changed = person;
    bool change = false;
    Column left{column.x, column.y, column.w - 110};
    Column right{column.x + column.w - 98, column.y, 98};
    if (auto role = captioned_line(desk, left, "person-role/" + person.id, "Role", person.role)) {
        changed.role = std::move(*role);
        change = true;
    }
    caption(desk, right, "Share");
    const Typed share =
        number_field(desk, "person-share/" + person.id, "Share", person.share, right.next(field_height));
    if (share.changed && share.value.value_or(1) >= 0) {
        changed.share = share.value.value_or(1);
        change = true;
    } else if (share.changed) {
        desk.actions.say("A share is 0 or more; nothing was changed.");
    }
    column.y = left.y;
    remark(desk, column,
           "How much this person's answers count beside the others'; 0: heard, but not counted.");
    if (auto interest = captioned_lines(desk, column, "person-interest/" + person.id, "Interest to declare",
                                        person.interest)) {
        changed.interest = std::move(*interest);
        change = true;
    }
    if (change) desk.actions.edit(Change<Person>{std::move(changed)});
    abstentions(desk, column, person);

    ButtonRow row(desk, column);
    const std::string number = std::to_string(index + 1);
    if (row.up("person-up/" + person.id, "Move person " + number + " up", index > 0))
        desk.actions.edit(Move<Person>{person.id, index - 1});
    if (row.down("person-down/" + person.id, "Move person " + number + " down",
                 index + 1 < desk.decision().people.size()))
        desk.actions.edit(Move<Person>{person.id, index + 1});
    if (row.button("person-delete/" + person.id, "Delete person")) {
        desk.actions.edit(Remove<Person>{person.id});
        desk.state.person.clear();
    }
}

std::string person_summary(const Person& person) {
    std::string text = person.role;
    if (person.share != 1) text += (text.empty() ? "share " : " \xC2\xB7 share ") + figure_text(person.share);
    if (!person.interest.empty()) text += text.empty() ? "has an interest" : " \xC2\xB7 has an interest";
    return text;
}

void person_row(const Desk& desk, Column& column, std::size_t index) {
    const Person& person = desk.decision().people[index];
    const std::string number = std::to_string(index + 1);
    Box row = column.next(field_height, 2);
    const Box more = row.take_right(30, 4);
    if (auto name = line_field(desk, "person-name/" + person.id, "Name of person " + number, person.name, row,
                               "Name")) {
        Person changed = person;
        changed.name = std::move(*name);
        desk.actions.edit(Change<Person>{std::move(changed)});
    }
    more_button(desk, "person-more/" + person.id, "person " + number, more, desk.state.person, person.id);
    const std::string summary = person_summary(person);
    if (desk.state.person == person.id) {
        column.y += 6;
        person_details(desk, column, index);
        close_item(desk, column, index + 1 == desk.decision().people.size());
    } else if (!summary.empty()) {
        Column indented{row.x + 10, column.y, row.w - 10};
        draw_text(desk.ui, {indented.x, indented.y}, summary,
                  {.font = Font::small, .ink = desk.look().quiet, .max_width = indented.w});
        column.y += line_step(Font::small) + 8;
    } else {
        column.y += 6;
    }
}

} // namespace

float question_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    Column column = inside(card, "Question");
    const Decision& d = desk.decision();
    set_heading(desk, Heading::title, captioned_line(desk, column, "title", "Title", d.title));
    set_heading(desk, Heading::question,
                captioned_lines(desk, column, "question", "What is to be decided", d.question));
    Column left{column.x, column.y, std::min(124.0f, (column.w - 12) / 2)};
    Column right{column.x + left.w + 12, column.y, column.w - left.w - 12};
    set_heading(desk, Heading::decide_by,
                captioned_line(desk, left, "decide-by", "Decide by", d.decide_by, "date"));
    set_heading(desk, Heading::author, captioned_line(desk, right, "author", "Author", d.author));
    column.y = left.y;
    return card.end(column.y - 8);
}

float notes_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    Column column = inside(card, "Notes");
    set_heading(desk, Heading::notes, lines_field(desk, column, "notes", "Notes", desk.decision().notes, 10));
    return card.end(column.y - 8);
}

float options_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    Column column = inside(card, "Options");
    const auto& options = desk.decision().options;
    if (options.empty()) remark(desk, column, "What the decision chooses between: at least two.");
    for (std::size_t i = 0; i < options.size(); ++i) option_row(desk, column, i);
    {
        ButtonRow row(desk, column);
        if (row.button("option-add", "Add option")) {
            Option option;
            option.name = "New option";
            option.id = option_id_for(desk.decision(), option.name);
            desk.ui.focus_next = "option-name/" + option.id;
            desk.actions.edit(Add<Option>{std::move(option)});
        }
    }
    return card.end(column.y - 8);
}

float people_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    Column column = inside(card, "People who judge");
    const auto& people = desk.decision().people;
    if (people.empty()) {
        remark(desk, column,
               "Nobody has to be named: answers can be agreed in the room. Name people so that each can "
               "answer for himself.");
    }
    for (std::size_t i = 0; i < people.size(); ++i) person_row(desk, column, i);
    {
        ButtonRow row(desk, column);
        if (row.button("person-add", "Add person")) {
            Person person;
            person.name = "New person";
            person.id = person_id_for(desk.decision(), person.name);
            desk.ui.focus_next = "person-name/" + person.id;
            desk.actions.edit(Add<Person>{std::move(person)});
        }
    }
    return card.end(column.y - 8);
}

} // namespace steelyard::frame
