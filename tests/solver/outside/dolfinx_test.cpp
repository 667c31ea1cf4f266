// The same curved meshes solved by raiser's finite elements and by DOLFINx, a
// general-purpose PDE library: displacements and energy must agree.
#include <fmt/format.h>
#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <algorithm>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <set>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/fe/model.hpp"
#include "solver/field/field.hpp"

namespace raiser::solver {
namespace {

using nlohmann::json;

constexpr double thickness = 4.0;
const HookeLaw material{70000.0, 0.33, PlaneState::stress};

// Invented: a plate with a round and a slanted elliptic hole, in no symmetry.
Plate two_holes() {
  mesh::Hole round;
  round.name = "round";
  round.length = round.width = 12;
  round.centre = {-14, 5};
  mesh::Hole oval;
  oval.name = "oval";
  oval.shape = mesh::HoleShape::ellipse;
  oval.length = 20;
  oval.width = 9;
  oval.centre = {15, -4};
  oval.angle = 0.6;
  return {80, 50, thickness, {round, oval}};
}

constexpr double along = 80.0;
constexpr double across = -30.0;
constexpr double shear = 45.0;

std::vector<UnitLoad> loads(const Plate& plate) {
  Load pull{.kind = Load::Kind::tension, .name = "pull", .stress = along};
  Load squeeze{.kind = Load::Kind::transverse, .name = "squeeze", .stress = across};
  Load slide{.kind = Load::Kind::shear, .name = "slide", .stress = shear};
  return unit_loads(plate, {pull, squeeze, slide});
}

// The nodes of a polynomial of degree g, corners first.
std::vector<Point> lattice(int g) {
  std::vector<Point> nodes{{0, 0}, {1, 0}, {0, 1}};
  const double step = 1.0 / g;
  for (int i = 0; i <= g; ++i)
    for (int j = 0; i + j <= g; ++j)
      if (std::max({i, j, g - i - j}) < g) nodes.emplace_back(i * step, j * step);
  return nodes;
}

const std::vector<Point> samples{{0.1, 0.2}, {0.6, 0.3}, {0, 1}, {0.5, 0.5}, {0.25, 0}};

json pair(const Point& p) { return {p.x(), p.y()}; }

// What Model holds against rigid motion: the lower left corner, and the upper
// right one along x. Where the sides' degree is above the displacement's, a
// rotation costs energy, so that the answer depends on this choice.
json pins(const mesh::Mesh& mesh) {
  const auto& points = mesh.points();
  const auto by_sum = [](const Point& a, const Point& b) { return a.sum() < b.sum(); };
  const auto [first, last] = std::minmax_element(points.begin(), points.end(), by_sum);
  const auto pin = [&](auto point, int component) -> json {
    return {{"vertex", point - points.begin()}, {"component", component}};
  };
  return {pin(first, 0), pin(first, 1), pin(last, 0)};
}

json exported(const mesh::Mesh& mesh, int geometry_degree, int degree) {
  json out{{"degree", degree}, {"thickness", thickness}};
  out["material"] = {{"youngs_modulus", material.youngs_modulus},
                     {"poissons_ratio", material.poissons_ratio},
                     {"plane", "stress"}};
  for (const Point& node : lattice(geometry_degree)) out["reference"].push_back(pair(node));
  for (const Point& sample : samples) out["samples"].push_back(pair(sample));
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    out["vertices"].push_back(mesh.triangles()[t]);
    json nodes;
    for (const Point& node : lattice(geometry_degree)) nodes.push_back(pair(mesh.map(t, node).x));
    out["nodes"].push_back(nodes);
  }
  json sides;
  for (const mesh::BoundarySide& side : mesh.boundary())
    if (side.curve.owner.kind != Owner::Kind::raiser) sides.push_back({side.triangle, side.side});
  out["tractions"] = {{{"stress", {along, across, shear}}, {"sides", sides}}};
  out["pins"] = pins(mesh);
  return out;
}

// Solves all exported meshes in one DOLFINx process.
json solved_by_dolfinx(const json& meshes) {
  const std::filesystem::path folder = RAISER_DOLFINX_SCRATCH;
  std::filesystem::create_directories(folder);
  const auto question = folder / "meshes.json";
  const auto answer = folder / "answers.json";
  std::filesystem::remove(answer);
  std::ofstream(question) << meshes;
  const std::string command = fmt::format("'{}' '{}' '{}' '{}' '{}'", RAISER_PYTHON, RAISER_DOLFINX_SCRIPT,
                                          question.string(), answer.string(), (folder / "forms").string());
  if (std::system(command.c_str()) != 0) throw std::runtime_error("failed: " + command);
  std::ifstream file(answer);
  return json::parse(file);
}

// Largest distance between two displacement fields at the same points once the
// rigid motion that separates them best is taken off, over the largest displacement.
double difference(const std::vector<Point>& x, const std::vector<Point>& ours,
                  const std::vector<Point>& theirs) {
  const auto rows = static_cast<Eigen::Index>(2 * x.size());
  Eigen::MatrixX3d rigid(rows, 3);
  Eigen::VectorXd apart(rows);
  double largest = 0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    const auto row = static_cast<Eigen::Index>(2 * i);
    rigid.row(row) << 1, 0, -x[i].y();
    rigid.row(row + 1) << 0, 1, x[i].x();
    apart.segment<2>(row) = ours[i] - theirs[i];
    largest = std::max(largest, theirs[i].norm());
  }
  const Eigen::Vector3d motion = rigid.colPivHouseholderQr().solve(apart);
  return (apart - rigid * motion).cwiseAbs().maxCoeff() / largest;
}

