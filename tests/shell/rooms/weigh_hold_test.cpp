#include "shell/rooms/weigh_hold.hpp"

#include <catch_amalgamated.hpp>

#include "core/decision/write.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "tests/shell/support/card_page.hpp"
#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/judged_set.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

/// The card of the set "goal" alone on a page, so tall that nothing is out of sight.
class HoldPage {
public:
    explicit HoldPage(Decision decision, CardOptions options = {.width = 460, .height = 1900})
        : page(
              std::move(decision),
              [this](Ui& ui, const RoomView& view, Actions& actions, Box box) {
                  const SetResult entry = own_entry(view, "goal");
                  if (const auto pair = hold.draw(ui, view, actions, entry, box)) looked_at = *pair;
              },
              options) {}

    bool says(const std::string& part) const { return page.says(part); }

    HoldCard hold;
    ItemPair looked_at;
    CardPage page;
};

const std::vector<std::string> four{"Throughput", "Floor space", "Ease of use", "Noise"};

/// An examination of contradicting_set() as the job could give it: one pair that stands out, another behind
/// it.
Examination examination(const Id& by = {}, const Id& said_by = {}) {
    Examination found;
    found.set = "goal";
    found.by = by;
    found.finished = true;
    found.progress = 1;
    PairCorrection worst{.a = "c1",
                         .b = "c3",
                         .said_by = said_by,
                         .given = 1.0 / 6,
                         .implied = 2,
                         .best = 1.9,
                         .cr_at_best = .03};
    worst.choices = {{1, .12, {"brook", 3.1}}, {2, .03, {"alder", 0.4}}};
    PairCorrection second{.a = "c2", .b = "c3", .said_by = said_by, .given = 2, .implied = .3};
    second.choices = {{2, .2, {"brook", 3.1}}};
    found.pairs = {worst, second};
    found.fewest = FewestCorrections{true, {{"c1", "c3", said_by, 1.0 / 6, 1.9}}, .03, {"brook", 3}};
    found.matters_worst = MattersAnswer{.matters = Matters::proven_no, .pairs = {{"c1", "c3"}}};
    return found;
}

} // namespace

TEST_CASE("a set that holds together says so, then its figures with what they mean") {
    HoldPage hold(judged_set(four, {2, 4, 8, 2, 4, 2}));
    CHECK(hold.says("These answers hold together"));
    CHECK(hold.says("Consistency ratio CR"));
    CHECK(hold.says("0.000, limit 0.10"));
    CHECK(hold.says("0 without any contradiction, about 1 for answers at random."));
    CHECK(hold.says("from the table of Alonso and Lamata 2006."));
    CHECK(hold.says("0.8815"));
    CHECK(hold.says("0.000, limit 0.350"));
    CHECK(hold.says("No three answers contradict each other."));
    CHECK(hold.page.item("Kendall's coefficient \xCE\xB6").visible);
    CHECK(hold.says("53.3 %"));
    CHECK_FALSE(hold.says("Contradiction"));
    CHECK(hold.page.examined.wanted);
    CHECK(hold.page.examined.set == "goal");
}

TEST_CASE("other methods are shown beside the chosen one when asked for") {
    HoldPage hold(judged_set(four, {2, 4, 8, 2, 4, 0}));
    CHECK_FALSE(hold.says("geometric"));
    hold.page.click("By the other methods too", "button");
    CHECK(hold.says("geometric"));
    CHECK(hold.says("Columns can be averaged only where no pair is missing."));
    hold.page.click("Only the chosen method", "button");
    CHECK_FALSE(hold.says("Columns can be averaged"));
}

TEST_CASE("a set over its limit: the headline, the worst three answers, the figures") {
    HoldPage hold(contradicting_set());
    CHECK(
        (hold.says("Some answers contradict each other") || hold.says("One answer contradicts the others")));
    CHECK(hold.says("Koczkodaj's index"));
    CHECK(hold.says("They are:"));
    CHECK(hold.says("Noise counts 6 times as much as Floor space."));
}

