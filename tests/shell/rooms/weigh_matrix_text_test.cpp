#include "shell/rooms/weigh_matrix_text.hpp"

#include <catch_amalgamated.hpp>
#include <cmath>

#include "shell/rooms/cell_ratio.hpp"
#include "shell/rooms/cell_text.hpp"

using namespace steelyard;

namespace {

const std::vector<std::string> names{"Throughput", "Floor space", "Ease of use", "Noise"};

/// Reads a block whose lines are given without their tabs: "|" stands for one.
ReadMatrix read(std::string text, const std::vector<std::string>& items = names) {
    for (char& c : text) {
        if (c == '|') c = '\t';
    }
    return read_matrix(text, items);
}

/// "0-1 3, 0-2 1/2": what was read.
std::string said(const ReadMatrix& matrix) {
    std::string text;
    for (const auto& a : matrix.answers) {
        text += (text.empty() ? "" : ", ") + std::to_string(a.i) + "-" + std::to_string(a.j) + " " +
                exact_ratio(a.ratio);
    }
    return text;
}

const std::string whole = "0-1 3, 0-2 1/2, 0-3 1/3, 1-2 1/3, 1-3 1/6, 2-3 2";

} // namespace

TEST_CASE("a whole matrix with names above and at the left is read") {
    const auto read_back = read("|Throughput|Floor space|Ease of use|Noise\n"
                                "Throughput|1|3|1/2|1/3\n"
                                "Floor space|1/3|1|1/3|1/6\n"
                                "Ease of use|2|3|1|1/2\n"
                                "Noise|3|6|1/2|1\n");
    CHECK(read_back.problem ==
          "Row \"Ease of use\", column \"Noise\": 1/2 and, the other way round, 1/2 are not "
          "reciprocal.");
    CHECK(read_back.answers.empty());
    const auto put_right = read("|Throughput|Floor space|Ease of use|Noise\n"
                                "Throughput|1|3|1/2|1/3\n"
                                "Floor space|1/3|1|1/3|1/6\n"
                                "Ease of use|2|3|1|2\n"
                                "Noise|3|6|1/2|1\n");
    CHECK(put_right.problem.empty());
    CHECK(said(put_right) == whole);
    CHECK(put_right.blank.empty());
    CHECK(put_right.notes.empty());
}

TEST_CASE("a matrix without names is read by place, with and without its diagonal") {
    CHECK(said(read("1|3|1/2|1/3\n1/3|1|1/3|1/6\n2|3|1|2\n3|6|1/2|1")) == whole);
    CHECK(said(read("|3|1/2|1/3\r\n1/3||1/3|1/6\r\n2|3||2\r\n3|6|1/2|\r\n")) == whole);
}

TEST_CASE("one half is enough, padded or ragged, with or without its empty line") {
    CHECK(said(read("|3|1/2|1/3\n||1/3|1/6\n|||2\n|||")) == whole);
    CHECK(said(read("1|3|1/2|1/3\n|1|1/3|1/6\n||1|2\n")) == whole);
    CHECK(said(read("1\n1/3|1\n2|3|1\n3|6|1/2|1")) == whole);
    CHECK(said(read("|||\n1/3\n2|3\n3|6|1/2")) == whole);
    CHECK(
        said(read("|Throughput|Floor space|Ease of use|Noise\nThroughput||3|1/2|1/3\nFloor space|||1/3|1/6\n"
                  "Ease of use||||2")) == whole);
}

TEST_CASE("semicolons part cells where there is no tab") {
    CHECK(said(read("1;3;1/2;1/3\n1/3;1;1/3;1/6\n2;3;1;2\n3;6;1/2;1")) == whole);
    CHECK(said(read("1;3;0,5;1/3\n;1;1/3;1/6\n;;1;2\n;;;1")) == whole);
}

