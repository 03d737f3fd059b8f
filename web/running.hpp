#pragma once

#include <exception>
#include <memory>

#include "web/imports.hpp"
#include "web/program.hpp"

namespace steelyard {

/// The one program of this page; null before app_start.
extern std::unique_ptr<Program> program;

/// Runs something for the page. An exception would reach the scripts without its text: it is reported here
/// instead, and the page stops with an error box.
template<class Action>
void guard(Action action) {
    try {
        action();
    } catch (const std::exception& error) {
        host_failed(error.what());
    } catch (...) {
        host_failed("an exception without a text");
    }
}

template<class Action>
void guarded(Action action) {
    guard([&] { action(*program); });
}

} // namespace steelyard
