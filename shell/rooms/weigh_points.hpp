#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/text_flow.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// 100 points shared out in place of pairs: by sliders that keep the sum, or typed.
class PointsCard {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box box);
    void reset() { *this = {}; }

private:
    /// What stands on the sliders, and whose it is.
    struct Standing {
        const PointsEntry* own = nullptr; ///< Of the one who answers.
        std::vector<double> points;       ///< Of 100.
        bool given = false;               ///< Somebody gave them; else they are equal, to begin with.
        std::optional<std::vector<double>>
            together; ///< The group's, as points of 100, where they may be seen.
    };
    Standing standing(const RoomView& view, const SetResult& entry) const;

    void draw_head(Ui& ui, const RoomView& view, const SetResult& entry, const Standing& now,
                   TextFlow& flow) const;
    void draw_row(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, const Standing& now,
                  std::size_t at, TextFlow& flow);
    void draw_foot(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                   const Standing& now, TextFlow& flow);
    void enter(const RoomView& view, Actions& actions, const SetResult& entry,
               const std::vector<double>& points, const Standing& now) const;
    void type(const RoomView& view, Actions& actions, const SetResult& entry, const Standing& now,
              std::size_t at, const std::string& typed);

    Id set_;
    Id person_;
    std::vector<bool> held_;      ///< Typed, and not to give when another one takes.
    std::vector<double> preview_; ///< While a slider is dragged.
    std::string remark_;          ///< Typed before anything was shared out.
};

} // namespace steelyard