struct Agreement {
  double position = 0.0;
  double displacement = 0.0;
  double energy = 0.0;
};

// All relative.
Agreement agreement(const Plate& plate, const mesh::Mesh& mesh, int degree, const json& answer) {
  const Model model(mesh, {}, material, thickness, loads(plate));
  const Displacements displacements = model.solve(degree);
  const Field field(model, displacements);
  std::vector<Point> x;
  std::vector<Point> ours;
  std::vector<Point> theirs;
  Agreement result;
  for (std::size_t t = 0; t < field.cells(); ++t) {
    const auto values = field.sample(t, samples);
    for (std::size_t i = 0; i < samples.size(); ++i) {
      const json& u = answer["displacements"][t][i];
      const json& place = answer["positions"][t][i];
      x.push_back(values[i].point);
      ours.push_back(values[i].displacement);
      theirs.emplace_back(u[0].get<double>(), u[1].get<double>());
      const Point apart = values[i].point - Point(place[0].get<double>(), place[1].get<double>());
      result.position = std::max(result.position, apart.norm() / plate.length);
    }
  }
  result.displacement = difference(x, ours, theirs);
  result.energy =
      std::abs(model.balance(displacements).strain_energy / answer["strain_energy"].get<double>() - 1);
  return result;
}

TEST(Outside, DolfinxGivesTheSameDisplacementsAndEnergyOnTheSameMeshes) {
  const Plate plate = two_holes();
  mesh::SizeRule rule;
  rule.turn = 0.4;
  const mesh::Mesh exact = mesh::triangulate(mesh::trace(plate), rule);
  json meshes;
  for (int g = 1; g <= 3; ++g)
    for (int p = 1; p <= 3; ++p) meshes.push_back(exported(exact.with_geometry_degree(g), g, p));
  const json answers = solved_by_dolfinx(meshes);
  std::set<double> energies;
  for (int g = 1; g <= 3; ++g)
    for (int p = 1; p <= 3; ++p) {
      SCOPED_TRACE(fmt::format("geometry degree {}, displacement degree {}", g, p));
      const json& answer = answers[3 * (g - 1) + p - 1];
      const Agreement seen = agreement(plate, exact.with_geometry_degree(g), p, answer);
      RecordProperty(fmt::format("g{}p{}", g, p),
                     fmt::format("displacement {:.1e}, energy {:.1e}", seen.displacement, seen.energy));
      EXPECT_LT(seen.position, 1e-13);
      EXPECT_LT(seen.displacement, 1e-9);
      EXPECT_LT(seen.energy, 1e-9);
      energies.insert(answer["strain_energy"].get<double>());
    }
  EXPECT_EQ(energies.size(), 9u) << "each mesh and degree is its own problem";
}

}  // namespace
}  // namespace raiser::solver
