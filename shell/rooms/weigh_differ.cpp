#include "shell/rooms/weigh_differ.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <numeric>

#include "core/decision/lookup.hpp"
#include "core/results/disagreements.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float gap = 12;
constexpr std::size_t pairs_shown = 6;
constexpr float two_columns = 760;

std::string decimals(const char* format, double value) {
    char buffer[32];
    std::snprintf(buffer, sizeof buffer, format, value);
    return buffer;
}

/// "R. Voss: Noise counts 6 times as much as Floor space".
std::string said(const Decision& d, const Spread& spread, std::size_t which) {
    return person_name(d, spread.furthest[which]) + ": " +
           pair_sentence(d, spread.set, spread.a, spread.b, spread.furthest_ratios[which]);
}

/// "3 say Noise, 1 equal, 2 say Floor space".
std::string sides(const Decision& d, const Spread& s) {
    std::string text;
    const auto add = [&](int count, const std::string& what) {
        if (count > 0) text += (text.empty() ? "" : ", ") + std::to_string(count) + " " + what;
    };
    add(s.in_favour, "for " + item_name(d, s.set, s.a));
    add(s.equal, "equal");
    add(s.against, "for " + item_name(d, s.set, s.b));
    return text;
}

std::string points(double value) {
    return value < 0.05 ? "less than 0.1 points" : decimals("%.1f points", value);
}

/// What it would do to take one side or the other.
std::string verdict(const RoomView& view, const Disagreement& difference) {
    const Decision& d = view.decision;
    std::string text;
    for (const auto& side : difference.sides) {
        if (!side.first_moves) continue;
        text += (text.empty() ? "" : " ") + ("With " + person_name(d, side.judge)) + "'s answer ";
        text += side.first ? option_name(d, *side.first) + " is first." : "nobody is first.";
    }
    if (!text.empty()) return text;
    const std::string first = view.results.first ? option_name(d, view.results.options[*view.results.first])
                                                 : std::string("nobody");
    return "Your disagreement does not matter here: " + first +
           " stays first either way, the lead moves by " + points(difference.lead_movement()) + ".";
}

/// Our own words for a coefficient from 0 to 1.
std::string alike_words(double w) {
    if (w >= 0.9) return "The judges rank almost the same.";
    if (w >= 0.7) return "The judges rank much alike.";
    if (w >= 0.4) return "The judges rank somewhat alike.";
    return "The judges' rankings have little in common.";
}

std::string coefficient(const Concordance& c) {
    return "Kendall's W " + decimals("%.2f", c.w) + " (0 to 1), chi-square " + decimals("%.2f", c.chi2) +
           ", p " + decimals("%.3f", c.p) + (c.exact ? ", counted exactly" : ", by chi-square");
}

std::size_t place_of(const Decision& d, const Id& option) {
    const auto found =
        std::find_if(d.options.begin(), d.options.end(), [&](const Option& o) { return o.id == option; });
    return static_cast<std::size_t>(found - d.options.begin());
}

/// The options as marks, best first. Gives where the row ends.
float draw_order(Ui& ui, const Decision& d, const std::vector<Id>& options, const std::vector<int>& ranks,
                 ImVec2 at, float right) {
    std::vector<std::size_t> order(options.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return ranks[a] < ranks[b]; });
    float x = at.x;
    for (std::size_t k = 0; k < order.size(); ++k) {
        if (x + 22 > right - (k + 1 < order.size() ? 24 : 0)) {
            draw_text(ui, {x, at.y + 2}, "\xE2\x80\xA6");
            break;
        }
        option_mark(ui, {x, at.y}, place_of(d, options[order[k]]));
        x += 26;
    }
    return x;
}

