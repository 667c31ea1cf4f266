#pragma once

#include <nlohmann/json.hpp>
#include <numbers>
#include <string_view>
#include <vector>

#include "io/write/result.hpp"

/// Parts of json(): what the files that write a result share.
namespace raiser::io::json_part {

using Json = nlohmann::ordered_json;

inline constexpr double degrees_per_radian = 180.0 / std::numbers::pi;

/// A number without a bound.
Json quantity(double value, std::string_view unit);
Json quantity(const solver::Estimate& estimate, std::string_view unit);
/// A number that does not exist.
Json without_value(std::string_view unit, std::string_view why);
Json position(const mesh::Point& point);

/// One crack tip under the given loads.
Json tip(const Case& input, const std::vector<solver::Load>& loads, const solver::TipFindings& found);
/// How far the faces of each crack are apart.
Json faces(const Case& input, const std::vector<solver::CrackOpening>& openings);

/// The case as understood.
Json input(const Case& c);

}  // namespace raiser::io::json_part
