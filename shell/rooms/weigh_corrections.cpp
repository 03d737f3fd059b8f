#include "shell/rooms/weigh_corrections.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_hold_words.hpp"
#include "shell/rooms/weigh_pairs.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/icon_button.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float button_height = 32;
constexpr float sign_room = 32; ///< Left of a choice, for the ring that shows which one is chosen.
constexpr std::string_view reason_id = "correction-reason";

/// A round sign, filled where it is chosen, beside its words. True when pressed.
bool choice_row(Ui& ui, const std::string& id, const std::string& title, const std::string& detail,
                bool chosen, bool enabled, TextFlow& flow) {
    const Theme& theme = ui.look();
    const float width = flow.width() - sign_room - 10;
    const float title_height = paragraph_height(width, title, Font::strong);
    const float height = title_height + paragraph_height(width, detail, Font::small) + 16;
    const Box box = flow.next(height, 6);
    ImDrawList* list = ImGui::GetWindowDrawList();
    const ImU32 ground = chosen ? theme.brass_wash : theme.paper;
    list->AddRectFilled(box.at(), box.end(), ground, 6);
    list->AddRect(box.at(), box.end(), chosen ? theme.brass : theme.edge, 6, 0, chosen ? 2.0F : 1.0F);
    const OnPaper paper(ui, ground);
    const bool pressed = press_area(ui, id, title, box, "radio", chosen ? "true" : "false", enabled);
    const ImVec2 middle{box.x + 18, box.y + 8 + font_size(Font::strong) / 2};
    list->AddCircle(middle, 8, enabled ? theme.steel : theme.edge, 0, 1.6F);
    if (chosen) list->AddCircleFilled(middle, 4.5F, theme.brass);
    draw_paragraph(ui, {box.x + sign_room, box.y + 8}, width, title, {.font = Font::strong});
    draw_paragraph(ui, {box.x + sign_room, box.y + 8 + title_height}, width, detail,
                   {.font = Font::small, .ink = theme.quiet});
    return pressed;
}

std::string joined(const std::string& a, const std::string& b) {
    return a.empty() ? b : b.empty() ? a : a + " \xC2\xB7 " + b;
}

std::string joined_sentences(const std::string& a, const std::string& b) {
    return b.empty() ? a : a + " " + b;
}

/// What stands first is known, and what could stand there instead begins to be.
bool ready(const Examination* found) {
    return found != nullptr &&
           (found->finished || (!found->pairs.empty() && !found->pairs.front().choices.empty()));
}

/// The pairs worth correcting: what stands first, and what is far off and has answers to put in its place.
std::vector<const PairCorrection*> contradictions(const SetResult& entry, const Examination& found) {
    std::vector<const PairCorrection*> list;
    for (const auto& pair : found.pairs) {
        const bool far = misfit_words(entry, pair.a, pair.b) == "far off";
        if (list.empty() || (far && (found.mean_of_several || !pair.choices.empty()))) list.push_back(&pair);
    }
    return list;
}

} // namespace

