#include "shell/widgets/arm_names.hpp"

#include <catch_amalgamated.hpp>

#include "tests/support/dice.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

constexpr float left = 0;
constexpr float right = 800;
constexpr float centre = 400;
constexpr float gap = 5;

/// Whether two names of a row meet, or a pole runs through a name below its own.
bool collide(const std::vector<NameWish>& wishes, const std::vector<PlacedName>& names) {
    for (std::size_t i = 0; i < names.size(); ++i) {
        for (std::size_t j = 0; j < names.size(); ++j) {
            if (i == j) continue;
            const float end = names[i].left + names[i].width;
            if (names[i].row == names[j].row && names[j].left < end &&
                names[i].left < names[j].left + names[j].width)
                return true;
            const bool through = wishes[j].x > names[i].left && wishes[j].x < end;
            if (through && names[j].row > names[i].row) return true;
        }
    }
    return false;
}

} // namespace

TEST_CASE("names of poises never meet, and no pole runs through a name") {
    Dice dice(4711);
    for (int round = 0; round < 3000; ++round) {
        std::vector<NameWish> wishes(static_cast<std::size_t>(dice.between(1, 12)));
        for (auto& wish : wishes) {
            // Many at the same places, as judges answer.
            wish.x = 90 + 31 * static_cast<float>(dice.between(0, 20));
            wish.width = static_cast<float>(dice.between(20, 260));
        }
        const auto names = place_names(wishes, left, right, centre, gap);
        INFO(round);
        REQUIRE(names.size() == wishes.size());
        CHECK_FALSE(collide(wishes, names));
        for (std::size_t i = 0; i < names.size(); ++i) {
            CHECK(names[i].left >= left);
            CHECK(names[i].left + names[i].width <= right);
            CHECK(names[i].width <= wishes[i].width);
            CHECK(names[i].row < rows_of(names));
        }
    }
}

TEST_CASE("a name is shortened only where the edge is nearer than its width") {
    const auto names = place_names({{100, 60}, {100, 200}, {600, 150}}, left, right, centre, gap);
    CHECK(names[0].width == 60);
    CHECK(names[1].width == 95);
    CHECK(names[2].width == 150);
    CHECK(names[0].to_left);
    CHECK_FALSE(names[2].to_left);
    CHECK(names[0].row == 0);
    CHECK(names[1].row == 1);
    CHECK(names[2].row == 0);
}