TEST_CASE("three answers in a circle are named, within the limit too, and with a tie apart") {
    HoldPage hold(judged_set(four, {1.2, 1 / 1.2, 2, 1.2, 2, 2}));
    CHECK(hold.says("Three answers run in a circle"));
    CHECK(hold.says("By their size they hold together all the same"));
    CHECK(hold.says(
        "Throughput over Floor space, Floor space over Ease of use, yet Ease of use over Throughput."));
    HoldPage tied(judged_set(four, {1, 1 / 1.2, 2, 1.2, 2, 2}));
    CHECK(tied.says("These answers hold together"));
    CHECK(tied.says("Circles in which two count the same: Throughput, Floor space and Ease of use."));
    CHECK(tied.says("It is not defined where answers are ties (1)."));
}

TEST_CASE("every circle is named when asked for") {
    // Each of seven beats the next three, in a ring: 14 circles.
    std::vector<std::string> names;
    for (int i = 0; i < 7; ++i) names.push_back("Item " + std::to_string(i + 1));
    std::vector<double> upper;
    for (int i = 0; i < 7; ++i) {
        for (int j = i + 1; j < 7; ++j) upper.push_back(j - i <= 3 ? 2 : .5);
    }
    HoldPage hold(judged_set(names, upper));
    CHECK(hold.says("And 10 more."));
    hold.page.click("Name all circles", "button");
    CHECK_FALSE(hold.says("And 10 more."));
    CHECK(hold.says("Item 3 over Item 6, Item 6 over Item 7, yet Item 7 over Item 3."));
}

TEST_CASE("where a figure does not exist a dash stands there with its reason") {
    HoldPage two(judged_set({"Price", "Quality"}, {3}));
    CHECK(two.says("Nothing here can contradict"));
    CHECK(two.says("Two items have one answer, which cannot contradict itself."));
    CHECK(two.says("\xE2\x80\x94"));
    CHECK(two.says("No three items are judged in full."));
    CHECK(two.says("It takes three items to make a circle."));

    HoldPage tree(judged_set(four, {2, 0, 0, 2, 0, 2}));
    CHECK(tree.says("Nothing here can contradict"));
    CHECK(tree.says("Just as many answers as link all items: none can contradict another."));
    CHECK(tree.says("It needs every pair to be answered."));

    HoldPage apart(judged_set(four, {2, 0, 0, 0, 0, 2}));
    CHECK(apart.says("These answers do not hang together yet"));
    CHECK(apart.says("No answer links these with each other: Throughput, Floor space; Ease of use, Noise."));

    std::vector<std::string> eleven;
    for (int i = 0; i < 11; ++i) eleven.push_back("Item " + std::to_string(i + 1));
    Decision d = judged_set(eleven, std::vector<double>(55, 1.0));
    d.settings.random_index = RandomIndexTable::saaty_1980;
    HoldPage beyond(d);
    CHECK(beyond.says("The table of Saaty 1980 ends before 11 items; another table can be chosen below."));

    HoldPage nothing(judged_set(four));
    CHECK(nothing.says("Nothing is answered yet"));
}

TEST_CASE("limit, table, method and combination are changed here") {
    Decision d = judged_set(four, {2, 4, 8, 2, 4, 2});
    add_judge(d, "A. Kern", {2});
    HoldPage hold(d);
    hold.page.click("Change these settings", "button");
    hold.page.click("Limit of the consistency ratio", "textbox");
    hold.page.key(ImGuiKey_A, ImGuiMod_Ctrl);
    hold.page.type("0,05");
    hold.page.key(ImGuiKey_Enter);
    CHECK(hold.page.decision().settings.limit == .05);
    CHECK(hold.says("0.000, limit 0.05"));
    hold.page.click("Method", "combobox");
    hold.page.click("Geometric mean: rows multiplied", "option");
    CHECK(hold.page.decision().settings.method == Method::geometric_mean);
    hold.page.click("Combine", "combobox");
    hold.page.click("Each one's weights, multiplied", "option");
    CHECK(hold.page.decision().settings.combine == Combine::priorities);
    hold.page.click("Limit of the consistency ratio", "textbox");
    hold.page.key(ImGuiKey_A, ImGuiMod_Ctrl);
    hold.page.type("0");
    hold.page.key(ImGuiKey_Enter);
    CHECK(hold.page.decision().settings.limit == .05);
    CHECK(hold.page.message == "The limit is a number above 0, such as 0.1; nothing was changed.");
}

