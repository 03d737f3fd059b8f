#include <catch_amalgamated.hpp>

#include "shell/rooms/gauge_plot.hpp"

using namespace steelyard::gauge;

TEST_CASE("marks on an axis never cover one another and keep their order") {
    const auto places = spread({50, 52, 53, 90}, 20, 0, 200);
    REQUIRE(places);
    CHECK(*places == std::vector<float>{50, 70, 90, 110});
    // At the right end they give way to the left.
    CHECK(*spread({195, 196}, 20, 0, 200) == std::vector<float>{170, 190});
    CHECK(*spread({-5}, 20, 0, 200) == std::vector<float>{10});
    CHECK_FALSE(spread({1, 2, 3}, 20, 0, 59));
    CHECK(spread({}, 20, 0, 10)->empty());
}

TEST_CASE("the axis reaches a little beyond all that stands on it") {
    Plot plot;
    CHECK(span_of(plot).low < span_of(plot).high);
    plot.anchors = {40, 100};
    CHECK(span_of(plot).low == 35);
    CHECK(span_of(plot).high == 105);
    plot.marks = {{.figure = 90, .high = 160}};
    CHECK(span_of(plot).high == 170);
    // Not below 0 where no figure is.
    plot.limits = {1};
    CHECK(span_of(plot).low == 0);

    Plot one;
    one.marks = {{.figure = -7}};
    CHECK(span_of(one).low < -7);
    CHECK(span_of(one).high > -7);
    one.marks = {{.figure = 0}};
    CHECK(span_of(one).low <= 0);
    CHECK(span_of(one).high > 0);
}
