#include <catch_amalgamated.hpp>

#include "core/decision/read.hpp"
#include "shell/example.hpp"
#include "tests/shell/support/headless.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

std::string minimal(const char* id, const char* title) {
    return std::string(R"({"format":"steelyard-decision","version":1,"id":")") + id + R"(","title":")" +
           title + R"(","options":[],"criteria":{"id":"goal"}})";
}

void rename(Headless& page, const char* title) {
    page.click("Frame", "tab");
    page.click("Title", "textbox");
    page.type(title);
    page.key(ImGuiKey_Enter);
    page.settle();
}

} // namespace

TEST_CASE("a first start shows the example, marked as one, and stores nothing") {
    Headless page;
    page.settle();
    CHECK(page.find("Start empty", "button") != nullptr);
    CHECK(page.find("Open a file", "button") != nullptr);
    page.wait(2);
    CHECK(page.platform().kept.empty());
}

TEST_CASE("what was changed is stored and found again at the next start") {
    std::vector<StoredDecision> kept;
    {
        Headless page;
        page.settle();
        rename(page, "Washer, my way");
        page.wait(1);
        page.settle();
        kept = page.platform().kept;
    }
    REQUIRE(kept.size() == 1);
    CHECK(read_decision(kept[0].text).decision->title == "Washer, my way");
    Headless again({.prepare = [&](FakePlatform& platform) { platform.kept = kept; }});
    again.settle();
    CHECK(again.find("Washer, my way", "text") != nullptr);
}

TEST_CASE("starting empty and opening a file keep the decision before") {
    Headless page;
    page.settle();
    rename(page, "Washer, my way");
    page.click("Start empty", "button");
    page.settle();
    CHECK(page.find("Untitled decision", "text") != nullptr);
    page.app().open_text("other.decision.json", minimal("other", "Other"));
    page.settle();
    CHECK(page.find("Other", "text") != nullptr);
    bool found = false;
    for (const auto& kept : page.platform().kept) found = found || kept.title == "Washer, my way";
    CHECK(found);
}

TEST_CASE("a file with the id of a kept decision does not overwrite it") {
    Headless page({.prepare = [](FakePlatform& platform) {
        platform.kept.push_back({"same", "Kept", minimal("same", "Kept"), "2026-11-30T08:00:00Z", 4});
    }});
    page.settle();
    page.app().open_text("same.decision.json", minimal("same", "From the file"));
    page.settle();
    rename(page, "From the file, changed");
    page.wait(1);
    page.settle();
    std::vector<std::string> titles;
    for (const auto& kept : page.platform().kept) {
        const ReadResult read = read_decision(kept.text);
        INFO(kept.text);
        REQUIRE(read.decision.has_value());
        titles.push_back(read.decision->title);
    }
    CHECK(titles.size() == 2);
    CHECK(std::count(titles.begin(), titles.end(), "Kept") == 1);
    CHECK(std::count(titles.begin(), titles.end(), "From the file, changed") == 1);
}

TEST_CASE("a bad file is refused with all its reasons and changes nothing") {
    Headless page;
    page.settle();
    page.app().open_text("bad.decision.json",
                         R"({"format":"steelyard-decision","version":1,"title":5,"options":[]})");
    page.settle();
    CHECK(page.find("bad.decision.json cannot be opened") != nullptr);
    page.click("Close", "button");
    page.settle();
    CHECK(page.find("Parts washer for cell 7", "text") != nullptr);
}

TEST_CASE("a failed store shows a lasting bar, and trying again clears it") {
    Headless page(
        {.prepare = [](FakePlatform& platform) { platform.next_store_problems = {"The disk is full."}; }});
    page.settle();
    rename(page, "Washer, my way");
    page.wait(1);
    page.settle();
    CHECK(page.find("Not saved in this browser: The disk is full.") != nullptr);
    CHECK(page.platform().unsaved);
    page.click("Try again", "button");
    page.settle();
    CHECK(page.find("Try again", "button") == nullptr);
    CHECK_FALSE(page.platform().unsaved);
}

TEST_CASE("a decision another page writes can only be read, until it is taken over") {
    Headless page(
        {.prepare = [](FakePlatform& platform) { platform.next_claims = {Claim::taken_elsewhere}; }});
    page.settle();
    CHECK(page.find("Another page has this decision open; here it can only be read.") != nullptr);
    page.click("Write here instead", "button");
    page.settle();
    CHECK(page.find("Write here instead", "button") == nullptr);
}

TEST_CASE("saving writes a file that reads back, and the results file beside it") {
    Headless page;
    page.settle();
    page.key(ImGuiKey_S, ImGuiMod_Ctrl);
    page.settle();
    REQUIRE(page.platform().saved_files.size() == 1);
    CHECK(read_decision(page.platform().saved_files[0].text).decision ==
          read_decision(example_decision()).decision);
    CHECK(page.platform().saved_files[0].name.ends_with(".decision.json"));
    page.click("File", "combobox");
    page.settle();
    page.click("Save the results file", "option");
    page.settle();
    REQUIRE(page.platform().saved_files.size() == 2);
    CHECK(page.platform().saved_files[1].text == page.app().results_file());
}

TEST_CASE("an edit that takes entries away is asked about first") {
    Headless page;
    page.settle();
    page.click("Frame", "tab");
    page.settle();
    const std::string before = page.app().results_file();
    page.click("More about option A", "button");
    page.settle();
    page.click("Delete option", "button");
    page.settle();
    CHECK(page.find("This takes something away") != nullptr);
    page.click("Keep it as it is", "button");
    page.settle();
    CHECK(page.app().results_file() == before);
}
