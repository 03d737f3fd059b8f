#include <algorithm>
#include <cmath>

#include "tests/support/slow_pairs.hpp"

namespace steelyard::testing {
namespace {

/// Random indices from n = 3 on. Alonso & Lamata 2006, IJUFKS 14(4), 445-459, beyond their table its
/// regression; Saaty 1980, ends at n = 10. Both written down from memory of the sources.
std::optional<double> random_index(RandomIndexTable table, std::size_t n) {
    static const std::vector<double> alonso_lamata{0.5245, 0.8815, 1.1086, 1.2479, 1.3417, 1.4056, 1.4499,
                                                   1.4854, 1.5141, 1.5365, 1.5551, 1.5713, 1.5838};
    static const std::vector<double> saaty{0.58, 0.90, 1.12, 1.24, 1.32, 1.41, 1.45, 1.49};
    const auto& values = table == RandomIndexTable::saaty_1980 ? saaty : alonso_lamata;
    if (n < 3) return std::nullopt;
    if (n - 3 < values.size()) return values[n - 3];
    if (table == RandomIndexTable::saaty_1980) return std::nullopt;
    const auto size = static_cast<double>(n);
    return (1.7699 * size - 4.3513) / (size - 1);
}

/// Above (1), below (-1) or equal (0). Group ratios are means of logarithms, so that 3 and 1/3 may meet a
/// rounding error away from 1: still a tie.
int side(double ratio) {
    if (std::abs(std::log(ratio)) <= 1e-12) return 0;
    return ratio > 1 ? 1 : -1;
}

using Triad = std::array<Id, 3>;

std::vector<Triad> judged_triads(const SlowPairs& pairs) {
    std::vector<Triad> triads;
    for (std::size_t i = 0; i < pairs.items.size(); ++i)
        for (std::size_t j = i + 1; j < pairs.items.size(); ++j)
            for (std::size_t k = j + 1; k < pairs.items.size(); ++k) {
                const Triad triad{pairs.items[i], pairs.items[j], pairs.items[k]};
                if (pairs.judged(triad[0], triad[1]) && pairs.judged(triad[1], triad[2]) &&
                    pairs.judged(triad[0], triad[2]))
                    triads.push_back(triad);
            }
    return triads;
}

/// Koczkodaj 1993, the maximum over triads by Duszak & Koczkodaj 1994; of triads equal within 1e-12 the
/// first.
void koczkodaj(const SlowPairs& pairs, SlowIndices& indices) {
    std::map<Triad, double> value;
    for (const Triad& t : judged_triads(pairs)) {
        const double way =
            pairs.ratio.at({t[0], t[2]}) / (pairs.ratio.at({t[0], t[1]}) * pairs.ratio.at({t[1], t[2]}));
        value[t] = std::min(std::abs(1 - way), std::abs(1 - 1 / way));
        indices.koczkodaj = std::max(indices.koczkodaj.value_or(0), value[t]);
    }
    for (const Triad& t : judged_triads(pairs))
        if (!indices.worst_triad && value[t] >= *indices.koczkodaj - 1e-12) indices.worst_triad = t;
}

/// Circular triads: strict ones, and those with one or two ties; zeta of Kendall & Babington Smith 1940.
void circles(const SlowPairs& pairs, SlowIndices& indices) {
    const auto over = [&](const Id& a, const Id& b) { return side(pairs.ratio.at({a, b})); };
    for (const Triad& t : judged_triads(pairs))
        for (const Triad& way : {t, Triad{t[0], t[2], t[1]}}) {
            const std::array<int, 3> sides{over(way[0], way[1]), over(way[1], way[2]), over(way[2], way[0])};
            if (*std::min_element(sides.begin(), sides.end()) < 0) continue;
            const auto ties = std::count(sides.begin(), sides.end(), 0);
            if (ties == 0)
                indices.cycles.push_back(way);
            else if (ties < 3)
                indices.tied_cycles.push_back(way);
        }
    std::map<Id, std::size_t> place;
    for (const Id& item : pairs.items) place.emplace(item, place.size());
    const auto earlier = [&](const Triad& x, const Triad& y) {
        return std::array{place[x[0]], place[x[1]], place[x[2]]} <
               std::array{place[y[0]], place[y[1]], place[y[2]]};
    };
    std::sort(indices.cycles.begin(), indices.cycles.end(), earlier);
    std::sort(indices.tied_cycles.begin(), indices.tied_cycles.end(), earlier);

    const std::size_t items = pairs.items.size();
    if (items < 3 || !slow_missing(pairs).empty()) return;
    for (const auto& [pair, ratio] : pairs.ratio)
        if (side(ratio) == 0) return;
    const auto n = static_cast<double>(items);
    const double most = n * n * n - (items % 2 == 1 ? n : 4 * n);
    indices.zeta = 1 - 24 * static_cast<double>(indices.cycles.size()) / most;
}

/// Aguarón & Moreno-Jiménez 2003.
double geometric_consistency(const SlowPairs& pairs) {
    const SlowWeights w = slow_geometric_mean(pairs);
    double total = 0;
    for (std::size_t i = 0; i < pairs.items.size(); ++i)
        for (std::size_t j = i + 1; j < pairs.items.size(); ++j) {
            const Id& a = pairs.items[i];
            const Id& b = pairs.items[j];
            const double off = std::log(pairs.ratio.at({a, b}) * w.at(b) / w.at(a));
            total += off * off;
        }
    const auto n = static_cast<double>(pairs.items.size());
    return 2 / ((n - 1) * (n - 2)) * total;
}

} // namespace

SlowIndices slow_indices(const SlowPairs& pairs, RandomIndexTable table) {
    SlowIndices indices;
    koczkodaj(pairs, indices);
    circles(pairs, indices);
    const std::size_t items = pairs.items.size();
    if (items < 2 || slow_parts(pairs).size() != 1) return indices;

    // Saaty 1980; the random index of an incomplete set after Ágoston & Csató 2022. At a spanning tree it
    // would be 0.
    const auto n = static_cast<double>(items);
    const std::size_t missing = slow_missing(pairs).size();
    indices.lambda_max = slow_eigen(pairs).lambda;
    indices.ci = (*indices.lambda_max - n) / (n - 1);
    const std::size_t freedom = (items - 1) * (items - 2) / 2;
    if (const auto full = random_index(table, items); full && missing < freedom) {
        indices.ri = *full * (1 - static_cast<double>(missing) / static_cast<double>(freedom));
        indices.cr = *indices.ci / *indices.ri;
    }
    if (items >= 3 && missing == 0) indices.gci = geometric_consistency(pairs);
    return indices;
}

std::map<SlowPair, SlowMisfit> slow_misfits(const SlowPairs& pairs, Method method) {
    // Columns need every pair, so what the rest implies is then told by the eigenvector.
    const Method used = method == Method::geometric_mean ? method : Method::eigenvector;
    std::map<SlowPair, SlowMisfit> misfits;
    const auto weights = slow_weights(used, pairs);
    if (!weights) return misfits;
    for (std::size_t i = 0; i < pairs.items.size(); ++i)
        for (std::size_t j = i + 1; j < pairs.items.size(); ++j) {
            const Id& a = pairs.items[i];
            const Id& b = pairs.items[j];
            if (!pairs.judged(a, b)) continue;
            SlowMisfit misfit;
            misfit.given = pairs.ratio.at({a, b});
            misfit.size = std::abs(std::log(misfit.given * weights->at(b) / weights->at(a)));
            SlowPairs rest = pairs;
            rest.forget(a, b);
            if (slow_parts(rest).size() == 1) {
                // Where only this pair may move, besides the missing ones, it is one more missing pair.
                const SlowEigen without = slow_eigen(rest);
                misfit.best = without.filled.at({a, b});
                misfit.lambda_at_best = without.lambda;
                const SlowWeights implied =
                    used == Method::geometric_mean ? slow_geometric_mean(rest) : without.weights;
                misfit.implied = implied.at(a) / implied.at(b);
            }
            misfits[{a, b}] = misfit;
        }
    return misfits;
}

} // namespace steelyard::testing
