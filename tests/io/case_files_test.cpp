#include <gtest/gtest.h>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <sstream>
#include <string>
#include <vector>

#include "io/case/case.hpp"

using namespace raiser::io;

namespace {

const std::filesystem::path source = RAISER_SOURCE_DIR;

std::vector<std::filesystem::path> files_in(const std::filesystem::path& folder) {
  std::vector<std::filesystem::path> files;
  for (const auto& entry : std::filesystem::directory_iterator(folder)) files.push_back(entry.path());
  std::sort(files.begin(), files.end());
  return files;
}

std::string content_of(const std::filesystem::path& file) {
  std::ifstream stream(file, std::ios::binary);
  return {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
}

/// The lines "# expect: 7:3 fragment" at the top of a case.
std::vector<std::string> expectations(const std::string& content) {
  constexpr std::string_view mark = "# expect: ";
  std::vector<std::string> result;
  std::istringstream lines(content);
  for (std::string line; std::getline(lines, line);) {
    if (line.starts_with(mark)) result.push_back(line.substr(mark.size()));
  }
  return result;
}

/// "7:3 hole.diameter = "18": a length needs a unit; ...": as expected lines are written.
std::string without_file(const Diagnostic& fault) {
  const std::string line = text(fault).substr(fault.file.size() + 1);
  const std::size_t colon = line.find(": ");
  return line.substr(0, colon) + line.substr(colon + 1);
}

}  // namespace

TEST(CaseFiles, ExamplesAndGoodCasesAreAccepted) {
  std::size_t count = 0;
  for (const auto& folder : {source / "examples", source / "tests/io/cases/good"}) {
    for (const auto& file : files_in(folder)) {
      if (file.extension() != ".toml") continue;
      const auto reading = read_case(file);
      EXPECT_TRUE(reading.value) << (reading.faults.empty() ? "" : text(reading.faults.front()));
      ++count;
    }
  }
  EXPECT_GE(count, 8U);
}

TEST(CaseFiles, EveryFaultOfABadCaseIsFoundAtItsPlace) {
  const auto files = files_in(source / "tests/io/cases/bad");
  EXPECT_GE(files.size(), 100U);
  for (const auto& file : files) {
    const auto expected = expectations(content_of(file));
    const auto reading = read_case(file);
    EXPECT_FALSE(reading.value) << file;
    EXPECT_FALSE(expected.empty()) << file;
    ASSERT_EQ(reading.faults.size(), expected.size()) << file;
    for (std::size_t i = 0; i < expected.size(); ++i) {
      EXPECT_TRUE(without_file(reading.faults[i]).starts_with(expected[i]))
          << file << "\n  expected " << expected[i] << "\n  found    " << without_file(reading.faults[i]);
      EXPECT_FALSE(reading.faults[i].cure.empty()) << file;
    }
  }
}

TEST(CaseFiles, WhatFuzzingFoundIsReadWithoutHarm) {
  const auto files = files_in(source / "tests/fuzz/corpus");
  EXPECT_GE(files.size(), 20U);
  for (const auto& file : files) {
    const auto reading = read_case_text(content_of(file), file.filename().string());
    EXPECT_NE(reading.value.has_value(), !reading.faults.empty()) << file;
    for (const Diagnostic& fault : reading.faults) {
      EXPECT_EQ(text(fault).find('\n'), std::string::npos) << file;
      EXPECT_FALSE(fault.what.empty()) << file;
      EXPECT_FALSE(fault.cure.empty()) << file;
    }
  }
}
