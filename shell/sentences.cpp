#include "shell/sentences.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <map>
#include <optional>

#include "core/decision/lookup.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

/// Curved quotation marks: lines do not break beside them.
std::string quoted(const std::string& name) {
    return "\xE2\x80\x9C" + name + "\xE2\x80\x9D";
}

/// Before a unit a space, before none nothing.
std::string with_unit(const std::string& number, const std::string& unit) {
    return unit.empty() ? number : number + " " + unit;
}

/// The entry that stands: the last one of its place.
template<class Entry>
const Entry* last_where(const std::vector<Entry>& entries, const auto& matches) {
    const auto found = std::find_if(entries.rbegin(), entries.rend(), matches);
    return found == entries.rend() ? nullptr : &*found;
}

std::string judgment_sentence(const Decision& d, const OpenItem& item) {
    const Node* node = find_node(d.criteria, item.set);
    const std::string pair = item_name(d, item.set, item.a) + " and " + item_name(d, item.set, item.b);
    const std::string place = node_name(d, item.set);
    if (node != nullptr && node->is_leaf()) {
        return node->rate == RateBy::grade
                   ? "The grades " + quoted(item_name(d, item.set, item.a)) + " and " +
                         quoted(item_name(d, item.set, item.b)) + " of " + place + " are not compared yet."
                   : pair + " are not compared yet on " + place + ".";
    }
    return pair + " are not compared yet, in " + place + ".";
}

std::string figure_sentence(const Decision& d, const OpenItem& item) {
    const Node* leaf = find_node(d.criteria, item.criterion);
    const std::string option = option_name(d, item.option);
    const std::string place = node_name(d, item.criterion);
    if (leaf != nullptr && leaf->cost_sheet) {
        return "The cost sheet of " + option + " gives no figure for " + place + " yet.";
    }
    const Figure* last = last_where(
        d.figures, [&](const Figure& f) { return f.criterion == item.criterion && f.option == item.option; });
    if (last != nullptr && last->value) {
        // Only a proportional curve has no worth for a figure that is there.
        return "The figure of " + option + " for " + place + ", " +
               with_unit(figure_text(*last->value), leaf == nullptr ? std::string{} : leaf->unit) +
               ", has no worth: it must be above 0.";
    }
    return option + " has no figure for " + place + " yet.";
}

std::string must_sentence(const Decision& d, const OpenItem& item) {
    const std::string option = option_name(d, item.option);
    const std::string must = quoted(requirement_name(d, item.requirement));
    const Requirement* requirement = find_requirement(d, item.requirement);
    if (requirement == nullptr) {
        return "Whether " + option + " meets the must " + must + " is not settled yet.";
    }
    const bool checked = requirement->criterion.empty() && requirement->node.empty();
    const Check* last = last_where(d.checks, [&](const Check& c) {
        return c.requirement == item.requirement && c.option == item.option;
    });
    const bool limited = requirement->at_least || requirement->at_most || requirement->min_worth;
    if (!limited && !requirement->yes_no) {
        return "The must " + must + " has no limit yet, so " + option + " cannot be checked.";
    }
    if (checked && last != nullptr && last->state == CheckState::asked && !last->value) {
        return option + " was asked about the must " + must + "; the answer is not there yet.";
    }
    return "Whether " + option + " meets the must " + must + " is not settled yet.";
}

/// A number with as many decimals as it takes to tell it from a limit it broke.
std::string told_apart(double value, double limit, int decimals) {
    std::string text = figure_text(value, decimals);
    while (value != limit && decimals < 12 && text == figure_text(limit, decimals))
        text = figure_text(value, ++decimals);
    return text;
}

/// "81 dB(A), at most 78 allowed"; empty where nothing is known but that the must is not met.
std::string broken_limit(const Decision& d, const Requirement& requirement, std::optional<double> value) {
    std::optional<double> least = requirement.at_least;
    if (requirement.min_worth)
        least = std::max(*requirement.min_worth, least.value_or(*requirement.min_worth));
    const std::optional<double>& most = requirement.at_most;
    if (!value || (!least && !most)) return {};
    const bool worth = !requirement.node.empty();
    // A requirement on a criterion may leave the unit to it.
    const Node* leaf = find_node(d.criteria, requirement.criterion);
    const std::string unit =
        worth ? std::string{} : (requirement.unit.empty() && leaf != nullptr ? leaf->unit : requirement.unit);
    // A value may lie inside where only its range does not; then the nearer limit is the one broken.
    const bool over =
        most && (!least || *value > *most || std::abs(*value - *most) < std::abs(*value - *least));
    const double limit = over ? *most : *least;
    const int decimals = worth ? 2 : 6;
    std::string text = with_unit(told_apart(*value, limit, decimals), unit);
    if (worth) text = "worth " + text + " of 1 on " + node_name(d, requirement.node);
    return text + (over ? ", at most " + figure_text(limit) + " allowed"
                        : ", at least " + figure_text(limit) + " needed");
}

