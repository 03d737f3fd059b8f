#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cstdio>
#include <fstream>
#include <istream>
#include <ostream>
#include <sstream>
#include <streambuf>
#include <string>
#include <vector>

#include "core/command/command.hpp"
#include "core/decision/problem.hpp"
#include "core/decision/read.hpp"
#include "core/results/corrections.hpp"
#include "core/results/solve.hpp"
#include "core/results/write_results.hpp"
#include "tests/support/bad_files.hpp"
#include "tests/support/full_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::ContainsSubstring;

namespace {

struct Ran {
    int code = -1;
    std::string out;
    std::string err;
};

int run_into(const std::vector<std::string>& arguments, const std::string& input, std::ostream& out,
             std::ostream& err) {
    std::vector<const char*> argv{"steelyard"};
    for (const auto& argument : arguments) argv.push_back(argument.c_str());
    std::istringstream in(input);
    return run_command(static_cast<int>(argv.size()), argv.data(), in, out, err);
}

Ran run(const std::vector<std::string>& arguments, const std::string& input = "") {
    std::ostringstream out;
    std::ostringstream err;
    const int code = run_into(arguments, input, out, err);
    return {code, out.str(), err.str()};
}

/// A file that is gone when the test ends.
class TemporaryFile {
public:
    TemporaryFile(std::string name, const std::string& text) : name_(std::move(name)) {
        std::ofstream stream(name_, std::ios::binary);
        stream << text;
        REQUIRE(stream.flush());
    }
    TemporaryFile(const TemporaryFile&) = delete;
    TemporaryFile& operator=(const TemporaryFile&) = delete;
    ~TemporaryFile() { std::remove(name_.c_str()); }
    const std::string& name() const { return name_; }

private:
    std::string name_;
};

/// Takes `most` bytes, then no more, as a full disk does.
class FullDisk : public std::streambuf {
public:
    explicit FullDisk(std::streamsize most) : left_(most) {}

protected:
    std::streamsize xsputn(const char*, std::streamsize n) override {
        const std::streamsize taken = std::min(n, left_);
        left_ -= taken;
        return taken;
    }
    int_type overflow(int_type c) override {
        return left_-- > 0 ? traits_type::not_eof(c) : traits_type::eof();
    }

private:
    std::streamsize left_;
};

/// Takes everything and loses it: the failure shows only when it is flushed.
class LostOnFlush : public std::streambuf {
protected:
    std::streamsize xsputn(const char*, std::streamsize n) override { return n; }
    int_type overflow(int_type c) override { return traits_type::not_eof(c); }
    int sync() override { return -1; }
};

int run_to(std::streambuf& buffer, const std::vector<std::string>& arguments, const std::string& input) {
    std::ostream out(&buffer);
    std::ostringstream err;
    return run_into(arguments, input, out, err);
}

const std::string bad_file =
    R"({"format": "steelyard-decision", "version": 1, "options": [{"id": "o1"}, {"id": "o1"}],
    "criteria": {"id": "goal"}, "judgments": [{"set": "goal", "a": "o1", "b": "o9", "ratio": 2}]})";

const std::string noticed_file = R"({"format": "steelyard-decision", "version": 1,
    "options": [{"id": "o1"}, {"id": "o2"}], "criteria": {"id": "goal"}, "colour": "green",
    "judgments": [{"set": "goal", "a": "o1", "b": "o2", "ratio": 20}]})";

} // namespace

TEST_CASE("command: a decision without faults and remarks passes in silence") {
    const TemporaryFile file("command_test quiet.decision.json", test::small_decision_text());
    const Ran ran = run({"check", file.name()});
    CHECK(ran.code == done);
    CHECK(ran.out.empty());
    CHECK(ran.err.empty());
}

TEST_CASE("command: check tells notices on standard output, with their places") {
    const Ran ran = run({"check", "-"}, noticed_file);
    CHECK(ran.code == done);
    CHECK(ran.err.empty());
    const ReadResult read = read_decision(noticed_file);
    REQUIRE(read.notices.size() >= 2);
    for (const auto& notice : read.notices) {
        CHECK_THAT(ran.out, ContainsSubstring(notice.text));
        CHECK_THAT(ran.out, ContainsSubstring(notice.at));
    }
    CHECK_THAT(ran.out, ContainsSubstring("/judgments/0/ratio"));
}

TEST_CASE("command: a refused file has all its problems told on standard error, one a line") {
    const ReadResult read = read_decision(bad_file);
    REQUIRE(read.problems.size() >= 2);
    std::string expected;
    for (const auto& problem : read.problems) expected += sentence(problem) + "\n";
    for (const char* call : {"check", "solve"}) {
        INFO(call);
        const Ran ran = run({call, "-"}, bad_file);
        CHECK(ran.code == refused);
        CHECK(ran.out.empty());
        CHECK(ran.err == expected);
    }
}

TEST_CASE("command: solve prints the results file, from a file and from standard input alike") {
    const std::string& text = test::full_decision_text();
    const Decision decision = test::read(text);
    const std::string expected = write_results(decision, solve(decision));
    const TemporaryFile file("command_test Größe.decision.json", text);
    const Ran from_file = run({"solve", file.name()});
    CHECK(from_file.code == done);
    CHECK(from_file.err.empty());
    CHECK(from_file.out == expected);
    const Ran from_input = run({"solve", "-"}, text);
    CHECK(from_input.code == done);
    CHECK(from_input.out == expected);
}

