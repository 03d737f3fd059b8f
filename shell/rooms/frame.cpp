#include <algorithm>
#include <string>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

using frame::Desk;

constexpr float gap = 12;
/// From these widths on, the cards stand in two and in three columns.
constexpr float two_columns = 720;
constexpr float three_columns = 1200;

using DrawCard = float (*)(const Desk&, ImVec2, float);

/// Cards one below the other. Gives where the next would stand.
float stack(const Desk& desk, const Box& box, const std::vector<DrawCard>& cards) {
    float y = box.y;
    for (const DrawCard card : cards) y = card(desk, {box.x, y}, box.w) + gap;
    return y;
}

/// The question, who is asked, what is chosen between and what it is judged by.
class FrameRoom : public Room {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, Box area) override {
        const Desk desk{ui, view, actions, state_};
        if (view.read_only) state_.paste = {};
        frame::close_added_paste(desk);
        if (state_.paste.open) {
            frame::paste_panel(desk, area);
            return;
        }
        if (!wanted_.empty()) open_item(desk, std::exchange(wanted_, {}));
        ScrollArea scroll(ui, "cards", area);
        const Box in = scroll.inner();
        scroll.reach(draw_cards(desk, {in.x, in.y, cards_width(area, in), in.h}) - gap);
    }

    void show(const Id& id) override { wanted_ = id; }

    bool paste(const std::string& text, const RoomView& view, Actions&) override {
        if (view.read_only) return false;
        if (read_outline(text).items.empty() && read_outline(text).problem.empty()) return false;
        frame::open_paste(state_, view.decision, text);
        return true;
    }

    void reset() override {
        state_ = {};
        wanted_.clear();
    }

private:
    float draw_cards(const Desk& desk, Box box) {
        using namespace frame;
        if (box.w >= three_columns) {
            const float width = (box.w - 2 * gap) / 3;
            const Box left = box.take_left(width * 0.95f, gap);
            const Box middle = box.take_left(width * 1.1f, gap);
            // One after the other, since the keyboard goes through them in this order.
            const float first = stack(desk, left, {question_card, options_card, people_card, notes_card});
            const float second = stack(desk, middle, {criteria_card});
            return std::max({first, second, stack(desk, box, {musts_card, settings_card})});
        }
        if (box.w >= two_columns) {
            const Box left = box.take_left(box.w * 0.43f, gap);
            const float first = stack(desk, left, {question_card, options_card, people_card, notes_card});
            return std::max(first, stack(desk, box, {criteria_card, musts_card, settings_card}));
        }
        return stack(
            desk, box,
            {question_card, options_card, criteria_card, musts_card, people_card, notes_card, settings_card});
    }

    /// Opens what another room or the line below points at and puts the keyboard there.
    void open_item(const Desk& desk, const Id& id) {
        const Decision& d = desk.decision();
        if (find_node(d.criteria, id) != nullptr) {
            state_.node = id;
            state_.reveal = id;
            state_.reveal_in = 2;
            desk.ui.focus_next = frame::row_id(id);
        } else if (find_requirement(d, id) != nullptr) {
            state_.must = id;
            desk.ui.focus_next = "must-more/" + id;
        } else if (find_option(d, id) != nullptr) {
            state_.option = id;
            desk.ui.focus_next = "option-more/" + id;
        } else if (find_person(d, id) != nullptr) {
            state_.person = id;
            desk.ui.focus_next = "person-more/" + id;
        }
    }

    frame::State state_;
    Id wanted_;
};

} // namespace

std::unique_ptr<Room> make_frame_room() {
    return std::make_unique<FrameRoom>();
}

} // namespace steelyard
