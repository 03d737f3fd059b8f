#include "core/decision/problem.hpp"

namespace steelyard {

std::string sentence(const Problem& problem) {
    const std::string place = problem.at.empty() ? "The file as a whole" : "At " + problem.at;
    return place + ": found " + problem.found + ", expected " + problem.expected + ".";
}

std::string pointer_part(const std::string& name) {
    std::string part = "/";
    for (const char c : name) {
        if (c == '~') {
            part += "~0";
        } else if (c == '/') {
            part += "~1";
        } else {
            part += c;
        }
    }
    return part;
}

} // namespace steelyard