TEST_CASE("while the examination works its progress stands there, and nothing else moves") {
    HoldPage hold(contradicting_set());
    hold.page.examination = examination();
    hold.page.frame(2);
    const float before = hold.page.item("What these answers give").at.y;
    for (auto& pair : hold.page.examination->pairs) pair.choices.clear();
    hold.page.examination->finished = false;
    hold.page.examination->progress = .42;
    hold.page.frame(2);
    CHECK(hold.says("Looking for what contradicts what \xE2\x80\xA6 42 %"));
    CHECK(hold.page.item("What these answers give").at.y == before);
    hold.page.examination.reset();
    hold.page.frame(2);
    CHECK(hold.says("0 %"));
    CHECK(hold.page.item("What these answers give").at.y == before);
}

TEST_CASE("the two sentences, the answers that could stand instead, and what each does") {
    HoldPage hold(contradicting_set());
    hold.page.examination = examination();
    hold.page.frame(2);
    CHECK(hold.says("Contradiction 1 of 2"));
    CHECK(hold.says("It was agreed that Noise counts 6 times as much as Floor space."));
    CHECK(hold.says("The other answers say Floor space counts 2 times as much as Noise."));
    CHECK(hold.page.find("Floor space as much as Noise", "radio") != nullptr);
    CHECK(hold.says("CR 0.12, over 0.10 \xC2\xB7 Brook stays first"));
    CHECK(hold.says("CR 0.03 \xC2\xB7 Alder would be first"));
    CHECK(hold.says("One change is enough, and no fewer."));
    CHECK(hold.says("However this is corrected, Brook stays first."));
    hold.page.click("Look at this pair", "button");
    CHECK(hold.looked_at == ItemPair{"c1", "c3"});
    hold.page.click("Next contradiction", "button");
    CHECK(hold.says("Contradiction 2 of 2"));
    CHECK(hold.says("It was agreed that Ease of use counts 2 times as much as Noise."));
    // It was proven of the other pair only.
    CHECK_FALSE(hold.says("However this is corrected"));
    hold.page.click("Previous contradiction", "button");
    CHECK(hold.says("Contradiction 1 of 2"));
}

TEST_CASE(
    "a correction is one step with its reason in the log, on today's ranges, the way round it was said") {
    Decision d = contradicting_set();
    for (auto& j : d.judgments) {
        if (j.a != "c1" || j.b != "c3") continue;
        std::swap(j.a, j.b); // Said as "Noise 6 times Floor space".
        j.ratio = 6;
        j.note = "heard in the hall";
    }
    HoldPage hold(d);
    hold.page.examination = examination();
    hold.page.frame(2);
    hold.page.click("Floor space 2 times Noise", "radio");
    CHECK(hold.says("Ahead by 0.4 points of 100 then."));
    hold.page.click("Reason", "textbox");
    hold.page.type("read the wrong way round");
    hold.page.click("Correct this answer", "button");
    const Judgment& now = hold.page.decision().judgments.back();
    CHECK(now.a == "c3");
    CHECK(now.b == "c1");
    CHECK(now.ratio == .5);
    CHECK(now.note == "read the wrong way round");
    CHECK(now.a_range == "0 to 10 kg");
    CHECK(now.b_range == "0 to 10 kg");
    const LogEntry& log = hold.page.decision().log.back();
    CHECK(log.did == "Corrected Floor space against Noise: 1/6 to 2");
    CHECK(log.why == "read the wrong way round");
    CHECK(hold.page.undo());
    CHECK(hold.page.decision().judgments.size() == d.judgments.size());
}

TEST_CASE("without a reason the log says what the other answers say, and the remark stays") {
    Decision d = contradicting_set();
    for (auto& j : d.judgments) j.note = "heard in the hall";
    HoldPage hold(d);
    hold.page.examination = examination();
    hold.page.frame(2);
    hold.page.click("Floor space as much as Noise", "radio");
    hold.page.click("Correct this answer", "button");
    CHECK(hold.page.decision().log.back().why ==
          "corrected: the other answers say Floor space counts 2 times as much as Noise");
    CHECK(hold.page.decision().judgments.back().ratio == 1);
    CHECK(hold.page.decision().judgments.back().note == "heard in the hall");
}

