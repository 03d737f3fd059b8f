#include "shell/rooms/standing_pair.hpp"

#include <algorithm>
#include <cmath>

#include "core/decision/lookup.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float row_step = 32;
constexpr float bar_height = 22;
constexpr float value_width = 50;
constexpr float open_width = 42;
/// Differences below show as 0.0 points.
constexpr double even = 0.0005;
/// Scores this near share a rank.
constexpr double same = 1e-9;

/// What one criterion gives one option over another.
struct Difference {
    const NodeResult* node;
    std::string name;
    double score; ///< Positive: for the first of the two.
    bool open;    ///< A value that stands in for a missing one has a part in it.
};

bool stands_in(const Results& results, const NodeResult& node, std::size_t x, std::size_t y) {
    if (node.leaf) {
        return std::any_of(results.leaves.begin(), results.leaves.end(), [&](const LeafResult& leaf) {
            return leaf.leaf == node.node && (leaf.missing[x] || leaf.missing[y]);
        });
    }
    return std::any_of(results.nodes.begin(), results.nodes.end(), [&](const NodeResult& child) {
        return child.parent == node.node && stands_in(results, child, x, y);
    });
}

/// The greatest gain of `x` first.
std::vector<Difference> differences(const RoomView& view, std::size_t x, std::size_t y, bool groups) {
    std::vector<Difference> list;
    const Id& goal = view.results.nodes.front().node;
    for (const auto& node : view.results.nodes) {
        if (groups ? node.parent != goal : !node.leaf) continue;
        list.push_back({&node, node_name(view.decision, node.node),
                        node.contribution[x] - node.contribution[y], stands_in(view.results, node, x, y)});
    }
    std::stable_sort(list.begin(), list.end(),
                     [](const Difference& a, const Difference& b) { return a.score > b.score; });
    return list;
}

bool has_groups(const Results& results) {
    return std::any_of(results.nodes.begin(), results.nodes.end(),
                       [](const NodeResult& node) { return !node.leaf && !node.parent.empty(); });
}

std::string signed_points(double score) {
    const std::string text = points_text(score);
    return score > 0 ? "+" + text : text;
}

std::size_t place_in_file(const Decision& decision, const Id& option) {
    const auto found = std::find_if(decision.options.begin(), decision.options.end(),
                                    [&](const Option& o) { return o.id == option; });
    return static_cast<std::size_t>(found - decision.options.begin());
}

/// "Brook is better on Purchase price and Delivery; Alder on Residual dirt."
std::string better_sentence(const std::vector<Difference>& list, const std::string& x, const std::string& y) {
    std::vector<std::string> for_x;
    std::vector<std::string> for_y;
    for (const auto& difference : list) {
        if (difference.score >= even) for_x.push_back(difference.name);
        if (difference.score <= -even) for_y.insert(for_y.begin(), difference.name);
    }
    if (for_x.empty() && for_y.empty()) return x + " and " + y + " are level on everything.";
    if (for_y.empty()) return x + " is better on " + listed(for_x) + "; " + y + " on nothing.";
    if (for_x.empty()) return y + " is better on " + listed(for_y) + "; " + x + " on nothing.";
    return x + " is better on " + listed(for_x) + "; " + y + " on " + listed(for_y) + ".";
}

/// "All in all 1.2 points of 100 for Brook."
std::string sum_sentence(const Results& results, std::size_t x, std::size_t y, const std::string& x_name,
                         const std::string& y_name) {
    const double sum = results.scores[x] - results.scores[y];
    if (std::abs(sum) <= same) return "All in all they are level.";
    const std::string points = std::abs(sum) < even ? "less than 0.1" : points_text(std::abs(sum));
    return "All in all " + points + " points of 100 for " + (sum > 0 ? x_name : y_name) + ".";
}

