#pragma once

#include <vector>

#include "solver/adapt/bound.hpp"
#include "solver/extract/edge_scan.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {

/// The stress along every raiser's edge under all loads, by raiser: of a hole
/// anticlockwise from the point of smallest angle, elsewhere along the outline
/// (anticlockwise round the plate). `scans` are those of successive degrees on
/// the model's mesh; the last gives the values, all together the bounds.
std::vector<std::vector<EdgeSample>> edge_samples(const Model& model, const Plate& plate,
                                                  const EdgeScanner& scanner,
                                                  const std::vector<EdgeScan>& scans,
                                                  const Convergence& convergence);

/// The largest stress that what is not known of pressures makes, MPa: it is on the
/// edge that they press on. 0 where all is known.
double largest_doubt(const Model& model, const EdgeScan& scan);

/// The ligaments on every side of every raiser along the section that its
/// nominal stresses stand on, under all loads. `fields` are those of
/// successive degrees; the last gives the values. `doubt` is added to the bounds.
std::vector<Ligament> ligaments(const Plate& plate, const std::vector<Section>& sections,
                                const std::vector<Field>& fields, const Convergence& convergence,
                                double doubt = 0.0);

/// The mean of sigma_xx over the gross section x = station of the plate, and
/// its largest departure from the nominal distribution, which is `mean` at the
/// section's centroid and rises by `slope` (MPa / mm) with y.
struct FarStress {
  double mean = 0.0;
  double scatter = 0.0;
};
FarStress far_stress(const Plate& plate, const Field& field, double station, double mean, double slope);

}  // namespace raiser::solver
