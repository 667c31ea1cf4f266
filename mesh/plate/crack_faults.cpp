#include "mesh/plate/crack_faults.hpp"

#include <fmt/format.h>

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <optional>

#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

// Relative to the plate's longer side: a mouth that misses its edge by more
// lies on none, and a segment shorter than the second cannot be resolved.
constexpr double mouth_misses = 1e-6;
constexpr double shortest_segment = 1e-7;
// Distance of a tip from everything else over the length of its segment.
constexpr double closest_tip = 1e-4;
constexpr double sharpest_kink = 150.0;  // degrees of turning

struct Segment {
  Point from, to;
  Point along() const { return to - from; }
};

double cross(const Point& a, const Point& b) { return a.x() * b.y() - a.y() * b.x(); }

std::string at(const Point& p) { return fmt::format("({:.6g}, {:.6g}) mm", p.x(), p.y()); }

/// Positions on a segment, from 0 to 1, where it meets a curve.
std::vector<double> meetings(const Segment& segment, const Curve& curve) {
  std::vector<double> found;
  const Point d = segment.along();
  if (curve.kind == Curve::Kind::line) {
    const Point e = (curve.end - curve.begin) * curve.u;
    const Point gap = curve.at(curve.begin) - segment.from;
    const double denominator = cross(d, e);
    if (denominator == 0.0) return found;
    const double s = cross(gap, e) / denominator;
    const double t = cross(gap, d) / denominator;
    if (s >= 0 && s <= 1 && t >= 0 && t <= 1) found.push_back(s);
    return found;
  }
  // In the arc's own axes it is a unit circle.
  Eigen::Matrix2d axes;
  axes << curve.u, curve.v;
  const double area = axes.determinant();
  const auto own = [&](const Point& p) { return Point(cross(p, curve.v) / area, cross(curve.u, p) / area); };
  const Point start = own(segment.from - curve.centre);
  const Point step = own(d);
  const double a = step.squaredNorm();
  const double b = start.dot(step);
  const double root = b * b - a * (start.squaredNorm() - 1);
  if (!(root >= 0) || a == 0.0) return found;
  for (const double sign : {-1.0, 1.0}) {
    const double s = (-b + sign * std::sqrt(root)) / a;
    if (!(s >= 0 && s <= 1)) continue;
    const Point p = segment.from + s * d;
    const Nearest near = nearest(curve, p);
    if (near.distance < 1e-9 * (curve.u.norm() + curve.v.norm())) found.push_back(s);
  }
  return found;
}

class CrackCheck {
 public:
  CrackCheck(const Plate& plate, std::size_t crack, const Region& uncracked, std::vector<PlateFault>& faults)
      : plate_(plate),
        index_(crack),
        crack_(plate.cracks[crack]),
        who_(label(plate.cracks, crack)),
        size_(std::max(plate.length, plate.width)),
        region_(uncracked),
        faults_(faults) {}

  void run() {
    if (!has_sound_points() || !has_sound_mouth()) return;
    const std::size_t before = faults_.size();
    check_edges();
    check_self();
    for (std::size_t other = 0; other < index_; ++other) check_other(other);
    if (faults_.size() == before) check_room();
  }

 private:
  void report(std::string what, std::string cure) {
    faults_.push_back(
        {PlateFault::none, PlateFault::none, who_ + " " + std::move(what), std::move(cure), index_});
  }

  std::vector<Segment> segments(const Crack& crack) const {
    std::vector<Segment> result;
    for (std::size_t k = 1; k < crack.points.size(); ++k)
      result.push_back({crack.points[k - 1], crack.points[k]});
    return result;
  }

  bool has_sound_points() {
    const std::size_t before = faults_.size();
    if (crack_.points.size() < 2) report("has fewer than two points", "give at least two points");
    for (const Point& p : crack_.points)
      if (!p.allFinite()) report(fmt::format("has a point at {}", at(p)), "give finite coordinates");
    if (faults_.size() > before) return false;
    const std::vector<Segment> own = segments(crack_);
    for (std::size_t k = 0; k < own.size(); ++k) {
      if (own[k].along().norm() < shortest_segment * size_)
        report(fmt::format("has a segment of {:.3g} mm at {}: too short beside the plate",
                           own[k].along().norm(), at(own[k].from)),
               fmt::format("give at least {:.3g} mm, or leave the point out", shortest_segment * size_));
      if (k == 0) continue;
      const double turn = std::abs(
          std::atan2(cross(own[k - 1].along(), own[k].along()), own[k - 1].along().dot(own[k].along())));
      if (turn * 180 / M_PI > sharpest_kink)
        report(fmt::format("folds back by {:.4g} deg at {}", turn * 180 / M_PI, at(own[k].from)),
               fmt::format("let it turn by at most {:g} deg at a point", sharpest_kink));
    }
    return faults_.size() == before;
  }

  bool has_sound_mouth() {
    if (!crack_.has_mouth) return true;
    double least = std::numeric_limits<double>::infinity();
    for (const Loop& loop : region_.loops)
      for (const Curve& curve : loop) least = std::min(least, nearest(curve, crack_.points.front()).distance);
    if (least <= mouth_misses * size_) return true;
    report(
        fmt::format("has its mouth at {}, {:.4g} mm from the nearest edge", at(crack_.points.front()), least),
        "begin it on an edge of the plate or of a hole, or let it lie inside with a tip at either end");
    return false;
  }

