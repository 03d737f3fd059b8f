#pragma once

namespace steelyard {

/// Q(a, x), the regularized upper incomplete gamma function: the part of the gamma integral beyond x.
/// a > 0, x >= 0, both finite. Accuracy: relative 1e-12 for a up to 500 and Q above 1e-300.
/// Source: Abramowitz and Stegun, Handbook of Mathematical Functions (1964), 6.5.29 (series) and 6.5.31
/// (continued fraction), from memory.
double upper_gamma_fraction(double a, double x);

/// The chance that a chi-square variable of `freedom` degrees exceeds `chi2`. freedom >= 1, chi2 >= 0.
double chi_square_tail(double chi2, int freedom);

} // namespace steelyard