/// The bars of one pair; made anew for every frame.
class PairBars {
public:
    PairBars(Ui& ui, const RoomView& view, const std::vector<Difference>& list, std::size_t x, std::size_t y,
             const GrowingCard& card)
        : ui_(ui),
          view_(view),
          list_(list),
          x_(view.results.options[x]),
          y_(view.results.options[y]),
          card_(card) {
        float names = 0;
        double most_for = 0;
        double most_against = 0;
        bool open = false;
        for (const auto& difference : list_) {
            if (std::abs(difference.score) < even) continue;
            names = std::max(names, text_size(Font::body, difference.name).x);
            most_for = std::max(most_for, difference.score);
            most_against = std::max(most_against, -difference.score);
            open = open || difference.open;
        }
        name_width_ = std::min(names, card_.width() * 0.44f);
        const float margin = value_width + (open ? open_width : 0);
        const float left = card_.left() + name_width_ + 12;
        const float before = most_against > 0 ? margin : 8;
        const float room = std::max(40.0f, card_.right() - left - before - (most_for > 0 ? margin : 8));
        const double whole = most_for + most_against;
        scale_ = whole > 0 ? room / static_cast<float>(whole) : 0;
        zero_ = left + before + scale_ * static_cast<float>(most_against);
    }

    /// Gives where the bars end.
    float draw(float y) {
        const float top = y;
        std::vector<std::string> level;
        for (const auto& difference : list_) {
            if (std::abs(difference.score) < even) {
                level.push_back(difference.name);
                continue;
            }
            draw_row(difference, y);
            y += row_step;
        }
        if (y > top) {
            ImGui::GetWindowDrawList()->AddRectFilled({zero_ - 0.5f, top - 4}, {zero_ + 0.5f, y - 6},
                                                      ui_.look().ink);
        }
        if (!level.empty()) {
            y += 2 + draw_paragraph(ui_, {card_.left(), y + 2}, card_.width(),
                                    "Level on " + listed(level, 6) + ".",
                                    {.font = Font::small, .ink = ui_.look().quiet});
        }
        return y;
    }

private:
    void draw_row(const Difference& difference, float y) {
        const bool for_x = difference.score > 0;
        const Id& winner = for_x ? x_ : y_;
        const float length = scale_ * static_cast<float>(std::abs(difference.score));
        const float text_y = y + (bar_height - font_size(Font::body)) / 2;
        draw_text(ui_, {card_.left() + name_width_, text_y}, difference.name,
                  {.max_width = name_width_, .align = Align::right});
        const Box box{for_x ? zero_ : zero_ - length, y, std::max(length, 1.0f), bar_height};
        ImGui::GetWindowDrawList()->AddRectFilled(
            box.at(), box.end(), option_colour(ui_.look(), place_in_file(view_.decision, winner)), 2);
        const std::string value = signed_points(difference.score);
        LedgerItem item;
        item.id = "standing/difference/" + difference.node->node;
        item.label = difference.name + ": better for " + option_name(view_.decision, winner);
        item.role = "img";
        item.value = value;
        item.at = box.at();
        item.size = {box.w, box.h};
        item.may_scroll = ui_.scrolling;
        ui_.ledger.add(std::move(item));

        const Align align = for_x ? Align::left : Align::right;
        const float away = for_x ? 1.0f : -1.0f;
        const float end = for_x ? box.right() : box.x;
        const float small_y = y + (bar_height - font_size(Font::small)) / 2;
        const ImVec2 shown =
            draw_text(ui_, {end + away * 8, text_y}, value, {.font = Font::strong, .align = align});
        if (difference.open) {
            draw_text(ui_, {end + away * (8 + shown.x + 8), small_y}, "open",
                      {.font = Font::small, .ink = ui_.look().brass_ink, .align = align});
        }
    }

    Ui& ui_;
    const RoomView& view_;
    const std::vector<Difference>& list_;
    const Id& x_;
    const Id& y_;
    const GrowingCard& card_;
    float name_width_ = 0;
    float scale_ = 0;
    float zero_ = 0;
};

} // namespace

