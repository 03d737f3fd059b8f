#include "core/results/examination.hpp"

#include <utility>

namespace steelyard {

struct ExaminationJob::Work {
    Examination found;
};

ExaminationJob::ExaminationJob(const Decision&, const Results&, const Id& set, const Id& by)
    : work_(std::make_unique<Work>()) {
    work_->found.set = set;
    work_->found.by = by;
}
ExaminationJob::~ExaminationJob() = default;
ExaminationJob::ExaminationJob(ExaminationJob&&) noexcept = default;
ExaminationJob& ExaminationJob::operator=(ExaminationJob&&) noexcept = default;

void ExaminationJob::step() {
    work_->found.finished = true;
    work_->found.progress = 1;
}

const Examination& ExaminationJob::found() const {
    return work_->found;
}

} // namespace steelyard