TEST_CASE("decimals have a comma or a point, and what a rounded one can only mean is said") {
    const auto points = read("1|3|0.5|0.33\n0.33|1|0.33|0.17\n2|3|1|2\n3|6|0.5|1");
    CHECK(points.problem.empty());
    CHECK(said(points) == whole);
    CHECK(points.notes.empty()); // Whole numbers in the other half say it exactly.
    const auto commas = read("|3|0,5|0,333\n||0,33|0,1667\n|||2,0");
    CHECK(said(commas) == whole);
    CHECK(commas.notes == "0,333 is taken as 1/3, 0,1667 as 1/6.");
    CHECK(said(read("1|1,333|2,5|1/2.5\n|1|1|1\n||1|1\n|||1")) ==
          "0-1 1.333, 0-2 2.5, 0-3 0.4, 1-2 1, 1-3 1, 2-3 1");
    CHECK(said(read("|0.4|.75|7\n||1|1\n|||1\n|||")) == "0-1 0.4, 0-2 0.75, 0-3 7, 1-2 1, 1-3 1, 2-3 1");
}

TEST_CASE("of two rounded halves the more exact one counts") {
    const auto both = read("1|2.35|1|1\n0.43|1|1|1\n1|1|1|1\n1|1|1|1");
    CHECK(said(both) == "0-1 2.35, 0-2 1, 0-3 1, 1-2 1, 1-3 1, 2-3 1");
    CHECK(said(read("1|0.1|1|1\n9|1|1|1\n1|1|1|1\n1|1|1|1")).starts_with("0-1 1/9,"));
}

TEST_CASE("rows and columns in another order are matched by name, whatever their capitals and spaces") {
    CHECK(said(read("set|Noise|ease of  use|FLOOR SPACE|Throughput\n"
                    "Floor space|1/6|1/3|1|1/3\n"
                    "Throughput|1/3|1/2|3|1\n"
                    "Noise|1|1/2|6|3\n"
                    "Ease of use|2|1|3|2")) == whole);
}

TEST_CASE("names on one side stand for both") {
    CHECK(said(read("Throughput|Floor space|Ease of use|Noise\n1|3|1/2|1/3\n|1|1/3|1/6\n||1|2\n|||1")) ==
          whole);
    CHECK(said(read(
              "Noise|1|1/2|6|3\nEase of use|2|1|3|2\nFloor space|1/6|1/3|1|1/3\nThroughput|1/3|1/2|3|1")) ==
          whole);
}

TEST_CASE("blanks are missing pairs, dashes and question marks too") {
    const auto some = read("1|3|-|1/3\n|1|?|\n||1|\xE2\x80\x94\n|||1");
    CHECK(said(some) == "0-1 3, 0-3 1/3");
    CHECK(some.blank == std::vector<std::array<std::size_t, 2>>{{0, 2}, {1, 2}, {1, 3}, {2, 3}});
}

TEST_CASE("a block of some of the items leaves the others alone") {
    const auto some = read("|Noise|Throughput\nNoise|1|4\nThroughput|1/4|1");
    CHECK(said(some) == "0-3 1/4");
    CHECK(some.blank.empty());
}

TEST_CASE("what spreadsheets put around a block is passed over") {
    CHECK(said(read("\xEF\xBB\xBF|Throughput|Floor space|Ease of use|Noise|\n"
                    "Throughput|1|=1/3|'1/3|0 1/3|\n"
                    "Floor space|3|1|\xC2\xBD| 2 1/2 |\n"
                    "Ease of use|||1|\xC2\xA0"
                    "7\xC2\xA0|\n"
                    "Noise||||1|\n|||||\n\n")) == "0-1 1/3, 0-2 1/3, 0-3 1/3, 1-2 1/2, 1-3 2.5, 2-3 7");
    CHECK(said(read("1|3|1|1|\n|1|1|1|\n||1|1|\n|||1|\n||||")) == "0-1 3, 0-2 1, 0-3 1, 1-2 1, 1-3 1, 2-3 1");
    CHECK(said(read("|||||\n||1|3|1|1\n|||1|1|1\n||||1|1\n|||||1")).starts_with("0-1 3"));
    CHECK(said(read("1,00E+00|3,00E+00|5,00E-01|1|\n|1|1|1\n||1|1\n|||1")).starts_with("0-1 3, 0-2 1/2"));
    const std::vector<std::string> odd{"A \"big\" one", "two\nlines"};
    CHECK(said(read("|\"A \"\"big\"\" one\"|\"two\nlines\"\n\"A \"\"big\"\" one\"|1|5\n\"two\nlines\"|1/5|1",
                    odd)) == "0-1 5");
}

