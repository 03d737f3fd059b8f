#include "core/results/write_results.hpp"

#include <array>
#include <string_view>
#include <utility>

#include "core/decision/fingerprint.hpp"
#include "core/decision/json_value.hpp"
#include "core/decision/lookup.hpp"
#include "core/decision/words.hpp"
#include "core/decision/write.hpp"

namespace steelyard {
namespace {

JsonValue maybe(const std::optional<double>& number) {
    return number ? JsonValue::of(*number) : JsonValue{};
}

/// An id, null where it is empty.
JsonValue maybe(const Id& id) {
    return id.empty() ? JsonValue{} : JsonValue::of(id);
}

template<class List>
JsonValue ids(const List& list) {
    JsonValue out = JsonValue::array();
    for (const auto& id : list) out.items.push_back(JsonValue::of(id));
    return out;
}

template<class Lists>
JsonValue id_lists(const Lists& lists) {
    JsonValue out = JsonValue::array();
    for (const auto& list : lists) out.items.push_back(ids(list));
    return out;
}

template<class Number>
JsonValue by_id(const std::vector<Id>& ids, const std::vector<Number>& numbers) {
    JsonValue out = JsonValue::object();
    for (std::size_t i = 0; i < ids.size(); ++i) out.add(ids[i], JsonValue::of(numbers[i]));
    return out;
}

JsonValue by_id(const std::vector<Id>& ids, const std::optional<std::vector<double>>& numbers) {
    return numbers ? by_id(ids, *numbers) : JsonValue{};
}

/// Settings with every member written, so that a results file says by what rules it came about.
JsonValue all_settings(Settings settings) {
    settings.extras.stated = {"method", "synthesis", "combine", "random_index",
                              "limit",  "too_close", "money"};
    settings.trials.extras.stated = {"n", "seed", "kinds", "spread"};
    JsonValue out = to_json(settings);
    for (auto& [name, value] : out.members) {
        if (name == "money" && value.text.empty()) value = JsonValue{};
    }
    return out;
}

JsonValue fewest_changes_json(const std::optional<FewestChangesResult>& fewest) {
    if (!fewest) return JsonValue{};
    JsonValue out = JsonValue::object();
    out.add("count", JsonValue::of(static_cast<int>(fewest->changes.size())))
        .add("proven", JsonValue::of(fewest->proven));
    JsonValue changes = JsonValue::array();
    for (const auto& change : fewest->changes) {
        JsonValue one = JsonValue::object();
        one.add("a", JsonValue::of(change.a)).add("b", JsonValue::of(change.b));
        one.add("to", JsonValue::of(change.to));
        changes.items.push_back(std::move(one));
    }
    out.add("changes", std::move(changes));
    return out;
}

JsonValue set_json(const SetResult& set, bool corrected) {
    JsonValue out = JsonValue::object();
    out.add("set", JsonValue::of(set.set)).add("by", maybe(set.by)).add("items", ids(set.items));
    out.add("missing", id_lists(set.missing)).add("weights", by_id(set.items, set.weights));
    JsonValue methods = JsonValue::object();
    methods.add("eigenvector", by_id(set.items, set.eigenvector));
    methods.add("geometric-mean", by_id(set.items, set.geometric_mean));
    methods.add("column-average", by_id(set.items, set.column_average));
    out.add("by_method", std::move(methods));
    out.add("lambda_max", maybe(set.lambda_max)).add("ci", maybe(set.ci)).add("ri", maybe(set.ri));
    out.add("cr", maybe(set.cr)).add("gci", maybe(set.gci)).add("koczkodaj", maybe(set.koczkodaj));
    out.add("cycles", id_lists(set.cycles));
    JsonValue misfits = JsonValue::array();
    for (const auto& misfit : set.misfits) {
        JsonValue one = JsonValue::object();
        one.add("a", JsonValue::of(misfit.a)).add("b", JsonValue::of(misfit.b));
        one.add("given", JsonValue::of(misfit.given)).add("implied", maybe(misfit.implied));
        if (corrected) one.add("best", maybe(misfit.best)).add("cr_at_best", maybe(misfit.cr_at_best));
        misfits.items.push_back(std::move(one));
    }
    out.add("misfits", std::move(misfits));
    if (corrected) out.add("fewest_changes", fewest_changes_json(set.fewest_changes));
    if (set.concordance) {
        JsonValue concordance = JsonValue::object();
        concordance.add("w", JsonValue::of(set.concordance->w))
            .add("chi2", JsonValue::of(set.concordance->chi2));
        concordance.add("p", JsonValue::of(set.concordance->p));
        concordance.add("p_by", JsonValue::of(set.concordance->exact ? "exact" : "chi2"));
        concordance.add("judges", ids(set.concordance->judges));
        out.add("concordance", std::move(concordance));
    }
    return out;
}

JsonValue group_json(const GroupResult& group) {
    JsonValue out = JsonValue::object();
    out.add("judges", ids(group.judges));
    out.add("kendall_w", group.concordance ? JsonValue::of(group.concordance->w) : JsonValue{});
    JsonValue spreads = JsonValue::array();
    for (const auto& spread : group.spreads) {
        JsonValue one = JsonValue::object();
        one.add("set", JsonValue::of(spread.set));
        one.add("a", JsonValue::of(spread.a)).add("b", JsonValue::of(spread.b));
        one.add("gsd", JsonValue::of(spread.gsd)).add("for", JsonValue::of(spread.in_favour));
        one.add("equal", JsonValue::of(spread.equal)).add("against", JsonValue::of(spread.against));
        one.add("furthest", ids(spread.furthest));
        spreads.items.push_back(std::move(one));
    }
    out.add("spreads", std::move(spreads));
    JsonValue without = JsonValue::array();
    for (const auto& rest : group.without) {
        JsonValue one = JsonValue::object();
        one.add("person", JsonValue::of(rest.person)).add("ranks", by_id(rest.options, rest.ranks));
        without.items.push_back(std::move(one));
    }
    out.add("without", std::move(without));
    return out;
}

JsonValue limit_of(const Requirement& requirement) {
    JsonValue limit = JsonValue::object();
    if (requirement.at_least) limit.add("at_least", JsonValue::of(*requirement.at_least));
    if (requirement.at_most) limit.add("at_most", JsonValue::of(*requirement.at_most));
    if (requirement.min_worth) limit.add("min_worth", JsonValue::of(*requirement.min_worth));
    return limit;
}

JsonValue excluded_json(const Decision& decision, const std::vector<Exclusion>& excluded) {
    JsonValue out = JsonValue::array();
    for (const auto& exclusion : excluded) {
        JsonValue one = JsonValue::object();
        one.add("option", JsonValue::of(exclusion.option))
            .add("requirement", JsonValue::of(exclusion.requirement));
        if (exclusion.value) one.add("value", JsonValue::of(*exclusion.value));
        JsonValue limit = limit_of(*find_requirement(decision, exclusion.requirement));
        if (!limit.members.empty()) one.add("limit", std::move(limit));
        out.items.push_back(std::move(one));
    }
    return out;
}

JsonValue open_json(const std::vector<OpenItem>& open) {
    static constexpr std::array<std::string_view, 7> kinds{"judgment", "points", "figure",     "curve",
                                                           "grade",    "worth",  "requirement"};
    JsonValue out = JsonValue::array();
    for (const auto& item : open) {
        JsonValue one = JsonValue::object();
        one.add("kind", JsonValue::of(kinds[static_cast<std::size_t>(item.kind)]));
        const std::array<std::pair<const char*, const Id*>, 7> members{{{"set", &item.set},
                                                                        {"a", &item.a},
                                                                        {"b", &item.b},
                                                                        {"criterion", &item.criterion},
                                                                        {"requirement", &item.requirement},
                                                                        {"option", &item.option},
                                                                        {"grade", &item.grade}}};
        for (const auto& [name, id] : members) {
            if (!id->empty()) one.add(name, JsonValue::of(*id));
        }
        out.items.push_back(std::move(one));
    }
    return out;
}

JsonValue rates_json(const Rates& rates) {
    JsonValue per_unit = JsonValue::object();
    for (const auto& rate : rates.rates) per_unit.add(rate.leaf, maybe(rate.per_unit));
    JsonValue out = JsonValue::object();
    out.add("money", JsonValue::of(rates.money)).add("option", JsonValue::of(rates.option));
    out.add("per_unit", std::move(per_unit));
    return out;
}

JsonValue field_json(const std::vector<FieldChange>& changes) {
    JsonValue out = JsonValue::array();
    for (const auto& change : changes) {
        std::string name = "typical added";
        if (change.kind == FieldChange::Kind::without) name = "without " + change.option;
        if (change.kind == FieldChange::Kind::copy_of) name = "copy of " + change.option;
        std::vector<std::array<Id, 2>> reversed;
        for (const auto& reversal : change.reversals) reversed.push_back({reversal.a, reversal.b});
        JsonValue one = JsonValue::object();
        one.add("change", JsonValue::of(name)).add("reversed", id_lists(reversed));
        out.items.push_back(std::move(one));
    }
    return out;
}

} // namespace

std::string write_results(const Decision& decision, const Results& results) {
    JsonValue out = JsonValue::object();
    out.add("format", JsonValue::of("steelyard-results")).add("version", JsonValue::of(1));
    out.add("decision_sha256", JsonValue::of(decision_sha256(decision)));
    out.add("settings", all_settings(results.settings));

    JsonValue sets = JsonValue::array();
    for (const auto& set : results.sets) sets.items.push_back(set_json(set, results.corrected));
    out.add("sets", std::move(sets));

    JsonValue weights = JsonValue::object();
    JsonValue local = JsonValue::object();
    for (const auto& leaf : results.leaves) {
        weights.add(leaf.leaf, JsonValue::of(leaf.weight));
        local.add(leaf.leaf, by_id(results.options, leaf.local));
    }
    out.add("leaf_weights", std::move(weights));
    JsonValue figures = JsonValue::object();
    for (const auto& leaf : results.figures) {
        JsonValue values = JsonValue::object();
        for (const auto& [option, value] : leaf.values) values.add(option, JsonValue::of(value));
        figures.add(leaf.leaf, std::move(values));
    }
    out.add("figures", std::move(figures)).add("local", std::move(local));

    out.add("scores", by_id(results.options, results.scores))
        .add("shares", by_id(results.options, results.shares));
    out.add("ranks", by_id(results.options, results.ranks))
        .add("provisional", JsonValue::of(results.provisional));
    JsonValue ranges = JsonValue::object();
    for (const auto& [option, range] : results.ranges) {
        JsonValue pair = JsonValue::array();
        pair.items = {JsonValue::of(range[0]), JsonValue::of(range[1])};
        ranges.add(option, std::move(pair));
    }
    out.add("ranges", std::move(ranges));
    if (results.lead_points) {
        JsonValue lead = JsonValue::object();
        lead.add("points", JsonValue::of(*results.lead_points)).add("money", maybe(results.lead_money));
        out.add("lead", std::move(lead));
    }
    out.add("excluded", excluded_json(decision, results.excluded)).add("open", open_json(results.open));
    if (results.rates) out.add("rates", rates_json(*results.rates));
    if (results.group) out.add("group", group_json(*results.group));
    if (results.field_changes) out.add("field_changes", field_json(*results.field_changes));

    JsonValue notices = JsonValue::array();
    for (const auto& notice : results.notices) {
        JsonValue one = JsonValue::object();
        one.add("code", JsonValue::of(notice.code)).add("text", JsonValue::of(notice.text));
        one.add("at", JsonValue::of(notice.at));
        notices.items.push_back(std::move(one));
    }
    out.add("notices", std::move(notices));
    return write_json(out);
}

} // namespace steelyard
