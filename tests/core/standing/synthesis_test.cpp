#include <catch_amalgamated.hpp>
#include <cstddef>
#include <vector>

#include "core/standing/synthesis.hpp"
#include "tests/support/close.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Ranks = std::vector<int>;

namespace {

Node node(const Id& id, const std::vector<Node>& children = {}) {
    Node n;
    n.id = id;
    n.children = children;
    return n;
}

} // namespace

TEST_CASE("weighing the tree: a leaf alone has everything") {
    const Node leaf = node("only");
    const auto tree = weigh_tree(leaf, {});
    REQUIRE(tree.size() == 1);
    CHECK(tree[0].node == &leaf);
    CHECK(tree[0].parent == nullptr);
    CHECK(tree[0].depth == 0);
    CHECK(tree[0].local == 1);
    CHECK(tree[0].weight == 1);
}

TEST_CASE("weighing the tree: a leaf's weight is the product down to it, each node before its children") {
    const Node root = node("goal", {node("a", {node("a1"), node("a2")}), node("b"), node("c", {node("c1")})});
    const auto tree = weigh_tree(root, {{"goal", Weights{.5, .3, .2}}, {"a", Weights{.25, .75}}});
    const std::vector<Id> ids{"goal", "a", "a1", "a2", "b", "c", "c1"};
    const std::vector<double> local{1, .5, .25, .75, .3, .2, 1};
    const std::vector<double> weight{1, .5, .125, .375, .3, .2, .2};
    const std::vector<int> depth{0, 1, 2, 2, 1, 1, 2};
    REQUIRE(tree.size() == ids.size());
    for (std::size_t i = 0; i < ids.size(); ++i) {
        INFO(ids[i]);
        CHECK(tree[i].node->id == ids[i]);
        CHECK(tree[i].local == local[i]);
        CHECK_THAT(tree[i].weight, WithinAbs(weight[i], 1e-16));
        CHECK(tree[i].depth == depth[i]);
    }
    CHECK(tree[2].parent == tree[1].node);
}

TEST_CASE("weighing the tree: a set without weights counts its items equally") {
    const Node root = node("goal", {node("a"), node("b"), node("c", {node("c1"), node("c2")})});
    for (const CriteriaWeights& weights :
         {CriteriaWeights{}, CriteriaWeights{{"goal", std::nullopt}, {"c", std::nullopt}}}) {
        const auto tree = weigh_tree(root, weights);
        CHECK_THAT(tree[1].weight, WithinAbs(1. / 3, 1e-16));
        CHECK_THAT(tree[4].weight, WithinAbs(1. / 6, 1e-16));
        CHECK(tree[5].local == .5);
    }
}

TEST_CASE("weighing the tree: a weight of 0 carries down, and leaf weights sum to 1") {
    const Node root = node("goal", {node("a", {node("a1"), node("a2")}), node("b")});
    const auto tree = weigh_tree(root, {{"goal", Weights{0, 1}}, {"a", Weights{.4, .6}}});
    CHECK(tree[2].weight == 0);
    CHECK(tree[2].local == .4);
    double sum = 0;
    for (const auto& at : tree) sum += at.node->is_leaf() ? at.weight : 0;
    CHECK(sum == 1);
}

TEST_CASE("ranks: one more than the number of options that are better") {
    CHECK(rank({}).empty());
    CHECK(rank({.4}) == Ranks{1});
    CHECK(rank({.2, .5, .3}) == Ranks{3, 1, 2});
    CHECK(rank({0, 0, 0}) == Ranks{1, 1, 1});
}

TEST_CASE("ranks: ties within 1e-9 share a rank, and the next one is skipped") {
    CHECK(rank({.5, .5 - 1e-10, .3}) == Ranks{1, 1, 3});
    CHECK(rank({.5, .5 - 2e-9, .3}) == Ranks{1, 2, 3});
    // Better by more than 1e-9 is what counts, pair by pair: the last ties with the middle one only.
    CHECK(rank({.5, .5 - 8e-10, .5 - 16e-10}) == Ranks{1, 1, 2});
}

TEST_CASE("ranks: forty options in reverse") {
    std::vector<double> scores;
    for (int i = 0; i < 40; ++i) scores.push_back(i / 40.);
    const Ranks ranks = rank(scores);
    for (std::size_t i = 0; i < 40; ++i) CHECK(ranks[i] == static_cast<int>(40 - i));
}

TEST_CASE("shares: scores over their sum, none where all are 0 or there is nobody") {
    testing::check_close(shares_of({.6, .3, 0}).value(), {2. / 3, 1. / 3, 0}, 1e-15);
    CHECK_FALSE(shares_of({0, 0}).has_value());
    CHECK_FALSE(shares_of({}).has_value());
    CHECK(shares_of({.2}) == std::vector<double>{1});
}

} // namespace steelyard
