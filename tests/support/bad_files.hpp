#pragma once

#include <string>
#include <vector>

namespace steelyard::test {

/// A text the reader must refuse, and the places (JSON Pointers) it must name: all of these and no others.
struct BadFile {
    std::string name;
    std::string text;
    std::vector<std::string> at;
};

std::vector<BadFile> bad_texts(); ///< What is wrong before any member is looked at: size, encoding, JSON.
std::vector<BadFile> bad_types(); ///< Members of the wrong type, missing, or of the wrong format or version.
std::vector<BadFile>
bad_values(); ///< Numbers out of range, unknown words, texts and trees that are too large.
std::vector<BadFile>
bad_references(); ///< Ids that repeat, lead nowhere or do not belong there; rules between members.

/// All of the above.
std::vector<BadFile> bad_files();

} // namespace steelyard::test
