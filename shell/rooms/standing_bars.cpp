#include "shell/rooms/standing_bars.hpp"

#include <algorithm>
#include <array>
#include <numeric>
#include <optional>

#include "core/decision/lookup.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float bar_height = 30;
constexpr float row_step = 46;
constexpr float mark_size = 22;
constexpr float rank_width = 26;
constexpr float points_width = 92;
constexpr float share_width = 60;
constexpr float legend_height = 26;
constexpr float legend_swatch = 12;

const NodeResult* find_result(const Results& results, const Id& id) {
    const auto found = std::find_if(results.nodes.begin(), results.nodes.end(),
                                    [&](const NodeResult& node) { return node.node == id; });
    return found == results.nodes.end() ? nullptr : &*found;
}

/// One criterion of those that are stacked.
struct Part {
    const NodeResult* result;
    std::string name;
    bool opens; ///< Has parts of its own.
};

/// The parts of a criterion; a leaf is its own only part.
std::vector<Part> parts_of(const RoomView& view, const NodeResult& whole) {
    std::vector<Part> parts;
    for (const auto& node : view.results.nodes) {
        if (node.parent == whole.node)
            parts.push_back({&node, node_name(view.decision, node.node), !node.leaf});
    }
    if (parts.empty()) parts.push_back({&whole, node_name(view.decision, whole.node), false});
    return parts;
}

/// True on a press that began and ended inside the box. Bars are a second way to what the names under them
/// do, which can be reached by keys too.
bool bar_pressed(const Ui& ui, const Box& box) {
    if (!ImGui::IsWindowHovered() || !ImGui::IsMouseHoveringRect(box.at(), box.end())) return false;
    ImGui::SetMouseCursor(ImGuiMouseCursor_Hand);
    ImGui::GetWindowDrawList()->AddRectFilled(box.at(), box.end(), ui.look().hover, 3);
    const ImVec2 from = ImGui::GetIO().MouseClickedPos[0];
    return ImGui::IsMouseReleased(0) && from.x >= box.x && from.x < box.right() && from.y >= box.y &&
           from.y < box.bottom();
}

/// Draws one card; made anew for every frame.
class BarsCard {
public:
    BarsCard(Ui& ui, const RoomView& view, const NodeResult& whole, ImVec2 at, float width)
        : ui_(ui),
          view_(view),
          results_(view.results),
          whole_(whole),
          parts_(parts_of(view, whole)),
          card_(ui, at, width),
          at_top_(whole.parent.empty()) {
        place_columns();
    }

    /// Gives the bottom of the card.
    float draw() {
        const std::string heading = at_top_ ? "What each criterion adds"
                                            : "What adds up to " + node_name(view_.decision, whole_.node);
        float y = draw_heads(card_.heading(heading));
        bool first = true;
        for (const std::size_t option : in_order()) {
            draw_row(option, y, first);
            y += row_step + (whisker(option) ? 6 : 0);
            if (first) y += draw_legend(option, y - (row_step - bar_height) + 2);
            first = false;
        }
        if (at_top_ && !results_.ranges.empty()) {
            y += draw_paragraph(ui_, {card_.left(), y - 4}, card_.width(),
                                "The thin line is the range of an option whose answers are partly missing.",
                                {.font = Font::small, .ink = ui_.look().quiet});
            return card_.end(y - 4);
        }
        return card_.end(y - (row_step - bar_height));
    }

    /// The criterion that was pressed; its parent where the way back was.
    std::optional<Id> pressed() const { return pressed_; }

private:
    void place_columns() {
        float name_width = 0;
        for (const auto& option : results_.options)
            name_width = std::max(name_width, text_size(Font::strong, option_name(view_.decision, option)).x);
        name_width_ = std::min(name_width, std::max(80.0f, card_.width() * 0.2f));
        bar_x_ = card_.left() + rank_width + mark_size + 10 + name_width_ + 16;
        const bool has_share = at_top_ && results_.shares.has_value();
        share_ = has_share && card_.right() - bar_x_ - points_width - share_width >= 150;
        points_right_ = card_.right() - (share_ ? share_width : 0);
        bar_width_ = std::max(60.0f, points_right_ - points_width - bar_x_);
        for (const double added : whole_.contribution) most_ = std::max(most_, added);
        if (at_top_) {
            for (const auto& [option, range] : results_.ranges) most_ = std::max(most_, range[1]);
        }
    }

