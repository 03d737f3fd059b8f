#include "tests/support/open_cases.hpp"

#include <algorithm>
#include <cmath>
#include <random>

#include "tests/support/dice.hpp"
#include "tests/support/pairs.hpp"

namespace steelyard::testing {
namespace {

using Rows = std::vector<std::vector<double>>;

/// The judge's matrix with the answers in; 0 where a pair stays missing.
Rows matrix_of(const OpenJudge& judge, const std::vector<double>& answers) {
    const std::size_t n = judge.known.size();
    Rows a(n, std::vector<double>(n));
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = 0; j < n; ++j) a[i][j] = judge.known.at(i, j);
    }
    for (const auto& entry : judge.open) {
        a[entry.i][entry.j] = std::exp(entry.fixed) * std::pow(answers[entry.answer], entry.factor);
        a[entry.j][entry.i] = 1 / a[entry.i][entry.j];
    }
    return a;
}

std::vector<double> to_sum_one(std::vector<double> w) {
    double sum = 0;
    for (const double x : w) sum += x;
    for (double& x : w) x /= sum;
    return w;
}

std::vector<double> power_iteration(const Rows& a) {
    std::vector<double> w(a.size(), 1.0 / static_cast<double>(a.size()));
    for (int step = 0; step < 1000; ++step) {
        std::vector<double> next(a.size(), 0.0);
        for (std::size_t i = 0; i < a.size(); ++i) {
            for (std::size_t j = 0; j < a.size(); ++j) next[i] += a[i][j] * w[j];
        }
        next = to_sum_one(next);
        double change = 0;
        for (std::size_t i = 0; i < a.size(); ++i) change = std::max(change, std::abs(next[i] - w[i]));
        w = std::move(next);
        if (change < 1e-14) break;
    }
    return w;
}

std::vector<double> weights_of(Method method, const Rows& a) {
    bool complete = true;
    for (const auto& row : a) complete = complete && std::find(row.begin(), row.end(), 0.0) == row.end();
    if (!complete) { // Completing is tested elsewhere.
        PairMatrix pairs(a.size());
        for (std::size_t i = 0; i < a.size(); ++i) {
            for (std::size_t j = i + 1; j < a.size(); ++j) {
                if (a[i][j] > 0) pairs.set(i, j, a[i][j]);
            }
        }
        return *weights_by(method, pairs);
    }
    if (method == Method::eigenvector) return power_iteration(a);
    std::vector<double> w(a.size(), method == Method::geometric_mean ? 1.0 : 0.0);
    for (std::size_t j = 0; j < a.size(); ++j) {
        double column = 0;
        for (std::size_t i = 0; i < a.size(); ++i) column += a[i][j];
        for (std::size_t i = 0; i < a.size(); ++i) {
            if (method == Method::geometric_mean) w[i] *= a[i][j];
            if (method == Method::column_average) w[i] += a[i][j] / column;
        }
    }
    if (method == Method::geometric_mean) {
        for (double& x : w) x = std::pow(x, 1 / static_cast<double>(a.size()));
    }
    return to_sum_one(w);
}

} // namespace

std::vector<Lead> OpenCase::leads() const {
    std::vector<Lead> leads;
    const bool largest = kind == OpenKind::options_ideal || kind == OpenKind::grades_ideal;
    for (std::size_t o = 0; o < rest.size(); ++o) {
        if (o == leader) continue;
        Lead lead{rest[leader] - rest[o], {}, std::vector<double>(items, 1.0), largest};
        for (std::size_t i = 0; i < items; ++i)
            lead.effect.push_back(weight * (values[leader][i] - values[o][i]));
        leads.push_back(std::move(lead));
    }
    return leads;
}

std::vector<double> OpenCase::weights(const std::vector<double>& answers) const {
    double shares = 0;
    std::vector<double> combined(items, arithmetic ? 0.0 : 1.0);
    for (const auto& judge : judges) shares += judge.share;
    for (const auto& judge : judges) {
        const auto w = weights_of(method, matrix_of(judge, answers));
        for (std::size_t i = 0; i < items; ++i) {
            if (arithmetic) combined[i] += w[i] * judge.share / shares;
            if (!arithmetic) combined[i] *= std::pow(w[i], judge.share / shares);
        }
    }
    return to_sum_one(combined);
}

std::vector<double> OpenCase::scores(const std::vector<double>& answers) const {
    const auto w = weights(answers);
    const bool ideal = kind == OpenKind::options_ideal || kind == OpenKind::grades_ideal;
    const double unit = ideal ? *std::max_element(w.begin(), w.end()) : 1;
    std::vector<double> scores = rest;
    for (std::size_t o = 0; o < rest.size(); ++o) {
        for (std::size_t i = 0; i < items; ++i) scores[o] += weight * values[o][i] * w[i] / unit;
    }
    return scores;
}

double OpenCase::behind(const std::vector<double>& answers) const {
    const auto s = scores(answers);
    double best = -1;
    for (std::size_t o = 0; o < s.size(); ++o) {
        if (o != leader) best = std::max(best, s[o]);
    }
    return best - s[leader];
}

