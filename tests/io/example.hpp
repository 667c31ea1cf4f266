#pragma once

#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>
#include <stdexcept>
#include <string>
#include <utility>

#include "io/case/case.hpp"

namespace raiser::io::test {

/// A case and its solution.
struct Example {
  Case input;
  solver::Solution solution;
};

/// A case of the examples, solved as it comes. Throws std::runtime_error with its
/// first fault when it is not good.
inline Example example(const char* name) {
  CaseReading reading = read_case(std::filesystem::path(RAISER_SOURCE_DIR) / "examples" / name);
  if (!reading.value) throw std::runtime_error(text(reading.faults.front()));
  solver::Solution solution = solver::settle(reading.value->problem, reading.value->asks);
  EXPECT_EQ(solution.status, solver::Solution::Status::settled) << solution.reason;
  return {*std::move(reading.value), std::move(solution)};
}

/// `exact` is what the same case gives when many more digits are asked for.
inline void expect_within(const solver::Estimate& found, double exact, const std::string& what) {
  EXPECT_LE(std::abs(found.value - exact), found.bound)
      << what << " " << found.value << " +- " << found.bound;
}

}  // namespace raiser::io::test
