#include "shell/rooms/gauge_model.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <map>
#include <set>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/decision/words.hpp"
#include "core/measure/by_place.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

constexpr const char* dot = " \xC2\xB7 ";
constexpr const char* dash = "\xE2\x80\x93";

std::string joined(const std::vector<std::string>& parts, const char* between = dot) {
    std::string text;
    for (const auto& part : parts) {
        if (!part.empty()) text += (text.empty() ? "" : between) + part;
    }
    return text;
}

std::string range_text(const std::optional<double>& low, const std::optional<double>& high) {
    if (low && high) return figure_text(*low) + " to " + figure_text(*high);
    if (low) return "from " + figure_text(*low);
    return high ? "up to " + figure_text(*high) : std::string{};
}

class Builder {
public:
    explicit Builder(const RoomView& view)
        : d_(view.decision),
          r_(view.results),
          person_(view.person),
          figures_(view.decision.figures),
          grades_(view.decision.grades) {
        for (const auto& computed : r_.figures) {
            for (const auto& [option, value] : computed.values) computed_[{computed.leaf, option}] = value;
        }
        for (const auto& must : r_.musts) musts_[{must.requirement, must.option}] = &must;
        for (const auto& exclusion : r_.excluded) excluded_.insert({exclusion.option, exclusion.requirement});
        for (const auto& check : d_.checks) checks_[{check.requirement, check.option}] = &check;
        for (const auto& leaf : r_.leaves) {
            for (std::size_t o = 0; o < r_.options.size() && o < leaf.local.size(); ++o)
                local_[{leaf.leaf, r_.options[o]}] = {leaf.local[o], leaf.missing[o]};
        }
    }

    Model run() {
        Model model;
        for (const auto& option : d_.options) model.columns.push_back({out_of_play(option)});
        const Node* group = nullptr;
        for (const auto& placed : placed_nodes(d_.criteria)) {
            const Node& node = *placed.node;
            // A goal without criteria is a leaf too, but nothing is asked of it yet.
            if (!node.is_leaf() || (placed.parent == nullptr && node.rate == RateBy::pairs)) continue;
            if (placed.parent != group || model.rows.empty()) {
                model.rows.push_back(section(section_title(placed.parent)));
                group = placed.parent;
            }
            model.rows.push_back(leaf_row(node));
        }
        if (!d_.requirements.empty()) model.rows.push_back(section("Musts"));
        for (const auto& requirement : d_.requirements) model.rows.push_back(must_row(requirement));
        return model;
    }

private:
    using Place = std::pair<Id, Id>;

    std::string out_of_play(const Option& option) const {
        if (option.withdrawn) return "withdrawn";
        const bool in_play = std::find(r_.options.begin(), r_.options.end(), option.id) != r_.options.end();
        return in_play ? "" : "excluded";
    }

    static Row section(std::string title) {
        Row row;
        row.title = std::move(title);
        return row;
    }

    /// The names from below the root down to a group: "Cost › Upkeep".
    std::string section_title(const Node* group) const {
        if (group == nullptr || group == &d_.criteria) return "Criteria";
        std::string title = node_name(d_, group->id);
        for (const Node* up = find_parent(d_.criteria, group->id); up != nullptr && up != &d_.criteria;
             up = find_parent(d_.criteria, up->id))
            title = node_name(d_, up->id) + " \xE2\x80\xBA " + title;
        return title;
    }

    Row leaf_row(const Node& leaf) const {
        Row row;
        row.id = leaf.id;
        row.title = node_name(d_, leaf.id);
        row.kind = leaf.rate == RateBy::pairs   ? RowKind::pairs
                   : leaf.rate == RateBy::grade ? RowKind::grade
                   : leaf.cost_sheet            ? RowKind::sheet
                                                : RowKind::figure;
        row.detail = leaf_detail(leaf);
        for (const auto& option : d_.options) {
            Cell cell = leaf.rate == RateBy::pairs   ? pairs_cell(leaf, option)
                        : leaf.rate == RateBy::grade ? grade_cell(leaf, option)
                        : leaf.cost_sheet            ? sheet_cell(leaf, option)
                                                     : figure_cell(leaf, option);
            row.has_ranges = row.has_ranges || !cell.range.empty();
            row.cells.push_back(std::move(cell));
        }
        return row;
    }

