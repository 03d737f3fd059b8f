#pragma once

#include <algorithm>
#include <cstdint>

#include "shell/painter/scene.hpp"

namespace steelyard::painting {

/// Walks down a side of a shape and gives each row's first pixel right of it. Exact: two shapes that share an
/// edge neither overlap nor leave a gap.
class Side {
public:
    /// Sets out at `row` on the edge from `top` down to `bottom`, which must not be level.
    void start(const Corner& top, const Corner& bottom, int row) {
        const std::int64_t height = bottom.y - top.y;
        const std::int64_t width = bottom.x - top.x;
        divisor_ = height * one_pixel;
        const std::int64_t down = std::int64_t{row} * one_pixel + half_pixel - top.y;
        // Rounding up is rounding down after adding one less than the divisor.
        const std::int64_t at = (top.x - half_pixel) * height + down * width + divisor_ - 1;
        pixel_ = floor_divide(at, divisor_);
        rest_ = at - pixel_ * divisor_;
        step_ = floor_divide(width, height);
        step_rest_ = (width - step_ * height) * one_pixel;
    }

    int pixel() const { return static_cast<int>(pixel_); }

    void next_row() {
        pixel_ += step_;
        rest_ += step_rest_;
        if (rest_ >= divisor_) {
            rest_ -= divisor_;
            ++pixel_;
        }
    }

private:
    static std::int64_t floor_divide(std::int64_t a, std::int64_t b) {
        const std::int64_t quotient = a / b;
        return quotient - (quotient * b > a ? 1 : 0);
    }

    std::int64_t pixel_ = 0;
    std::int64_t rest_ = 0;
    std::int64_t step_ = 0;
    std::int64_t step_rest_ = 0;
    std::int64_t divisor_ = 1;
};

/// One of the two sides of a shape from its topmost corner down: the edges met going forward (+1) or backward
/// (-1).
class Chain {
public:
    Chain(const Corner* corners, int count, int top, int direction)
        : corners_(corners), count_(count), at_(top), direction_(direction) {}

    /// Goes to the edge that reaches `row`; false if there is none.
    bool reach(int row) {
        for (; left_ < count_; ++left_) {
            const int next = wrapped(at_ + direction_);
            const Corner& from = corners_[at_];
            const Corner& to = corners_[next];
            at_ = next;
            end_ = first_pixel(to.y);
            if (to.y > from.y && end_ > row) {
                ++left_;
                side_.start(from, to, row);
                return true;
            }
        }
        return false;
    }

    int end() const { return end_; } ///< The first row past the present edge.
    int pixel() const { return side_.pixel(); }
    void next_row() { side_.next_row(); }

private:
    int wrapped(int index) const { return index < 0 ? count_ - 1 : index == count_ ? 0 : index; }

    const Corner* corners_;
    int count_;
    int at_;
    int direction_;
    int left_ = 0; // how many edges were passed
    int end_ = 0;
    Side side_;
};

/// Calls `span(row, left, right)` for every row in which a shape covers pixels of `clip`; right is excluded.
/// The shape is a triangle or another polygon that each row meets in one span.
template<class Span>
void scan(const Corner* corners, int count, const PixelRect& clip, const Span& span) {
    int top = 0;
    int lowest = corners[0].y;
    for (int i = 1; i < count; ++i) {
        if (corners[i].y < corners[top].y) top = i;
        lowest = std::max(lowest, corners[i].y);
    }
    int row = std::max(clip.top, first_pixel(corners[top].y));
    const int last = std::min(clip.bottom, first_pixel(lowest));
    Chain a(corners, count, top, 1);
    Chain b(corners, count, top, -1);
    if (row >= last || !a.reach(row) || !b.reach(row)) return;
    for (;;) {
        const int end = std::min({last, a.end(), b.end()});
        for (; row < end; ++row) {
            const int left = std::max(clip.left, std::min(a.pixel(), b.pixel()));
            const int right = std::min(clip.right, std::max(a.pixel(), b.pixel()));
            if (left < right) span(row, left, right);
            a.next_row();
            b.next_row();
        }
        if (row >= last) return;
        if (a.end() <= row && !a.reach(row)) return;
        if (b.end() <= row && !b.reach(row)) return;
    }
}

} // namespace steelyard::painting
