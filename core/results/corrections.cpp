#include "core/results/corrections.hpp"

#include <utility>

#include "core/judgment/best_value.hpp"
#include "core/judgment/consistency.hpp"
#include "core/judgment/tied_order.hpp"
#include "core/results/entry_matrix.hpp"

namespace steelyard {
namespace {

std::size_t place(const std::vector<Id>& items, const Id& id) {
    std::size_t at = 0;
    while (items[at] != id) ++at;
    return at;
}

void add_best_values(SetResult& entry, const PairMatrix& pairs) {
    if (entry.misfits.empty()) return;
    const auto cr_of = [&](double lambda) {
        return *consistency_index(lambda, entry.items.size()) / *entry.ri;
    };
    BestValues values(pairs);
    std::vector<std::size_t> item_order(pairs.size() * pairs.size());
    for (std::size_t k = 0; k < entry.misfits.size(); ++k) {
        Misfit& misfit = entry.misfits[k];
        const std::size_t i = place(entry.items, misfit.a);
        const std::size_t j = place(entry.items, misfit.b);
        item_order[i * pairs.size() + j] = k;
        const auto best = values.of(i, j);
        if (best) misfit.best = best->ratio;
        if (entry.ri) misfit.cr_at_best = best ? cr_of(best->lambda) : *entry.cr;
    }
    if (!entry.ri) return;
    std::vector<Misfit> by_items;
    std::vector<double> ratios;
    for (const auto& [i, j] : pairs.judged_pairs()) {
        by_items.push_back(std::move(entry.misfits[item_order[i * pairs.size() + j]]));
        ratios.push_back(*by_items.back().cr_at_best);
    }
    entry.misfits.clear();
    for (const auto k : tied_order(ratios)) entry.misfits.push_back(std::move(by_items[k]));
}

std::optional<EntrySearch> search_of(const Settings& settings, const SetResult& entry, EntryMatrix matrix) {
    if (!entry.cr || (entry.by.empty() && matrix.judges > 1)) return std::nullopt;
    return EntrySearch{std::move(matrix.pairs), {*entry.ri, settings.limit}};
}

} // namespace

void add_corrections(const Decision& decision, Results& results) {
    const JudgmentsBySet judgments(decision);
    for (SetResult& entry : results.sets) {
        if (entry.from_points) continue;
        EntryMatrix matrix = entry_matrix(decision, judgments, entry);
        add_best_values(entry, matrix.pairs);
        if (const auto search = search_of(decision.settings, entry, std::move(matrix)))
            entry.fewest_changes = in_words(entry, fewest_changes(search->pairs, search->limit));
    }
    results.corrected = true;
}

std::optional<EntrySearch> entry_search(const Decision& decision, const SetResult& entry) {
    return search_of(decision.settings, entry, entry_matrix(decision, entry));
}

FewestChangesResult in_words(const SetResult& entry, const FewestChanges& found) {
    FewestChangesResult result;
    result.proven = found.proven;
    for (const auto& [i, j, to] : found.changes)
        result.changes.push_back({entry.items[i], entry.items[j], to});
    result.cr = *consistency_index(found.lambda, entry.items.size()) / *entry.ri;
    return result;
}

} // namespace steelyard
