#include "io/write/vtu.hpp"

#include <gtest/gtest.h>
#include <vtkCell.h>
#include <vtkCellType.h>
#include <vtkDataArray.h>
#include <vtkFieldData.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkStringArray.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLUnstructuredGridReader.h>

#include <array>
#include <cmath>
#include <map>
#include <random>

#include "tests/io/cracked.hpp"
#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

using mesh::Point;
using solver::FieldValue;

// A polynomial of the given total degree in which every monomial takes part,
// so that no two nodes could be exchanged unnoticed.
double polynomial(int degree, double seed, const Point& at) {
  double sum = 0.0;
  for (int i = 0; i <= degree; ++i) {
    for (int j = 0; i + j <= degree; ++j)
      sum += std::cos(seed + 3.1 * i + 1.7 * j) * std::pow(at.x(), i) * std::pow(at.y(), j);
  }
  return sum;
}

// Cell `cell` of a made-up field: curved sides, every quantity different.
FieldValue made_up(int degree, std::size_t cell, const Point& r) {
  const double c = static_cast<double>(cell);
  FieldValue value;
  value.point = Point(10.0 * c + 4.0 * r.x() + r.y(), 3.0 * r.y() - 0.5 * r.x());
  value.point += 0.05 * Point(polynomial(degree, 1.0 + c, r), polynomial(degree, 2.0 + c, r));
  value.displacement = Point(polynomial(degree, 3.0 + c, r), polynomial(degree, 4.0 + c, r));
  value.stress = {polynomial(degree, 5.0 + c, r), polynomial(degree, 6.0 + c, r),
                  polynomial(degree, 7.0 + c, r), polynomial(degree, 8.0 + c, r)};
  return value;
}

CellSource made_up(int degree, std::size_t cells) {
  return {cells, degree, [degree](std::size_t cell, std::span<const Point> reference) {
            std::vector<FieldValue> values;
            for (const Point& r : reference) values.push_back(made_up(degree, cell, r));
            return values;
          }};
}

class Read {
 public:
  explicit Read(const std::string& file) {
    reader_->ReadFromInputStringOn();
    reader_->SetInputString(file);
    reader_->Update();
  }
  vtkUnstructuredGrid* grid() { return reader_->GetOutput(); }

  // An array of the point data interpolated inside a cell as VTK does it.
  std::vector<double> at(vtkIdType cell, const Point& r, const char* array, Point* place = nullptr) {
    vtkCell* body = grid()->GetCell(cell);
    int sub = 0;
    const std::array<double, 3> parametric{r.x(), r.y(), 0.0};
    std::array<double, 3> x{};
    std::vector<double> weights(static_cast<std::size_t>(body->GetNumberOfPoints()));
    body->EvaluateLocation(sub, parametric.data(), x.data(), weights.data());
    if (place != nullptr) *place = Point(x[0], x[1]);
    vtkDataArray* data = grid()->GetPointData()->GetArray(array);
    std::vector<double> sum(static_cast<std::size_t>(data->GetNumberOfComponents()), 0.0);
    for (std::size_t i = 0; i < weights.size(); ++i) {
      const vtkIdType id = body->GetPointId(static_cast<int>(i));
      for (std::size_t k = 0; k < sum.size(); ++k) {
        sum[k] += weights[i] * data->GetComponent(id, static_cast<int>(k));
      }
    }
    return sum;
  }

 private:
  vtkNew<vtkXMLUnstructuredGridReader> reader_;
};

const Provenance somewhere{"0.1.0", "gcc 12", "plate.toml", "abc123"};

class VtuDegree : public testing::TestWithParam<int> {};