TEST_CASE("names that are numbers are names where there is one line more than items") {
    const std::vector<std::string> years{"2024", "2025", "2026"};
    CHECK(said(read("|2026|2025|2024\n2026|1|2|4\n2025||1|2\n2024|||1", years)) ==
          "0-1 1/2, 0-2 1/4, 1-2 1/2");
    CHECK(said(read("1|2|4\n|1|2\n||1", years)) == "0-1 2, 0-2 4, 1-2 2");
}

TEST_CASE("a refused block names the cell and why, and gives no answer") {
    struct Case {
        const char* text;
        const char* problem;
    };
    for (const Case& one : {
             Case{"1|3|abc|1/3\n|1|1/3|1/6\n||1|2\n|||1",
                  "Row \"Throughput\", column \"Ease of use\": \"abc\" is no ratio. It takes 3, 2.5 or 1/3."},
             Case{"1|3|01. Mrz|1/3\n|1|1/3|1/6\n||1|2\n|||1",
                  "Row \"Throughput\", column \"Ease of use\": \"01. Mrz\" is no ratio; the spreadsheet may "
                  "have made "
                  "a date of a fraction. Set its cells to text and type it again."},
             Case{"1|3|1|1\n|1|1|1\n||1|3/1/2026\n|||1",
                  "Row \"Ease of use\", column \"Noise\": \"3/1/2026\" is no ratio; the spreadsheet may have "
                  "made a "
                  "date of a fraction. Set its cells to text and type it again."},
             Case{"1|3|1|1\n|1|1|120\n||1|1\n|||1",
                  "Row \"Floor space\", column \"Noise\": 120 is not between 1/100 and 100."},
             Case{"1|3|1|1\n|1|1|0\n||1|1\n|||1",
                  "Row \"Floor space\", column \"Noise\": 0 is not between 1/100 and 100."},
             Case{"1|3|1|1\n|1|1|-3\n||1|1\n|||1",
                  "Row \"Floor space\", column \"Noise\": -3 is not between 1/100 and 100."},
             Case{"1|3|1|1\n|1|1|1,234.5\n||1|1\n|||1",
                  "Row \"Floor space\", column \"Noise\": \"1,234.5\" is no ratio. It takes 3, 2.5 or 1/3."},
             Case{"1|3|1|1\n|1|1|1/0\n||1|1\n|||1",
                  "Row \"Floor space\", column \"Noise\": \"1/0\" is no ratio. It takes 3, 2.5 or 1/3."},
             Case{"1|3|1|1\n|1|1|#N/A\n||1|1\n|||1",
                  "Row \"Floor space\", column \"Noise\": \"#N/A\" is no ratio. It takes 3, 2.5 or 1/3."},
             Case{"1|3|1|1\n|2|1|1\n||1|1\n|||1", "Row \"Floor space\", column \"Floor space\": an item "
                                                  "against itself is 1 or left blank, not 2."},
             Case{"1|3|1|1\n3|1|1|1\n1|1|1|1\n1|1|1|1", "Row \"Throughput\", column \"Floor space\": 3 and, "
                                                        "the other way round, 3 are not reciprocal."},
             Case{"1|3|1|1\n0.37|1|1|1\n1|1|1|1\n1|1|1|1",
                  "Row \"Throughput\", column \"Floor space\": 3 and, the other way round, 0.37 are not "
                  "reciprocal."},
             Case{"1|3|1\n|1|1\n||1",
                  "The block has 3 rows and 3 columns; this set has 4 items, so it takes 4 rows "
                  "and 4 columns, and one more of each for names."},
             Case{"1|2|3|4|5\n1|2|3|4|5\n1|2|3|4|5\n1|2|3|4|5\n1|2|3|4|5",
                  "The column \"2\" is no item of this set."},
             Case{"|Throughput|Floor space|Ease of use|Din\nThroughput|1|3|1|1",
                  "The column \"Din\" is no item of this set."},
             Case{"|Throughput|Floor space|Ease of use|Noise\nThroughput|1|3|1|1\nThroughput|1|3|1|1",
                  "The row \"Throughput\" stands there twice."},
             Case{"|Throughput||Ease of use|Noise\nThroughput|1|3|1|1", "Column 3 has no name above it."},
             Case{"|Throughput|Floor space|Ease of use|Noise\n|1|3|1|1\nNoise|1|1|1|1",
                  "Row 2 has no name at its left."},
             Case{"|Throughput|Floor space|Ease of use|Noise\nThroughput|1||| \nNoise||||",
                  "There is no answer in the block."},
             Case{"", "Nothing was pasted."},
             Case{"We met on Tuesday; nobody agreed.", "This is no block of several rows and columns. Mark "
                                                       "the whole matrix in the spreadsheet and copy it; "
                                                       "its cells arrive parted by tabs or semicolons."},
         }) {
        const ReadMatrix matrix = read(one.text);
        CHECK(matrix.problem == one.problem);
        CHECK(matrix.answers.empty());
        CHECK(matrix.blank.empty());
    }
}