    static Words leaf_detail(const Node& leaf) {
        switch (leaf.rate) {
        case RateBy::pairs: return {"judged in pairs", Tone::quiet};
        case RateBy::grade: {
            if (leaf.grades.empty()) return {"no grades to choose from yet", Tone::open};
            const std::string count =
                std::to_string(leaf.grades.size()) + (leaf.grades.size() == 1 ? " grade" : " grades");
            if (leaf.worths == WorthsBy::pairs) return {count + dot + "weighed in pairs", Tone::quiet};
            const bool known =
                std::all_of(leaf.grades.begin(), leaf.grades.end(), [](const Grade& g) { return g.worth; });
            return known ? Words{count, Tone::quiet} : Words{count + dot + "worth open", Tone::open};
        }
        case RateBy::figure: break;
        }
        if (!leaf.curve) return {joined({leaf.unit, "no curve yet"}), Tone::open};
        return {joined({leaf.unit, curve_words(*leaf.curve)}), Tone::quiet};
    }

    /// A place without a value: open while the option takes part.
    Cell open_cell(const Option& option, std::string small = {}) const {
        Cell cell;
        cell.open = out_of_play(option).empty();
        cell.main = cell.open ? Words{"open", Tone::open} : Words{dash, Tone::quiet};
        cell.small = {std::move(small), Tone::quiet};
        return cell;
    }

    Cell figure_cell(const Node& leaf, const Option& option) const {
        const auto& entries = figures_.at(leaf.id, option.id);
        if (entries.empty() || !entries.back()->value) return open_cell(option);
        const Figure& now = *entries.back();
        Cell cell;
        cell.main = {figure_text(*now.value), Tone::plain};
        cell.range = range_text(now.low, now.high);
        for (const Figure* before : superseded(entries)) {
            if (before->round == now.round && now.round) continue;
            cell.change = change_text(*before->value, *now.value);
            break;
        }
        const std::string round = now.round ? "round " + std::to_string(*now.round) : std::string{};
        cell.small = {joined({round, std::string(word(now.status))}), Tone::quiet};
        return cell;
    }

    Cell sheet_cell(const Node& leaf, const Option& option) const {
        const auto found = computed_.find({leaf.id, option.id});
        if (found == computed_.end()) return open_cell(option, "no costs yet");
        Cell cell;
        // Cents of a sum over ten years are noise.
        cell.main = {figure_text(found->second, std::abs(found->second) >= 1000 ? 0 : 2), Tone::plain};
        cell.small = {"by cost sheet", Tone::quiet};
        return cell;
    }

    Cell pairs_cell(const Node& leaf, const Option& option) const {
        const auto found = local_.find({leaf.id, option.id});
        if (found == local_.end() || found->second.second)
            return open_cell(option, out_of_play(option).empty() ? "compare in Weigh" : "");
        Cell cell;
        cell.main = {worth_text(found->second.first), Tone::plain};
        cell.small = {"judged in pairs", Tone::quiet};
        return cell;
    }

    static std::string grade_name(const Node& leaf, const Id& id) {
        const Grade* grade = find_grade(leaf, id);
        return grade == nullptr || grade->name.empty() ? id : grade->name;
    }

