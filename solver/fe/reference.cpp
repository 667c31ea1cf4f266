#include "solver/fe/reference.hpp"

#include <cmath>
#include <memory>
#include <mutex>
#include <numbers>

namespace raiser::solver {
namespace {

/// One table a degree, made when first asked for.
template <class Table>
class ByDegree {
 public:
  template <class Make>
  const Table& get(int degree, Make make) {
    Slot& slot = slots_.at(static_cast<std::size_t>(degree));
    std::call_once(slot.once, [&] { slot.table = std::make_unique<const Table>(make()); });
    return *slot.table;
  }

 private:
  struct Slot {
    std::once_flag once;
    std::unique_ptr<const Table> table;
  };
  std::array<Slot, max_degree + 1> slots_;
};

constexpr int search_count = 21;

}  // namespace

ReferenceElement::ReferenceElement(int degree)
    : rule(triangle_rule(degree + 3)), maps(rule.points), shapes(tabulate(degree, rule.points)) {
  const Eigen::Map<const Eigen::VectorXd> weights(rule.weights.data(),
                                                  static_cast<Eigen::Index>(rule.weights.size()));
  rr = shapes.dr * weights.asDiagonal() * shapes.dr.transpose();
  rs = shapes.dr * weights.asDiagonal() * shapes.ds.transpose();
  sr = rs.transpose();
  ss = shapes.ds * weights.asDiagonal() * shapes.ds.transpose();
}

SideTables::SideTables(int degree, std::span<const double> s) {
  for (int side = 0; side < 3; ++side) {
    std::vector<Point> reference;
    for (const double position : s) reference.push_back(on_side(side, position));
    shapes[side] = tabulate(degree, reference);
    maps.emplace_back(reference);
  }
}

const ReferenceElement& reference_element(int degree) {
  static ByDegree<ReferenceElement> tables;
  return tables.get(degree, [&] { return ReferenceElement(degree); });
}

const SideTables& sides_at_gauss_points(int degree) {
  static ByDegree<SideTables> tables;
  return tables.get(degree, [&] { return SideTables(degree, traction_rule(degree).points); });
}

const SideTables& sides_at_search_points(int degree) {
  static ByDegree<SideTables> tables;
  return tables.get(degree, [&] { return SideTables(degree, search_points()); });
}

const mesh::GaussRule& traction_rule(int degree) {
  static ByDegree<mesh::GaussRule> rules;
  return rules.get(degree, [&] { return mesh::gauss_legendre(degree + 6); });
}

const std::vector<double>& search_points() {
  static const std::vector<double> points = [] {
    std::vector<double> s;
    for (int j = 0; j < search_count; ++j) s.push_back(-std::cos(std::numbers::pi * j / (search_count - 1)));
    s[search_count / 2] = 0.0;
    return s;
  }();
  return points;
}

}  // namespace raiser::solver
