#include "tests/io/solved.hpp"

#include <algorithm>
#include <map>
#include <sstream>
#include <stdexcept>

#include "io/write/layout.hpp"

namespace raiser::io::test {

// Invented data.
const char* const one_hole = R"toml(raiser = 1
title = "Strap, one hole (invented data)"
[plate]
length = "200 mm"
width = "50 mm"
thickness = "4 mm"
[material]
youngs_modulus = "70 GPa"
poissons_ratio = 0.33
yield_strength = "120 MPa"
[[hole]]
name = "pin"
shape = "circle"
diameter = "10 mm"
[[load]]
kind = "tension"
stress = "50 MPa"
)toml";

// Invented data.
const char* const two_holes = R"toml(raiser = 1
title = "Pump bracket, two holes (invented data)"
[plate]
length = "300 mm"
width = "80 mm"
thickness = "5 mm"
[material]
youngs_modulus = "210 GPa"
poissons_ratio = 0.3
[[hole]]
name = "inlet, left"
shape = "circle"
diameter = "12 mm"
at = ["-40 mm", "0 mm"]
[[hole]]
name = "outlet"
shape = "ellipse"
length = "20 mm"
width = "10 mm"
angle = "90 deg"
at = ["50 mm", "0 mm"]
[[load]]
name = "pull"
kind = "tension"
stress = "80 MPa"
[[load]]
name = "bend"
kind = "bending"
stress = "30 MPa"
[ask]
tolerance = "0.5 %"
[[ask.result]]
name = "peak at the outlet"
of = "largest edge stress"
hole = "outlet"
tolerance = "0.1 %"
)toml";

Case case_from(const std::string& content) {
  CaseReading reading = read_case_text(content, "case.toml");
  std::string faults;
  for (const Diagnostic& fault : reading.faults) faults += text(fault) + "\n";
  if (!reading.value) throw std::runtime_error(faults);
  return *std::move(reading.value);
}

Result solved(const std::string& content) {
  static std::map<std::string, Result> kept;
  const auto found = kept.find(content);
  if (found != kept.end()) return found->second;
  Case input = case_from(content);
  solver::Solution solution = solver::settle(input.problem, input.asks);
  std::vector<validation::Comparison> published = validation::compare(input.problem, solution);
  Result result{std::move(input), std::move(solution), std::move(published),
                provenance("case.toml", content)};
  return kept.emplace(content, std::move(result)).first->second;
}

std::size_t widest(const std::string& content) {
  std::istringstream lines(content);
  std::size_t widest = 0;
  for (std::string line; std::getline(lines, line);) widest = std::max(widest, columns(line));
  return widest;
}

}  // namespace raiser::io::test