TEST_CASE("command: solve keeps what is worth knowing out of the results on standard output") {
    // Results are all there is: notices of reading would spoil the JSON.
    const Ran ran = run({"solve", "-"}, noticed_file);
    CHECK(ran.code == done);
    const Decision decision = test::read(noticed_file);
    CHECK(ran.out == write_results(decision, solve(decision)));
}

TEST_CASE("command: a file that is not there or is a folder is unreadable") {
    for (const char* call : {"check", "solve"}) {
        INFO(call);
        const Ran absent = run({call, "no such file.decision.json"});
        CHECK(absent.code == refused);
        CHECK(absent.out.empty());
        CHECK_THAT(absent.err, ContainsSubstring("no such file.decision.json"));
        const Ran folder = run({call, STEELYARD_SOURCE_DIR});
        CHECK(folder.code == refused);
        CHECK(folder.out.empty());
        CHECK_FALSE(folder.err.empty());
    }
}

TEST_CASE("command: an empty file, and one of the wrong kind, are refused") {
    for (const std::string& text :
         {std::string{}, std::string{"steelyard"}, std::string{"[]"}, std::string(3, '\0')}) {
        const Ran ran = run({"check", "-"}, text);
        CHECK(ran.code == refused);
        CHECK(ran.out.empty());
        CHECK_FALSE(ran.err.empty());
    }
}

TEST_CASE("command: a file of 16 MiB is read, one byte more is refused for its size") {
    const std::string text = test::small_decision_text();
    const std::size_t limit = std::size_t{16} << 20;
    std::string padded = text + std::string(limit - text.size(), ' ');
    CHECK(run({"check", "-"}, padded).code == done);
    padded += ' ';
    const Ran ran = run({"check", "-"}, padded);
    CHECK(ran.code == refused);
    CHECK_FALSE(ran.err.empty());
}

TEST_CASE("command: wrong usage is told on standard error") {
    const std::vector<std::vector<std::string>> wrong{{},
                                                      {"check"},
                                                      {"solve"},
                                                      {"weigh", "file"},
                                                      {"check", "-", "another"},
                                                      {"solve", "-", "another"},
                                                      {"check", "--no-such-option", "-"},
                                                      {"--no-such-option"},
                                                      {"-"}};
    for (const auto& arguments : wrong) {
        std::string line;
        for (const auto& argument : arguments) line += " " + argument;
        INFO("steelyard" << line);
        const Ran ran = run(arguments, test::small_decision_text());
        CHECK(ran.code == wrong_usage);
        CHECK(ran.out.empty());
        CHECK_FALSE(ran.err.empty());
    }
}

TEST_CASE("command: help is an answer") {
    const Ran whole = run({"--help"});
    CHECK(whole.code == done);
    CHECK(whole.err.empty());
    CHECK_THAT(whole.out, ContainsSubstring("check") && ContainsSubstring("solve"));
    for (const char* call : {"check", "solve"}) {
        const Ran one = run({call, "--help"});
        INFO(call);
        CHECK(one.code == done);
        CHECK_THAT(one.out, ContainsSubstring("FILE"));
    }
}

TEST_CASE("command: an output that cannot be written is told by the exit code") {
    const std::string& text = test::full_decision_text();
    for (const std::streamsize room : {std::streamsize{0}, std::streamsize{100}}) {
        INFO("room for " << room << " bytes");
        FullDisk disk(room);
        CHECK(run_to(disk, {"solve", "-"}, text) == cannot_write);
    }
    FullDisk full(0);
    CHECK(run_to(full, {"check", "-"}, noticed_file) == cannot_write);
    FullDisk full_too(0);
    CHECK(run_to(full_too, {"--help"}, "") == cannot_write);
    LostOnFlush lost;
    CHECK(run_to(lost, {"solve", "-"}, text) == cannot_write);
}

TEST_CASE("command: a refused file is refused though nothing could be written") {
    FullDisk full(0);
    CHECK(run_to(full, {"solve", "-"}, bad_file) == refused);
}

TEST_CASE("command: every kind of bad file ends in exit code 1, with each place on standard error") {
    for (const auto& file : test::bad_files()) {
        INFO(file.name);
        const Ran ran = run({"check", "-"}, file.text);
        CHECK(ran.code == refused);
        CHECK(ran.out.empty());
        for (const auto& place : file.at) {
            CHECK_THAT(ran.err,
                       ContainsSubstring(place.empty() ? "The file as a whole:" : "At " + place + ":"));
        }
    }
}

TEST_CASE("command: solve adds corrections when asked for them, or for everything") {
    const std::string& text = test::full_decision_text();
    const Decision decision = test::read(text);
    Results results = solve(decision);
    add_corrections(decision, results);
    const std::string expected = write_results(decision, results);
    const TemporaryFile file("command_test corrections.decision.json", text);
    for (const std::vector<std::string>& arguments :
         {std::vector<std::string>{"solve", file.name(), "--corrections"},
          {"solve", "--corrections", file.name()},
          {"solve", file.name(), "--all"}}) {
        const Ran ran = run(arguments);
        CHECK(ran.code == done);
        CHECK(ran.err.empty());
        CHECK(ran.out == expected);
    }
    CHECK(run({"solve", file.name()}).out != expected);
    CHECK(run({"check", file.name(), "--corrections"}).code == wrong_usage);
}

} // namespace steelyard
