#include "core/results/set_weights.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"

namespace steelyard {

SetWeights::Said& SetWeights::said(const Node& node, const std::vector<Id>& items) {
    const auto found = said_.find({node.id, items});
    if (found != said_.end()) return found->second;
    const bool of_options = node.is_leaf() && node.rate == RateBy::pairs;
    Said said{judgments_.gather(node.id, items, of_options), false, std::nullopt};
    return said_.try_emplace({node.id, items}, std::move(said)).first->second;
}

JudgedSet SetWeights::heard(const Node& node, const std::vector<Id>& items, const Voices& voices) {
    JudgedSet set = judged(node, items);
    if (!voices.without.empty())
        std::erase_if(set.judges, [&](const JudgeAnswers& j) { return j.person == voices.without; });
    if (voices.agreed && voices.agreed->set == node.id) {
        const auto a = std::find(items.begin(), items.end(), voices.agreed->a);
        const auto b = std::find(items.begin(), items.end(), voices.agreed->b);
        if (a != items.end() && b != items.end()) {
            set.agreed.set(static_cast<std::size_t>(a - items.begin()),
                           static_cast<std::size_t>(b - items.begin()), voices.agreed->ratio);
        }
    }
    return set;
}

std::optional<Weights> SetWeights::pairs(const Node& node, const std::vector<Id>& items,
                                         const Voices& voices) {
    Said& all = said(node, items);
    const bool touched =
        (voices.agreed && voices.agreed->set == node.id) ||
        std::any_of(all.judged.judges.begin(), all.judged.judges.end(), [&](const JudgeAnswers& judge) {
            return judge.person == voices.without || judge.person == voices.only;
        });
    if (touched) return weigh(heard(node, items, voices), voices.only);
    if (!all.weighed) all.by_everybody = weigh(all.judged, {});
    all.weighed = true;
    return all.by_everybody;
}

std::optional<Weights> SetWeights::weigh(const JudgedSet& set, const Id& only) {
    const Settings& settings = decision_.settings;
    const auto own = [&](const JudgeAnswers& judge) -> const std::optional<Weights>& {
        return cache_.weights(judge_matrix(judge, set.agreed), settings.method);
    };
    for (const auto& judge : set.judges) {
        if (judge.person != only) continue;
        if (const auto& weights = own(judge)) return weights;
    }
    if (settings.combine != Combine::judgments) {
        std::vector<Weights> weights;
        std::vector<double> shares;
        for (const auto& judge : set.judges) {
            if (judge.share == 0) continue;
            const auto& of_judge = own(judge);
            if (!of_judge) continue;
            weights.push_back(*of_judge);
            shares.push_back(judge.share);
        }
        if (!weights.empty())
            return combine_weights(weights, shares, settings.combine == Combine::priorities_arithmetic);
    }
    return cache_.weights(group_matrix(set), settings.method);
}

bool SetWeights::needs_whole(const Node& leaf, const std::vector<Id>& in_play, const Voices& voices) {
    if (in_play.size() == decision_.options.size()) return false;
    const auto connected = [&](const std::vector<Id>& items) {
        return group_matrix(heard(leaf, items, voices)).connected();
    };
    return !connected(in_play) && connected(set_items(decision_, leaf.id));
}

SetWeights::OfOptions SetWeights::options(const Node& leaf, const std::vector<Id>& in_play,
                                          const Voices& voices) {
    OfOptions set{in_play, {}};
    if (needs_whole(leaf, in_play, voices)) set.items = set_items(decision_, leaf.id);
    set.weights = pairs(leaf, set.items, voices);
    return set;
}

GivenPoints SetWeights::given_points(const Node& node) const {
    const auto last = [&](const Id& by) -> std::optional<Weights> {
        const auto entry = std::find_if(decision_.points.rbegin(), decision_.points.rend(),
                                        [&](const PointsEntry& e) { return e.set == node.id && e.by == by; });
        if (entry == decision_.points.rend()) return std::nullopt;
        Weights weights(node.children.size(), 0.0);
        double sum = 0;
        for (const auto& [id, points] : entry->points) {
            const auto at = std::find_if(node.children.begin(), node.children.end(),
                                         [&id = id](const Node& child) { return child.id == id; });
            weights[static_cast<std::size_t>(at - node.children.begin())] = points;
            sum += points;
        }
        for (auto& weight : weights) weight /= sum;
        return weights;
    };
    GivenPoints given;
    given.agreed = last(Id{});
    for (const auto& person : decision_.people) {
        if (auto own = last(person.id)) given.own.push_back({&person, std::move(*own)});
    }
    return given;
}

std::optional<Weights> SetWeights::points(const Node& node, const Voices& voices) const {
    const GivenPoints given = given_points(node);
    if (given.agreed) return given.agreed;
    std::vector<Weights> weights;
    std::vector<double> shares;
    for (const auto& [person, own] : given.own) {
        if (person->share == 0 || person->id == voices.without) continue;
        if (person->id == voices.only) return own;
        weights.push_back(own);
        shares.push_back(person->share);
    }
    if (weights.empty()) return std::nullopt;
    return combine_weights(weights, shares, true);
}

} // namespace steelyard
