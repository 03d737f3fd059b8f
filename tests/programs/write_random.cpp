// Writes random decisions as files, for checks that are scripts.
#include <charconv>
#include <cstdint>
#include <cstring>
#include <fstream>
#include <iostream>
#include <string>

#include "core/decision/write.hpp"
#include "tests/support/random_decision.hpp"

namespace {

bool read_number(const char* text, std::uint64_t& number) {
    const char* end = text + std::strlen(text);
    const auto [stop, error] = std::from_chars(text, end, number);
    return error == std::errc() && stop == end;
}

} // namespace

int main(int argc, char** argv) {
    std::uint64_t count = 0;
    std::uint64_t seed = 0;
    if (argc != 4 || !read_number(argv[1], count) || !read_number(argv[3], seed)) {
        std::cerr << "usage: steelyard_random COUNT FOLDER SEED\n"
                     "Writes FOLDER/SEED.decision.json and so on, one for each seed from SEED.\n";
        return 2;
    }
    for (std::uint64_t k = seed; k < seed + count; ++k) {
        const std::string name = std::string(argv[2]) + "/" + std::to_string(k) + ".decision.json";
        std::ofstream file(name, std::ios::binary);
        file << steelyard::write_decision(steelyard::testing::random_decision(k));
        if (!file.flush()) {
            std::cerr << name << " cannot be written.\n";
            return 3;
        }
    }
    return 0;
}
