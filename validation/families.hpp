#pragma once

#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "solver/extract/estimate.hpp"
#include "validation/published.hpp"

/// The published solutions as families of plates that are solved and held
/// against them: what `raiser validate` runs.
namespace raiser::validation {

/// A family's number as we find it, dimensionless, in the family's definition.
struct Ours {
  std::optional<solver::Estimate> value;  ///< empty when it could not be had; `reason` says why
  double model = 0.0;      ///< relative: how far the plate solved may differ from the one the sources mean
  bool is_settled = true;  ///< its bound meets the tolerance
  std::string reason;
  int degree = 0;
  std::size_t unknowns = 0;
  double seconds = 0.0;
};

/// What a source gives for a point.
struct Cited {
  Reference reference;
  double value = 0.0;
};

/// One plate of a family. The first parameter is the chart's abscissa.
struct FamilyPoint {
  std::string series;  ///< the curve that it lies on, e.g. "a/b 2"; empty when there is one only
  std::vector<Parameter> parameters;
  std::vector<Cited> cited;
  std::function<Ours(double tolerance)> solve;  ///< tolerance relative to the largest edge stress
  bool is_quick = false;                        ///< belongs to the short run
  double scale = 0.0;  ///< of numbers that pass through zero: what "off" is relative to where ours is smaller
};

/// A published solution drawn over the chart's abscissa.
struct FamilyCurve {
  Reference reference;
  std::string series;
  std::function<std::optional<double>(double)> at;
  double from = 0.0;
  double to = 1.0;
  bool is_table = false;  ///< known at `points` only, drawn as marks
  std::vector<double> points;
};

/// A group of plates under one definition.
struct Family {
  std::string id;       ///< short name for the command line
  std::string records;  ///< of the reference collection, e.g. "A02-A05"
  std::string title;
  std::string abscissa;   ///< the chart's, with what it means, e.g. "d/W: diameter over width"
  std::string ordinate;   ///< what the number is, e.g. "Kt net"
  std::string reading;    ///< how our number is formed from what plate
  std::string deviation;  ///< why sources and we differ where they do
  double tolerance = 1e-5;
  std::vector<FamilyPoint> points;
  std::vector<FamilyCurve> curves;
};

/// All families in the order of their records.
std::vector<Family> families();

/// Published records that no family solves, and why.
struct LeftOut {
  std::string records;
  std::string title;
  std::string why;
};
std::vector<LeftOut> left_out();

/// How a published value stands to ours.
enum class Agreement {
  exact,          ///< the source is exact and ours agrees within bound and model
  not_exact,      ///< the source is exact and ours does not agree
  within_claim,   ///< within the accuracy that the source claims
  beyond_claim,   ///< not so: the source is less accurate there than it claims
  as_found,       ///< no claim; within what is known of the source
  not_as_found,   ///< no claim; farther off than known so far
  outside_range,  ///< the source does not cover these parameters
};

/// A published value beside ours.
struct HeldValue {
  Reference reference;
  double published = 0.0;
  double off = 0.0;              ///< (published - ours) / scale: below 0 where the source is low
  double scale = 1.0;            ///< |ours|, or the point's scale where that is larger
  std::optional<double> digits;  ///< of agreement, for exact sources
  Agreement agreement = Agreement::as_found;
};

struct PointResult {
  std::string series;
  std::vector<Parameter> parameters;
  Ours ours;
  std::vector<HeldValue> held;  ///< empty when ours has no value
};

struct FamilyResult {
  const Family* family = nullptr;
  double tolerance = 0.0;
  std::vector<PointResult> points;
};

/// Holds one published value against ours. `scale` as in FamilyPoint.
HeldValue hold(const Cited& cited, const std::vector<Parameter>& parameters, const Ours& ours,
               double scale = 0.0);

/// Solves a family, only its short part when `quick`. `stopped` is asked
/// before each point; what has been solved until then is returned. Holds a
/// pointer to the family. Never throws: what fails is a point without a value.
FamilyResult run(const Family& family, bool quick, const std::function<bool()>& stopped = {});

/// Whether every point was settled and every exact source met.
bool is_sound(const FamilyResult& result);

}  // namespace raiser::validation