OpenCase random_open_case(Method method, OpenKind kind, const OpenCaseSize& size, std::uint64_t seed) {
    Dice dice(seed * 7919 + size.items);
    const auto thousandths = [&](int low, int high) { return dice.between(low, high) / 1000.0; };
    OpenCase open;
    open.method = method;
    open.kind = kind;
    open.items = size.items;
    open.arithmetic = dice.chance(50) && size.judges > 1;
    const PairMatrix first = random_near_pairs(size.items, .6, 0, seed);
    auto pairs = first.judged_pairs();
    for (std::size_t p = pairs.size(); p > 1; --p)
        std::swap(pairs[p - 1], pairs[static_cast<std::size_t>(dice.below(static_cast<int>(p)))]);
    const auto answers = std::min(static_cast<std::size_t>(size.open), pairs.size());
    open.ranges.assign(answers, AnswerRange{});
    static const std::vector<double> shares{1, 1, 2, .5};
    for (int k = 0; k < size.judges; ++k) {
        // All judges share the answers, as agreed ones; of several the last may have none of them.
        const PairMatrix noisy =
            random_near_pairs(size.items, .6, 0, seed + static_cast<std::uint64_t>(k) * 1009);
        OpenJudge judge{dice.pick(shares), k == 0 ? first : noisy, {}};
        const bool settled = k > 0 && k + 1 == size.judges && dice.chance(50);
        PairMatrix pattern = judge.known;
        for (std::size_t p = 0; p < answers && !settled; ++p) {
            judge.known.clear(pairs[p][0], pairs[p][1]);
            // Now and then another's answer stands beside, as in a group's matrix.
            const bool shared = size.judges == 1 && dice.chance(15);
            judge.open.push_back(
                {pairs[p][0], pairs[p][1], p, shared ? .5 : 1.0, shared ? thousandths(-1000, 1000) : 0.0});
        }
        int stay = size.stay;
        for (std::size_t p = answers; p < pairs.size() && stay > 0; ++p) {
            pattern.clear(pairs[p][0], pairs[p][1]);
            if (pattern.connected()) {
                judge.known.clear(pairs[p][0], pairs[p][1]);
                --stay;
            } else {
                pattern.set(pairs[p][0], pairs[p][1], 1);
            }
        }
        open.judges.push_back(std::move(judge));
    }

    const bool of_options = kind == OpenKind::options_ideal || kind == OpenKind::options_distributive;
    const auto options = of_options ? size.items : static_cast<std::size_t>(dice.between(2, 6));
    open.weight = kind == OpenKind::criteria && dice.chance(50) ? 1 : thousandths(100, 700);
    for (std::size_t o = 0; o < options; ++o) {
        open.rest.push_back((1 - open.weight) * thousandths(0, 1000));
        std::vector<double> row(size.items, 0.0);
        for (std::size_t i = 0; i < size.items; ++i) {
            if (of_options) row[i] = i == o ? 1 : 0;
            if (kind == OpenKind::criteria) row[i] = thousandths(0, 1000);
        }
        if (kind == OpenKind::grades_ideal) { // Two judges' grades.
            row[static_cast<std::size_t>(dice.below(static_cast<int>(size.items)))] += .75;
            row[static_cast<std::size_t>(dice.below(static_cast<int>(size.items)))] += .25;
        }
        open.values.push_back(std::move(row));
    }
    const auto scores = open.scores(std::vector<double>(answers, 1.0));
    open.leader = static_cast<std::size_t>(std::max_element(scores.begin(), scores.end()) - scores.begin());
    return open;
}

std::optional<std::vector<double>> turning_answers(const OpenCase& open, int tries, std::uint64_t seed) {
    constexpr double margin = 1e-9;
    std::mt19937_64 engine(seed);
    const auto uniform = [&] { return static_cast<double>(engine() >> 11) * 0x1p-53; };
    const auto between = [](const AnswerRange& range, double part) {
        return range.low * std::pow(range.high / range.low, part);
    };
    std::vector<double> best;
    double most = -2;
    for (int k = 0; k < tries; ++k) {
        std::vector<double> x;
        for (const auto& range : open.ranges) {
            const double part = uniform();
            x.push_back(between(range, k % 2 == 0 ? part : part < .5 ? 0 : 1));
        }
        const double ahead = open.behind(x);
        if (ahead <= most) continue;
        most = ahead;
        best = std::move(x);
        if (most > margin) return best;
    }
    for (bool better = true; better;) {
        better = false;
        for (std::size_t p = 0; p < best.size(); ++p) {
            for (int step = 0; step <= 24; ++step) {
                auto x = best;
                x[p] = between(open.ranges[p], step / 24.0);
                const double ahead = open.behind(x);
                if (ahead <= most + 1e-13) continue;
                most = ahead;
                best = std::move(x);
                better = true;
            }
        }
    }
    if (most > margin) return best;
    return std::nullopt;
}

} // namespace steelyard::testing
