#include <algorithm>

#include "shell/rooms/growing_card.hpp"
#include "shell/rooms/room.hpp"
#include "shell/rooms/standing_bars.hpp"
#include "shell/rooms/standing_lists.hpp"
#include "shell/rooms/standing_pair.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float gap = 12;
/// From this width on, the pair and the lists stand side by side.
constexpr float two_columns = 760;

/// A card below what ends at `bottom`, if it draws anything.
template<class Draw>
float below(float bottom, Draw draw) {
    const float top = bottom + gap;
    const float end = draw(top);
    return end > top ? end : bottom;
}

/// The ranking and why: who is first and by how much, what each criterion adds, one option against another,
/// who is not in play, what is open.
class StandingRoom : public Room {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, Box area) override {
        ScrollArea scroll(ui, "standing", area);
        const Box inner = scroll.inner();
        const ImVec2 at = inner.at();
        const float width = cards_width(area, inner);
        if (!wanted_.empty()) bars_.open(wanted_, view);
        wanted_.clear();

        float y = draw_heading(ui, view, at, width);
        if (view.results.options.empty()) {
            y = draw_way_to_start(ui, view, actions, {at.x, y}, width);
        } else {
            y = below(y - gap, [&](float top) { return draw_provisional(ui, view, {at.x, top}, width); });
            y = below(y, [&](float top) { return bars_.draw(ui, view, {at.x, top}, width); });
        }
        y = draw_lower(ui, view, actions, {at.x, y}, width);
        y += gap +
             draw_paragraph(
                 ui, {at.x, y + gap}, width,
                 "Ranks preferences on the figures given; certifies nothing. What must be met for safety "
                 "is decided by licensed people under local codes.",
                 {.font = Font::small, .ink = ui.look().quiet});
        scroll.reach(y);
    }

    void show(const Id& id) override { wanted_ = id; }

    void reset() override {
        bars_.reset();
        pair_.reset();
        open_.reset();
        wanted_.clear();
    }

private:
    float draw_heading(Ui& ui, const RoomView& view, ImVec2 at, float width) {
        const std::string sentence = standing_sentence(view.decision, view.results);
        const Font which = text_size(Font::large, sentence).x <= width ? Font::large : Font::heading;
        return at.y + draw_paragraph(ui, at, width, sentence, {.font = which}) + gap;
    }

    /// Where nothing can be ranked yet.
    float draw_way_to_start(Ui& ui, const RoomView& view, Actions& actions, ImVec2 at, float width) {
        const bool musts = !view.results.excluded.empty();
        const bool none = view.decision.options.empty();
        const std::string text =
            musts ? "A ranking shows here as soon as one option meets every must."
            : none
                ? "Options and criteria are listed in Frame; the ranking shows here from the first option on."
                : "Bring one back in Frame to see a ranking.";
        float y = at.y + draw_paragraph(ui, at, width, text) + 8;
        const std::string way = musts ? "Go to Gauge" : "Go to Frame";
        if (button(ui, "standing/start", way, {at.x, y, button_width(way), 32}))
            actions.go(musts ? RoomId::gauge : RoomId::frame);
        return y + 32;
    }

    float draw_lower(Ui& ui, const RoomView& view, Actions& actions, ImVec2 at, float width) {
        const bool pair = view.results.options.size() >= 2;
        const bool beside = pair && width >= two_columns;
        const float left_width = beside ? (width - gap) / 2 : width;
        const float right_x = beside ? at.x + left_width + gap : at.x;
        const float right_width = beside ? width - left_width - gap : width;
        float left = at.y;
        if (pair)
            left = below(left, [&](float top) { return pair_.draw(ui, view, {at.x, top}, left_width); });
        float right = beside ? at.y : left;
        if (!view.results.options.empty() || !view.results.open.empty())
            right = below(right, [&](float top) {
                return open_.draw(ui, view, actions, {right_x, top}, right_width);
            });
        right = below(right, [&](float top) {
            return draw_not_in_play(ui, view, {right_x, top}, right_width);
        });
        right = below(right, [&](float top) { return draw_notices(ui, view, {right_x, top}, right_width); });
        return std::max(left, right);
    }

    StandingBars bars_;
    StandingPair pair_;
    StandingOpen open_;
    Id wanted_; ///< A criterion to be opened at the next frame.
};

} // namespace

std::unique_ptr<Room> make_standing_room() {
    return std::make_unique<StandingRoom>();
}

} // namespace steelyard
