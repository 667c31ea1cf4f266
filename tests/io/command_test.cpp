#include <gtest/gtest.h>
#include <stdlib.h>

#include <filesystem>
#include <fstream>
#include <sstream>

#include "io/command/files.hpp"
#include "io/command/options.hpp"
#include "io/command/run.hpp"
#include "io/command/speech.hpp"
#include "tests/io/scratch.hpp"
#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

namespace fs = std::filesystem;

Options options(const std::vector<std::string>& arguments) {
  const auto parsed = parse(arguments);
  const auto* found = std::get_if<Options>(&parsed);
  return found == nullptr ? Options{} : *found;
}

Reply reply(const std::vector<std::string>& arguments) {
  const auto parsed = parse(arguments);
  const auto* found = std::get_if<Reply>(&parsed);
  return found == nullptr ? Reply{"understood", Exit::undefined} : *found;
}

TEST(CommandLine, IsUnderstood) {
  const Options plain = options({"solve", "a.toml"});
  EXPECT_EQ(plain.command, Options::Command::solve);
  EXPECT_EQ(plain.cases, std::vector<fs::path>{"a.toml"});
  EXPECT_FALSE(plain.folder || plain.json || plain.quiet);
  EXPECT_TRUE(plain.files);
  const Options full = options({"solve", "--out", "x", "a.toml", "b.toml", "--json", "-q", "--no-files"});
  EXPECT_EQ(full.cases.size(), 2U);
  EXPECT_EQ(full.folder, fs::path("x"));
  EXPECT_TRUE(full.json && full.quiet);
  EXPECT_FALSE(full.files);
  EXPECT_EQ(options({"check", "a.toml"}).command, Options::Command::check);
  EXPECT_EQ(options({"solve", "--", "-a.toml"}).cases, std::vector<fs::path>{"-a.toml"});
}

TEST(CommandLine, SaysWhatIsWrongAndWhereHelpIs) {
  EXPECT_EQ(reply({"solve"}).code, Exit::usage);
  EXPECT_EQ(reply({"solve"}).text, "raiser solve: no case file is named; see raiser solve --help\n");
  EXPECT_NE(reply({"solve", "a", "--fast"}).text.find("--fast"), std::string::npos);
  EXPECT_EQ(reply({"solve", "a", "--out", ""}).code, Exit::usage);
  const std::string cure =
      "; write raiser solve CASE..., raiser check CASE..., raiser grow CASE or raiser validate; see raiser "
      "--help\n";
  EXPECT_EQ(reply({"slove", "a.toml"}).text, "raiser: \"slove\" is no command" + cure);
  EXPECT_EQ(reply({"--"}).text, "raiser: no command is given" + cure);
  EXPECT_EQ(reply({"--help"}).code, Exit::settled);
}

TEST(CommandLine, HelpNamesEveryOption) {
  for (const char* option : {"--out", "--json", "--quiet", "--no-files"}) {
    EXPECT_NE(reply({"solve", "--help"}).text.find(option), std::string::npos) << option;
  }
}

TEST(Targets, LieBesideTheCaseOrInTheFolder) {
  EXPECT_EQ(target_of("plates/a.toml", "").folder, fs::path("plates"));
  EXPECT_EQ(target_of("plates/a.toml", "").stem, "a");
  EXPECT_EQ(target_of("plates/a.b.toml", "out").folder, fs::path("out"));
  EXPECT_EQ(target_of("plates/a.b.toml", "out").stem, "a.b");
}

TEST(Targets, ClashOnlyWhenTheyAreTheSameFile) {
  EXPECT_TRUE(clashes({"x/a.toml", "y/a.toml", "x/b.toml"}, "").empty());
  EXPECT_EQ(clashes({"x/a.toml", "y/a.toml", "z/a.toml"}, "out").size(), 2U);
  EXPECT_EQ(clashes({"x/a.toml", "x/../x/a.txt"}, "").size(), 1U);
  EXPECT_EQ(clashes({"a.json"}, "").size(), 1U) << "its result would replace it";
  EXPECT_EQ(clashes({"a.toml", "a-edge.csv"}, "").size(), 1U);
  EXPECT_TRUE(clashes({"a.json"}, "out").empty());
}

TEST(Run, SolvesACaseToTheStreamsItIsGiven) {
  const test::ScratchFolder folder;
  const std::string strap = folder.file("strap.toml", test::one_hole).string();
  std::ostringstream out, err;
  EXPECT_EQ(run({"solve", strap}, out, err), Exit::settled) << err.str();
  EXPECT_NE(out.str().find("Kt gross"), std::string::npos);
  EXPECT_LE(test::widest(out.str()), 80U) << out.str();
  for (const std::string& suffix : result_suffixes()) {
    if (suffix == "-tips.csv") continue;  // of cracks only
    EXPECT_GT(fs::file_size(folder / ("strap" + suffix)), 100U) << suffix;
  }
}

TEST(Output, SaysThatItFailed) {
  std::ostringstream out, err;
  Output output(out);
  output.say("one");
  EXPECT_EQ(output.ended(Exit::not_met, err), Exit::not_met);
  EXPECT_EQ(err.str(), "");
  out.setstate(std::ios::badbit);
  output.say("two");
  EXPECT_EQ(output.ended(Exit::settled, err), Exit::not_written);
  EXPECT_NE(err.str().find("cannot write to standard output"), std::string::npos);
}

}  // namespace
}  // namespace raiser::io