    Cell grade_cell(const Node& leaf, const Option& option) const {
        std::vector<std::pair<Id, Id>> by; // Person and grade, in the order first given.
        Id agreed;
        for (const GradeEntry* entry : grades_.at(leaf.id, option.id)) {
            if (entry->by.empty()) {
                agreed = entry->grade;
                continue;
            }
            std::erase_if(by, [&](const auto& one) { return one.first == entry->by; });
            if (!entry->grade.empty()) by.emplace_back(entry->by, entry->grade);
        }
        Cell cell;
        if (!agreed.empty()) {
            cell.main = {grade_name(leaf, agreed), Tone::plain};
            cell.small = {"agreed", Tone::quiet};
            return cell;
        }
        if (!person_.empty()) return own_grade_cell(leaf, option, by);
        if (by.empty()) return open_cell(option);
        std::vector<std::string> names;
        std::vector<std::string> people;
        for (const auto& [person, grade] : by) {
            const std::string name = grade_name(leaf, grade);
            if (std::find(names.begin(), names.end(), name) == names.end()) names.push_back(name);
            people.push_back(person_name(d_, person));
        }
        cell.main = {joined(names, " / "), Tone::plain};
        cell.small = {people.size() <= 2 ? joined(people, ", ") : std::to_string(people.size()) + " people",
                      Tone::quiet};
        return cell;
    }

    /// While somebody grades, what the others said stays out of his sight.
    Cell own_grade_cell(const Node& leaf, const Option& option,
                        const std::vector<std::pair<Id, Id>>& by) const {
        const auto own =
            std::find_if(by.begin(), by.end(), [&](const auto& one) { return one.first == person_; });
        if (own != by.end()) {
            Cell cell;
            cell.main = {grade_name(leaf, own->second), Tone::plain};
            cell.small = {person_name(d_, person_), Tone::quiet};
            return cell;
        }
        const Person* person = find_person(d_, person_);
        const bool abstains = person != nullptr && std::find(person->abstains.begin(), person->abstains.end(),
                                                             option.id) != person->abstains.end();
        if (abstains) {
            Cell cell;
            cell.main = {dash, Tone::quiet};
            cell.small = {person_name(d_, person_) + " abstains", Tone::quiet};
            return cell;
        }
        return open_cell(option, by.empty() ? "" : "not graded by " + person_name(d_, person_));
    }

    Row must_row(const Requirement& must) const {
        Row row;
        row.id = must.id;
        row.title = requirement_name(d_, must.id);
        row.kind = must.yes_no               ? RowKind::must_yes_no
                   : !must.criterion.empty() ? RowKind::must_read
                   : !must.node.empty()      ? RowKind::must_node
                                             : RowKind::must_limit;
        const std::string limit = must.yes_no ? "yes or no" : limit_words(must);
        row.detail = {
            joined({must.unit, limit.empty() ? "no limit yet" : limit, must.safety ? "safety" : ""}),
            limit.empty() ? Tone::open : Tone::quiet};
        for (const auto& option : d_.options) row.cells.push_back(must_cell(must, option, row.kind));
        row.has_ranges =
            std::any_of(row.cells.begin(), row.cells.end(), [](const Cell& c) { return !c.range.empty(); });
        return row;
    }

    Cell must_cell(const Requirement& must, const Option& option, RowKind kind) const {
        // What is read from elsewhere is not to be entered here.
        const bool entered = kind == RowKind::must_limit || kind == RowKind::must_yes_no;
        const auto found = musts_.find({must.id, option.id});
        if (found == musts_.end() ||
            (found->second->state == MustState::unchecked && !found->second->value)) {
            Cell cell = open_cell(option);
            cell.open = cell.open && entered;
            return cell;
        }
        const MustResult& result = *found->second;
        Words state{must_words(result.state), must_tone(result.state)};
        if (excluded_.contains({option.id, must.id})) state.text += dot + std::string("excluded");
        Cell cell;
        cell.open = entered && (result.state == MustState::asked || result.state == MustState::undecided);
        if (result.value) {
            cell.main = {kind == RowKind::must_node ? worth_text(*result.value) : figure_text(*result.value),
                         result.state == MustState::failed ? Tone::bad : Tone::plain};
            cell.small = state;
        } else {
            cell.main = state;
        }
        if (const auto check = checks_.find({must.id, option.id}); check != checks_.end()) {
            if (kind == RowKind::must_limit) cell.range = range_text(check->second->low, check->second->high);
            if (!result.value) cell.small = {check->second->source, Tone::quiet};
        }
        if (kind == RowKind::must_read && result.state == MustState::undecided) {
            const auto& entries = figures_.at(must.criterion, option.id);
            if (!entries.empty()) cell.range = range_text(entries.back()->low, entries.back()->high);
        }
        return cell;
    }