/// Places in `results.options` with this rank.
std::vector<std::string> ranked(const Decision& d, const Results& results, int rank) {
    std::vector<std::string> names;
    for (std::size_t o = 0; o < results.options.size(); ++o) {
        if (results.ranks[o] == rank) names.push_back(option_name(d, results.options[o]));
    }
    return names;
}

std::string nobody_sentence(const Decision& d) {
    if (d.options.empty()) return "There are no options yet";
    const bool withdrawn =
        std::all_of(d.options.begin(), d.options.end(), [](const Option& o) { return o.withdrawn; });
    return withdrawn ? "Every option is withdrawn" : "No option is in play";
}

std::string missing_sentence(const std::vector<std::string>& leaves, const std::vector<std::string>& options,
                             bool all) {
    const std::string places = listed(leaves, 4);
    if (all) {
        return (leaves.size() == 1 ? "On " + places + " nobody has a value"
                                   : "Nobody has a value on " + places) +
               ", so every option counts the same there.";
    }
    return listed(options, 4) + (options.size() == 1 ? " has" : " have") + " no value on " + places +
           "; the mean of the others stands in.";
}

/// Two digits that count are all that "about" can claim: 1,437 becomes 1,400.
std::string about_text(double value) {
    if (!(value > 0)) return figure_text(value);
    const double unit = std::pow(10.0, std::floor(std::log10(value)) - 1);
    return figure_text(std::round(value / unit) * unit);
}

/// "1 week" of "weeks", "1 m\xC2\xB2", "1" where there is no unit. Only a plain word loses its plural.
std::string one_unit(const std::string& unit) {
    if (unit.empty()) return "1";
    const bool word = unit.size() > 3 && std::all_of(unit.begin(), unit.end(), [](char c) {
                          return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
                      });
    if (word && unit.back() == 's' && unit[unit.size() - 2] != 's')
        return "1 " + unit.substr(0, unit.size() - 1);
    return "1 " + unit;
}

} // namespace

std::string open_sentence(const Decision& decision, const OpenItem& item) {
    switch (item.kind) {
    case OpenKind::judgment: return judgment_sentence(decision, item);
    case OpenKind::points: return "No points are shared out yet in " + node_name(decision, item.set) + ".";
    case OpenKind::figure: return figure_sentence(decision, item);
    case OpenKind::curve:
        return node_name(decision, item.criterion) + " has no worth curve yet, so no figure counts there.";
    case OpenKind::grade:
        return option_name(decision, item.option) + " has no grade for " +
               node_name(decision, item.criterion) + " yet.";
    case OpenKind::worth:
        return "The grade " + quoted(item_name(decision, item.criterion, item.grade)) + " of " +
               node_name(decision, item.criterion) + " has no worth yet.";
    case OpenKind::requirement: return must_sentence(decision, item);
    }
    return {};
}

RoomId room_of(const OpenItem& item) {
    return item.kind == OpenKind::judgment || item.kind == OpenKind::points ? RoomId::weigh : RoomId::gauge;
}

Id focus_of(const OpenItem& item) {
    if (item.kind == OpenKind::requirement) return item.requirement;
    return room_of(item) == RoomId::weigh ? item.set : item.criterion;
}

std::string room_name(RoomId room) {
    static constexpr std::array<const char*, 6> names{"Frame",    "Weigh",   "Gauge",
                                                      "Standing", "Tipping", "Record"};
    return names[static_cast<std::size_t>(room)];
}

std::string exclusion_reason(const Decision& decision, const Exclusion& exclusion) {
    const Requirement* requirement = find_requirement(decision, exclusion.requirement);
    const std::string broken =
        requirement == nullptr ? std::string{} : broken_limit(decision, *requirement, exclusion.value);
    return requirement_name(decision, exclusion.requirement) + ": " + (broken.empty() ? "not met" : broken);
}

std::string exclusion_sentence(const Decision& decision, const Exclusion& exclusion) {
    const Requirement* requirement = find_requirement(decision, exclusion.requirement);
    const std::string broken =
        requirement == nullptr ? std::string{} : broken_limit(decision, *requirement, exclusion.value);
    return option_name(decision, exclusion.option) + " does not meet the must " +
           quoted(requirement_name(decision, exclusion.requirement)) +
           (broken.empty() ? "." : ": " + broken + ".");
}

