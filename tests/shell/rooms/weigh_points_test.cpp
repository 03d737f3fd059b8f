#include "shell/rooms/weigh_points.hpp"

#include <catch_amalgamated.hpp>

#include "shell/rooms/weigh_answers.hpp"
#include "tests/shell/support/card_page.hpp"
#include "tests/shell/support/judged_set.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

Decision by_points(const std::vector<std::string>& names) {
    Decision d = judged_set(names);
    d.criteria.weights = WeightsBy::points;
    return d;
}

const std::vector<std::string> three{"Price", "Noise", "Service"};

class PointsPage {
public:
    explicit PointsPage(Decision decision, CardOptions options = {.width = 720, .height = 760})
        : page(
              std::move(decision),
              [this](Ui& ui, const RoomView& view, Actions& actions, Box box) {
                  card.draw(ui, view, actions, own_entry(view, "goal"), box);
              },
              options) {}

    std::vector<double> points(const Id& by = {}) const {
        std::vector<double> list;
        for (const auto& entry : page.decision().points) {
            if (entry.by != by) continue;
            list.clear();
            for (const auto& [item, value] : entry.points) list.push_back(value);
        }
        return list;
    }
    void fill(const std::string& field, const std::string& text) {
        page.click(field, "textbox");
        page.key(ImGuiKey_A, ImGuiMod_Ctrl);
        page.type(text);
        page.key(ImGuiKey_Enter);
    }
    /// The place of so many points on a slider.
    ImVec2 at(const std::string& name, float points) const {
        const LedgerItem& item = page.item("Points of " + name, "slider");
        return {item.at.x + 9 + (item.size.x - 18) * points / 100, item.at.y + item.size.y / 2};
    }
    std::string slider(const std::string& name) const {
        return page.item("Points of " + name, "slider").value;
    }

    PointsCard card;
    CardPage page;
};

using Points = std::vector<double>;

} // namespace

TEST_CASE("a slider is dragged, the others give, and one drag is one step") {
    PointsPage points(by_points(three));
    CHECK(points.page.says("Nothing is shared out yet: the sliders stand level."));
    CHECK(points.slider("Price") == "");
    points.page.drag(points.at("Price", 34), points.at("Price", 60), 10);
    CHECK(points.points() == Points{60, 20, 20});
    CHECK(points.page.decision().points.size() == 1);
    CHECK(points.slider("Price") == "60");
    CHECK(points.page.says("60.0 %"));
    points.page.drag(points.at("Noise", 20), points.at("Noise", 40), 10);
    CHECK(points.points() == Points{45, 40, 15});
    CHECK(points.page.undo());
    CHECK(points.points() == Points{60, 20, 20});
    CHECK(points.page.undo());
    CHECK(points.points().empty());
}

TEST_CASE("keys move a slider by one, with Shift by a tenth") {
    PointsPage points(by_points(three));
    points.page.click_at(points.at("Price", 50));
    CHECK(points.points() == Points{50, 25, 25});
    points.page.key(ImGuiKey_RightArrow);
    CHECK(points.points()[0] == 51);
    points.page.key(ImGuiKey_UpArrow);
    points.page.key(ImGuiKey_LeftArrow);
    CHECK(points.points()[0] == 51);
    points.page.key(ImGuiKey_RightArrow, ImGuiMod_Shift);
    CHECK(points.points()[0] == 51.1);
    points.page.key(ImGuiKey_LeftArrow);
    CHECK(points.points()[0] == 51);
    points.page.key(ImGuiKey_PageDown);
    CHECK(points.points()[0] == 41);
    points.page.key(ImGuiKey_End);
    CHECK(points.points() == Points{100, 0, 0});
    points.page.key(ImGuiKey_Home);
    CHECK(points.points() == Points{0, 50, 50});
}

TEST_CASE("points are typed exactly, and typed ones are held against the others") {
    PointsPage points(by_points(three));
    points.fill("Points for Price", "50");
    CHECK(points.points() == Points{50, 25, 25});
    points.fill("Points for Noise", "33,3");
    CHECK(points.points() == Points{50, 33.3, 16.7});
    points.fill("Points for Service", "20");
    CHECK(points.page.message ==
          "Price and Noise are held, which leaves 16.7 points here. Press \"held\" to let one give.");
    CHECK(points.points() == Points{50, 33.3, 16.7});
    points.page.click("held", "button"); // The first one.
    points.fill("Points for Service", "20");
    CHECK(points.points() == Points{46.7, 33.3, 20});
    points.fill("Points for Price", "abc");
    CHECK(points.page.message == "\"abc\" is no number of points from 0 to 100.");
    points.fill("Points for Price", "101");
    CHECK(points.points() == Points{46.7, 33.3, 20});
}

TEST_CASE("each person has points of his own, the group's mean stands beside, and they can be taken back") {
    Decision d = by_points(three);
    d.people = {Person{.id = "p0", .name = "A. Kern"}, Person{.id = "p1", .name = "M. Tolle"}};
    d.points.push_back(PointsEntry{
        .set = "goal", .by = "p1", .points = {{"c0", 3}, {"c1", 1}, {"c2", 1}}, .note = "as last year"});
    PointsPage points(d);
    CHECK(points.page.says("The sliders stand where the judges' points lie together"));
    CHECK(points.page.says("M. Tolle: Price 3, Noise 1 and Service 1. \"as last year\""));
    points.page.person = "p0";
    points.page.frame(2);
    CHECK(points.page.says("Answering as A. Kern"));
    CHECK(points.page.says("together 60.0"));
    points.fill("Remark", "cheap to run");
    CHECK(points.points("p0").empty());
    points.page.click_at(points.at("Price", 20));
    CHECK(points.points("p0") == Points{20, 40, 40});
    CHECK(points.page.decision().points.back().note == "cheap to run");
    CHECK(points.page.says("together 40.0"));
    points.fill("Remark", "cheap");
    CHECK(points.page.decision().points.back().note == "cheap");
    CHECK(points.points("p0") == Points{20, 40, 40});
    points.page.click("Take back", "button");
    CHECK(points.points("p0").empty());
    points.page.answering = Answering::alone;
    points.page.frame(2);
    CHECK_FALSE(points.page.says("together"));
    CHECK_FALSE(points.page.says("%"));
    points.page.person = "";
    points.page.frame(2);
    CHECK_FALSE(points.page.says("Tolle"));
}

TEST_CASE("from points one comes to where pairs are chosen instead") {
    PointsPage points(by_points(three));
    points.page.click("Weigh in pairs instead", "button");
    REQUIRE(points.page.went);
    CHECK(points.page.went->room == RoomId::frame);
    CHECK(points.page.went->focus == "goal");
}

TEST_CASE("points that are only read stand still") {
    PointsPage points(by_points(three));
    points.page.read_only = true;
    points.page.frame(2);
    points.page.drag(points.at("Price", 34), points.at("Price", 60), 5);
    CHECK(points.points().empty());
    CHECK_FALSE(points.page.item("Points of Price", "slider").enabled);
}
