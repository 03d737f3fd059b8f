#pragma once

#include <Eigen/Core>
#include <cstddef>
#include <optional>
#include <vector>

#include "core/judgment/eigenvector.hpp"
#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// What would suit one judged pair of a set best, the other judged pairs held.
struct BestValue {
    double ratio = 1;   ///< At which lambda max is least.
    double lambda = 0;  ///< Lambda max there.
    double implied = 1; ///< w_i / w_j there, w the eigenvector: what the other judgments say of the pair.
};

/// The best values of the judged pairs of one set. In an incomplete set the missing pairs are minimised along
/// with each; so the best value is that of the optimal completion without the pair.
class BestValues {
public:
    /// `pairs` must be connected.
    explicit BestValues(const PairMatrix& pairs);

    /// None where the set falls apart without the pair: then no value is better than another. i != j, judged.
    /// Ratio and implied to about 1e-11 relative. A complete set's pair costs a few hundred operations.
    std::optional<BestValue> of(std::size_t i, std::size_t j);

    /// Lambda max with the judged pair at `ratio` instead, missing pairs minimised anew.
    double lambda_at(std::size_t i, std::size_t j, double ratio) const;

    const Completion& whole() const { return whole_; }

private:
    struct Reduced;
    void add_power();
    bool reduce(Eigen::Index i, Eigen::Index j, double fall, Reduced& out);
    std::optional<BestValue> by_series(Eigen::Index i, Eigen::Index j);
    bool positive_vector(Eigen::Index i, Eigen::Index j, double fall, double ratio,
                         double weight_ratio) const;

    PairMatrix pairs_;
    Completion whole_;
    bool complete_ = false;
    Eigen::MatrixXd scaled_;              ///< a_ij w_j / w_i: its principal eigenvector is all ones.
    Eigen::VectorXd shares_;              ///< v_i w_i, the left eigenvector of `scaled_`; sums to 1.
    std::vector<Eigen::MatrixXd> powers_; ///< Of the reduced resolvent of `scaled_`, as many as were needed.
    std::vector<double> sizes_;           ///< The largest entry of each, without its sign.
};

/// The value of the scale 1/9, 1/8 ... 1/2, 1, 2 ... 9 nearest to a positive ratio by its logarithm; of two
/// equally near the one nearer to 1.
double nearest_on_scale(double ratio);

} // namespace steelyard
