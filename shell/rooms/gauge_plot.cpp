#include "shell/rooms/gauge_plot.hpp"

#include <imgui.h>

#include <algorithm>
#include <cmath>
#include <numeric>

#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

constexpr float mark_size = 20;
constexpr float numbers_height = 18;
constexpr float left_margin = 22;
constexpr float handle = 5;
constexpr int steps = 240; ///< Pieces of a curve that is not straight between its anchors.

ImU32 faded(ImU32 colour, unsigned alpha) {
    return (colour & ~IM_COL32_A_MASK) | (alpha << IM_COL32_A_SHIFT);
}

void dotted(ImDrawList& list, ImVec2 from, ImVec2 to, ImU32 colour) {
    constexpr float dash = 3;
    const float length = std::abs(to.y - from.y);
    const float direction = to.y < from.y ? -1.0F : 1.0F;
    for (float done = 0; done < length; done += 2 * dash) {
        const float end = std::min(done + dash, length);
        list.AddLine({from.x, from.y + direction * done}, {from.x, from.y + direction * end}, colour, 1.5F);
    }
}

class Drawer {
public:
    Drawer(Ui& ui, const Plot& plot, const Box& box)
        : ui_(ui), plot_(plot), box_(box), span_(span_of(plot)), list_(*ImGui::GetWindowDrawList()) {
        left_ = box.x + (plot.worth ? left_margin : 0);
        axis_ = box.bottom() - mark_size - 6 - numbers_height;
        top_ = box.y + 10;
    }

    void draw() {
        const Theme& theme = ui_.look();
        draw_range();
        list_.AddLine({left_, axis_}, {box_.right(), axis_}, theme.edge, 1.5F);
        if (plot_.worth) {
            list_.AddLine({left_, top_ - 4}, {left_, axis_}, theme.edge, 1.5F);
            for (const int worth : {0, 1})
                draw_text(ui_, {left_ - 8, y_of(worth) - 8}, std::to_string(worth),
                          {.font = Font::small, .ink = theme.quiet, .align = Align::right});
        }
        draw_limits();
        if (plot_.worth) draw_curve();
        draw_marks();
        draw_numbers();
        report();
    }

private:
    float x_of(double figure) const {
        return left_ +
               static_cast<float>((figure - span_.low) / (span_.high - span_.low)) * (box_.right() - left_);
    }
    double figure_at(float x) const {
        return span_.low +
               (span_.high - span_.low) * static_cast<double>((x - left_) / (box_.right() - left_));
    }
    float y_of(double worth) const {
        return axis_ - static_cast<float>(std::clamp(worth, 0.0, 1.0)) * (axis_ - top_);
    }

    ImU32 colour_of(const PlotMark& mark) const {
        return mark.in_play ? option_colour(ui_.look(), mark.index) : ui_.look().quiet;
    }

    /// The range of the chosen option, as a band.
    void draw_range() {
        for (const auto& mark : plot_.marks) {
            if (!mark.chosen || (!mark.low && !mark.high)) continue;
            const ImU32 colour = colour_of(mark);
            list_.AddRectFilled({x_of(mark.low.value_or(mark.figure)), top_},
                                {x_of(mark.high.value_or(mark.figure)), axis_}, faded(colour, 36));
        }
    }

    void draw_limits() {
        for (const double limit : plot_.limits)
            list_.AddLine({x_of(limit), top_ - 4}, {x_of(limit), axis_ + 4}, ui_.look().red, 2);
    }

    void draw_curve() {
        std::vector<double> at{span_.low, span_.high};
        at.insert(at.end(), plot_.anchors.begin(), plot_.anchors.end());
        if (plot_.anchors.empty()) {
            for (int i = 1; i < steps; ++i) at.push_back(span_.low + (span_.high - span_.low) * i / steps);
        }
        std::sort(at.begin(), at.end());
        std::vector<ImVec2> line;
        for (const double figure : at) {
            if (const auto worth = plot_.worth(figure)) line.push_back({x_of(figure), y_of(*worth)});
        }
        list_.AddPolyline(line.data(), static_cast<int>(line.size()), ui_.look().steel, 0, 2.5F);
        for (const double figure : plot_.anchors) {
            const ImVec2 p{x_of(figure), y_of(plot_.worth(figure).value_or(0))};
            list_.AddRectFilled({p.x - handle, p.y - handle}, {p.x + handle, p.y + handle}, ui_.look().card,
                                2);
            list_.AddRect({p.x - handle, p.y - handle}, {p.x + handle, p.y + handle}, ui_.look().steel, 2, 0,
                          2);
        }
    }