float draw_judges(Ui& ui, const RoomView& view, const GroupResult& group, ImVec2 at, float width) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    GrowingCard card(ui, at, width);
    float y = card.heading("How alike the judges rank");
    if (group.concordance) {
        y += draw_paragraph(ui, {card.left(), y}, card.width(), alike_words(group.concordance->w));
        y += draw_paragraph(ui, {card.left(), y}, card.width(), coefficient(*group.concordance),
                            {.font = Font::small, .ink = theme.quiet}) +
             8;
    }
    const float names = std::min(card.width() * 0.38f, 180.0f);
    for (std::size_t j = 0; j < group.judges.size(); ++j) {
        const std::string name = person_name(d, group.judges[j]);
        draw_text(ui, {card.left(), y + 2}, name, {.max_width = names - 10});
        const float x = draw_order(ui, d, view.results.options, group.rankings[j].ranks,
                                   {card.left() + names, y}, card.right());
        const auto& ranks = group.rankings[j].ranks;
        const bool differs = view.results.first && ranks[*view.results.first] != 1;
        if (differs && x + 60 < card.right()) {
            draw_text(ui, {card.right(), y + 2}, "differs",
                      {.font = Font::small, .ink = theme.brass_ink, .align = Align::right});
        }
        y += 30;
    }
    rule(ui, card.left(), y + 2, card.width());
    y += 12;
    draw_text(ui, {card.left(), y}, "Without one of them", {.font = Font::strong, .ink = theme.quiet});
    y += 26;
    std::vector<std::string> unmoved;
    for (const auto& without : group.without) {
        if (!without.first_moves) {
            unmoved.push_back(person_name(d, without.person));
            continue;
        }
        const std::string text =
            "Without " + person_name(d, without.person) + " " +
            (without.first ? option_name(d, *without.first) + " is first." : "nobody is first.");
        y += draw_paragraph(ui, {card.left(), y}, card.width(), text,
                            {.font = Font::strong, .ink = theme.brass_ink});
        y += 4;
    }
    if (!unmoved.empty() && view.results.first) {
        const std::string first = option_name(d, view.results.options[*view.results.first]);
        const std::string who =
            unmoved.size() == group.without.size() ? "any one of them" : listed(unmoved, 6);
        y += draw_paragraph(ui, {card.left(), y}, card.width(),
                            "Without " + who + " " + first + " stays first.");
    }
    return card.end(y);
}

float draw_sets(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    const Decision& d = view.decision;
    const bool some = std::any_of(view.results.sets.begin(), view.results.sets.end(),
                                  [](const SetResult& s) { return s.concordance.has_value(); });
    if (!some) return at.y;
    GrowingCard card(ui, at, width);
    float y = card.heading("Set by set");
    for (const auto& set : view.results.sets) {
        if (!set.concordance) continue;
        const std::string w = "W " + decimals("%.2f", set.concordance->w);
        const ImVec2 size =
            draw_text(ui, {card.right(), y}, w, {.font = Font::strong, .align = Align::right});
        draw_text(ui, {card.left(), y}, node_name(d, set.set), {.max_width = card.width() - size.x - 12});
        y += 22;
        const std::string detail = std::to_string(set.concordance->judges.size()) + " judges, p " +
                                   decimals("%.3f", set.concordance->p) +
                                   (set.concordance->exact ? ", counted exactly" : ", by chi-square");
        y += draw_paragraph(ui, {card.left(), y}, card.width(), detail,
                            {.font = Font::small, .ink = ui.look().quiet}) +
             8;
    }
    return card.end(y);
}

} // namespace

