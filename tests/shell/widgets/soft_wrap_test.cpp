#include "shell/widgets/soft_wrap.hpp"

#include <catch_amalgamated.hpp>

#include <string>

#include "tests/support/dice.hpp"

using namespace steelyard;
using steelyard::testing::Dice;

namespace {

/// Every byte is one wide.
float bytes(std::string_view text) {
    return static_cast<float>(text.size());
}

std::string wrapped(std::string_view text, float width) {
    return soft_wrap(text, width, bytes);
}

/// What typing `text` at the first "|" of a wrapped text gives, the cursor shown as "|".
std::string typed(std::string marked, const std::string& text) {
    const auto at = marked.find('|');
    marked.erase(at, 1);
    std::string after = marked;
    after.insert(at, text);
    PlainEdit plain = edit_of_wrapped(marked, after, at + text.size(), Erased::nothing);
    return plain.text.insert(plain.cursor, "|");
}

/// What a key gives that takes away one byte before or after the "|".
std::string erased(std::string marked, Erased which) {
    auto at = marked.find('|');
    marked.erase(at, 1);
    if (which == Erased::before) --at;
    std::string after = marked;
    after.erase(at, 1);
    PlainEdit plain = edit_of_wrapped(marked, after, at, which);
    return plain.text.insert(plain.cursor, "|");
}

} // namespace

TEST_CASE("lines are broken at spaces, the space staying before the break") {
    CHECK(wrapped("one two three", 8) == "one two \nthree");
    CHECK(wrapped("one two three", 7) == "one two \nthree");
    CHECK(wrapped("one two three", 6) == "one \ntwo \nthree");
    CHECK(wrapped("one two three", 100) == "one two three");
    CHECK(wrapped("", 8).empty());
}

TEST_CASE("a word longer than the line stands alone in it") {
    CHECK(wrapped("a verylongword b", 6) == "a \nverylongword \nb");
    CHECK(wrapped("verylongword", 6) == "verylongword");
}

TEST_CASE("real line feeds stay and have no space before them") {
    CHECK(wrapped("one\ntwo three", 5) == "one\ntwo \nthree");
    CHECK(wrapped("one  \n\ntwo ", 9) == "one\n\ntwo ");
}

TEST_CASE("taking the soft breaks away gives the text back") {
    Dice dice(11);
    for (int run = 0; run < 300; ++run) {
        std::string text;
        const int length = dice.between(0, 60);
        for (int i = 0; i < length; ++i) {
            const int what = dice.between(0, 7);
            const bool feed = what == 0 && !text.ends_with(' ');
            text += feed ? '\n' : what <= 2 ? ' ' : 'x';
        }
        const auto width = static_cast<float>(dice.between(1, 20));
        CAPTURE(text, width);
        const std::string shown = wrapped(text, width);
        CHECK(without_soft_breaks(shown) == text);
        for (std::size_t place = 0; place <= text.size(); ++place) {
            CHECK(without_soft_breaks(shown.substr(0, wrapped_place(shown, place))) == text.substr(0, place));
        }
    }
}

TEST_CASE("a place at a soft break is at the beginning of the next line") {
    CHECK(wrapped_place("one \ntwo", 4) == 5);
    CHECK(wrapped_place("one \ntwo", 7) == 8);
    CHECK(wrapped_place("one\ntwo", 3) == 3);
}

TEST_CASE("typing keeps soft breaks soft") {
    CHECK(typed("one |\ntwo", "x") == "one x|two");
    CHECK(typed("one \n|two", "x") == "one x|two");
    CHECK(typed("on|e \ntwo", "xx") == "onxx|e two");
    CHECK(typed("one \ntwo|", " ") == "one two |");
    CHECK(typed("aaa|a \naa", "a") == "aaaa|a aa");
}

TEST_CASE("line feeds that are typed or pasted are real") {
    CHECK(typed("one |\ntwo", "\n") == "one\n|two");
    CHECK(typed("one|", "\n") == "one\n|");
    CHECK(typed("one |", "\n") == "one\n|");
    CHECK(typed("one |", "a \nb") == "one a\nb|");
}

TEST_CASE("deleting a soft break takes what stands before or after it") {
    CHECK(erased("one \n|two", Erased::before) == "one|two");
    CHECK(erased("one |\ntwo", Erased::before) == "one|two");
    CHECK(erased("one |\ntwo", Erased::after) == "one |wo");
    CHECK(erased("one |\n\xC3\xBC"
                 "x",
                 Erased::after) == "one |x");
    CHECK(erased("one\n|two", Erased::before) == "one|two");
    CHECK(erased("one|\ntwo", Erased::after) == "one|two");
}
