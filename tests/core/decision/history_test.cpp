#include <catch_amalgamated.hpp>

#include "core/decision/history.hpp"

using namespace steelyard;

namespace {

Decision two_options() {
    Decision d;
    d.criteria.id = "goal";
    d.options = {Option{.id = "o1", .name = "One"}, Option{.id = "o2", .name = "Two"}};
    return d;
}

const Stamp noon{"2026-12-01T12:00:00Z", "", "because"};

Edit rename(const char* name) {
    return Change<Option>{Option{.id = "o1", .name = name}};
}

} // namespace

TEST_CASE("a step is logged, raises the revision and can be undone and redone") {
    History history(two_options());
    const auto first = history.revision();
    const auto outcome = history.apply({rename("Uno")}, noon);
    CHECK(outcome.changed);
    CHECK(history.revision() > first);
    CHECK(history.now().options[0].name == "Uno");
    CHECK(history.undo_label() == "Renamed option \"One\" to \"Uno\"");
    REQUIRE(history.now().log.size() == 1);
    CHECK(history.now().log[0] == LogEntry{noon.at, "", "Renamed option \"One\" to \"Uno\"", "because", {}});

    CHECK(history.undo(noon));
    CHECK(history.now().options[0].name == "One");
    CHECK(history.undo_label().empty());
    CHECK_FALSE(history.undo(noon));
    CHECK(history.redo(noon));
    CHECK(history.now().options[0].name == "Uno");
    CHECK_FALSE(history.redo(noon));
}

TEST_CASE("undo adds to the log and erases nothing from it") {
    History history(two_options());
    history.apply({rename("Uno")}, noon);
    history.apply({rename("Eins")}, noon);
    history.undo(noon);
    history.undo(noon);
    history.redo(noon);
    std::vector<std::string> did;
    for (const auto& entry : history.now().log) did.push_back(entry.did);
    CHECK(did == std::vector<std::string>{
                     "Renamed option \"One\" to \"Uno\"", "Renamed option \"Uno\" to \"Eins\"",
                     "Undid: Renamed option \"Uno\" to \"Eins\"", "Undid: Renamed option \"One\" to \"Uno\"",
                     "Redid: Renamed option \"One\" to \"Uno\""});
}

TEST_CASE("an edit that changes nothing leaves no step, no log entry and the same revision") {
    History history(two_options());
    const auto before = history.revision();
    CHECK_FALSE(history.apply({rename("One")}, noon).changed);
    CHECK(history.revision() == before);
    CHECK(history.undo_label().empty());
    CHECK(history.now().log.empty());
}

TEST_CASE("a refused edit changes nothing and says why") {
    History history(two_options());
    const auto snapshot = history.snapshot();
    const auto outcome = history.apply({rename("Uno"), Remove<Option>{"o9"}}, noon);
    CHECK_FALSE(outcome.changed);
    CHECK(outcome.problems.size() == 1);
    CHECK(history.snapshot() == snapshot);
}

TEST_CASE("several edits in one act are one step under one label") {
    History history(two_options());
    history.apply({rename("Uno"), Remove<Option>{"o2"}}, noon, "Tidied up");
    CHECK(history.undo_label() == "Tidied up");
    history.undo(noon);
    CHECK(history.now().options == two_options().options);
}

TEST_CASE("a new step after undo ends what could be redone") {
    History history(two_options());
    history.apply({rename("Uno")}, noon);
    history.undo(noon);
    CHECK_FALSE(history.redo_label().empty());
    history.apply({rename("Eins")}, noon);
    CHECK(history.redo_label().empty());
    CHECK_FALSE(history.redo(noon));
}

TEST_CASE("steps are undone last first, two hundred of them at the most") {
    History history(two_options());
    for (int i = 0; i < 205; ++i) history.apply({rename(("n" + std::to_string(i)).c_str())}, noon);
    int undone = 0;
    while (history.undo(noon)) {
        ++undone;
        REQUIRE(history.now().options[0].name == "n" + std::to_string(204 - undone));
    }
    CHECK(undone == 200);
}