    float draw_heads(float y) {
        const TextLook look{.font = Font::small, .ink = ui_.look().quiet, .align = Align::right};
        draw_text(ui_, {points_right_, y + 3}, at_top_ ? "points of 100" : "points", look);
        if (share_) draw_text(ui_, {card_.right(), y + 3}, "share", look);
        const float room = points_right_ - points_width - card_.left();
        if (!at_top_) {
            const Id& parent = whole_.parent;
            const std::string back = "\xE2\x80\xB9 Back to " + (find_result(results_, parent)->parent.empty()
                                                                    ? std::string("all criteria")
                                                                    : node_name(view_.decision, parent));
            const float width = std::min(room, button_width(back, ButtonKind::link));
            if (button(ui_, "standing/back", back, {card_.left() - 4, y - 4, width, 28}, ButtonKind::link))
                pressed_ = parent;
        } else if (std::any_of(parts_.begin(), parts_.end(), [](const Part& p) { return p.opens; })) {
            draw_text(ui_, {card_.left(), y + 3}, "Press a criterion to see what it is made of.",
                      {.font = Font::small, .ink = ui_.look().quiet, .max_width = room});
        }
        return y + 32;
    }

    /// Options in play by rank, equal ones as in the file.
    std::vector<std::size_t> in_order() const {
        std::vector<std::size_t> order(results_.options.size());
        std::iota(order.begin(), order.end(), std::size_t{0});
        std::stable_sort(order.begin(), order.end(),
                         [&](std::size_t a, std::size_t b) { return results_.ranks[a] < results_.ranks[b]; });
        return order;
    }

    std::size_t place_in_file(const Id& option) const {
        const auto& options = view_.decision.options;
        const auto found =
            std::find_if(options.begin(), options.end(), [&](const Option& o) { return o.id == option; });
        return static_cast<std::size_t>(found - options.begin());
    }

    /// The range of an option with missing values, where it is shown.
    std::optional<std::array<double, 2>> whisker(std::size_t option) const {
        if (!at_top_) return std::nullopt;
        for (const auto& [id, range] : results_.ranges) {
            if (id == results_.options[option]) return range;
        }
        return std::nullopt;
    }

    float length(double value) const {
        return most_ > 0 ? static_cast<float>(value / most_) * bar_width_ : 0;
    }

    void draw_row(std::size_t option, float y, bool first) {
        const Theme& theme = ui_.look();
        const Id& id = results_.options[option];
        const std::string name = option_name(view_.decision, id);
        const float text_y = y + (bar_height - font_size(Font::strong)) / 2;
        draw_text(ui_, {card_.left(), text_y}, std::to_string(results_.ranks[option]),
                  {.font = Font::strong});
        option_mark(ui_, {card_.left() + rank_width, y + (bar_height - mark_size) / 2}, place_in_file(id));
        draw_text(ui_, {card_.left() + rank_width + mark_size + 10, text_y}, name,
                  {.font = first ? Font::strong : Font::body, .max_width = name_width_});

        float x = bar_x_;
        for (std::size_t p = 0; p < parts_.size(); ++p) {
            const float end = x + length(parts_[p].result->contribution[option]);
            draw_segment(p, option, name, {x, y, end - x, bar_height});
            x = end;
        }
        const auto range = whisker(option);
        if (range) draw_whisker(y, (*range)[0], (*range)[1]);
        const float points_y = range ? y - 3 : text_y;
        draw_text(ui_, {points_right_, points_y}, points_text(whole_.contribution[option]),
                  {.font = Font::strong, .align = Align::right});
        if (range) {
            draw_text(ui_, {points_right_, y + 17},
                      points_text((*range)[0]) + " to " + points_text((*range)[1]),
                      {.font = Font::small, .ink = theme.brass_ink, .align = Align::right});
        }
        if (share_) {
            draw_text(ui_, {card_.right(), points_y}, points_text((*results_.shares)[option]) + " %",
                      {.ink = theme.quiet, .align = Align::right});
        }
    }

    void draw_segment(std::size_t part, std::size_t option, const std::string& option_name, Box box) {
        const Fill fill = part_fill(ui_.look(), part);
        // A gap between neighbours, but nothing vanishes for it.
        if (box.w > 4) box.w -= 2;
        if (box.w < 0.5f) return;
        ImGui::GetWindowDrawList()->AddRectFilled(box.at(), box.end(), fill.fill, 3);
        const std::string points = points_text(parts_[part].result->contribution[option]);
        LedgerItem item;
        item.id = "standing/part/" + parts_[part].result->node + "/" + results_.options[option];
        item.label = option_name + ": " + parts_[part].name;
        item.role = "img";
        item.value = points;
        item.at = box.at();
        item.size = {box.w, box.h};
        item.may_scroll = ui_.scrolling;
        ui_.ledger.add(std::move(item));
        if (text_size(Font::small, points).x + 12 <= box.w) {
            const OnPaper paper(ui_, fill.fill);
            draw_text(ui_, {box.x + 7, box.y + (box.h - font_size(Font::small)) / 2}, points,
                      {.font = Font::small, .ink = fill.ink});
        }
        if (parts_[part].opens && bar_pressed(ui_, box)) pressed_ = parts_[part].result->node;
    }