std::string standing_sentence(const Decision& decision, const Results& results) {
    if (!results.first) return nobody_sentence(decision);
    const std::vector<std::string> first = ranked(decision, results, 1);
    if (results.options.size() == 1) return first.front() + " is the only option in play";
    if (first.size() == results.options.size() && first.size() > 2)
        return "All " + std::to_string(first.size()) + " options are level";
    if (first.size() > 1) return listed(first) + " are level in first place";
    const double lead = results.lead_points.value_or(0) / 100;
    const std::string shown = points_text(lead);
    const std::string points = shown == "0.0"   ? "less than 0.1 points"
                               : shown == "1.0" ? "1.0 point"
                                                : shown + " points";
    const std::string ahead = points + " of 100 ahead of " + listed(ranked(decision, results, 2));
    // Scores within 1e-9 are level elsewhere too.
    if (lead <= results.settings.too_close + 1e-9)
        return "Too close to call: " + first.front() + " is only " + ahead;
    return first.front() + " is first, " + ahead;
}

std::string lead_in_money_words(const Decision& decision, const Results& results) {
    if (!results.lead_money || !(*results.lead_money > 0)) return {};
    const Node* money = find_node(decision.criteria, results.settings.money);
    const std::string unit = money == nullptr || money->unit.empty() ? "" : " " + money->unit;
    return "worth about " + about_text(*results.lead_money) + unit;
}

std::vector<RateWords> rate_words(const Decision& decision, const Results& results) {
    std::vector<RateWords> lines;
    if (!results.rates) return lines;
    const Node* money = find_node(decision.criteria, results.rates->money);
    const std::string unit = money == nullptr || money->unit.empty() ? "" : " " + money->unit;
    for (const auto& rate : results.rates->rates) {
        const Node* leaf = find_node(decision.criteria, rate.leaf);
        if (!rate.per_unit || leaf == nullptr) continue;
        const std::string amount = about_text(std::abs(*rate.per_unit)) + unit;
        const std::string name = node_name(decision, rate.leaf);
        // A figure that must fall for the price to rise is paid for when it falls.
        const std::string way = *rate.per_unit < 0 ? " less in " : " more in ";
        lines.push_back({amount, leaf->rate == RateBy::grade ? "for one grade better in " + name
                                                             : "for " + one_unit(leaf->unit) + way + name});
    }
    return lines;
}

std::vector<std::string> stand_in_sentences(const Decision& decision, const Results& results) {
    std::vector<std::string> sentences;
    std::vector<std::string> unweighed;
    for (const auto& node : results.nodes) {
        const Node* criterion = find_node(decision.criteria, node.node);
        if (criterion == nullptr || criterion->children.size() < 2 || !(node.weight > 0)) continue;
        const bool weighed = std::any_of(results.sets.begin(), results.sets.end(), [&](const SetResult& s) {
            return s.set == node.node && s.by.empty() && s.weights;
        });
        if (!weighed) unweighed.push_back(node_name(decision, node.node));
    }
    if (!unweighed.empty()) {
        sentences.push_back("In " + listed(unweighed, 4) +
                            " the criteria count equally until they are weighed.");
    }
    // Leaves on which the same options have no value are told together.
    std::vector<std::vector<bool>> order;
    std::map<std::vector<bool>, std::vector<std::string>> leaves;
    for (const auto& leaf : results.leaves) {
        if (!(leaf.weight > 0) || std::count(leaf.missing.begin(), leaf.missing.end(), true) == 0) continue;
        if (leaves.count(leaf.missing) == 0) order.push_back(leaf.missing);
        leaves[leaf.missing].push_back(node_name(decision, leaf.leaf));
    }
    for (const auto& missing : order) {
        std::vector<std::string> options;
        for (std::size_t o = 0; o < missing.size(); ++o) {
            if (missing[o]) options.push_back(option_name(decision, results.options[o]));
        }
        sentences.push_back(missing_sentence(leaves[missing], options, options.size() == missing.size()));
    }
    return sentences;
}

std::vector<std::string> range_sentences(const Decision& decision, const Results& results) {
    std::vector<std::string> sentences;
    for (const auto& [option, range] : results.ranges) {
        sentences.push_back(option_name(decision, option) + ": " + points_text(range[0]) + " to " +
                            points_text(range[1]) + ", depending on what is still open");
    }
    return sentences;
}

std::string listed(const std::vector<std::string>& names, std::size_t most) {
    std::string text;
    const std::size_t shown = names.size() <= most ? names.size() : most;
    for (std::size_t i = 0; i < shown; ++i) {
        const bool last = i + 1 == names.size();
        text += (i == 0 ? "" : last ? " and " : ", ") + names[i];
    }
    if (names.size() > shown) text += " and " + std::to_string(names.size() - shown) + " more";
    return text;
}

} // namespace steelyard
