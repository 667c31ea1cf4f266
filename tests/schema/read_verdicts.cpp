// Reads the case files named on standard input, one a line, and prints for
// each what the reader makes of it: "file<TAB>ok", or a line
// "file<TAB>kind<TAB>message" for every fault. For schema_test.py.

#include <iostream>
#include <string>

#include "io/case/case.hpp"

int main() {
  using raiser::io::Diagnostic;
  for (std::string file; std::getline(std::cin, file);) {
    const auto reading = raiser::io::read_case(file);
    if (reading.value) std::cout << file << "\tok\n";
    for (const Diagnostic& fault : reading.faults) {
      const bool input = fault.kind == Diagnostic::Kind::input;
      std::cout << file << '\t' << (input ? "input" : "physics") << '\t' << text(fault) << '\n';
    }
  }
}