TEST_CASE("an answer is left as said only with a reason, which becomes its remark") {
    const Decision d = contradicting_set();
    HoldPage hold(d);
    hold.page.examination = examination();
    hold.page.frame(2);
    hold.page.click("Leave it as said", "radio");
    CHECK_FALSE(hold.page.item("Keep it, with this reason", "button").enabled);
    hold.page.click("Reason", "textbox");
    hold.page.type("noise is a matter of law here");
    hold.page.click("Keep it, with this reason", "button");
    const Judgment& now = hold.page.decision().judgments.back();
    CHECK(now.ratio == 1.0 / 6);
    CHECK(now.note == "noise is a matter of law here");
    CHECK(hold.page.decision().log.back().did == "Kept Floor space against Noise at 1/6");
    CHECK(hold.page.decision().log.back().why == "noise is a matter of law here");
}

TEST_CASE("the fewest changes, if several, are made together in one act") {
    HoldPage hold(contradicting_set());
    hold.page.examination = examination();
    auto& fewest = *hold.page.examination->fewest;
    fewest.proven = false;
    fewest.changes = {{"c1", "c3", "", 1.0 / 6, 2}, {"c0", "c2", "", 4, 3}, {"c2", "c3", "", 2, .5}};
    hold.page.examination->matters_fewest = MattersAnswer{.matters = Matters::not_known,
                                                          .pairs = {{"c1", "c3"}, {"c0", "c2"}, {"c2", "c3"}},
                                                          .why = "Too many cases."};
    hold.page.frame(2);
    CHECK(hold.says("Three changes found; fewer may do."));
    CHECK(hold.says(
        "Whether other answers to these 3 pairs could change first place is not known. Too many cases."));
    hold.page.click("Change 3 answers together", "radio");
    CHECK(hold.says("Floor space 2 times Noise (now 1/6), Throughput 3 times Ease of use (now 4) and Noise 2 "
                    "times Ease of use (now 1/2)."));
    hold.page.click("Make these 3 changes", "button");
    const Decision& now = hold.page.decision();
    CHECK(said_ratio(now, "goal", "", "c1", "c3") == 2);
    CHECK(said_ratio(now, "goal", "", "c0", "c2") == 3);
    CHECK(said_ratio(now, "goal", "", "c2", "c3") == .5);
    CHECK(now.log.size() == 1);
    CHECK(hold.page.undo());
    CHECK(said_ratio(hold.page.decision(), "goal", "", "c0", "c2") == 4);
}

TEST_CASE("that it matters is said with the answers that make it so") {
    HoldPage hold(contradicting_set());
    hold.page.examination = examination();
    hold.page.examination->matters_worst = MattersAnswer{.matters = Matters::found_yes,
                                                         .pairs = {{"c1", "c3"}},
                                                         .answers = {{"c1", "c3", 9}},
                                                         .first_then = "alder"};
    hold.page.frame(2);
    CHECK(hold.says("It matters who is right: with Floor space 9 times Noise, Alder would be first."));
    CHECK_FALSE(hold.says("stays first."));
}

TEST_CASE("a group's mean is not corrected, it leads to the answers it is made of") {
    Decision d = judged_set({"Throughput", "Floor space", "Ease of use", "Noise", "Height"});
    add_judge(d, "A. Kern", {2, 4, 3, 5, 2, 1.0 / 9, 3, 2, 2, 1});
    add_judge(d, "M. Tolle", {2, 4, 3, 5, 2, 1.0 / 4, 3, 2, 2, 1});
    HoldPage hold(d);
    hold.page.examination = examination();
    hold.page.examination->mean_of_several = true;
    hold.page.frame(2);
    CHECK(hold.says("The judges together say Noise counts 6 times as much as Floor space."));
    CHECK(hold.says("A mean cannot be corrected, but the answers it is made of can, each by who gave it:"));
    CHECK(hold.page.find("Leave it as said", "radio") == nullptr);
    // Furthest from the others first.
    CHECK(hold.page.item("Look at the answer of A. Kern", "button").at.y <
          hold.page.item("Look at the answer of M. Tolle", "button").at.y);
    CHECK(hold.page.item("Look at the answer of A. Kern", "button").value == "Noise 9 times Floor space");
    hold.page.click("Look at the answer of A. Kern", "button");
    CHECK(hold.page.answers == Id("p0"));
    CHECK(hold.looked_at == ItemPair{"c1", "c3"});
    CHECK(hold.page.decision().judgments.size() == d.judgments.size());
}

