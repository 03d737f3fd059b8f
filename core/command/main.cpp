#include <iostream>

#include "core/command/command.hpp"

int main(int argc, char** argv) {
    std::ios::sync_with_stdio(false);
    return steelyard::run_command(argc, argv, std::cin, std::cout, std::cerr);
}
