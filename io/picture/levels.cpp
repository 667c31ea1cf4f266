#include "io/picture/levels.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <utility>

namespace raiser::io {
namespace {

constexpr std::array<double, 4> steps{1.0, 2.0, 2.5, 5.0};
constexpr std::array<double, 11> r10{1.0, 1.25, 1.6, 2.0, 2.5, 3.15, 4.0, 5.0, 6.3, 8.0, 10.0};
constexpr double slack = 1e-9;

// The round step whose number of intervals comes closest to `wanted`.
double round_step(double smallest, double largest, int wanted) {
  const double ideal = (largest - smallest) / wanted;
  const double decade = std::pow(10.0, std::floor(std::log10(ideal)) - 1);
  double best = 0.0;
  double miss = std::numeric_limits<double>::infinity();
  for (const double power : {decade, 10 * decade, 100 * decade})
    for (const double step : steps) {
      const double intervals =
          std::ceil(largest / (step * power) - slack) - std::floor(smallest / (step * power) + slack);
      if (std::abs(intervals - wanted) >= miss) continue;
      miss = std::abs(intervals - wanted);
      best = step * power;
    }
  return best;
}

std::vector<double> multiples(double step, double smallest, double largest) {
  const auto first = std::llround(std::floor(smallest / step + slack));
  const auto last = std::llround(std::ceil(largest / step - slack));
  std::vector<double> levels;
  for (auto i = first; i <= last; ++i) levels.push_back(static_cast<double>(i) * step);
  return levels;
}

// The largest area whose values lie within a twelfth of a step of one inner limit.
double plateau(const std::vector<Spread>& values, const std::vector<double>& limits) {
  const double near = (limits[1] - limits[0]) / 12;
  std::vector<double> areas(limits.size(), 0.0);
  for (const Spread& part : values) {
    const double at = (part.value - limits.front()) / (limits[1] - limits[0]);
    const auto i = static_cast<std::size_t>(std::max(0.0, std::round(at)));
    if (i > 0 && i + 1 < limits.size() && std::abs(part.value - limits[i]) < near) areas[i] += part.area;
  }
  return *std::max_element(areas.begin(), areas.end());
}

std::vector<double> geometric_limits(double typical, double largest) {
  const int stride = largest / typical > 12.0 ? 2 : 1;
  std::vector<double> limits;
  double decade = std::pow(10.0, std::floor(std::log10(largest)));
  int i = 0;
  while (r10[static_cast<std::size_t>(i)] * decade < largest * (1 - slack)) i += stride;
  for (int band = 0; band < 11; ++band, i -= stride) {
    if (i < 0) {
      i += 10;
      decade /= 10;
    }
    limits.push_back(r10[static_cast<std::size_t>(i)] * decade);
  }
  limits.push_back(0.0);
  std::reverse(limits.begin(), limits.end());
  return limits;
}

}  // namespace

std::vector<double> round_levels(double smallest, double largest, int wanted) {
  const double size = std::max(std::abs(smallest), std::abs(largest));
  if (!(largest - smallest > slack * size)) {
    const double half = size > 0 ? 0.05 * size : 0.5;
    return round_levels(smallest - half, largest + half, 2);
  }
  const double step = round_step(smallest, largest, wanted);
  return multiples(step, smallest, largest);
}

std::vector<double> band_limits(const std::vector<Spread>& values, double largest) {
  double smallest = values.front().value, area = 0.0, sum = 0.0;
  for (const Spread& part : values) {
    smallest = std::min(smallest, part.value);
    largest = std::max(largest, part.value);
    area += part.area;
    sum += part.area * part.value;
  }
  const double mean = area > 0.0 ? sum / area : 0.0;
  if (smallest >= 0.0 && mean > 0.0 && largest > 8.0 * mean) return geometric_limits(mean, largest);
  const std::vector<double> usual = round_levels(smallest, largest, 11);
  const double enough = 0.1 * area;
  if (plateau(values, usual) <= enough) return usual;
  std::vector<double> best = usual;
  const double decade = std::pow(10.0, std::floor(std::log10(largest - smallest)) - 1);
  for (const double part : {0.8, 1.0, 1.2, 1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 8.0, 10.0}) {
    std::vector<double> limits = multiples(part * decade, smallest, largest);
    if (limits.size() < 9 || limits.size() > 16 || plateau(values, limits) >= plateau(values, best)) continue;
    best = std::move(limits);
  }
  return best;
}

double position_on_bar(const std::vector<double>& limits, double value) {
  const double bands = static_cast<double>(limits.size() - 1);
  if (value <= limits.front()) return 0.0;
  if (value >= limits.back()) return 1.0;
  const auto above = std::upper_bound(limits.begin(), limits.end(), value);
  const double low = *(above - 1);
  return (static_cast<double>(above - limits.begin() - 1) + (value - low) / (*above - low)) / bands;
}

std::vector<double> ticks(double smallest, double largest, int at_most) {
  double decade = std::pow(10.0, std::floor(std::log10(largest - smallest)) - 3);
  for (; decade < 20 * (largest - smallest); decade *= 10)
    for (const double part : {1.0, 2.0, 5.0}) {
      const double step = part * decade;
      const auto first = std::llround(std::ceil(smallest / step - slack));
      const auto last = std::llround(std::floor(largest / step + slack));
      if (last - first >= std::max(at_most, 1)) continue;
      std::vector<double> marks;
      for (auto i = first; i <= last; ++i) marks.push_back(static_cast<double>(i) * step);
      return marks;
    }
  return {};
}

std::string tick_text(double value) {
  const std::string text = fmt::format("{:.6g}", value);
  if (text == "-0") return "0";
  return text.front() == '-' ? "\u2212" + text.substr(1) : text;
}

}  // namespace raiser::io