  std::string name_of(const Owner& owner) const {
    if (owner.kind == Owner::Kind::edge) return fmt::format("the {} edge", edge_names(plate_)[owner.index]);
    const Raiser at = raiser(plate_, owner.index);
    return fmt::format("{} '{}'", word(at.kind), at.name);
  }

  /// Whether a point lies in the material: a ray from it meets the boundary an
  /// odd number of times.
  bool is_inside(const Point& p) const {
    const Segment ray{p, p + 10 * size_ * Point(0.9613, 0.2754)};
    std::size_t count = 0;
    for (const Loop& loop : region_.loops)
      for (const Curve& curve : loop) count += meetings(ray, curve).size();
    return count % 2 == 1;
  }

  void check_edges() {
    const std::vector<Segment> own = segments(crack_);
    std::optional<std::string> first;
    for (std::size_t k = 0; k < own.size(); ++k) {
      std::optional<std::pair<double, std::string>> nearest_meeting;
      for (const Loop& loop : region_.loops)
        for (const Curve& curve : loop)
          for (const double s : meetings(own[k], curve)) {
            const bool is_mouth =
                crack_.has_mouth && k == 0 && s * own[k].along().norm() <= 2 * mouth_misses * size_;
            if (is_mouth || (nearest_meeting && nearest_meeting->first <= s)) continue;
            nearest_meeting = {s, name_of(curve.owner)};
          }
      if (!nearest_meeting) continue;
      report(fmt::format("meets {} at {}", nearest_meeting->second,
                         at(own[k].from + nearest_meeting->first * own[k].along())),
             "shorten or turn it: a crack may begin at an edge, but must end within the material");
      return;
    }
    if (!is_inside((own[0].from + own[0].to) / 2))
      report(fmt::format("lies outside the material at {}", at((own[0].from + own[0].to) / 2)),
             crack_.has_mouth ? "let it run into the plate: turn its direction round"
                              : "move it; positions count from the plate's centre");
  }

  std::optional<Point> meeting(const Segment& a, const Segment& b) const {
    const Curve line{Curve::Kind::line, b.from, b.along(), Point::Zero(), 0.0, 1.0, {}};
    if (const auto found = meetings(a, line); !found.empty()) return a.from + found[0] * a.along();
    // Parallel, or an end that just touches.
    constexpr double touch = 1e-9;
    for (const Point& end : {b.from, b.to}) {
      const Curve own{Curve::Kind::line, a.from, a.along(), Point::Zero(), 0.0, 1.0, {}};
      if (nearest(own, end).distance <= touch * size_) return end;
    }
    for (const Point& end : {a.from, a.to})
      if (nearest(line, end).distance <= touch * size_) return end;
    return std::nullopt;
  }

  void check_self() {
    const std::vector<Segment> own = segments(crack_);
    for (std::size_t i = 0; i < own.size(); ++i)
      for (std::size_t k = i + 2; k < own.size(); ++k)
        if (const auto found = meeting(own[i], own[k])) {
          report(fmt::format("meets itself at {}", at(*found)), "leave room between its segments");
          return;
        }
  }

  void check_other(std::size_t other) {
    for (const Segment& a : segments(crack_))
      for (const Segment& b : segments(plate_.cracks[other])) {
        if (!b.from.allFinite() || !b.to.allFinite()) continue;
        if (const auto found = meeting(a, b)) {
          report(
              fmt::format("meets {} at {}", label(plate_.cracks, other), at(*found)),
              "move one of them: cracks that join or cross are not covered; two that form one chain are one "
              "crack");
          return;
        }
      }
  }

  /// The tips need room for triangles about them.
  void check_room() {
    Plate alone = plate_;
    alone.cracks = {crack_};
    const Region region = trace(alone);
    for (const RegionTip& tip : region.tips) {
      const std::vector<Segment> own = segments(crack_);
      const Segment& last = tips(alone.cracks)[tip.tip].at_end ? own.back() : own.front();
      if (tip.reach < closest_tip * last.along().norm())
        report(fmt::format("leaves a ligament of {:.3g} mm at its tip {}: too thin to resolve", tip.reach,
                           at(tip.at)),
               fmt::format("leave at least {:.3g} mm ({:g} of the crack's last segment)",
                           closest_tip * last.along().norm(), closest_tip));
    }
  }

  const Plate& plate_;
  std::size_t index_;
  const Crack& crack_;
  std::string who_;
  double size_;
  const Region& region_;
  std::vector<PlateFault>& faults_;
};

}  // namespace

std::vector<PlateFault> crack_faults(const Plate& plate) {
  std::vector<PlateFault> faults;
  if (plate.cracks.empty()) return faults;
  Plate uncracked = plate;
  uncracked.cracks.clear();
  const Region region = trace(uncracked);
  for (std::size_t i = 0; i < plate.cracks.size(); ++i) {
    CrackCheck(plate, i, region, faults).run();
    for (std::size_t k = 0; k < i; ++k)
      if (!plate.cracks[i].name.empty() && plate.cracks[k].name == plate.cracks[i].name)
        faults.push_back(
            {PlateFault::none, PlateFault::none,
             fmt::format("cracks {} and {} are both named '{}'", k + 1, i + 1, plate.cracks[i].name),
             "give each crack a name of its own", i});
  }
  return faults;
}

}  // namespace raiser::mesh