TEST_CASE("a judge corrects his own answers, not what was agreed") {
    Decision d = judged_set({"Throughput", "Floor space", "Ease of use", "Noise", "Height"});
    add_judge(d, "A. Kern", {2, 4, 3, 5, 2, 1.0 / 6, 3, 2, 2, 1});
    HoldPage hold(d);
    hold.page.person = "p0";
    hold.page.examination = examination("p0", "p0");
    hold.page.frame(2);
    CHECK(hold.says("You said Noise counts 6 times as much as Floor space."));
    CHECK(hold.says("Your other answers say Floor space counts 2 times as much as Noise."));
    hold.page.click("Floor space 2 times Noise", "radio");
    hold.page.click("Correct this answer", "button");
    CHECK(said_ratio(hold.page.decision(), "goal", "p0", "c1", "c3") == 2);
    CHECK(hold.page.decision().log.back().did == "Corrected Floor space against Noise: 1/6 to 2 (A. Kern)");

    CHECK(hold.page.undo());
    hold.page.examination = examination("p0", "");
    hold.page.frame(2);
    CHECK(hold.says("It was agreed in the room and is corrected there."));
    CHECK(hold.page.find("Floor space 2 times Noise", "radio") == nullptr);
    hold.page.click("Answer for the room", "button");
    CHECK(hold.page.answers == Id{});
}

TEST_CASE("while all answer alone no standing and nobody else's answer is told") {
    Decision d = judged_set({"Throughput", "Floor space", "Ease of use", "Noise", "Height"});
    add_judge(d, "A. Kern", {2, 4, 3, 5, 2, 1.0 / 6, 3, 2, 2, 1});
    add_judge(d, "M. Tolle", {2, 4, 3, 5, 2, 1.0 / 4, 3, 2, 2, 1});
    HoldPage hold(d);
    hold.page.answering = Answering::alone;
    hold.page.frame(2);
    CHECK(hold.says("Sealed"));
    CHECK_FALSE(hold.says("contradict"));
    CHECK_FALSE(hold.says("%"));
    CHECK_FALSE(hold.page.examined.wanted);
    hold.page.person = "p0";
    hold.page.examination = examination("p0", "p0");
    hold.page.frame(2);
    CHECK(hold.says("You said Noise counts 6 times as much as Floor space."));
    CHECK_FALSE(hold.says("first"));
    CHECK_FALSE(hold.says("Tolle"));
    hold.page.examination->pairs.front().said_by = "";
    hold.page.frame(2);
    CHECK(hold.says("This is not your own answer; it can be looked at once all are revealed."));
    CHECK(hold.page.find("Answer for the room", "button") == nullptr);
}

TEST_CASE(
    "HOUSE in the room: the pair that contradicts first is named, corrected, and the correction undone") {
    // T. L. Saaty, How to make a decision, EJOR 48 (1990) 9-26, judgments from memory of the source.
    Decision d = judged_set(
        {"Size", "Buses", "Surroundings", "Age", "Yard", "Kitchen", "Condition", "Financing"},
        {5, 3, 7, 6,      6,      1. / 3, 1. / 4, 1. / 3, 5,      3,      3,      1. / 5, 1. / 7, 6,
         3, 4, 6, 1. / 5, 1. / 3, 1. / 4, 1. / 7, 1. / 8, 1. / 2, 1. / 5, 1. / 6, 1. / 5, 1. / 6, 1. / 2});
    Headless room({.width = 1920, .height = 3000});
    room.app().open_text("house.decision.json", write_decision(d));
    room.settle();
    room.click("Weigh", "tab");
    room.settle();
    const auto says = [&](const std::string& part) {
        std::string all;
        for (const auto& item : room.ledger().items())
            if (item.role == "text") all += item.label + " ";
        return all.find(part) != std::string::npos;
    };
    CHECK(says("It was agreed that Surroundings counts 6 times as much as Condition."));
    CHECK(says("CR 0.08"));
    CHECK(says("One change is enough, and no fewer."));
    room.click("Condition 2 times Surroundings", "radio");
    room.click("Correct this answer", "button");
    CHECK(says("0.082, limit 0.10"));
    CHECK(says("Some answers contradict each other") == false);
    room.key(ImGuiKey_Z, ImGuiMod_Ctrl);
    CHECK(says("It was agreed that Surroundings counts 6 times as much as Condition."));
}