    void draw_whisker(float y, double low, double high) {
        ImDrawList* list = ImGui::GetWindowDrawList();
        const ImU32 ink = ui_.look().brass;
        const float from = bar_x_ + length(low);
        const float to = bar_x_ + length(high);
        const float middle = y + bar_height + 6;
        list->AddRectFilled({from, middle - 1}, {to, middle + 1}, ink);
        list->AddRectFilled({from, middle - 4}, {from + 2, middle + 4}, ink);
        list->AddRectFilled({to - 2, middle - 4}, {to, middle + 4}, ink);
    }

    std::string legend_text(const Part& part) const {
        return part.opens ? part.name + " \xE2\x80\xBA" : part.name;
    }

    /// Under the first bar, the names of the parts: each under its own where all fit, else in lines with a
    /// patch of the colour. Gives the height taken.
    float draw_legend(std::size_t option, float y) {
        bool fits = true;
        for (const auto& part : parts_) {
            const float needs = text_size(Font::small, legend_text(part)).x + 4;
            fits = fits && needs <= length(part.result->contribution[option]);
        }
        if (fits) {
            float x = bar_x_;
            for (std::size_t p = 0; p < parts_.size(); ++p) {
                const float above = length(parts_[p].result->contribution[option]);
                const float width = std::min(above, text_size(Font::small, legend_text(parts_[p])).x + 8);
                draw_name(p, {x, y, std::max(24.0f, width), legend_height}, false);
                x += above;
            }
            return legend_height - 6;
        }
        const float left = std::min(bar_x_, card_.right() - 280);
        float x = left;
        float height = legend_height;
        for (std::size_t p = 0; p < parts_.size(); ++p) {
            const float text = text_size(Font::small, legend_text(parts_[p])).x;
            const float width = std::min(text + legend_swatch + 14, card_.right() - left);
            if (x > left && x + width > card_.right()) {
                x = left;
                height += legend_height;
            }
            draw_name(p, {x, y + height - legend_height, width, legend_height}, true);
            x += width + 10;
        }
        return height - 6;
    }

    void draw_name(std::size_t p, const Box& box, bool patch) {
        const Part& part = parts_[p];
        float x = box.x + (patch ? 4 : 2);
        if (part.opens && press_area(ui_, "standing/open/" + part.result->node, part.name, box))
            pressed_ = part.result->node;
        if (patch) {
            const float top = box.y + (box.h - legend_swatch) / 2;
            ImGui::GetWindowDrawList()->AddRectFilled({x, top}, {x + legend_swatch, top + legend_swatch},
                                                      part_fill(ui_.look(), p).fill, 3);
            x += legend_swatch + 6;
        }
        draw_text(ui_, {x, box.y + (box.h - font_size(Font::small)) / 2}, legend_text(part),
                  {.font = Font::small,
                   .ink = part.opens ? ui_.look().steel : ui_.look().quiet,
                   .max_width = box.right() - x});
    }

    Ui& ui_;
    const RoomView& view_;
    const Results& results_;
    const NodeResult& whole_;
    std::vector<Part> parts_;
    GrowingCard card_;
    bool at_top_;
    bool share_ = false;
    float name_width_ = 0;
    float bar_x_ = 0;
    float bar_width_ = 0;
    float points_right_ = 0;
    double most_ = 0;
    std::optional<Id> pressed_;
};

} // namespace

float StandingBars::draw(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    const NodeResult* whole = find_result(view.results, opened_);
    if (whole == nullptr || whole->leaf) {
        opened_.clear(); // It was removed, or its parts were.
        whole = &view.results.nodes.front();
    }
    BarsCard card(ui, view, *whole, at, width);
    const float bottom = card.draw();
    if (card.pressed()) opened_ = *card.pressed();
    return bottom;
}

void StandingBars::open(const Id& criterion, const RoomView& view) {
    const NodeResult* node = find_result(view.results, criterion);
    if (node != nullptr) opened_ = node->leaf ? node->parent : node->node;
}

} // namespace steelyard
