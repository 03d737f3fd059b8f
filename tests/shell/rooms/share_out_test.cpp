#include "shell/rooms/share_out.hpp"

#include <catch_amalgamated.hpp>
#include <numeric>

#include "tests/support/dice.hpp"

using namespace steelyard;

namespace {

using Points = std::vector<double>;
const std::vector<bool> none{false, false, false};

double sum(const Points& points) {
    return std::accumulate(points.begin(), points.end(), 0.0);
}

} // namespace

TEST_CASE("any points become points of 100, whole ones or tenths") {
    CHECK(as_hundred({0, 0, 0}, true) == Points{34, 33, 33});
    CHECK(as_hundred({3, 2}, false) == Points{60, 40});
    CHECK(as_hundred({1, 1, 1}, false) == Points{33.4, 33.3, 33.3});
    CHECK(as_hundred({62.5, 37.5}, false) == Points{62.5, 37.5});
    CHECK(as_hundred({62.5, 37.5}, true) == Points{63, 37});
    CHECK(as_hundred({1, 0, 0}, true) == Points{100, 0, 0});
}

TEST_CASE("what one item takes the others give in proportion") {
    CHECK(share_out({50, 30, 20}, none, 0, 60) == Points{60, 24, 16});
    CHECK(share_out({50, 30, 20}, none, 0, 0) == Points{0, 60, 40});
    CHECK(share_out({50, 30, 20}, none, 0, 120) == Points{100, 0, 0});
    CHECK(share_out({50, 30, 20}, none, 2, -5) ==
          Points{63, 37, 0}); // 62.5 and 37.5: the first takes the half.
    CHECK(share_out({100, 0, 0}, none, 0, 90) == Points{90, 5, 5});
    CHECK(share_out({50, 50}, {false, false}, 1, 25) == Points{75, 25});
}

TEST_CASE("tenths where one is moved by tenths, and what is typed is met exactly") {
    CHECK(share_out({50, 30, 20}, none, 0, 50.5) == Points{50.5, 29.7, 19.8});
    CHECK(share_out({50.5, 29.7, 19.8}, none, 0, 51) == Points{51, 29.4, 19.6});
    CHECK(share_out({50, 30, 20}, none, 0, 33.33)[0] == 33.33);
}

TEST_CASE("held ones give nothing, as long as another one can") {
    CHECK(share_out({50, 30, 20}, {true, false, false}, 1, 40) == Points{50, 40, 10});
    CHECK(share_out({50, 30, 20}, {true, false, false}, 1, 90) == Points{50, 50, 0});
    CHECK(left_by_held({50, 30, 20}, {true, false, false}, 1) == 50);
    CHECK(share_out({50, 30, 20}, {true, true, false}, 2, 60) == Points{25, 15, 60});
    CHECK(left_by_held({50, 30, 20}, {true, true, false}, 2) == 100);
}

TEST_CASE("the sum stays 100 and nothing falls below 0, whatever is moved") {
    testing::Dice dice(7);
    for (int round = 0; round < 2000; ++round) {
        const std::size_t n = 2 + dice.below(9);
        Points points;
        std::vector<bool> held;
        for (std::size_t i = 0; i < n; ++i) {
            points.push_back(dice.below(50));
            held.push_back(dice.below(4) == 0);
        }
        points = as_hundred(points, dice.below(2) == 0);
        for (int move = 0; move < 5; ++move) {
            const double value = dice.below(2) == 0 ? dice.below(101) : dice.below(1001) / 10.0;
            points = share_out(points, held, dice.below(static_cast<int>(n)), value);
            INFO(round << " " << move);
            CHECK_THAT(sum(points), Catch::Matchers::WithinAbs(100, 1e-9));
            for (const double p : points) CHECK(p >= 0);
        }
    }
}
