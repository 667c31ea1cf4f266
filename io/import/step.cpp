#include "io/import/step.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <gmsh.h>
#include <unistd.h>

#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <fstream>

namespace raiser::io {
namespace {

using Space = Eigen::Vector3d;
using mesh::Curve;
using mesh::Point;

/// Standard output sent nowhere while it lives: the kernel reports there.
class Quiet {
 public:
  Quiet() : kept_(dup(STDOUT_FILENO)) {
    std::fflush(stdout);
    const int nowhere = open("/dev/null", O_WRONLY | O_CLOEXEC);
    if (nowhere < 0) return;
    dup2(nowhere, STDOUT_FILENO);
    close(nowhere);
  }
  ~Quiet() {
    std::fflush(stdout);
    if (kept_ < 0) return;
    dup2(kept_, STDOUT_FILENO);
    close(kept_);
  }
  Quiet(const Quiet&) = delete;
  Quiet& operator=(const Quiet&) = delete;

 private:
  int kept_;
};

/// A model of Gmsh's, empty at first and gone at the end.
class Model {
 public:
  Model() {
    gmsh::initialize(0, nullptr, false);
    gmsh::option::setNumber("General.Terminal", 0);
    gmsh::option::setNumber("General.Verbosity", 0);
    gmsh::option::setString("Geometry.OCCTargetUnit", "MM");
    gmsh::model::add("import");
  }
  ~Model() {
    try {
      gmsh::clear();
    } catch (...) {  // nothing is left to clear
    }
  }
  Model(const Model&) = delete;
  Model& operator=(const Model&) = delete;
};

struct Face {
  int tag = 0;
  double area = 0.0;  ///< mm^2
  Space centre = Space::Zero();
  Space normal = Space::UnitZ();
  std::array<double, 6> box{};