    const Decision& d_;
    const Results& r_;
    const Id& person_;
    ByPlace<Figure> figures_;
    ByPlace<GradeEntry> grades_;
    std::map<Place, double> computed_;
    std::map<Place, const MustResult*> musts_;
    std::map<Place, const Check*> checks_;
    std::set<Place> excluded_;
    std::map<Place, std::pair<double, bool>> local_; ///< Worth, and whether it stands in for a missing one.
};

} // namespace

Model make_model(const RoomView& view) {
    return Builder(view).run();
}

std::string cell_name(const Row& row, const Decision& decision, const Id& option) {
    return row.title + " of " + option_name(decision, option);
}

std::string worth_text(double worth) {
    char buffer[32];
    std::snprintf(buffer, sizeof buffer, "%.2f", worth);
    return buffer;
}

std::string change_text(double before, double now) {
    if (before == 0) return {};
    char buffer[64];
    const double percent = 100 * (now - before) / std::abs(before);
    std::snprintf(buffer, sizeof buffer, "%.1f", std::abs(percent));
    const bool none = std::string_view(buffer) == "0.0";
    return (none ? "\xC2\xB1" : percent < 0 ? "\xE2\x88\x92" : "+") + std::string(buffer) + " %";
}

std::string curve_words(const Curve& curve) {
    if (const auto* proportional = std::get_if<ProportionalCurve>(&curve.shape))
        return proportional->better == Better::less ? "less is better" : "more is better";
    if (const auto* line = std::get_if<LineCurve>(&curve.shape))
        return "none at " + figure_text(line->worst) + ", full at " + figure_text(line->best);
    if (const auto* target = std::get_if<TargetCurve>(&curve.shape))
        return "full at " + figure_text(target->target) + ", none " + figure_text(target->tolerance) +
               " away";
    const auto& at = std::get<PointsCurve>(curve.shape).at;
    const auto words = [](const std::array<double, 2>& point) {
        const std::string worth = point[1] == 0 ? "none" : point[1] == 1 ? "full" : worth_text(point[1]);
        return worth + " at " + figure_text(point[0]);
    };
    return at.size() == 1 ? words(at.front()) : words(at.front()) + ", " + words(at.back());
}

std::string limit_words(const Requirement& must) {
    std::vector<std::string> parts;
    if (must.min_worth) parts.push_back("at least " + worth_text(*must.min_worth));
    if (must.at_least) parts.push_back("at least " + figure_text(*must.at_least));
    if (must.at_most) parts.push_back("at most " + figure_text(*must.at_most));
    return joined(parts, " and ");
}

std::string must_words(MustState state) {
    switch (state) {
    case MustState::met: return "met";
    case MustState::failed: return "failed";
    case MustState::undecided: return "undecided";
    case MustState::asked: return "asked";
    case MustState::waived: return "waived";
    case MustState::unchecked: break;
    }
    return "open";
}

Tone must_tone(MustState state) {
    switch (state) {
    case MustState::met: return Tone::good;
    case MustState::failed: return Tone::bad;
    case MustState::waived: return Tone::quiet;
    case MustState::undecided:
    case MustState::asked:
    case MustState::unchecked: break;
    }
    return Tone::open;
}

} // namespace steelyard::gauge
