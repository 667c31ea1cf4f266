#include <array>
#include <cmath>
#include <map>
#include <utility>

#include "mesh/region/region.hpp"
#include "solver/crack/tip_scan.hpp"
#include "solver/fe/reference.hpp"

namespace raiser::solver {
namespace {

constexpr std::array<double, 5> positions = {-0.9, -0.45, 0.0, 0.45, 0.9};

/// What one face moves towards the other: -u . n at the positions along a side,
/// one column a load; n points out of the material.
Eigen::MatrixXd retreat(const Discretisation& space, const mesh::BoundarySide& side,
                        const Displacements& displacements) {
  std::vector<Point> reference;
  for (const double s : positions) reference.push_back(on_side(side.side, s));
  const ShapeTable shapes = tabulate(displacements.degree, reference);
  const Point along = side.curve.at(side.curve.end) - side.curve.at(side.curve.begin);
  const Point n = Point(along.y(), -along.x()).normalized();
  Discretisation::Local local;
  space.local(side.triangle, local);
  Eigen::MatrixXd normal(static_cast<Eigen::Index>(local.function.size()), displacements.values.cols());
  for (Eigen::Index i = 0; i < normal.rows(); ++i)
    normal.row(i) = -local.sign[i] * (n.x() * displacements.values.row(2 * local.function[i]) +
                                      n.y() * displacements.values.row(2 * local.function[i] + 1));
  return shapes.value.transpose() * normal;
}

struct Face {
  std::size_t crack;
  std::vector<Point> points;
  Eigen::MatrixXd retreat;  ///< summed over the faces that are there
  int faces = 0;
};

}  // namespace

std::vector<CrackOpening> crack_openings(const Model& model, const Plate& plate,
                                         const Displacements& displacements) {
  const Discretisation space(model.mesh(), displacements.degree);
  std::map<std::pair<double, double>, Face> pairs;  // by the middle of the side
  for (const mesh::BoundarySide& side : model.mesh().boundary()) {
    if (side.curve.owner.kind != Owner::Kind::crack) continue;
    const Point a = side.curve.at(side.curve.begin);
    const Point b = side.curve.at(side.curve.end);
    const Point middle = (a + b) / 2;
    Eigen::MatrixXd own = retreat(space, side, displacements);
    const bool is_backward = std::pair(b.x(), b.y()) < std::pair(a.x(), a.y());
    if (is_backward) own = own.colwise().reverse().eval();
    Face& face = pairs[{middle.x(), middle.y()}];
    if (face.faces++ == 0) {
      face.crack = side.curve.owner.index;
      for (const double s : positions)
        face.points.push_back(((1 - s) * (is_backward ? b : a) + (1 + s) * (is_backward ? a : b)) / 2);
      face.retreat = std::move(own);
    } else {
      face.retreat += own;
    }
  }
  const Eigen::VectorXd together = displacements.values * model.factors(0, model.images().front());
  const double size =
      together.head(2 * static_cast<Eigen::Index>(model.mesh().points().size())).cwiseAbs().maxCoeff();
  std::vector<CrackOpening> result;
  for (std::size_t c = 0; c < plate.cracks.size(); ++c)
    result.push_back({c, 0.0, plate.cracks[c].points.front(), 0.0, size});
  for (const auto& [key, face] : pairs)
    for (const Image& image : model.images()) {
      const mesh::Mirrors mirror = image.mirror();
      const std::size_t crack =
          mirror.x || mirror.y ? mesh::mirror_image_of_crack(plate, face.crack, mirror) : face.crack;
      Eigen::VectorXd factors = model.factors(0, image);
      if (face.faces == 1) {
        // The other face is the image across the mirror line along the crack.
        const bool along_x = std::abs(face.points.back().x() - face.points.front().x()) >
                             std::abs(face.points.back().y() - face.points.front().y());
        const Image across{{along_x ? 1.0 : -1.0, along_x ? -1.0 : 1.0}};
        for (Eigen::Index l = 0; l < factors.size(); ++l)
          factors[l] *= 1.0 + model.parity(static_cast<std::size_t>(l), across);
      }
      const Eigen::VectorXd gap = face.retreat * factors;
      for (Eigen::Index q = 0; q < gap.size(); ++q) {
        result[crack].largest = std::max(result[crack].largest, std::abs(gap[q]));
        if (gap[q] < result[crack].least) {
          result[crack].least = gap[q];
          result[crack].where = image.apply(face.points[q]);
        }
      }
    }
  return result;
}

}  // namespace raiser::solver