TEST_CASE("what was copied is read back to the bit, whatever the names and ratios") {
    const std::vector<std::string> odd{"=1+1", "A \"big\" one", "two\nlines", "Noise;loud"};
    const double ratios[4][4] = {
        {1, 3, 1.0 / 3, 0.3}, {0, 1, std::sqrt(2.0), 1 / std::sqrt(7.0)}, {0, 0, 1, 0.01}, {0, 0, 0, 1}};
    const auto ratio = [&](std::size_t i, std::size_t j) {
        return std::optional(i < j ? ratios[i][j] : 1 / ratios[j][i]);
    };
    const ReadMatrix back = read_matrix(matrix_text(odd, ratio), odd);
    CHECK(back.problem.empty());
    CHECK(back.notes.empty());
    REQUIRE(back.answers.size() == 6);
    for (const auto& a : back.answers) {
        INFO(a.i << " " << a.j);
        CHECK_THAT(a.ratio, Catch::Matchers::WithinRel(ratios[a.i][a.j], 1e-15));
    }
}

TEST_CASE("a copied matrix has names above and at the left, fractions and blanks") {
    const auto ratio = [](std::size_t i, std::size_t j) -> std::optional<double> {
        if (i + j == 3) return std::nullopt;
        return i < j ? 1.0 / 3 : 3.0;
    };
    CHECK(matrix_text({"A", "=B", "C"}, ratio) == "\tA\t'=B\tC\nA\t1\t1/3\t1/3\n'=B\t3\t1\t\nC\t3\t\t1\n");
    CHECK(exact_ratio(2.5) == "2.5");
    CHECK(exact_ratio(0.4) == "0.4");
    CHECK(exact_ratio(1.0 / 7) == "1/7");
}

TEST_CASE("a ratio in a cell is read with the rounding of its digits") {
    CHECK(read_cell_ratio("0,33")->half == 0.005);
    CHECK(read_cell_ratio("3")->half == 0);
    CHECK(read_cell_ratio("1/3")->half == 0);
    CHECK_THAT(read_cell_ratio("5,0E-01")->half, Catch::Matchers::WithinRel(0.005, 1e-12));
    CHECK_FALSE(read_cell_ratio("3 times"));
    CHECK_FALSE(read_cell_ratio("1e"));
    CHECK_FALSE(read_cell_ratio("1/2/3"));
    CHECK(trimmed("\xC2\xA0 a b \xE2\x80\xAF") == "a b");
    CHECK(read_cells("a;b\r\nc;d") == std::vector<std::vector<std::string>>{{"a", "b"}, {"c", "d"}});
}