    void draw_marks() {
        std::vector<std::size_t> order(plot_.marks.size());
        std::iota(order.begin(), order.end(), std::size_t{0});
        std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
            return plot_.marks[a].figure < plot_.marks[b].figure;
        });
        std::vector<float> middles;
        for (const std::size_t i : order) middles.push_back(x_of(plot_.marks[i].figure));
        const auto places = spread(middles, mark_size + 2, box_.x, box_.right());
        for (std::size_t k = 0; k < order.size(); ++k) {
            const PlotMark& mark = plot_.marks[order[k]];
            const ImU32 colour = colour_of(mark);
            const float x = middles[k];
            const auto worth = plot_.worth ? plot_.worth(mark.figure) : std::nullopt;
            if (worth) {
                dotted(list_, {x, axis_}, {x, y_of(*worth)}, colour);
                list_.AddCircleFilled({x, y_of(*worth)}, mark.chosen ? 5.0F : 3.5F, colour);
            } else {
                list_.AddCircleFilled({x, axis_}, 3.5F, colour);
            }
            // So many that their letters would cover one another: the dots must do, and the chosen one's
            // letter.
            if (!places && !mark.chosen) continue;
            const float middle = places ? (*places)[k] : std::clamp(x, box_.x + 11, box_.right() - 11);
            list_.AddLine({x, axis_}, {middle, axis_ + 5}, colour, 1.5F);
            option_mark(ui_, {middle - mark_size / 2, axis_ + 5}, mark.index, mark.in_play, mark_size);
        }
    }

    void draw_numbers() {
        std::vector<double> figures = plot_.anchors;
        figures.insert(figures.end(), plot_.limits.begin(), plot_.limits.end());
        // Anchors and limits were typed and stand as they are; of figures a thousandth of the axis is enough.
        int decimals = 6;
        if (figures.empty()) {
            decimals = std::clamp(static_cast<int>(std::ceil(3 - std::log10(span_.high - span_.low))), 0, 6);
            for (const auto& mark : plot_.marks) figures.push_back(mark.figure);
        }
        std::sort(figures.begin(), figures.end());
        // The outermost first: where there is no room for all, those between are left out.
        std::vector<std::size_t> order(figures.size());
        std::iota(order.begin(), order.end(), std::size_t{0});
        std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
            return std::min(a, figures.size() - 1 - a) < std::min(b, figures.size() - 1 - b);
        });
        std::vector<std::pair<float, float>> taken;
        for (const std::size_t i : order) {
            const std::string text = figure_text(figures[i], decimals);
            const float width = text_size(Font::small, text).x;
            const float left = std::clamp(x_of(figures[i]) - width / 2, box_.x, box_.right() - width);
            const bool free = std::none_of(taken.begin(), taken.end(), [&](const auto& other) {
                return left < other.second + 8 && left + width + 8 > other.first;
            });
            if (!free) continue;
            taken.emplace_back(left, left + width);
            const bool limit =
                std::find(plot_.limits.begin(), plot_.limits.end(), figures[i]) != plot_.limits.end();
            draw_text(ui_, {left, box_.bottom() - 16}, text,
                      {.font = Font::small, .ink = limit ? ui_.look().red : ui_.look().quiet});
        }
    }

    void report() {
        LedgerItem item;
        item.id = "plot";
        item.label = plot_.name;
        item.role = "img";
        for (const auto& mark : plot_.marks) {
            item.value += (item.value.empty() ? "" : "; ") + option_letter(mark.index) + " at " +
                          figure_text(mark.figure);
            const auto worth = plot_.worth ? plot_.worth(mark.figure) : std::nullopt;
            if (worth) item.value += " is worth " + figure_text(*worth, 2);
        }
        item.at = box_.at();
        item.size = {box_.w, box_.h};
        item.may_scroll = ui_.scrolling;
        ui_.ledger.add(std::move(item));
    }

    Ui& ui_;
    const Plot& plot_;
    Box box_;
    Span span_;
    ImDrawList& list_;
    float left_ = 0;
    float axis_ = 0;
    float top_ = 0;
};

} // namespace

Span span_of(const Plot& plot) {
    std::vector<double> figures = plot.anchors;
    figures.insert(figures.end(), plot.limits.begin(), plot.limits.end());
    for (const auto& mark : plot.marks) {
        figures.push_back(mark.figure);
        figures.push_back(mark.low.value_or(mark.figure));
        figures.push_back(mark.high.value_or(mark.figure));
    }
    if (figures.empty()) return {};
    const auto [low, high] = std::minmax_element(figures.begin(), figures.end());
    const double size = std::max(std::abs(*low), std::abs(*high));
    // A twelfth beside it on either side; where all figures are one, a tenth of it.
    double room = (*high - *low) / 12;
    if (room <= 1e-9 * size) room = size > 0 ? size / 10 : 1;
    Span span{*low - room, *high + room};
    if (*low >= 0 && span.low < 0) span.low = 0;
    return span;
}

std::optional<std::vector<float>> spread(const std::vector<float>& wanted, float width, float left,
                                         float right) {
    if (width * static_cast<float>(wanted.size()) > right - left) return std::nullopt;
    std::vector<float> at = wanted;
    float free = left;
    for (float& middle : at) {
        middle = std::max(middle, free + width / 2);
        free = middle + width / 2;
    }
    free = right;
    for (auto middle = at.rbegin(); middle != at.rend(); ++middle) {
        *middle = std::min(*middle, free - width / 2);
        free = *middle - width / 2;
    }
    return at;
}

void draw_plot(Ui& ui, const Plot& plot, const Box& box) {
    Drawer(ui, plot, box).draw();
}

} // namespace steelyard::gauge