  bool holds(const Space& x) const {
    const double slack = 1e-4 * std::sqrt(area);
    for (int k = 0; k < 3; ++k)
      if (x[k] < box[k] - slack || x[k] > box[3 + k] + slack) return false;
    return std::abs(normal.dot(x - centre)) <= slack;
  }
};

/// The planar faces of the model, and the number of others.
std::vector<Face> planar_faces(std::size_t& others) {
  gmsh::vectorpair all;
  gmsh::model::getEntities(all, 2);
  std::vector<Face> faces;
  for (const auto& [dimension, tag] : all) {
    std::string type;
    gmsh::model::getType(dimension, tag, type);
    if (type != "Plane") {
      ++others;
      continue;
    }
    Face face;
    face.tag = tag;
    gmsh::model::occ::getMass(2, tag, face.area);
    gmsh::model::occ::getCenterOfMass(2, tag, face.centre.x(), face.centre.y(), face.centre.z());
    std::vector<double> low, high, normal;
    gmsh::model::getParametrizationBounds(2, tag, low, high);
    gmsh::model::getNormal(tag, {low[0], low[1]}, normal);
    face.normal = Space(normal[0], normal[1], normal[2]).normalized();
    auto& b = face.box;
    gmsh::model::getBoundingBox(2, tag, b[0], b[1], b[2], b[3], b[4], b[5]);
    faces.push_back(face);
  }
  return faces;
}

/// Axes of the plane of a face: a face across z keeps x and y.
struct Plane {
  Space first, second;
  explicit Plane(const Space& normal) {
    const Space start = std::abs(normal.x()) < 0.99 ? Space::UnitX() : Space::UnitY();
    first = (start - normal.dot(start) * normal).normalized();
    second = normal.cross(first);
    Eigen::Index largest = 0;
    second.cwiseAbs().maxCoeff(&largest);
    if (second[largest] < 0) second = -second;
  }
  Point at(const Space& x) const { return {first.dot(x), second.dot(x)}; }
};

std::vector<Point> points_on(int tag, const std::vector<double>& parameters, const Plane& plane) {
  std::vector<double> xyz;
  gmsh::model::getValue(1, tag, parameters, xyz);
  std::vector<Point> points;
  for (std::size_t k = 0; k + 2 < xyz.size(); k += 3)
    points.push_back(plane.at({xyz[k], xyz[k + 1], xyz[k + 2]}));
  return points;
}

/// The arc centre + u cos t + v sin t of a circular or elliptic edge, by least
/// squares through points on it; nothing if they do not lie on such an arc.
std::optional<Curve> arc_through(int tag, double low, double high, const Plane& plane) {
  constexpr int count = 12;
  std::vector<double> parameters;
  for (int k = 0; k < count; ++k) parameters.push_back(low + (high - low) * k / (count - 1));
  const std::vector<Point> points = points_on(tag, parameters, plane);
  Eigen::MatrixXd shapes(count, 3), places(count, 2);
  for (int k = 0; k < count; ++k) {
    shapes.row(k) << 1.0, std::cos(parameters[k]), std::sin(parameters[k]);
    places.row(k) = points[k].transpose();
  }
  const Eigen::MatrixXd fit = shapes.colPivHouseholderQr().solve(places);
  const Curve arc{Curve::Kind::arc,
                  fit.row(0).transpose(),
                  fit.row(1).transpose(),
                  fit.row(2).transpose(),
                  low,
                  high,
                  {}};
  const double size = arc.u.norm() + arc.v.norm();
  if (!((shapes * fit - places).cwiseAbs().maxCoeff() < 1e-7 * size)) return std::nullopt;
  return arc;
}

std::optional<Curve> curve_of(int tag, const std::string& type, const Plane& plane) {
  std::vector<double> low, high;
  gmsh::model::getParametrizationBounds(1, tag, low, high);
  if (type == "Circle" || type == "Ellipse") return arc_through(tag, low[0], high[0], plane);
  if (type != "Line") return std::nullopt;
  const std::vector<Point> ends = points_on(tag, {low[0], high[0]}, plane);
  return Curve{Curve::Kind::line, ends[0], ends[1] - ends[0], Point::Zero(), 0.0, 1.0, {}};
}

Diagnostic fault(const std::string& file, std::string what, std::string cure) {
  return {Diagnostic::Kind::input, file, std::nullopt, "file", "", std::move(what), std::move(cure)};
}

std::string list_of(const std::vector<Face>& faces) {
  constexpr std::size_t most = 12;
  std::string list;
  for (std::size_t k = 0; k < faces.size() && k < most; ++k)
    list += fmt::format("{}{:.6g} mm^2 about ({:.6g}, {:.6g}, {:.6g}) mm", k == 0 ? "" : "; ", faces[k].area,
                        faces[k].centre.x(), faces[k].centre.y(), faces[k].centre.z());
  if (faces.size() > most) list += fmt::format("; and {} more", faces.size() - most);
  return list;
}

/// The face asked for, or a fault.
std::optional<Face> choose(const std::vector<Face>& faces, std::size_t others, const std::string& file,
                           const std::optional<std::array<double, 3>>& face_at,
                           std::vector<Diagnostic>& faults) {
  if (faces.empty()) {
    faults.push_back(fault(file, fmt::format("there is no planar face in the file, and {} others", others),
                           "export the planar face of the part as STEP"));
    return std::nullopt;
  }
  if (!face_at && faces.size() == 1 && others == 0) return faces.front();
  std::vector<Face> fitting;
  if (face_at)
    for (const Face& face : faces)
      if (face.holds({(*face_at)[0], (*face_at)[1], (*face_at)[2]})) fitting.push_back(face);
  if (fitting.size() == 1) return fitting.front();
  const std::string what = face_at ? fmt::format("{} planar faces lie at that point", fitting.size())
                                   : fmt::format("the file has {} planar faces", faces.size());
  faults.push_back(
      fault(file, what,
            fmt::format("name a point on the face with face_at = [\"x mm\", \"y mm\", \"z mm\"]; "
                        "the planar faces are: {}",
                        list_of(faces))));
  if (face_at) faults.back().key = "face_at";
  return std::nullopt;
}

DrawingReading read_face(const Face& face, const std::string& file) {
  const Plane plane(face.normal);
  DrawingReading reading;
  Drawing drawing;
  drawing.unit = 1.0;
  drawing.unit_word = "mm";
  gmsh::vectorpair edges;
  gmsh::model::getBoundary({{2, face.tag}}, edges, false, false, false);
  for (const auto& [dimension, tag] : edges) {
    std::string type;
    gmsh::model::getType(dimension, tag, type);
    if (const auto curve = curve_of(tag, type, plane)) {
      drawing.strokes.push_back({*curve, type, "", 0});
      continue;
    }
    std::vector<double> low, high;
    gmsh::model::getParametrizationBounds(1, tag, low, high);
    const Point middle = points_on(tag, {(low[0] + high[0]) / 2}, plane).front();
    reading.faults.push_back(
        fault(file, fmt::format("the edge near ({:.6g}, {:.6g}) mm is a {}", middle.x(), middle.y(), type),
              "only lines and arcs of circles and ellipses are imported: turn it into these"));
  }
  if (reading.faults.empty()) reading.value = std::move(drawing);
  return reading;
}

}  // namespace

DrawingReading read_step(const std::filesystem::path& path, const std::string& file,
                         const std::optional<std::array<double, 3>>& face_at) {
  const std::string save = "export the part as STEP once more";
  std::ifstream content(path, std::ios::binary);
  std::string head(13, '\0');
  if (!content.read(head.data(), 13) || head != "ISO-10303-21;")
    return {std::nullopt, {fault(file, "the file does not begin as a STEP file does", save)}};
  content.close();
  const Quiet quiet;
  try {
    const Model model;
    gmsh::vectorpair shapes;
    gmsh::model::occ::importShapes(path.string(), shapes, false, "step");
    gmsh::model::occ::synchronize();
    std::size_t others = 0;
    std::vector<Diagnostic> faults;
    const std::vector<Face> faces = planar_faces(others);
    const auto face = choose(faces, others, file, face_at, faults);
    if (!face) return {std::nullopt, std::move(faults)};
    return read_face(*face, file);
  } catch (const std::string& message) {
    return {std::nullopt, {fault(file, "the STEP file cannot be read: " + message, save)}};
  } catch (const std::exception& error) {
    return {std::nullopt, {fault(file, std::string("the STEP file cannot be read: ") + error.what(), save)}};
  }
}

}  // namespace raiser::io
