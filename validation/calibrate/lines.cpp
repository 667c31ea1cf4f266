#include <fmt/format.h>

#include <iterator>
#include <sstream>
#include <stdexcept>

#include "validation/calibrate.hpp"

namespace raiser::validation {

namespace {

constexpr char separator = '\t';

std::vector<std::string> fields_of(const std::string& line) {
  std::vector<std::string> fields;
  std::istringstream in(line);
  for (std::string field; std::getline(in, field, separator);) fields.push_back(field);
  return fields;
}

std::string one_line(std::string text) {
  for (char& c : text)
    if (c == '\n' || c == separator) c = ' ';
  return text;
}

PlateTrial read_plate(const std::vector<std::string>& f) {
  PlateTrial plate;
  plate.seed = std::stoull(f.at(1));
  plate.truth = static_cast<PlateTrial::Truth>(std::stoi(f.at(2)));
  plate.is_settled = f.at(3) == "1";
  plate.degree = std::stoi(f.at(4));
  plate.refinements = std::stoi(f.at(5));
  plate.triangles = std::stoull(f.at(6));
  plate.unknowns = std::stoull(f.at(7));
  plate.truth_unknowns = std::stoull(f.at(8));
  plate.cpu_seconds = std::stod(f.at(9));
  if (f.size() > 10) plate.reason = f[10];
  return plate;
}

Trial read_trial(const std::vector<std::string>& f) {
  Trial trial;
  trial.what = static_cast<Trial::What>(std::stoi(f.at(1)));
  trial.hole = std::stoull(f.at(2));
  trial.load = f.at(3);
  trial.is_asked = f.at(4) == "1";
  trial.shape = f.at(5);
  trial.value = std::stod(f.at(6));
  trial.bound = std::stod(f.at(7));
  trial.error = std::stod(f.at(8));
  trial.doubt = std::stod(f.at(9));
  trial.scale = std::stod(f.at(10));
  trial.ligament = std::stod(f.at(11));
  return trial;
}

}  // namespace

std::string to_lines(const PlateTrial& p) {
  std::string text = fmt::format(
      "plate\t{}\t{}\t{:d}\t{}\t{}\t{}\t{}\t{}\t{}\t{}\n", p.seed, static_cast<int>(p.truth), p.is_settled,
      p.degree, p.refinements, p.triangles, p.unknowns, p.truth_unknowns, p.cpu_seconds, one_line(p.reason));
  for (const Trial& t : p.trials)
    fmt::format_to(std::back_inserter(text), "trial\t{}\t{}\t{}\t{:d}\t{}\t{}\t{}\t{}\t{}\t{}\t{}\n",
                   static_cast<int>(t.what), t.hole, t.load, t.is_asked, t.shape, t.value, t.bound, t.error,
                   t.doubt, t.scale, t.ligament);
  return text;
}

std::vector<PlateTrial> from_lines(std::string_view text) {
  std::vector<PlateTrial> plates;
  std::istringstream in{std::string(text)};
  for (std::string line; std::getline(in, line);) {
    const auto fields = fields_of(line);
    if (fields.empty()) continue;
    if (fields.front() == "plate")
      plates.push_back(read_plate(fields));
    else if (fields.front() == "trial" && !plates.empty())
      plates.back().trials.push_back(read_trial(fields));
    else
      throw std::invalid_argument("from_lines: not a plate or a trial: " + line);
  }
  return plates;
}

}  // namespace raiser::validation