TEST_P(VtuDegree, ReadsBackAsTheSamePolynomials) {
  const int degree = GetParam();
  constexpr std::size_t cells = 3;
  Read read(vtu(made_up(degree, cells), somewhere));
  ASSERT_EQ(read.grid()->GetNumberOfCells(), static_cast<vtkIdType>(cells));
  EXPECT_EQ(read.grid()->GetNumberOfPoints(),
            static_cast<vtkIdType>(cells * (degree + 1) * (degree + 2) / 2));
  std::mt19937 random(20240501);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  for (int trial = 0; trial < 60; ++trial) {
    Point r(unit(random), unit(random));
    if (r.sum() > 1.0) r = Point(1.0 - r.x(), 1.0 - r.y());
    const auto cell = static_cast<std::size_t>(trial) % cells;
    const FieldValue expected = made_up(degree, cell, r);
    Point place;
    const auto u = read.at(static_cast<vtkIdType>(cell), r, "displacement, mm", &place);
    const auto s = read.at(static_cast<vtkIdType>(cell), r, "stress, MPa");
    EXPECT_LT((place - expected.point).norm(), 1e-11) << "degree " << degree;
    EXPECT_NEAR(u[0], expected.displacement.x(), 1e-11);
    EXPECT_NEAR(u[1], expected.displacement.y(), 1e-11);
    EXPECT_EQ(u[2], 0.0);
    const std::array<double, 6> stress{
        expected.stress.xx, expected.stress.yy, expected.stress.zz, expected.stress.xy, 0.0, 0.0};
    for (std::size_t k = 0; k < 6; ++k) EXPECT_NEAR(s[k], stress[k], 2e-4) << "component " << k;
  }
}

INSTANTIATE_TEST_SUITE_P(Degrees, VtuDegree, testing::Range(1, 9));

// The whole way: a solved plate, mirror images included, written, read back and
// compared with the solver inside every cell. The displacement is a polynomial
// in the reference coordinates and must agree to rounding; the edges are exact
// arcs in the solver and interpolated in the file.
TEST(Vtu, ASolvedPlateReadsBackAsTheSolverHasIt) {
  const Result result = test::solved(test::one_hole);
  const solver::Field& field = result.solution.field;
  ASSERT_LE(field.degree(), highest_vtu_degree);
  ASSERT_TRUE(result.solution.mirrors_used.x && result.solution.mirrors_used.y);
  Read read(vtu(cells_of(field), result.provenance));
  ASSERT_EQ(read.grid()->GetNumberOfCells(), static_cast<vtkIdType>(4 * result.solution.triangles));
  const std::vector<Point> inside{{0.2, 0.3}, {0.61, 0.17}, {0.05, 0.9}};
  for (std::size_t cell = 0; cell < field.cells(); ++cell) {
    const std::vector<FieldValue> expected = field.sample(cell, inside);
    for (std::size_t i = 0; i < inside.size(); ++i) {
      Point place;
      const auto u = read.at(static_cast<vtkIdType>(cell), inside[i], "displacement, mm", &place);
      const auto s = read.at(static_cast<vtkIdType>(cell), inside[i], "stress, MPa");
      EXPECT_LT((place - expected[i].point).norm(), 1e-5) << "mm; the hole measures 10 mm";
      EXPECT_LT((Point(u[0], u[1]) - expected[i].displacement).norm(), 1e-12);
      EXPECT_NEAR(s[0], expected[i].stress.xx, 1e-3);
      EXPECT_NEAR(s[3], expected[i].stress.xy, 1e-3);
      const auto there = field.at(place);
      ASSERT_TRUE(there);
      EXPECT_LT((Point(u[0], u[1]) - there->displacement).norm(), 1e-7) << "the same place, found by search";
    }
  }
}

// Along a crack the file has both faces: read back, they stand apart by what the
// solver says of its opening, and nowhere else does the displacement jump.
TEST(Vtu, ACrackIsOpenInTheFile) {
  const Result result = test::solved(test::cracked_strap);
  Read read(vtu(cells_of(result.solution.field), result.provenance));
  std::map<std::pair<double, double>, std::pair<Point, double>> seen;  // displacement, largest distance
  for (vtkIdType cell = 0; cell < read.grid()->GetNumberOfCells(); ++cell)
    for (const Point& r : {Point(0.5, 0), Point(0.5, 0.5), Point(0, 0.5)}) {
      Point place;
      const auto u = read.at(cell, r, "displacement, mm", &place);
      const std::pair key{std::round(place.x() * 1e4), std::round(place.y() * 1e4)};
      const auto [at, is_new] = seen.try_emplace(key, Point(u[0], u[1]), 0.0);
      if (!is_new) at->second.second = (Point(u[0], u[1]) - at->second.first).norm();
    }
  double edge = 0.0, flaw = 0.0, elsewhere = 0.0;
  for (const auto& [key, value] : seen) {
    const Point x(key.first / 1e4, key.second / 1e4);
    const bool on_edge_crack = x.x() == 0.0 && x.y() > 15.0;
    const bool on_flaw = (x - Point(60, -25)).norm() < 8.1;
    double& largest = on_edge_crack ? edge : on_flaw ? flaw : elsewhere;
    largest = std::max(largest, value.second);
  }
  // The widest places are the mouths, half a side away from the nearest point looked at.
  EXPECT_NEAR(edge, result.solution.openings.at(0).largest, 0.2 * edge);
  EXPECT_NEAR(flaw, result.solution.openings.at(1).largest, 0.2 * flaw);
  EXPECT_LT(elsewhere, 1e-6 * edge);
}