std::optional<DifferPage::Chosen> DifferPage::draw_pairs(Ui& ui, const RoomView& view, ImVec2 at, float width,
                                                         float& bottom) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    std::optional<Chosen> chosen;
    GrowingCard card(ui, at, width);
    float y = card.heading("Pairs on which you differ");
    const bool finished = view.disagreements != nullptr && view.disagreement_progress >= 1;
    if (!finished) {
        const int percent = static_cast<int>(100 * view.disagreement_progress);
        y += draw_paragraph(ui, {card.left(), y}, card.width(),
                            "Working out what each does to the standing: " + std::to_string(percent) + " %",
                            {.ink = theme.quiet});
    } else if (view.disagreements->empty()) {
        y += draw_paragraph(ui, {card.left(), y}, card.width(),
                            "On every pair that several judged you agree.");
    } else {
        const auto& found = *view.disagreements;
        const auto moving = std::count_if(found.begin(), found.end(),
                                          [](const Disagreement& one) { return one.moves_first(); });
        const std::string summary =
            moving == 0 ? "None of them decides who is first."
                        : (moving == 1 ? "One of them decides" : std::to_string(moving) + " of them decide") +
                              std::string(" who is first.");
        y += draw_paragraph(ui, {card.left(), y}, card.width(), summary,
                            {.font = Font::strong, .ink = moving == 0 ? theme.green : theme.red}) +
             6;
        const std::size_t shown = all_ ? found.size() : std::min(found.size(), pairs_shown);
        for (std::size_t k = 0; k < shown; ++k) {
            const Disagreement& difference = found[k];
            const Spread& spread = view.results.group->spreads[difference.spread];
            const std::string name =
                item_name(d, spread.set, spread.a) + " against " + item_name(d, spread.set, spread.b);
            const std::string both = said(d, spread, 0) + ". " + said(d, spread, 1) + ".";
            const double apart =
                std::exp(std::abs(std::log(spread.furthest_ratios[0] / spread.furthest_ratios[1])));
            const std::string spread_words = sides(d, spread) + "; the furthest two " + ratio_text(apart) +
                                             " times apart; typical spread a factor of " +
                                             ratio_text(spread.gsd);
            const std::string effect = verdict(view, difference);
            const float w = card.width();
            const float height = 26 + paragraph_height(w, both, Font::body) +
                                 paragraph_height(w, spread_words, Font::small) +
                                 paragraph_height(w, effect, Font::body) + 18;
            const Box box{card.left() - 8, y, w + 16, height};
            const std::string id = "differ/" + spread.set + "/" + spread.a + "/" + spread.b;
            if (press_area(ui, id, name, box, "row",
                           difference.moves_first() ? "decides" : "does not matter"))
                chosen = Chosen{spread.set, {spread.a, spread.b}};
            float line = y + 8;
            const std::string set_name = node_name(d, spread.set);
            const ImVec2 size = draw_text(
                ui, {card.right(), line + 1}, set_name,
                {.font = Font::small, .ink = theme.quiet, .max_width = w * 0.4f, .align = Align::right});
            draw_text(ui, {card.left(), line}, name, {.font = Font::strong, .max_width = w - size.x - 12});
            line += 24;
            line += draw_paragraph(ui, {card.left(), line}, w, both);
            line += draw_paragraph(ui, {card.left(), line}, w, spread_words,
                                   {.font = Font::small, .ink = theme.quiet});
            draw_paragraph(ui, {card.left(), line}, w, effect,
                           {.ink = difference.moves_first() ? theme.red : theme.green});
            y += height;
            rule(ui, card.left(), y, card.width());
        }
        if (found.size() > pairs_shown) {
            const std::string label =
                all_ ? "Show the first only" : "Show all " + std::to_string(found.size());
            y += 8;
            if (button(ui, "differ/all", label, {card.left(), y, button_width(label, ButtonKind::quiet), 32},
                       ButtonKind::quiet))
                all_ = !all_;
            y += 32;
        }
    }
    bottom = card.end(y);
    return chosen;
}

std::optional<DifferPage::Chosen> DifferPage::draw(Ui& ui, const RoomView& view, Actions& actions, Box area) {
    if (!has_something(view)) return std::nullopt;
    actions.weigh_disagreements();
    ScrollArea scroll(ui, "differ", area);
    const Box inner = scroll.inner();
    const float width = cards_width(area, inner);
    float y = inner.y;
    y += draw_paragraph(ui, {inner.x, y}, width, "Where you disagree", {.font = Font::large}) + gap;
    const bool beside = width >= two_columns;
    const float left_width = beside ? std::floor((width - gap) * 0.6f) : width;
    float left = y;
    const auto chosen = draw_pairs(ui, view, {inner.x, y}, left_width, left);
    const float right_x = beside ? inner.x + left_width + gap : inner.x;
    const float right_width = beside ? width - left_width - gap : width;
    float right = beside ? y : left + gap;
    right = draw_judges(ui, view, *view.results.group, {right_x, right}, right_width);
    right = draw_sets(ui, view, {right_x, right + gap}, right_width);
    scroll.reach(std::max(left, right) + 8);
    return chosen;
}

} // namespace steelyard
