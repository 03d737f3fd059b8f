// Glossary: J judges, n items, R_i the sum of the ranks of item i, S the sum of squared deviations of R_i
// from their mean, t the length of a run of ties.
#include "core/judgment/concordance.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>
#include <numeric>
#include <utility>

#include "core/judgment/chi_square.hpp"

namespace steelyard {
namespace {

/// Weights are ranked as scores are: closer ones share a rank.
constexpr double tie = 1e-9;

/// Up to how many judges p is exact, by the number of items. Past these, dealing out takes over 10 ms.
constexpr std::array<std::size_t, 10> most_judges{0, 0, 60, 30, 12, 6, 3, 2, 2, 2};

/// Rank sums of n items side by side in one number, doubled: whole, as mean ranks are whole or halves. Each
/// takes 64 / n bits, which is enough for the tables above; equal and unequal sums are told apart fast.
class Sums {
public:
    using Unpacked = std::array<std::uint64_t, most_judges.size()>;

    explicit Sums(std::size_t n) : n_(n), bits_(64 / n) {}

    std::uint64_t packed(const Unpacked& sums) const {
        std::uint64_t key = 0;
        for (std::size_t i = 0; i < n_; ++i) key |= sums[i] << (i * bits_);
        return key;
    }

    std::uint64_t packed_in_order(std::uint64_t key) const {
        Unpacked sums = unpacked(key);
        std::sort(sums.begin(), sums.begin() + static_cast<std::ptrdiff_t>(n_));
        return packed(sums);
    }

    /// n times the squared deviations of doubled sums from their mean: 4 n S, a whole number.
    std::uint64_t spread(std::uint64_t key) const {
        const Unpacked sums = unpacked(key);
        std::uint64_t sum = 0;
        std::uint64_t squares = 0;
        for (std::size_t i = 0; i < n_; ++i) {
            sum += sums[i];
            squares += sums[i] * sums[i];
        }
        return n_ * squares - sum * sum;
    }

private:
    Unpacked unpacked(std::uint64_t key) const {
        const std::uint64_t mask = (std::uint64_t{1} << bits_) - 1; // n >= 2.
        Unpacked sums{};
        for (std::size_t i = 0; i < n_; ++i) sums[i] = (key >> (i * bits_)) & mask;
        return sums;
    }

    std::size_t n_;
    std::size_t bits_;
};

struct Reached {
    std::uint64_t sums;
    double ways;
};

/// Adds up the ways of equal sums.
std::vector<Reached> merged(std::vector<Reached> list) {
    std::sort(list.begin(), list.end(), [](const Reached& a, const Reached& b) { return a.sums < b.sums; });
    std::vector<Reached> out;
    for (const auto& one : list) {
        if (!out.empty() && out.back().sums == one.sums) {
            out.back().ways += one.ways;
        } else {
            out.push_back(one);
        }
    }
    return out;
}

/// The chance of a spread of at least `observed`. Deals out the ranks of one judge after the other. Which
/// item has which sum is of no account, so the sums reached are kept in order of size, each once with the
/// number of ways that lead to it; and the first judge's ranks may stay where they are.
double exact_p(const std::vector<std::vector<double>>& ranks, std::uint64_t observed) {
    const std::size_t n = ranks.front().size();
    const Sums sums(n);
    std::vector<Reached> reached{{0, 1.0}};
    double all = 0;
    double as_large = 0;
    for (std::size_t j = 0; j < ranks.size(); ++j) {
        Sums::Unpacked deal{};
        for (std::size_t i = 0; i < n; ++i)
            deal[i] = static_cast<std::uint64_t>(std::lround(2 * ranks[j][i]));
        const auto end = deal.begin() + static_cast<std::ptrdiff_t>(n);
        std::sort(deal.begin(), end);
        const bool last = j + 1 == ranks.size();
        std::vector<Reached> next;
        do {
            const std::uint64_t dealt = sums.packed(deal);
            for (const auto& before : reached) {
                const std::uint64_t after = before.sums + dealt; // Item by item: no sum outgrows its bits.
                if (last) {
                    all += before.ways;
                    if (sums.spread(after) >= observed) as_large += before.ways;
                } else {
                    next.push_back({sums.packed_in_order(after), before.ways});
                }
            }
        } while (j > 0 && std::next_permutation(deal.begin(), end));
        reached = merged(std::move(next));
    }
    return as_large / all;
}

} // namespace

std::vector<double> mean_ranks(const std::vector<double>& values) {
    std::vector<std::size_t> order(values.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return values[a] > values[b]; });
    std::vector<double> ranks(values.size());
    for (std::size_t from = 0; from < order.size();) {
        std::size_t to = from + 1;
        while (to < order.size() && values[order[to - 1]] - values[order[to]] <= tie) ++to;
        for (std::size_t k = from; k < to; ++k) ranks[order[k]] = static_cast<double>(from + 1 + to) / 2;
        from = to;
    }
    return ranks;
}

std::optional<KendallW> kendall_w(const std::vector<std::vector<double>>& ranks) {
    if (ranks.size() < 2 || ranks.front().size() < 2) return std::nullopt;
    const std::size_t n = ranks.front().size();
    const auto size = static_cast<double>(n);
    const auto judges = static_cast<double>(ranks.size());

    std::vector<double> sums(n, 0.0);
    double ties = 0; // The sum of t^3 - t.
    for (const auto& of_judge : ranks) {
        for (std::size_t i = 0; i < n; ++i) {
            sums[i] += of_judge[i];
            // Each member of a run of t brings (t^2 - 1), t of them t^3 - t.
            const auto t = static_cast<double>(std::count(of_judge.begin(), of_judge.end(), of_judge[i]));
            ties += t * t - 1;
        }
    }
    const double most =
        judges * judges * (size * size * size - size) - judges * ties; // 12 times the largest S.
    if (!(most > 0)) return std::nullopt;
    const double mean = judges * (size + 1) / 2;
    double s = 0;
    for (const double sum : sums) s += (sum - mean) * (sum - mean);

    KendallW result;
    result.w = 12 * s / most;
    result.chi2 = judges * (size - 1) * result.w;
    result.exact = n < most_judges.size() && ranks.size() <= most_judges[n];
    result.p = result.exact ? exact_p(ranks, static_cast<std::uint64_t>(std::llround(4 * size * s)))
                            : chi_square_tail(result.chi2, static_cast<int>(n) - 1);
    return result;
}

} // namespace steelyard
