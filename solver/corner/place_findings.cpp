#include "solver/corner/place_findings.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <numbers>

#include "solver/adapt/bound.hpp"

namespace raiser::solver {
namespace {

using Kind = SingularPlace::Kind;

double degrees(double angle) { return angle * 180 / std::numbers::pi; }

/// Length of the shortest side of a triangle at a place.
double finest(const Field& field, const Point& at) {
  double least = std::numeric_limits<double>::infinity();
  const auto& points = field.mesh().points();
  for (const Image& image : field.images())
    for (const auto& [a, b] : field.mesh().edges()) {
      const double length = (points[a] - points[b]).norm();
      const bool touches = std::min((image.apply(points[a]) - at).norm(),
                                    (image.apply(points[b]) - at).norm()) < 1e-6 * length;
      if (touches) least = std::min(least, length);
    }
  return least;
}

/// Distances between which the growth is measured: well outside the triangles
/// at the place, and well inside its surroundings.
struct Span {
  double inner, outer;
};
std::optional<Span> growth_span(const Field& field, const SingularPlace& place) {
  const Span span{20 * finest(field, place.site.vertex.at), 0.02 * place.site.reach};
  if (!(span.outer > 3 * span.inner)) return std::nullopt;
  return Span{span.inner, std::min(span.outer, 1000 * span.inner)};
}

/// The radius of the disc for the integrals.
double disc_radius(const SingularPlace& place) {
  const auto& vertex = place.site.vertex;
  const auto is_held_arc = [](const mesh::Curve& curve, WedgeEdge edge) {
    return curve.kind == mesh::Curve::Kind::arc && edge != WedgeEdge::free;
  };
  const bool small = is_held_arc(vertex.after, place.site.wedge.first) ||
                     is_held_arc(vertex.before, place.site.wedge.second);
  return (small ? 0.02 : 0.9) * place.site.reach;
}

std::vector<SingularField> fields_of(const SingularPlace& place, const std::vector<Field>& solutions,
                                     const PlaneConstants& material) {
  const double radius = disc_radius(place);
  std::vector<std::vector<std::complex<double>>> by_degree;
  for (const Field& field : solutions)
    by_degree.push_back(amplitudes(field, place.site, place.modes, material, radius));
  const auto other = amplitudes(solutions.back(), place.site, place.modes, material, radius / 2);
  const auto span = growth_span(solutions.back(), place);
  std::vector<SingularField> result;
  for (std::size_t m = 0; m < place.modes.size(); ++m) {
    SingularField field{place.modes[m].exponent, place.modes[m].symmetry, {}, 0.0, std::nullopt};
    const auto value = [&](std::complex<double> q) {
      return place.modes[m].is_complex() ? std::abs(q) : q.real();
    };
    std::vector<double> values;
    double scale = 0.0;  // of all fields at the edge of the disc, as an intensity of this one
    for (std::size_t k = 0; k < place.modes.size(); ++k)
      scale =
          std::max(scale, std::abs(by_degree.back()[k]) *
                              std::pow(radius, (place.modes[k].exponent - place.modes[m].exponent).real()));
    for (const auto& q : by_degree) values.push_back(value(q[m]));
    field.intensity = {values.back(), error_bound(values, scale) + std::abs(value(other[m]) - values.back())};
    field.phase = place.modes[m].is_complex() ? std::arg(by_degree.back()[m]) : 0.0;
    const bool stands_alone = place.modes.size() == 1 || field.symmetry != WedgeMode::Symmetry::none;
    const bool is_there = std::abs(values.back()) > 1e-6 * scale + field.intensity.bound;
    if (span && stands_alone && is_there)
      field.measured =
          measured_exponent(solutions.back(), place.site, field.symmetry, span->inner, span->outer);
    result.push_back(field);
  }
  return result;
}

std::string what_of(const SingularPlace& place) {
  const double angle = degrees(place.site.vertex.angle);
  switch (place.kind) {
    case Kind::corner:
      return fmt::format("sharp re-entrant corner of {:.4g} deg", angle);
    case Kind::held_end:
      return fmt::format("end of a held edge, material of {:.4g} deg", angle);
    case Kind::jump:
      return std::abs(angle - 180) < 1
                 ? "jump of traction on a straight edge"
                 : fmt::format("tractions that do not fit at a corner of {:.4g} deg", angle);
  }
  return "";
}

std::string why_of(const SingularPlace& place) {
  if (place.kind == Kind::jump)
    return place.is_logarithmic
               ? "the stress grows with the logarithm of the distance: no peak stress and no Kt exist here"
               : "the stress is finite but depends on the direction from which the place is approached: it "
                 "has "
                 "no single value here";
  if (place.modes.empty())
    return "the stress grows without limit towards it: no peak stress and no Kt exist here";
  return fmt::format(
      "the stress grows without limit, as r^-{:.4f} at a distance r: no peak stress and no Kt exist here, "
      "and "
      "what a mesh shows depends on the mesh alone",
      1 - place.modes.front().exponent.real());
}

std::string cure_of(const SingularPlace& place) {
  switch (place.kind) {
    case Kind::corner:
      return "give the corner the radius it has in the part; or compare the generalised stress intensity "
             "with "
             "one measured on corners of the same angle";
    case Kind::held_end:
      return "model what holds the edge, or the radius where it ends; judge the stress away from it, where "
             "it "
             "does not depend on how the end is held";
    case Kind::jump:
      return "let the traction rise over the length on which it acts in the part, or judge the stress a "
             "little away";
  }
  return "";
}

}  // namespace

std::vector<PlaceFindings> place_findings(const std::vector<SingularPlace>& places,
                                          const std::vector<Field>& fields, const HookeLaw& material) {
  std::vector<PlaceFindings> result;
  for (const SingularPlace& place : places) {
    PlaceFindings findings;
    findings.kind = place.kind;
    findings.point = place.site.vertex.at;
    findings.angle = place.site.vertex.angle;
    findings.leaves = place.site.vertex.after.owner;
    findings.arrives = place.site.vertex.before.owner;
    findings.what = what_of(place);
    findings.why = why_of(place);
    findings.cure = cure_of(place);
    if (!place.modes.empty() && place.site.reach > 0)
      findings.fields = fields_of(place, fields, plane_constants(material));
    const auto span = growth_span(fields.back(), place);
    if (span && place.kind != Kind::jump)
      findings.measured =
          measured_exponent(fields.back(), place.site, WedgeMode::Symmetry::none, span->inner, span->outer);
    result.push_back(std::move(findings));
  }
  return result;
}

}  // namespace raiser::solver