std::optional<ItemPair> Corrections::draw(Ui& ui, const RoomView& view, Actions& actions,
                                          const SetResult& entry, TextFlow& flow) {
    if (set_ != entry.set || by_ != entry.by) {
        reset();
        set_ = entry.set;
        by_ = entry.by;
    }
    if (!over_limit(view.decision, entry) && entry.cycles.empty()) return std::nullopt;
    const Theme& theme = ui.look();
    const Examination* found = view.examination;
    if (found != nullptr && (found->set != entry.set || found->by != entry.by)) found = nullptr;
    const float top = flow.y();
    if (!ready(found)) {
        const double progress = found == nullptr ? 0 : found->progress;
        flow.say("Looking for what contradicts what \xE2\x80\xA6 " +
                     decimals_text(std::floor(100 * progress), 0) + " %",
                 Font::body, theme.quiet);
        bar(ui, flow.next(8), static_cast<float>(progress), theme.steel);
        flow.space(std::max(0.0F, top + height_ - flow.y()));
        return std::nullopt;
    }
    std::optional<ItemPair> result;
    PairCorrection plain;
    std::vector<const PairCorrection*> list = contradictions(entry, *found);
    if (list.empty() && !entry.misfits.empty()) {
        // Nothing to choose from: what is known of the worst pair is said all the same.
        const Misfit& worst = entry.misfits.front();
        plain.a = worst.a;
        plain.b = worst.b;
        plain.given = worst.given;
        plain.implied = worst.implied;
        if (standing_judgment(view.decision, entry.set, Id{}, worst.a, worst.b) == nullptr)
            plain.said_by = entry.by;
        list.push_back(&plain);
    }
    if (list.empty()) return std::nullopt;
    at_ = std::min(at_, list.size() - 1);
    const PairCorrection& pair = *list[at_];
    const bool mean = found->mean_of_several &&
                      standing_judgment(view.decision, entry.set, Id{}, pair.a, pair.b) == nullptr;
    draw_step(ui, view, flow, list);
    flow.say(given_sentence(view, entry, pair, mean), Font::body, 0, 2);
    flow.say(implied_sentence(view, entry, pair));
    const std::string best = best_sentence(pair);
    if (!best.empty()) flow.say(best, Font::small, ui.look().quiet, 2);
    const std::string look = "Look at this pair";
    if (button(ui, "look", look, {flow.x(), flow.y() + 2, button_width(look), button_height}))
        result = ItemPair{pair.a, pair.b};
    flow.space(button_height + 10);

    const bool own = !mean && pair.said_by == view.person;
    if (own && &pair != &plain)
        draw_choices(ui, view, actions, entry, *found, pair, flow);
    else if (!own)
        if (const auto led = draw_whose(ui, view, actions, entry, pair, mean, flow)) result = led;
    draw_findings(ui, view, entry, *found, pair, flow);
    if (!found->finished) {
        flow.say("Looking further \xE2\x80\xA6 " + decimals_text(std::floor(100 * found->progress), 0) + " %",
                 Font::small, theme.quiet);
        flow.space(std::max(0.0F, top + height_ - flow.y()));
    } else {
        height_ = flow.y() - top;
    }
    return result;
}

void Corrections::draw_step(Ui& ui, const RoomView&, TextFlow& flow,
                            const std::vector<const PairCorrection*>& list) {
    if (list.size() < 2) return;
    Box row = flow.next(30, 4);
    const Box next = row.take_right(30, 4);
    const Box before = row.take_right(30, 8);
    draw_text(ui, {row.x, row.y + 5},
              "Contradiction " + std::to_string(at_ + 1) + " of " + std::to_string(list.size()),
              {.font = Font::strong, .ink = ui.look().quiet, .max_width = row.w});
    const auto step = [&](std::size_t to) {
        at_ = to;
        chosen_.clear();
        reason_.clear();
    };
    if (icon_button(ui, "contradiction-before", "Previous contradiction", before, Icon::left, at_ > 0))
        step(at_ - 1);
    if (icon_button(ui, "contradiction-next", "Next contradiction", next, Icon::right, at_ + 1 < list.size()))
        step(at_ + 1);
}

