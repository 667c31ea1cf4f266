#include "validation/published/records.hpp"

namespace raiser::validation {

namespace {

constexpr std::string_view roark_fit =
    "W. C. Young and R. G. Budynas, Roark's Formulas for Stress and Strain, 7th ed. (2002), Table 17.1";

std::vector<Published> infinite_plate() {
  return {
      {Reference::kirsch,
       "Kirsch 1898",
       "E. G. Kirsch, Zeitschrift des VDI 42 (1898) 797-807",
       "circular hole, infinite plate, any uniform remote stress",
       Basis::gross,
       {},
       "exact for an infinite plate",
       "exact for an infinite plate",
       1e-2,
       false,
       0.0},
      {Reference::inglis,
       "Inglis 1913",
       "C. E. Inglis, Trans. Inst. Naval Architects 55 (1913) 219-241; S. P. Timoshenko and J. N. Goodier, "
       "Theory of Elasticity, 3rd ed. (1970)",
       "elliptical hole, infinite plate, any uniform remote stress",
       Basis::gross,
       {},
       "exact for an infinite plate",
       "exact for an infinite plate",
       1e-2,
       true,
       0.0},
  };
}

std::vector<Published> central_circle() {
  return {
      {Reference::howland,
       "Howland 1930",
       "R. C. J. Howland, Phil. Trans. R. Soc. A 229 (1930) 49-86",
       "central hole, diameter d, long strip of width W; Kt on P/((W-d)t)",
       Basis::net,
       {{"d/W", 0, 0.5}},
       "about 0.5 %",
       "0.1 to 0.65 % low",
       6.5e-3,
       true,
       5e-3},
      {Reference::heywood,
       "Heywood 1952",
       "R. B. Heywood, Designing by Photoelasticity (1952)",
       "central hole, diameter d, long strip of width W; Kt on P/((W-d)t)",
       Basis::net,
       {{"d/W", 0, 0.3}},
       "about 1 % for d/W up to 0.3",
       "0 to 0.8 % low up to d/W 0.3, 3.3 % low at 0.7",
       8.2e-3,
       true,
       1e-2},
      {Reference::roark_circle,
       "Roark 17.1",
       roark_fit,
       "central hole, diameter d, long strip of width W; Kt on P/((W-d)t)",
       Basis::net,
       {{"d/W", 0, 1}},
       "none given",
       "0.1 to 0.9 % low",
       9e-3,
       true},
      {Reference::peterson_circle,
       "Peterson 4.1",
       "W. D. Pilkey and D. F. Pilkey, Peterson's Stress Concentration Factors, 3rd ed. (2008), Chart 4.1",
       "central hole, diameter d, long strip of width W; Kt on P/((W-d)t)",
       Basis::net,
       {{"d/W", 0, 1}},
       "none given",
       "0.1 % high to 1.4 % low",
       1.42e-2,
       true},
      {Reference::bending_circle,
       "Howland-Stevenson 1933",
       "R. C. J. Howland and A. C. Stevenson, Phil. Trans. R. Soc. A 232 (1933); Peterson, Chart 4.88",
       "central hole, in-plane bending; Kt = 2 on 6 M d/((W^3-d^3) t) at the hole's edge",
       Basis::nominal,
       {{"d/W", 0, 0.5}},
       "none given",
       "0 to 3.8 % high up to d/W 0.5, 4.2 % at 0.6",
       3.76e-2,
       true},
      {Reference::bending_outer_edge,
       "Howland-Stevenson 1933, outer edge",
       "R. C. J. Howland and A. C. Stevenson, Phil. Trans. R. Soc. A 232 (1933); Peterson, Chart 4.88",
       "central hole, in-plane bending; Kt = 1 on 6 M W/((W^3-d^3) t) at the outer edge",
       Basis::nominal,
       {{"d/W", 0, 0.5}},
       "none given",
       "0 to 1.9 % high up to d/W 0.5, 0.7 % low at 0.8",
       1.9e-2,
       true},
  };
}

std::vector<Published> eccentric_circle() {
  return {
      {Reference::roark_eccentric,
       "Roark 17.1 off-centre",
       roark_fit,
       "hole of radius r at c from the near edge of a strip of width W; Kt at the near side, here on P/(Wt)",
       Basis::gross,
       {{"r/c", 0, 0.5}},
       "0 < r/c < 1, no figure given",
       "within 1 % at r/c 0.2, 1 to 6 % low at 0.5, 3 to 15 % low at 0.7",
       5.6e-2,
       true},
      {Reference::sjostrom_eccentric,
       "Sjostrom 1950",
       "S. Sjostrom, FFA Report 36, Aeronautical Research Institute of Sweden (1950), read off its chart",
       "hole of radius r at c from the near and e from the far edge; Kt at the near side on P/(Wt)",
       Basis::gross,
       {},
       "chart",
       "within 0.5 %",
       5e-3,
       false},
      {Reference::half_plane,
       "Mindlin 1948, fit",
       "R. D. Mindlin, Proc. SESA 5(2) (1948) 56-68; M. Isida (1955); fit in Peterson, Chart 4.2",
       "hole of radius r at c from the edge of a half plane; Kt at the near side on the remote stress",
       Basis::gross,
       {{"r/c", 0, 0.9}},
       "none given",
       "2.7 % low to 1.9 % high",
       2.7e-2,
       true},
      {Reference::half_plane_far,
       "Mindlin 1948, fit",
       "R. D. Mindlin, Proc. SESA 5(2) (1948) 56-68; M. Isida (1955); fit in Peterson, Chart 4.2",
       "hole of radius r at c from the edge of a half plane; Kt at the far side on the remote stress",
       Basis::gross,
       {{"r/c", 0, 0.9}},
       "none given",
       "2.0 % low to 0.7 % high",
       2.1e-2,
       true},
  };
}

std::vector<Published> several_circles() {
  return {
      {Reference::ling,
       "Ling 1948",
       "Chih-Bing Ling, J. Appl. Phys. 19 (1948) 77-82",
       "two equal holes, diameter d, centre distance L, infinite plate; Kt on the remote stress",
       Basis::gross,
       {{"L/d", 1.5, 8}},
       "table",
       "0.05 % at the table's entries, between them 0.5 %; along: its point is the crown, the true peak is "
       "up to 1 % higher",
       1.05e-2,
       true,
       5e-4},
      {Reference::two_along_fit,
       "Schulz 1941, fit",
       "K. J. Schulz (1941); fit in Peterson, Chart 4.22",
       "two equal holes, tension along their line; Kt on the remote stress",
       Basis::gross,
       {{"d/L", 0, 0.67}},
       "none given",
       "0.1 to 2 % low",
       2.05e-2,
       true},
      {Reference::row_across_fit,
       "Howland 1935 row, fit",
       "R. C. J. Howland, Proc. R. Soc. A 148 (1935); fit in Peterson, Chart 4.31",
       "infinite row, diameter d, pitch L, load normal to the row; Kt on S/(1-d/L)",
       Basis::net,
       {{"d/L", 0, 0.8}},
       "none given",
       "2.4 % low to 0.6 % high",
       2.45e-2,
       true},
      {Reference::row_along_fit,
       "Howland 1935 row, fit",
       "R. C. J. Howland, Proc. R. Soc. A 148 (1935); fit in Peterson, Chart 4.32",
       "infinite row, diameter d, pitch L, load along the row; Kt on the remote stress",
       Basis::gross,
       {{"d/L", 0, 0.8}},
       "none given",
       "5.3 % low to 0.3 % high",
       5.3e-2,
       true},
  };
}

std::vector<Published> other_shapes() {
  return {
      {Reference::roark_ellipse,
       "Isida 1953, fit",
       "M. Isida, J. Japan Soc. Mech. Eng. 4 (1953); fit in Roark's Formulas for Stress and Strain, 7th ed. "
       "(2002), Table 17.1",
       "central ellipse, 2a across and 2b along the load, strip of width W; Kt on P/((W-2a)t)",
       Basis::net,
       {{"a/b", 0.5, 10}, {"2a/W", 0, 0.7}},
       "none given",
       "3.7 % low to 4.0 % high up to a/b 8, 2a/W 0.7",
       4.05e-2,
       true},
      {Reference::slot_estimate,
       "equivalent ellipse",
       "C. E. Inglis (1913) with the slot's end radius, common practice; Peterson, section 4.5",
       "slot of length 2a across the load, end radius r; Kt = 1 + 2 sqrt(a/r) on the remote stress",
       Basis::gross,
       {{"a/r", 1, 16}},
       "estimate",
       "0 to 3.7 % low",
       3.75e-2,
       true},
      {Reference::rounded_rectangle,
       "Sobey 1965, fit",
       "A. J. Sobey, ARC R&M 3407 (1965); S. R. Heller, J. S. Brock and R. Bart (1958); fit in Peterson, "
       "Chart 4.62",
       "hole 2a across by 2b along the load, corner radius r; Kt on the remote stress",
       Basis::gross,
       {{"r/b", 0.2, 1}, {"b/a", 0.3, 1}},
       "none given",
       "0.9 % low to 2.5 % high",
       2.5e-2,
       true},
      {Reference::rounded_square_biaxial,
       "computed table",
       "no published source: computed with converged finite elements for this table",
       "square hole of side s, corner radius r, equal biaxial tension; Kt on the remote stress",
       Basis::gross,
       {{"r/s", 0.05, 0.5}},
       "0.05 %",
       "0.05 % at the entries, between them 2 %",
       2e-2,
       false,
       5e-4},
      {Reference::pressure_infinite,
       "Lame 1852",
       "G. Lame, Lecons sur la theorie mathematique de l'elasticite (1852)",
       "circular hole under pressure, infinite plate; tangential stress over the pressure",
       Basis::pressure,
       {},
       "exact for an infinite plate",
       "exact for an infinite plate",
       1e-2,
       true,
       0.0},
      {Reference::pressure_ellipse,
       "Inglis 1913",
       "C. E. Inglis, Trans. Inst. Naval Architects 55 (1913) 219-241",
       "elliptical hole under pressure, infinite plate: 2a/b - 1 at the end of a; over the pressure",
       Basis::pressure,
       {},
       "exact for an infinite plate",
       "exact for an infinite plate",
       1e-2,
       true,
       0.0},
      {Reference::pressure_half_plane,
       "Jeffery 1921",
       "G. B. Jeffery, Phil. Trans. R. Soc. A 221 (1921) 265",
       "circular hole under pressure, centre at c from a straight free edge; tangential stress over the "
       "pressure, q = c/r: (q^2+1)/(q^2-1) the largest on the hole, 4/(q^2-1) on the edge opposite",
       Basis::pressure,
       {{"c/r", 1.2, 1e9}},
       "exact",
       "within 0.2 %",
       2e-3,
       true,
       0.0},
      {Reference::pressure_ring,
       "Lame 1852",
       "G. Lame, Lecons sur la theorie mathematique de l'elasticite (1852)",
       "ring of radii a and b under inner pressure; tangential stress at a over the pressure",
       Basis::pressure,
       {},
       "exact",
       "exact",
       1e-6,
       true,
       0.0},
  };
}

std::vector<Published> all() {
  std::vector<Published> list;
  for (auto& part :
       {infinite_plate(), central_circle(), eccentric_circle(), several_circles(), other_shapes(),
        notch_records(), step_and_lug_records(), strip_crack_records(), hole_crack_records()}) {
    list.insert(list.end(), part.begin(), part.end());
  }
  return list;
}

}  // namespace

const std::vector<Published>& published() {
  static const std::vector<Published> list = all();
  return list;
}

const Published& record(Reference reference) { return published().at(static_cast<std::size_t>(reference)); }

bool covers(const Published& record, const std::vector<Parameter>& parameters) {
  for (const Limit& limit : record.limits)
    for (const Parameter& p : parameters) {
      const double slack = 1e-9 * (limit.high - limit.low);
      const bool within = p.value >= limit.low - slack && p.value <= limit.high + slack;
      if (p.name == limit.parameter && !within) return false;
    }
  return true;
}

}  // namespace raiser::validation
