#include "shell/rooms/outline.hpp"

#include <algorithm>
#include <map>
#include <utility>

#include "shell/rooms/outline_line.hpp"

namespace steelyard {
namespace {

/// A list of criteria is far shorter; what is longer was pasted by mistake.
constexpr std::size_t most_lines = 1000;
constexpr std::size_t longest_name = 200;

std::string line_name(std::size_t line) {
    return "Line " + std::to_string(line);
}

std::string quoted(const std::string& name) {
    return "\xE2\x80\x9C" + name + "\xE2\x80\x9D";
}

std::size_t characters(const std::string& text) {
    return static_cast<std::size_t>(std::count_if(
        text.begin(), text.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }));
}

class Reader {
public:
    explicit Reader(LineEnds ends) : ends_(ends) {}

    Outline read(std::string_view text) {
        take_lines(text);
        const bool numbered = std::all_of(lines_.begin(), lines_.end(),
                                          [](const OutlineLine& line) { return line.numbering > 0; });
        drop_headings();
        for (auto& line : lines_) {
            strip_marker(line, numbered);
            split_weight(line, ends_ == LineEnds::weights);
            out_.has_numbers = out_.has_numbers || line.ends_in_number;
        }
        if (numbered) depths_from_numbering();
        place_items();
        settle_weights();
        if (!out_.problem.empty()) out_.items.clear();
        return std::move(out_);
    }

private:
    void refuse(std::size_t line, const std::string& rest) {
        if (out_.problem.empty()) out_.problem = line_name(line) + rest;
    }

    void take_lines(std::string_view text) {
        std::size_t number = 0;
        for (const std::string_view line : text_lines(text)) {
            ++number;
            if (OutlineLine read = read_line(line, number); !read.text.empty())
                lines_.push_back(std::move(read));
        }
        if (lines_.size() > most_lines) {
            refuse(lines_[most_lines].number, " is more than a list of criteria can hold (1,000 lines).");
            lines_.clear();
        }
    }

    /// A first line without a number above a column of nothing but numbers names the columns.
    void drop_headings() {
        if (lines_.size() < 2 || ends_ == LineEnds::names) return;
        const bool heads = lines_[0].columns > 1 && !lines_[0].last_column_is_number &&
                           std::all_of(lines_.begin() + 1, lines_.end(),
                                       [](const OutlineLine& l) { return l.last_column_is_number; });
        if (!heads) return;
        out_.notes.push_back(line_name(lines_[0].number) + " was read as the headings of the columns.");
        lines_.erase(lines_.begin());
    }

    /// Where no line is indented, "1.2" stands below "1".
    void depths_from_numbering() {
        const bool flat = std::all_of(lines_.begin(), lines_.end(), [&](const OutlineLine& line) {
            return line.indent.narrow == lines_[0].indent.narrow && line.indent.wide == lines_[0].indent.wide;
        });
        if (!flat) return;
        for (auto& line : lines_) line.indent = {line.numbering, line.numbering};
    }

    void place_items() {
        std::vector<const OutlineLine*> open; // The line whose indentation each depth has.
        for (const auto& line : lines_) {
            while (!open.empty() && !deeper(line, *open.back()) && !level(line, *open.back())) {
                if (!shallower(line, *open.back())) {
                    refuse(line.number, " mixes tabs and spaces so that its place can be read in two ways. "
                                        "Use one of them throughout.");
                    return;
                }
                open.pop_back();
                if (open.empty() || deeper(line, *open.back())) {
                    refuse(line.number, open.empty() ? " is indented less than the first line."
                                                     : " is indented like no line above it, so that its "
                                                       "place is unclear.");
                    return;
                }
            }
            if (open.empty() || deeper(line, *open.back()))
                open.push_back(&line);
            else
                open.back() = &line;
            add(line, open.size() - 1);
        }
    }

    static bool deeper(const OutlineLine& a, const OutlineLine& b) {
        return a.indent.narrow > b.indent.narrow && a.indent.wide > b.indent.wide;
    }
    static bool level(const OutlineLine& a, const OutlineLine& b) {
        return a.indent.narrow == b.indent.narrow && a.indent.wide == b.indent.wide;
    }
    static bool shallower(const OutlineLine& a, const OutlineLine& b) { return deeper(b, a); }

    void add(const OutlineLine& line, std::size_t depth) {
        if (line.text.empty()) refuse(line.number, " has no name.");
        if (characters(line.text) > longest_name) {
            refuse(line.number, " is longer than 200 characters, which is too long for a criterion's name.");
        }
        if (line.weight && *line.weight < 0) refuse(line.number, " has a weight below 0.");
        out_.items.push_back({line.text, depth, line.number, line.weight, line.percent});
        sources_.push_back(&line);
    }

    /// Keeps weights where the whole group has them.
    void settle_weights() {
        std::map<std::size_t, std::vector<std::size_t>> groups; // By the item they stand under.
        const auto parents = outline_parents(out_.items);
        for (std::size_t i = 0; i < out_.items.size(); ++i) groups[parents[i]].push_back(i);
        for (const auto& [parent, group] : groups) {
            const auto without = std::find_if(group.begin(), group.end(),
                                              [&](std::size_t i) { return !out_.items[i].weight; });
            if (without != group.end())
                leave_out(group, out_.items[*without]);
            else
                check_sum(group);
        }
    }

    void leave_out(const std::vector<std::size_t>& group, const OutlineItem& bare) {
        bool meant = false;
        for (const std::size_t i : group) {
            const OutlineLine& line = *sources_[i];
            if (out_.items[i].weight && line.may_be_name)
                out_.items[i].name = line.with_number;
            else
                meant = meant || out_.items[i].weight;
            out_.items[i].weight.reset();
        }
        if (meant) {
            out_.notes.push_back("The weights beside " + quoted(bare.name) +
                                 " are left out, since it has none (line " + std::to_string(bare.line) +
                                 ").");
        }
    }

    void check_sum(const std::vector<std::size_t>& group) {
        double sum = 0;
        bool percents = false;
        for (const std::size_t i : group) {
            sum += *out_.items[i].weight;
            percents = percents || out_.items[i].percent;
        }
        if (sum <= 0) refuse(out_.items[group.front()].line, " begins a group whose weights add up to 0.");
        for (const std::size_t i : group) {
            const OutlineItem& item = out_.items[i];
            if (percents && !item.percent && *item.weight > 0 && *item.weight <= 1)
                refuse(item.line, " has a weight of 1 or less without % beside weights in %.");
        }
    }

    LineEnds ends_;
    Outline out_;
    std::vector<OutlineLine> lines_;
    std::vector<const OutlineLine*> sources_; ///< Beside out_.items.
};

} // namespace

Outline read_outline(std::string_view text, LineEnds ends) {
    return Reader(ends).read(text);
}

std::vector<std::size_t> outline_parents(const std::vector<OutlineItem>& items) {
    std::vector<std::size_t> parents;
    std::vector<std::size_t> open; // The latest item of each depth.
    for (std::size_t i = 0; i < items.size(); ++i) {
        open.resize(std::min(open.size(), items[i].depth));
        parents.push_back(open.empty() ? items.size() : open.back());
        open.push_back(i);
    }
    return parents;
}

} // namespace steelyard