std::vector<Corrections::Choice> Corrections::choices(const RoomView& view, const SetResult& entry,
                                                      const Examination& found,
                                                      const PairCorrection& pair) const {
    const Decision& d = view.decision;
    std::vector<Choice> list;
    for (std::size_t i = 0; i < pair.choices.size(); ++i) {
        const CorrectionChoice& one = pair.choices[i];
        list.push_back({"correction/" + std::to_string(i),
                        brief_pair(d, entry.set, pair.a, pair.b, one.to),
                        joined(ratio_then(d, one.cr), first_then(view, one.then)),
                        lead_then(view, one.then),
                        {{pair.a, pair.b, pair.given, one.to}},
                        false});
    }
    if (found.fewest && found.fewest->changes.size() > 1) {
        const FewestCorrections& fewest = *found.fewest;
        Choice all{"correction/fewest",
                   "Change " + std::to_string(fewest.changes.size()) + " answers together",
                   joined(ratio_then(d, fewest.cr), first_then(view, fewest.then)),
                   {},
                   {},
                   false};
        bool own = true;
        std::vector<std::string> what;
        for (const auto& change : fewest.changes) {
            own = own && change.said_by == view.person;
            what.push_back(brief_pair(d, entry.set, change.a, change.b, change.to) + " (now " +
                           ratio_text(change.to >= 1 ? change.given : 1 / change.given) + ")");
            all.changes.push_back({change.a, change.b, change.given, change.to});
        }
        all.more = joined_sentences(listed(what, 10) + ".", lead_then(view, fewest.then));
        if (own) list.push_back(std::move(all));
    }
    list.push_back({"correction/leave",
                    "Leave it as said",
                    joined(ratio_then(d, entry.cr), "give the reason for the record"),
                    {},
                    {{pair.a, pair.b, pair.given, pair.given}},
                    true});
    return list;
}

void Corrections::draw_choices(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                               const Examination& found, const PairCorrection& pair, TextFlow& flow) {
    for (const auto& choice : choices(view, entry, found, pair)) {
        if (choice_row(ui, choice.id, choice.title, choice.detail, chosen_ == choice.id, !view.read_only,
                       flow))
            chosen_ = chosen_ == choice.id ? std::string{} : choice.id;
        if (chosen_ == choice.id) draw_act(ui, view, actions, entry, pair, choice, flow);
    }
    flow.space(4);
}

void Corrections::draw_act(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                           const PairCorrection& pair, const Choice& choice, TextFlow& flow) {
    flow.say(choice.more, Font::small, ui.look().quiet);
    const Box field = flow.next(34);
    if (auto typed =
            text_field(ui, reason_id, "Reason", reason_, {field.x + 2, field.y, field.w - 4, field.h},
                       choice.keeps ? "Why it stays" : "Why (may be left empty)"))
        reason_ = std::move(*typed);
    const std::string* draft = draft_of(ui, reason_id);
    const bool said = !(draft != nullptr ? *draft : reason_).empty();
    const std::string label = choice.keeps ? "Keep it, with this reason"
                              : choice.changes.size() > 1
                                  ? "Make these " + std::to_string(choice.changes.size()) + " changes"
                                  : "Correct this answer";
    const Box row = flow.next(button_height, 10);
    if (!button(ui, "correct", label, {row.x + 2, row.y, std::min(row.w - 4, button_width(label)), row.h},
                ButtonKind::strong, !view.read_only && (said || !choice.keeps)))
        return;
    if (draft != nullptr) reason_ = *draft;
    const Decision& d = view.decision;
    const Id& by = pair.said_by;
    std::string why = reason_;
    if (why.empty()) {
        why = choice.changes.size() > 1 || !pair.implied
                  ? "corrected: these answers contradicted the others"
                  : "corrected: the other answers say " +
                        pair_sentence(d, entry.set, pair.a, pair.b, *pair.implied);
    }
    const std::string step = choice.keeps
                                 ? "Kept " + item_name(d, entry.set, pair.a) + " against " +
                                       item_name(d, entry.set, pair.b) + " at " + ratio_text(pair.given) +
                                       (by.empty() ? "" : " (" + person_name(d, by) + ")")
                                 : correction_label(d, entry.set, by, choice.changes);
    actions.edit(correction_edits(view, entry.set, by, choice.changes, reason_), step, why);
    chosen_.clear();
    reason_.clear();
    if (!choice.keeps) at_ = 0;
}