void StandingPair::choose(const Results& results) {
    const auto place = [&](const Id& option) -> std::optional<std::size_t> {
        const auto found = std::find(results.options.begin(), results.options.end(), option);
        if (found == results.options.end()) return std::nullopt;
        return static_cast<std::size_t>(found - results.options.begin());
    };
    /// The best of those in play but one.
    const auto best_but = [&](std::size_t left_out) {
        std::size_t best = left_out == 0 ? 1 : 0;
        for (std::size_t o = 0; o < results.options.size(); ++o) {
            if (o != left_out && results.ranks[o] < results.ranks[best]) best = o;
        }
        return best;
    };
    const auto one = place(one_);
    const auto other = place(other_);
    x_ = one ? *one : other && *other == *results.first ? best_but(*other) : *results.first;
    y_ = other && *other != x_ ? *other : best_but(x_);
}

float StandingPair::draw_heads(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    const Results& results = view.results;
    std::vector<std::string> names;
    for (const auto& option : results.options) names.push_back(option_name(view.decision, option));
    const double sum = results.scores[x_] - results.scores[y_];
    const std::string between = std::abs(sum) <= same ? "level with" : sum > 0 ? "before" : "behind";
    const float why_width = text_size(Font::strong, "Why").x + 10;
    const float between_width = text_size(Font::strong, between).x + 20;
    const float list_width = std::min(190.0f, (width - why_width - between_width) / 2);
    const float text_y = at.y + (32 - font_size(Font::strong)) / 2;
    const TextLook look{.font = Font::strong, .ink = ui.look().quiet};

    float x = at.x;
    draw_text(ui, {x, text_y}, "Why", look);
    x += why_width;
    const auto one = drop_down(ui, "standing/one", "Option explained", names, x_, {x, at.y, list_width, 32});
    x += list_width;
    draw_text(ui, {x + 10, text_y}, between, look);
    x += between_width;
    const auto other =
        drop_down(ui, "standing/other", "Option it is set against", names, y_, {x, at.y, list_width, 32});
    if (one) {
        // The other way round where the same is taken twice.
        other_ = results.options[*one == y_ ? x_ : y_];
        one_ = results.options[*one];
    } else if (other) {
        one_ = results.options[*other == x_ ? y_ : x_];
        other_ = results.options[*other];
    }
    float y = at.y + 32 + 12;
    if (has_groups(results)) {
        const auto chosen = choice(ui, "standing/detail", "Shown by", {"Single criteria", "Groups"},
                                   groups_ ? 1 : 0, {at.x, y, std::min(width, 280.0f), 30});
        if (chosen) groups_ = *chosen == 1;
        y += 30 + 14;
    } else {
        groups_ = false;
    }
    return y;
}

float StandingPair::draw(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    choose(view.results);
    GrowingCard card(ui, at, width);
    float y = draw_heads(ui, view, {card.left(), at.y + 16}, card.width());
    const auto list = differences(view, x_, y_, groups_);
    y = PairBars(ui, view, list, x_, y_, card).draw(y);
    y += 10;
    const std::string x_name = option_name(view.decision, view.results.options[x_]);
    const std::string y_name = option_name(view.decision, view.results.options[y_]);
    y += draw_paragraph(ui, {card.left(), y}, card.width(), better_sentence(list, x_name, y_name));
    y += 4 + draw_paragraph(ui, {card.left(), y + 4}, card.width(),
                            sum_sentence(view.results, x_, y_, x_name, y_name), {.ink = ui.look().quiet});
    if (std::any_of(list.begin(), list.end(), [](const Difference& d) { return d.open; })) {
        y += 4 + draw_paragraph(ui, {card.left(), y + 4}, card.width(),
                                "Where it says open, a value stands in for one that is missing.",
                                {.font = Font::small, .ink = ui.look().quiet});
    }
    return card.end(y);
}

} // namespace steelyard
