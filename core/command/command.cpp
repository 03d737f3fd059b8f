#include "core/command/command.hpp"

#include <CLI/CLI.hpp>
#include <fstream>
#include <iostream>
#include <iterator>
#include <optional>
#include <string>

#include "core/decision/problem.hpp"
#include "core/decision/read.hpp"
#include "core/results/corrections.hpp"
#include "core/results/solve.hpp"
#include "core/results/write_results.hpp"

namespace steelyard {
namespace {

/// More than this is never read: it is one byte over what a decision file may hold, enough to be refused for
/// its size.
constexpr std::size_t most_bytes = (std::size_t{16} << 20) + 1;

std::string read_stream(std::istream& in) {
    std::string text(most_bytes, '\0');
    in.read(text.data(), static_cast<std::streamsize>(text.size()));
    text.resize(static_cast<std::size_t>(in.gcount()));
    return text;
}

std::optional<std::string> read_text(const std::string& file, std::istream& in, std::ostream& err) {
    if (file == "-") return read_stream(in);
    std::ifstream stream(file, std::ios::binary);
    if (stream) {
        std::string text = read_stream(stream);
        if (!stream.bad()) return text;
    }
    err << file << " cannot be read.\n";
    return std::nullopt;
}

/// The decision in a file, or none with the reasons told.
std::optional<Decision> open_decision(const std::string& file, std::istream& in, std::ostream& err,
                                      std::vector<Notice>* notices = nullptr) {
    const auto text = read_text(file, in, err);
    if (!text) return std::nullopt;
    ReadResult read = read_decision(*text);
    for (const auto& problem : read.problems) err << sentence(problem) << '\n';
    if (notices != nullptr) *notices = std::move(read.notices);
    return std::move(read.decision);
}

int check_file(const std::string& file, std::istream& in, std::ostream& out, std::ostream& err) {
    std::vector<Notice> notices;
    if (!open_decision(file, in, err, &notices)) return refused;
    for (const auto& notice : notices) {
        out << (notice.at.empty() ? "" : "At " + notice.at + ": ") << notice.text << '\n';
    }
    return out.flush() ? done : cannot_write;
}

/// What `solve` is asked for beside the standing.
struct Wanted {
    bool all = false;
    bool corrections = false;
};

int solve_file(const std::string& file, const Wanted& wanted, std::istream& in, std::ostream& out,
               std::ostream& err) {
    const auto decision = open_decision(file, in, err);
    if (!decision) return refused;
    Results results = solve(*decision);
    if (wanted.all || wanted.corrections) add_corrections(*decision, results);
    out << write_results(*decision, results);
    return out.flush() ? done : cannot_write;
}

} // namespace

int run_command(int argc, const char* const* argv, std::istream& in, std::ostream& out, std::ostream& err) {
    CLI::App app{"Ranks the options of a decision file by its weights, figures and musts.\n"
                 "It ranks preferences on the figures given; it certifies nothing.",
                 "steelyard"};
    app.require_subcommand(1);
    std::string file;
    const char* file_help = "a decision file, or - for standard input";

    auto* check =
        app.add_subcommand("check", "Says what is wrong with a decision file, and what is worth knowing.");
    check->add_option("FILE", file, file_help)->required();

    auto* solve = app.add_subcommand("solve", "Prints the results file of a decision.");
    solve->add_option("FILE", file, file_help)->required();
    Wanted wanted;
    solve->add_flag("--corrections", wanted.corrections,
                    "for each judgment the value that suits the others best, and the fewest changes that "
                    "bring each set within its limit");
    solve->add_flag("--all", wanted.all, "everything there is");

    try {
        app.parse(argc, argv);
    } catch (const CLI::ParseError& error) {
        if (app.exit(error, out, err) != 0) return wrong_usage;
        return out.flush() ? done : cannot_write;
    }
    if (check->parsed()) return check_file(file, in, out, err);
    return solve_file(file, wanted, in, out, err);
}

} // namespace steelyard