void Corrections::draw_findings(Ui& ui, const RoomView& view, const SetResult& entry,
                                const Examination& found, const PairCorrection& pair, TextFlow& flow) const {
    const Theme& theme = ui.look();
    if (found.fewest) {
        std::string text = fewest_sentence(*found.fewest);
        const auto& changes = found.fewest->changes;
        if (changes.size() == 1 && (changes[0].a != pair.a || changes[0].b != pair.b)) {
            text += " It is " + item_name(view.decision, entry.set, changes[0].a) + " against " +
                    item_name(view.decision, entry.set, changes[0].b) + ".";
        }
        flow.say(text, Font::body, 0, 6);
    }
    const auto matters = [&](const std::optional<MattersAnswer>& answer, bool several) {
        if (!answer) return;
        const bool proven = answer->matters == Matters::proven_no;
        flow.say(matters_sentence(view, entry.set, *answer, several), proven ? Font::strong : Font::body,
                 proven                                  ? theme.green
                 : answer->matters == Matters::found_yes ? theme.brass_ink
                                                         : theme.quiet,
                 6);
    };
    // It was asked of one pair only, and is said where that one is shown.
    if (found.matters_worst && !found.matters_worst->pairs.empty() &&
        same_pair(found.matters_worst->pairs.front(), {pair.a, pair.b}))
        matters(found.matters_worst, false);
    matters(found.matters_fewest, true);
}

std::optional<ItemPair> Corrections::draw_whose(Ui& ui, const RoomView& view, Actions& actions,
                                                const SetResult& entry, const PairCorrection& pair, bool mean,
                                                TextFlow& flow) const {
    const Decision& d = view.decision;
    const Theme& theme = ui.look();
    if (view.sealed()) {
        flow.say("This is not your own answer; it can be looked at once all are revealed.", Font::small,
                 theme.quiet);
        return std::nullopt;
    }
    std::vector<std::pair<Id, double>> said;
    if (!mean) {
        flow.say(pair.said_by.empty()
                     ? "It was agreed in the room and is corrected there."
                     : "It is corrected among the answers of " + person_name(d, pair.said_by) + ".",
                 Font::small, theme.quiet);
        said.emplace_back(pair.said_by, pair.given);
    } else {
        flow.say("A mean cannot be corrected, but the answers it is made of can, each by who gave it:",
                 Font::small, theme.quiet);
        const PairTable table(view, entry);
        const auto place = [&](const Id& item) {
            return static_cast<std::size_t>(std::find(entry.items.begin(), entry.items.end(), item) -
                                            entry.items.begin());
        };
        said = table.pair(place(pair.a), place(pair.b)).said;
        const double others = pair.implied.value_or(1);
        const auto miss = [&](const auto& one) { return std::abs(std::log(one.second / others)); };
        std::stable_sort(said.begin(), said.end(),
                         [&](const auto& x, const auto& y) { return miss(x) > miss(y); });
    }
    std::optional<ItemPair> result;
    for (const auto& [person, ratio] : said) {
        const std::string who = person.empty() ? "Answer for the room" : person_name(d, person);
        const std::string words = brief_pair(d, entry.set, pair.a, pair.b, ratio);
        const float width = flow.width() - 24;
        const float name = text_size(Font::strong, who).x;
        const bool one_line = name + 16 + text_size(Font::small, words).x <= width;
        const float more = one_line ? 0 : paragraph_height(width, words, Font::small);
        const Box row = flow.next(line_step(Font::strong) + more + 12, 4);
        ImGui::GetWindowDrawList()->AddRect(row.at(), row.end(), theme.edge, 6);
        const std::string label = person.empty() ? who : "Look at the answer of " + who;
        if (press_area(ui, "whose/" + person, label, row, "button", words)) {
            actions.answer_as(person);
            result = ItemPair{pair.a, pair.b};
        }
        draw_text(ui, {row.x + 12, row.y + 6}, who,
                  {.font = Font::strong, .ink = theme.steel, .max_width = width});
        const TextLook quiet{.font = Font::small, .ink = theme.quiet};
        if (one_line)
            draw_text(ui, {row.x + 12 + name + 16, row.y + 8}, words, quiet);
        else
            draw_paragraph(ui, {row.x + 12, row.y + 6 + line_step(Font::strong)}, width, words, quiet);
    }
    flow.space(4);
    return result;
}

} // namespace steelyard
