#include <array>
#include <utility>

#include "validation/published.hpp"
#include "validation/published/interpolate.hpp"

namespace raiser::validation {

namespace {

/// d/L and Kt gross. Chih-Bing Ling, J. Appl. Phys. 19 (1948) 77-82, as
/// tabulated in Peterson; digits from memory. Interpolated in d/L.
using Row = std::pair<double, double>;
constexpr std::array<Row, 6> across{{{1 / 8.0, 3.002},
                                     {1 / 6.0, 3.003},
                                     {1 / 5.0, 3.004},
                                     {1 / 3.0, 3.020},
                                     {1 / 2.0, 3.066},
                                     {1 / 1.5, 3.264}}};
constexpr std::array<Row, 6> along{{{1 / 8.0, 2.970},
                                    {1 / 6.0, 2.949},
                                    {1 / 5.0, 2.927},
                                    {1 / 3.0, 2.825},
                                    {1 / 2.0, 2.703},
                                    {1 / 1.5, 2.623}}};
constexpr std::array<Row, 7> biaxial{{{1 / 8.0, 2.018},
                                      {1 / 6.0, 2.033},
                                      {1 / 5.0, 2.049},
                                      {1 / 4.0, 2.080},
                                      {1 / 3.0, 2.155},
                                      {1 / 2.0, 2.411},
                                      {1 / 1.5, 2.887}}};

}  // namespace

std::optional<double> ling(Pair pair, double l_over_d) {
  const double x = 1 / l_over_d;
  if (pair == Pair::across) return interpolate(across, x);
  if (pair == Pair::along) return interpolate(along, x);
  return interpolate(biaxial, x);
}

double two_along_fit(double x) { return 3.000 + x * (-0.712 + x * 0.271); }

double row_across_fit(double x) { return 3.000 + x * (-3.057 + x * (0.214 + x * 0.843)); }

double row_along_fit(double x) { return 3.000 + x * (-0.9916 + x * (-2.5899 + x * 2.2613)); }

}  // namespace raiser::validation
