#pragma once

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <cstdint>

namespace raiser::validation {

/// The SplitMix64 generator: G. L. Steele, D. Lea and C. H. Flood, Fast splittable
/// pseudorandom number generators, OOPSLA 2014. Written out so that no standard
/// library's choice of distribution matters.
class Dice {
 public:
  explicit Dice(std::uint64_t seed) : state_(seed) {}

  double uniform(double low, double high) { return low + (high - low) * unit(); }
  double log_uniform(double low, double high) { return low * std::pow(high / low, unit()); }
  std::size_t below(std::size_t n) {
    return std::min(n - 1, static_cast<std::size_t>(unit() * static_cast<double>(n)));
  }
  bool chance(double p) { return unit() < p; }

 private:
  double unit() {
    std::uint64_t z = (state_ += 0x9e3779b97f4a7c15u);
    z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9u;
    z = (z ^ (z >> 27)) * 0x94d049bb133111ebu;
    return static_cast<double>((z ^ (z >> 31)) >> 11) * 0x1.0p-53;
  }

  std::uint64_t state_;
};

}  // namespace raiser::validation
