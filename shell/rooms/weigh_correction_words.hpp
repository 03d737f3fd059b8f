#pragma once

#include <string>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

/// What an examination found, in words, and the edits that carry a correction out. No drawing.
namespace steelyard {

/// "Noise 6 times Floor space"; "Noise as much as Floor space".
std::string brief_pair(const Decision& decision, const Id& set, const Id& a, const Id& b, double ratio);

/// "You said Noise counts 6 times as much as Floor space." `mean`: of several judges.
std::string given_sentence(const RoomView& view, const SetResult& entry, const PairCorrection& pair,
                           bool mean);

/// "Your other answers say Floor space counts 2 times as much as Noise."
std::string implied_sentence(const RoomView& view, const SetResult& entry, const PairCorrection& pair);

/// "CR 0.03", and that it is still over the limit where it is.
std::string ratio_then(const Decision& decision, const std::optional<double>& cr);

/// "Brook stays first" or "Alder would be first"; empty while the standing may not be seen.
std::string first_then(const RoomView& view, const StandingThen& then);

/// "Ahead by 0.8 points of 100 then, by 1.2 as it is."; empty where there is nothing to compare.
std::string lead_then(const RoomView& view, const StandingThen& then);

/// "However this is corrected, Brook stays first." only where that is proven; else with which answer it does
/// not, or that it is not known. `several` answers are corrected together. Empty while the standing may not
/// be seen.
std::string matters_sentence(const RoomView& view, const Id& set, const MattersAnswer& matters, bool several);

/// "One change is enough, and no fewer."
std::string fewest_sentence(const FewestCorrections& fewest);

/// One answer put in place of another.
struct AnswerChange {
    Id a;
    Id b;
    double given = 1;
    double to = 1; ///< The same as given where the answer is kept and only its remark changes.
};

/// Judgments of `by` entered anew, each the way round it was given, on today's ranges, with `remark` (empty:
/// the one that stands is kept).
std::vector<Edit> correction_edits(const RoomView& view, const Id& set, const Id& by,
                                   const std::vector<AnswerChange>& changes, const std::string& remark);

/// "Corrected Noise against Floor space: 6 to 1/2 (A. Kern)".
std::string correction_label(const Decision& decision, const Id& set, const Id& by,
                             const std::vector<AnswerChange>& changes);

/// "The value that fits best, with the others as they are: 0.4625, with which CR is 0.0824." Empty where it
/// is not known.
std::string best_sentence(const PairCorrection& pair);

} // namespace steelyard