TEST(Vtu, CellTypesAreTheStandardOnes) {
  const std::array<std::pair<int, int>, 3> types{
      {{1, VTK_TRIANGLE}, {2, VTK_QUADRATIC_TRIANGLE}, {5, VTK_LAGRANGE_TRIANGLE}}};
  for (const auto& [degree, type] : types) {
    Read read(vtu(made_up(degree, 2), somewhere));
    EXPECT_EQ(read.grid()->GetCellType(1), type) << "degree " << degree;
  }
}

TEST(Vtu, DegreesBeyondTheHighestAreSampledAtIt) {
  Read read(vtu(made_up(10, 1), somewhere));
  EXPECT_EQ(read.grid()->GetNumberOfPoints(), 45);
  const FieldValue expected = made_up(10, 0, Point(0.0, 1.0));
  Point place;
  read.at(0, Point(0.0, 1.0), "displacement, mm", &place);
  EXPECT_LT((place - expected.point).norm(), 1e-11);
}

TEST(Vtu, PrincipalAndVonMisesStressesAreThoseOfTheTensor) {
  Read read(vtu(made_up(4, 2), somewhere));
  const std::vector<Point> nodes = vtk_triangle_nodes(4);
  vtkPointData* data = read.grid()->GetPointData();
  for (std::size_t i = 0; i < nodes.size(); ++i) {
    const solver::Stress s = made_up(4, 1, nodes[i]).stress;
    const auto id = static_cast<vtkIdType>(nodes.size() + i);
    const double middle = (s.xx + s.yy) / 2, radius = std::hypot((s.xx - s.yy) / 2, s.xy);
    const double mises =
        std::sqrt(0.5 * (std::pow(s.xx - s.yy, 2) + std::pow(s.yy - s.zz, 2) + std::pow(s.zz - s.xx, 2)) +
                  3 * s.xy * s.xy);
    EXPECT_NEAR(data->GetArray("largest principal stress, MPa")->GetComponent(id, 0), middle + radius, 1e-5);
    EXPECT_NEAR(data->GetArray("smallest principal stress, MPa")->GetComponent(id, 0), middle - radius, 1e-5);
    EXPECT_NEAR(data->GetArray("von Mises stress, MPa")->GetComponent(id, 0), mises, 1e-5);
  }
}

TEST(Vtu, NamesItsComponentsAndItsOrigin) {
  Read read(vtu(made_up(3, 1), somewhere));
  vtkDataArray* stress = read.grid()->GetPointData()->GetArray("stress, MPa");
  const std::array<const char*, 6> names{"XX", "YY", "ZZ", "XY", "YZ", "XZ"};
  for (int k = 0; k < 6; ++k) EXPECT_STREQ(stress->GetComponentName(k), names[static_cast<std::size_t>(k)]);
  const auto entry = [&](const char* name) {
    auto* array = vtkStringArray::SafeDownCast(read.grid()->GetFieldData()->GetAbstractArray(name));
    return array == nullptr ? std::string("missing") : std::string(array->GetValue(0));
  };
  EXPECT_EQ(entry("raiser version"), "0.1.0");
  EXPECT_EQ(entry("case file"), "plate.toml");
  EXPECT_EQ(entry("case SHA-256"), "abc123");
}

}  // namespace
}  // namespace raiser::io
