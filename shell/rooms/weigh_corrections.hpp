#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/text_flow.hpp"
#include "shell/rooms/weigh_correction_words.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// What can be done about answers that contradict each other: the two sentences, the answers that could stand
/// instead and what each does, the fewest changes. Nothing is changed but by the person's act.
class Corrections {
public:
    /// Draws on in `flow`; nothing where the set is within its limit and has no circle. Gives a pair to look
    /// at.
    std::optional<ItemPair> draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                 TextFlow& flow);
    void reset() { *this = {}; }

private:
    /// One act that can be chosen.
    struct Choice {
        std::string id;
        std::string title;
        std::string detail;
        std::string more; ///< Said once it is chosen.
        std::vector<AnswerChange> changes;
        bool keeps = false; ///< Leave it as said.
    };

    std::vector<Choice> choices(const RoomView& view, const SetResult& entry, const Examination& found,
                                const PairCorrection& pair) const;
    void draw_step(Ui& ui, const RoomView& view, TextFlow& flow,
                   const std::vector<const PairCorrection*>& list);
    void draw_choices(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                      const Examination& found, const PairCorrection& pair, TextFlow& flow);
    void draw_act(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                  const PairCorrection& pair, const Choice& choice, TextFlow& flow);
    void draw_findings(Ui& ui, const RoomView& view, const SetResult& entry, const Examination& found,
                       const PairCorrection& pair, TextFlow& flow) const;
    std::optional<ItemPair> draw_whose(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                       const PairCorrection& pair, bool mean, TextFlow& flow) const;

    Id set_;
    Id by_;
    std::size_t at_ = 0; ///< The contradiction shown.
    std::string chosen_; ///< Id of a Choice.
    std::string reason_;
    float height_ = 0; ///< Drawn last; kept free while the examination works.
};

} // namespace steelyard
