#include "core/judgment/matrix_facts.hpp"

#include "core/judgment/random_index.hpp"

namespace steelyard {

MatrixFacts matrix_facts(const PairMatrix& pairs, Method method, RandomIndexTable table) {
    MatrixFacts facts;
    const std::size_t n = pairs.size();
    facts.missing = pairs.missing();
    facts.parts = pairs.parts();
    facts.worst_triad = koczkodaj_index(pairs);
    facts.circular = circular_triads(pairs);
    if (facts.parts.size() > 1) return facts;

    const Completion completion = complete_optimally(pairs);
    facts.eigenvector = eigenvector_weights(completion);
    facts.geometric_mean = geometric_mean_weights(pairs);
    facts.column_average = column_average_weights(pairs);
    facts.lambda_max = completion.principal.lambda;
    if (const auto& weights = facts.by_method(method))
        facts.lambda_hand = lambda_by_hand(completion.matrix, *weights);
    facts.ci = consistency_index(completion.principal.lambda, n);
    facts.ri = random_index(table, n, facts.missing.size());
    if (facts.ri) facts.cr = *facts.ci / *facts.ri;
    facts.gci = geometric_consistency_index(pairs);
    const Method error_method = method == Method::column_average ? Method::eigenvector : method;
    facts.misfits = misfits(pairs, method, *facts.by_method(error_method));
    return facts;
}

} // namespace steelyard
